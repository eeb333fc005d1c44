"""Reference values for striplines and coplanar lines.

Exact cases by elliptic integrals to 30 digits (mpmath). Others by solutions of the field that go another way than the solver's: in the domain of
wave numbers, with the charge on a strip, or the field in a gap, in Chebyshev polynomials over the root that its edges have. Those hold to about 1e-5.
"""

import math

import mpmath as mp

from support import LIGHT, check, exact, write

mp.mp.dps = 50
MU0 = mp.mpf("1.25663706127e-6")
ETA0 = MU0 * LIGHT

# Wave numbers times half a width, with Gauss and Legendre's weights; beyond, the tail's mean is added in closed form.
POINTS, WEIGHTS = [], []
NODES = [(-0.8611363115940526, 0.34785484513745385), (-0.33998104358485626, 0.6521451548625461), (0.33998104358485626, 0.6521451548625461), (0.8611363115940526, 0.34785484513745385)]
EDGES = [0.05 * k for k in range(40)] + [2 + 0.5 * k for k in range(1, 1197)]
for left, right in zip(EDGES, EDGES[1:]):
    for place, weight in NODES:
        POINTS.append(0.5 * (right - left) * place + 0.5 * (left + right))
        WEIGHTS.append(0.5 * (right - left) * weight)
LAST = EDGES[-1]
ORDERS = 8


def bessel_columns():
    """J_n of every point, by backward recurrence."""
    columns = []
    for u in POINTS:
        start = ORDERS + 20 + int(u + 12 * (u + 1) ** (1 / 3))
        above, now, values, total = 0.0, 1e-300, [0.0] * (ORDERS + 1), 0.0
        for n in range(start, -1, -1):
            if n <= ORDERS:
                values[n] = now
            if n % 2 == 0:
                total += now if n == 0 else 2 * now
            above, now = now, 2 * n / u * now - above
            if abs(now) > 1e200:
                above, now, total, values = above * 1e-200, now * 1e-200, total * 1e-200, [each * 1e-200 for each in values]
        columns.append([each / total for each in values])
    return columns


BESSEL = bessel_columns()


def solve(matrix, side):
    return mp.lu_solve(mp.matrix(matrix), mp.matrix(side))


def strip_between_planes(w, b, offset):
    """C/eps of a strip without thickness: charge in T(2n), Green's function 1/(k (coth k h1 + coth k h2))."""
    h1, h2 = 0.5 * b + offset, 0.5 * b - offset
    count = ORDERS // 2 + 1
    def green(u):
        k = 2 * u / w
        return 1 / (u * (1 / math.tanh(k * h1) + 1 / math.tanh(k * h2)))
    weights = [weight * green(u) for u, weight in zip(POINTS, WEIGHTS)]
    matrix = [[sum(weight * (-1) ** (m + n) * values[2 * m] * values[2 * n] for weight, values in zip(weights, BESSEL)) + 1 / (2 * math.pi * LAST) for n in range(count)] for m in range(count)]
    solution = solve(matrix, [1] + [0] * (count - 1))
    return mp.pi * solution[0]


def gap_field(w, s, below):
    """C/eps0 of a coplanar line: field of the gap in T(n); `below(k)` is the admittance of what lies below, that of air above being 1."""
    middle = 0.5 * (w + s)
    half = 0.5 * s
    count = ORDERS
    rows = []
    for u, weight, values in zip(POINTS, WEIGHTS, BESSEL):
        k = u / half
        phase = k * middle
        waves = [math.pi * half * values[n] * (math.sin(phase) if n % 4 == 0 else math.cos(phase) if n % 4 == 1 else -math.sin(phase) if n % 4 == 2 else -math.cos(phase)) for n in range(count)]
        rows.append((weight * 4 * (1 + below(k)) / (math.pi * u), waves))
    # The tail: squares of sine and cosine are a half in the mean, J_n^2 2/(pi u) times a half again. Orders n and n + 2
    # change sign both in J_n and in the wave, so their products have the same sign; even and odd orders do not mix there.
    tail = 4 * (1 + below(LAST / half)) / math.pi * (math.pi * half) ** 2 * 0.5 / math.pi / LAST
    matrix = [[sum(weight * waves[m] * waves[n] for weight, waves in rows) + (tail if (m - n) % 2 == 0 else 0) for n in range(count)] for m in range(count)]
    voltage = [math.pi * half] + [0] * (count - 1)
    solution = solve(matrix, voltage)
    return 1 / (solution[0] * math.pi * half)


def ratio(k, complement):
    return mp.ellipk(k * k) / mp.ellipk(complement * complement)


def line(kind, er, **dimensions):
    return {"kind": kind, **dimensions, "conductor": "perfect", "dielectric": {"relative_permittivity": er}}


def stripline_checks():
    source = "Cohn, IRE Trans. MTT-2 (1954) 52-57 (from memory); elliptic integrals to 30 digits"
    for w, b, er in ((1e-3, 1e-3, 2.2), (1e-4, 2e-3, 4.3), (5e-3, 1e-3, 1), (2e-7, 2e-3, 9.8), (0.1, 1e-3, 2.2)):
        x = mp.pi * exact(w) / (2 * exact(b))
        with mp.workdps(200):
            z = ETA0 / (4 * mp.sqrt(exact(er))) * ratio(1 / mp.cosh(x), mp.tanh(x))
        given = {"line": line("stripline", er, width_m=w, plane_spacing_m=b), "frequency_hz": 1e9}
        yield check("lines/secondary-constants", f"stripline w/b = {w / b:g}, permittivity {er}", source, given, {"/characteristic_impedance_ohm": mp.mpc(z), "/phase_velocity_m_per_s": LIGHT / mp.sqrt(exact(er))}, 1e-12)
    given = {"line": line("stripline", 2.2, width_m=1e-3, plane_spacing_m=1e-3), "frequency_hz": 1e9}
    limit = LIGHT / (mp.sqrt(exact(2.2)) * (2 * exact(1e-3) + mp.pi / 2 * exact(1e-3)))
    yield check("lines/primary-constants", "stripline: first higher mode", "half a wave in 2 w + pi b/2 (Vendelin, Limitations on stripline Q, Microwave Journal 13 (1970) 63-69, from memory)", given, {"/single_mode_limit_hz": limit}, 1e-12)
    for w_b in (0.2, 0.5, 1, 2):
        for offset in (0.0, 0.1, 0.25, 0.35):
            c = strip_between_planes(w_b, 1.0, offset)
            z = ETA0 / (mp.sqrt(exact(2.2)) * c)
            given = {"line": line("stripline", 2.2, width_m=w_b * 1e-3, plane_spacing_m=1e-3, offset_m=offset * 1e-3), "frequency_hz": 1e9}
            yield check("lines/secondary-constants", f"stripline w/b = {w_b:g}, {offset:g} b off centre", "field in the domain of wave numbers, charge in Chebyshev polynomials (Itoh, Numerical Techniques for Microwave Passive Structures, 1989, chapter 5, from memory), good to 1e-5", given, {"/characteristic_impedance_ohm": mp.mpc(z)}, 5e-5)
    for w_b in (0.1, 0.2, 0.5, 1, 2):
        for t_b in (0.01, 0.05, 0.1, 0.2):
            z = wheeler(w_b, t_b)
            given = {"line": line("stripline", 2.2, width_m=w_b * 1e-3, plane_spacing_m=1e-3, thickness_m=t_b * 1e-3), "frequency_hz": 1e9}
            yield check("lines/secondary-constants", f"stripline w/b = {w_b:g}, t/b = {t_b:g}", "Wheeler, Transmission-line properties of a strip line between parallel planes, IEEE Trans. MTT-26 (1978) 866-876 (from memory), whose formula is good to 0.55 % from w/b = 0.1", given, {"/characteristic_impedance_ohm": mp.mpc(z / mp.sqrt(exact(2.2)))}, 5.5e-3)
    # Far from the edges the field of a very wide strip is that of plates: the middle adds 1/h1 + 1/h2 of its width.
    wide = {"line": line("stripline", 2.2, width_m=1.0, plane_spacing_m=1e-3, thickness_m=1e-4, offset_m=1e-4), "frequency_hz": 1e6}
    yield check("lines/primary-constants", "stripline a thousand times as wide as high", "C = eps w (1/h1 + 1/h2), the edges being a thousandth", wide, {"/capacitance_f_per_m": exact(2.2) / (MU0 * LIGHT**2) * 1000 * (1 / mp.mpf("0.35") + 1 / mp.mpf("0.55"))}, 2e-3)
    thick = {"line": {"kind": "stripline", "width_m": 2e-4, "plane_spacing_m": 6e-4, "thickness_m": 1.8e-5, "conductor": "copper"}, "frequency_hz": 0}
    yield check("lines/primary-constants", "stripline at direct current", "rho/(w t), IEC 60028:1925", thick, {"/resistance_ohm_per_m": 1 / (mp.mpf(58e6) * exact(2e-4) * exact(1.8e-5)), "/conductance_s_per_m": mp.mpf(0)}, 1e-12)
    # Between wide planes the current of a wide strip spreads over its two faces and the two planes.
    broad = {"line": {"kind": "stripline", "width_m": 0.5, "plane_spacing_m": 1e-3, "thickness_m": 1e-4, "conductor": "copper"}, "frequency_hz": 1e10}
    rs = mp.sqrt(mp.pi * 10**10 * MU0 / mp.mpf(58e6))
    yield check("lines/primary-constants", "resistance of a very wide stripline", "two lines of Rs/w strip and Rs/w plane in parallel: R = Rs/w, the edges being a few thousandths", broad, {"/resistance_ohm_per_m": rs / mp.mpf("0.5")}, 1e-2)


def wheeler(w, t):
    """Zc in vacuum with b = 1."""
    x = mp.mpf(t)
    m = 6 / (3 + 2 * x / (1 - x))
    wider = x / (mp.pi * (1 - x)) * (1 - mp.log((x / (2 - x)) ** 2 + (mp.mpf("0.0796") * x / (mp.mpf(w) + mp.mpf("1.1") * x)) ** m) / 2)
    a = mp.mpf(w) / (1 - x) + wider
    q = 8 / (mp.pi * a)
    return 30 * mp.log(1 + q / 2 * (q + mp.sqrt(q * q + mp.mpf("6.27"))))


def coplanar_checks():
    source = "Wen, IEEE Trans. MTT-17 (1969) 1087-1090 (from memory); elliptic integrals to 30 digits"
    for w, s, er in ((6e-4, 2e-4, 1), (1e-4, 5e-4, 9.8), (1e-3, 1e-6, 12.9), (1e-6, 1e-3, 4.3)):
        k = exact(w) / (exact(w) + 2 * exact(s))
        effective = (exact(er) + 1) / 2
        z = ETA0 / (4 * mp.sqrt(effective)) * ratio(mp.sqrt(1 - k * k), k)
        given = {"line": line("coplanar", er, width_m=w, gap_m=s), "frequency_hz": 1e9}
        yield check("lines/secondary-constants", f"coplanar line on a half space, w/s = {w / s:g}", source, given, {"/characteristic_impedance_ohm": mp.mpc(z), "/phase_velocity_m_per_s": LIGHT / mp.sqrt(effective)}, 1e-12)
        yield check("lines/primary-constants", f"coplanar line on a half space, w/s = {w / s:g}", source, given, {"/effective_permittivity": effective}, 1e-12)
    # A half space is half of the field: C = eps0 (1 + er (1 - j tan d)) c0/2, so G/(omega C) = er tan d/(1 + er).
    for er, tangent in ((4.3, 0.02), (12.9, 0.002)):
        k = exact(3e-4) / exact(7e-4)
        capacitance = (1 + exact(er)) / (MU0 * LIGHT**2) * 2 * ratio(k, mp.sqrt(1 - k * k))
        lossy = {"kind": "coplanar", "width_m": 3e-4, "gap_m": 2e-4, "conductor": "perfect", "dielectric": {"relative_permittivity": er, "loss_tangent": tangent}}
        given = {"line": lossy, "frequency_hz": 1e9}
        yield check("lines/primary-constants", f"loss of a substrate without end, permittivity {er}", source, given, {"/conductance_s_per_m": 2 * mp.pi * 10**9 * capacitance * exact(er) * exact(tangent) / (1 + exact(er)), "/capacitance_f_per_m": capacitance}, 1e-12)
    method = "field in the domain of wave numbers, the gap's field in Chebyshev polynomials (Itoh, Numerical Techniques for Microwave Passive Structures, 1989, chapter 5, from memory), good to 1e-4; against Ghione and Naldi's stated accuracy"
    for w_s in (0.5, 1, 3):
        for er in (2.2, 4.3, 9.8):
            for h_total, tolerance in ((2.0, 0.015), (0.7, 0.015), (0.5, 0.015), (0.2, 0.038)):
                s = 1.0
                w = w_s
                h = h_total * (w + 2 * s)
                plain = gap_field(w, s, lambda k: 1.0)
                for backed in (False, True):
                    below = (lambda k: er / math.tanh(k * h)) if backed else (lambda k: er * (1 + er * math.tanh(k * h)) / (er + math.tanh(k * h)))
                    air = gap_field(w, s, lambda k: 1 / math.tanh(k * h)) if backed else plain
                    filled = gap_field(w, s, below)
                    z = ETA0 / mp.sqrt(filled * air)
                    given = {"line": line("coplanar", er, width_m=w * 1e-3, gap_m=s * 1e-3, height_m=h * 1e-3, backed=backed), "frequency_hz": 1e6}
                    name = f"coplanar line{' over a plane' if backed else ''}, w/s = {w_s:g}, h = {h_total:g} (w + 2 s), permittivity {er}"
                    yield check("lines/secondary-constants", name, method, given, {"/characteristic_impedance_ohm": mp.mpc(z)}, tolerance)
                    yield check("lines/primary-constants", name, method, given, {"/effective_permittivity": filled / air}, tolerance if h_total >= 0.5 else 0.04)


def checks():
    yield from stripline_checks()
    yield from coplanar_checks()


if __name__ == "__main__":
    write(__file__, "Striplines and coplanar lines", checks())
