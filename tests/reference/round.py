"""Reference values for lines of round and flat conductors, to 30 digits.

Made by other routes than the solvers': Bessel functions of an arbitrary-precision library where the solver uses continued fractions and Taylor
steps; the cutoff of TE11 as a root in Bessel functions; crowding of current in two wires by matching fields at points of the surface, where the
solver re-expands harmonics. Inputs are taken as the exact values of their float64 numbers.
"""

import mpmath as mp

from support import J, LIGHT, check, exact, write

mp.mp.dps = 60
MU0 = mp.mpf("1.25663706127e-6")
EPS0 = 1 / (MU0 * LIGHT**2)
COPPER = 1 / mp.mpf(58e6)
BESSEL = "Bessel functions to 30 digits (mpmath) in Schelkunoff's formulas, Bell System Technical Journal 13 (1934) 532-579 (from memory)"
CONSTANTS = ("resistance_ohm_per_m", "inductance_h_per_m", "conductance_s_per_m", "capacitance_f_per_m")


def diffusion(omega, rho, mu_r):
    return mp.sqrt(J * omega * MU0 * mu_r / rho)


def wire(diameter, omega, rho=COPPER, mu_r=1):
    """R and L of a solid wire."""
    a = exact(diameter) / 2
    if omega == 0:
        return rho / (mp.pi * a * a), MU0 * mu_r / (8 * mp.pi)
    m = diffusion(omega, rho, mu_r)
    z = rho * m / (2 * mp.pi * a) * mp.besseli(0, m * a) / mp.besseli(1, m * a)
    return z.real, z.imag / omega


def tube(bore, thickness, omega, rho=COPPER, mu_r=1):
    """R and L of a tube's wall seen from its bore."""
    b = exact(bore) / 2
    c = b + exact(thickness) if thickness else None
    if omega == 0:
        # Energy of the field mu I (c^2 - r^2) / (2 pi r (c^2 - b^2)) in the wall.
        energy = mp.quad(lambda r: ((c * c - r * r) / (r * (c * c - b * b))) ** 2 * r, [b, c])
        return rho / (mp.pi * (c * c - b * b)), MU0 * mu_r / (2 * mp.pi) * energy
    m = diffusion(omega, rho, mu_r)
    k0, k1, i0, i1 = mp.besselk(0, m * b), mp.besselk(1, m * b), mp.besseli(0, m * b), mp.besseli(1, m * b)
    ratio = k0 / k1
    if c is not None:
        far_k, far_i = mp.besselk(1, m * c), mp.besseli(1, m * c)
        ratio = (i0 * far_k + k0 * far_i) / (far_i * k1 - i1 * far_k)
    z = rho * m / (2 * mp.pi * b) * ratio
    return z.real, z.imag / omega


def sheet(width, thickness, omega, rho=COPPER):
    t, w = exact(thickness), exact(width)
    if omega == 0:
        return rho / (t * w), MU0 * t / (3 * w)
    m = diffusion(omega, rho, 1)
    z = rho * m * mp.coth(m * t) / w
    return z.real, z.imag / omega


def four(r, l, g, c):
    return {f"/{name}": value for name, value in zip(CONSTANTS, (r, l, g, c))}


def te11(d, big, er):
    a, b = exact(d) / 2, exact(big) / 2
    k = mp.findroot(lambda k: mp.besselj(1, k * a, 1) * mp.bessely(1, k * b, 1) - mp.besselj(1, k * b, 1) * mp.bessely(1, k * a, 1), 2 / (a + b))
    return k * LIGHT / (2 * mp.pi * mp.sqrt(er))


def coaxial_checks():
    dielectric = {"relative_permittivity": 2.26, "loss_tangent": 2e-4}
    er, tangent = exact(2.26), exact(2e-4)
    shapes = {"cable": (9e-4, 2.95e-3, 1.5e-4), "air gap line without thickness": (3.04e-3, 7e-3, None), "thin gap": (1e-3, 1.0001e-3, 1e-5), "foil shield": (2e-3, 7.25e-3, 5e-6)}
    for name, (d, big, t) in shapes.items():
        for f in (0, 50, 1e4, 1e6, 1e8, 1e10):
            if f == 0 and t is None:
                continue
            omega = 2 * mp.pi * exact(f)
            r1, l1 = wire(d, omega)
            r2, l2 = tube(big, t, omega)
            logarithm = mp.log(exact(big) / exact(d))
            outside = MU0 / (2 * mp.pi) * logarithm
            c = 2 * mp.pi * EPS0 * er / logarithm
            line = {"kind": "coaxial", "inner_diameter_m": d, "outer_diameter_m": big, "conductor": "copper", "dielectric": dielectric, **({"shield_thickness_m": t} if t else {})}
            expected = {**four(r1 + r2, outside + l1 + l2, omega * c * tangent, c), "/external_inductance_h_per_m": outside, "/effective_permittivity": er, "/single_mode_limit_hz": te11(d, big, er)}
            expected["/skin_depth_m"] = mp.sqrt(2 * COPPER / (omega * MU0)) if f else None
            yield check("lines/primary-constants", f"coaxial {name} at {f:g} Hz", BESSEL, {"line": line, "frequency_hz": f}, expected, 1e-12)
    # Group velocity, by differences of the whole formula with 60 digits in hand.
    for name, (d, big, t) in shapes.items():
        f = 3e5
        at = lambda omega: sum_of(wire(d, omega), tube(big, t, omega))
        def beta(omega):
            r, l = at(omega)
            logarithm = mp.log(exact(big) / exact(d))
            z = r + J * omega * (l + MU0 / (2 * mp.pi) * logarithm)
            y = omega * 2 * mp.pi * EPS0 * er / logarithm * mp.mpc(tangent, 1)
            return mp.im(mp.sqrt(z) * mp.sqrt(y))
        omega = 2 * mp.pi * exact(f)
        h = omega * mp.mpf(10) ** -10
        slope = (8 * (beta(omega + h) - beta(omega - h)) - (beta(omega + 2 * h) - beta(omega - 2 * h))) / (12 * h)
        line = {"kind": "coaxial", "inner_diameter_m": d, "outer_diameter_m": big, "conductor": "copper", "dielectric": dielectric, **({"shield_thickness_m": t} if t else {})}
        yield check("lines/secondary-constants", f"coaxial {name}: group velocity", BESSEL, {"line": line, "frequency_hz": f}, {"/group_velocity_m_per_s": 1 / slope, "/phase_constant_rad_per_m": beta(omega)}, 1e-12)
    warm = (1 + exact(0.00393) * 55) * COPPER
    yield check("lines/primary-constants", "coaxial cable at 75 degC", "rho20 (1 + alpha20 (T - 20)), IEC 60028:1925", {"line": {"kind": "coaxial", "inner_diameter_m": 9e-4, "outer_diameter_m": 2.95e-3, "shield_thickness_m": 1.5e-4, "temperature_c": 75}, "frequency_hz": 0}, {"/resistance_ohm_per_m": wire(9e-4, 0, warm)[0] + tube(2.95e-3, 1.5e-4, 0, warm)[0]}, 1e-12)
    steel = mp.mpf(1.6e-7)
    omega = 2 * mp.pi * 1000
    yield check("lines/primary-constants", "steel wire in a copper tube", BESSEL, {"line": {"kind": "coaxial", "inner_diameter_m": 1e-3, "outer_diameter_m": 4e-3, "shield_thickness_m": 5e-4, "conductor": "steel", "shield": "copper"}, "frequency_hz": 1000}, {"/resistance_ohm_per_m": wire(1e-3, omega, steel, 100)[0] + tube(4e-3, 5e-4, omega)[0]}, 1e-12)


def sum_of(first, second):
    return first[0] + second[0], first[1] + second[1]


def ratio_checks():
    """R/Rdc of a wire over x = a sqrt(omega mu/rho): two wires of perfect shield leave the wire alone."""
    table = {1: "1.005", 2: "1.078", 3: "1.318", 4: "1.678", 5: "2.043", 10: "3.799"}
    for x, ratio in table.items():
        a = mp.mpf("0.5e-3")
        omega = (x / a) ** 2 * COPPER / MU0
        f = float(omega / (2 * mp.pi))
        line = {"kind": "coaxial", "inner_diameter_m": 1e-3, "outer_diameter_m": 1e-2, "shield_thickness_m": 1e-3, "conductor": "copper", "shield": "perfect"}
        yield check("lines/primary-constants", f"skin effect ratio at x = {x}", "Resistance ratio of round wires, Bureau of Standards Circular 74 (1924), table of skin effect, x being argument of its Kelvin functions (from memory, three decimals)", {"line": line, "frequency_hz": f}, {"/resistance_ohm_per_m": mp.mpf(ratio) * COPPER / (mp.pi * a * a)}, 5e-4)


def arcosh(x):
    return mp.log(x + mp.sqrt((x - 1) * (x + 1)))


def two_wire_checks():
    dielectric = {"relative_permittivity": 2.1, "loss_tangent": 1e-3}
    for d, s in ((5e-4, 2e-3), (2e-3, 2.02e-3), (1e-3, 0.3)):
        for f in (0, 1e3, 1e6, 1e9):
            omega = 2 * mp.pi * exact(f)
            r, l = wire(d, omega)
            outside = MU0 / mp.pi * arcosh(exact(s) / exact(d))
            c = EPS0 * MU0 * exact(2.1) / outside
            line = {"kind": "two_wire", "conductor_diameter_m": d, "spacing_m": s, "conductor": "copper", "proximity": False, "dielectric": dielectric}
            expected = {**four(2 * r, outside + 2 * l, omega * c * exact(1e-3), c), "/external_inductance_h_per_m": outside, "/single_mode_limit_hz": None}
            yield check("lines/primary-constants", f"two wires of {d:g} m, {s:g} m apart, without crowding, at {f:g} Hz", BESSEL + "; L C = mu eps", {"line": line, "frequency_hz": f}, expected, 1e-12)
            outside = MU0 / (2 * mp.pi) * arcosh(2 * exact(s) / exact(d))
            c = EPS0 * MU0 / outside
            line = {"kind": "wire_over_plane", "conductor_diameter_m": d, "height_m": s, "conductor": "copper"}
            yield check("lines/primary-constants", f"wire of {d:g} m, {s:g} m over a plane, at {f:g} Hz", BESSEL + "; L C = mu eps", {"line": line, "frequency_hz": f}, {**four(r, outside + l, 0, c), "/external_inductance_h_per_m": outside}, 1e-12)


def crowded(d, s, f):
    """R and L of two wires by matching the fields at points of the surface of one; the other is its mirror image, reversed."""
    a, s = exact(d) / 2, exact(s)
    omega = 2 * mp.pi * exact(f)
    m = diffusion(omega, COPPER, 1)
    count = 14
    rise = [m * mp.besseli(n, m * a, 1) / mp.besseli(n, m * a) for n in range(count + 1)]
    size = 2 * count + 1
    matrix, side = mp.zeros(size, size), mp.zeros(size, 1)

    def row(at, theta, radial):
        # Unknowns: b(1..count) outside, alpha(1..count) inside, and the mean of A on the surface.
        point = a * mp.expj(theta)
        other = s - point
        outward = mp.expj(theta)
        for n in range(1, count + 1):
            if radial:
                own = -n / a * mp.cos(n * theta)
                mirrored = mp.re(n * a**n / other ** (n + 1) * outward)
                matrix[at, count + n - 1] = -rise[n] * mp.cos(n * theta)
            else:
                own = mp.cos(n * theta)
                mirrored = mp.re((a / other) ** n)
                matrix[at, count + n - 1] = -mp.cos(n * theta)
            matrix[at, n - 1] = own - mirrored
        if radial:
            side[at] = mp.re(outward / other)
        else:
            matrix[at, size - 1] = -1
            side[at] = mp.log(a) - mp.log(abs(other))

    for k in range(count + 1):
        row(k, mp.pi * (2 * k + 1) / (2 * (count + 1)), False)
    for k in range(count):
        row(count + 1 + k, mp.pi * (2 * k + 1) / (2 * count + 1), True)
    mean = mp.lu_solve(matrix, side)[size - 1]
    r, l = wire(d, omega)
    z = 2 * (r + J * omega * l) + J * omega * MU0 / mp.pi * mean
    return z.real, z.imag / omega


def proximity_checks():
    source = "matching of the fields at points of the wires' surface, 29 unknowns; Carson, Philosophical Magazine 41 (1921) 607-633 treats the same problem (from memory)"
    with mp.workdps(30):
        for d, s in ((1e-3, 4e-3), (5e-4, 1.5e-3)):
            for f in (50, 2e4, 1e5, 1e6, 3e7):
                r, l = crowded(d, s, f)
                line = {"kind": "two_wire", "conductor_diameter_m": d, "spacing_m": s, "conductor": "copper"}
                # 14 harmonics leave (x - sqrt(x^2 - 1))^28.
                tolerance = float((exact(s) / exact(d) - mp.sqrt((exact(s) / exact(d)) ** 2 - 1)) ** 26) + 1e-12
                yield check("lines/primary-constants", f"two wires of {d:g} m, {s:g} m apart, with crowding, at {f:g} Hz", source, {"line": line, "frequency_hz": f}, {"/resistance_ohm_per_m": r, "/inductance_h_per_m": l}, tolerance)
    for d, s in ((1e-3, 1.5e-3), (1e-3, 1.1e-3), (1e-3, 1e-2)):
        x = exact(s) / exact(d)
        f = 1e13
        rs = mp.sqrt(mp.pi * exact(f) * MU0 * COPPER)
        line = {"kind": "two_wire", "conductor_diameter_m": d, "spacing_m": s, "conductor": "copper"}
        yield check("lines/primary-constants", f"two wires, {s:g} m apart, at the limit of a thin skin", "R = 2 Rs/(pi d) (s/d)/sqrt((s/d)^2 - 1), incremental inductance (Wheeler, Proc. IRE 30 (1942) 412-424, from memory); the skin is 4e-5 of the diameter", {"line": line, "frequency_hz": f}, {"/resistance_ohm_per_m": 2 * rs / (mp.pi * exact(d)) * x / mp.sqrt(x * x - 1)}, 5e-4)


def plate_checks():
    for w, s, t in ((0.02, 1e-3, 35e-6), (0.05, 2e-4, 1e-3)):
        for f in (0, 1e5, 1e7, 1e9):
            omega = 2 * mp.pi * exact(f)
            r, l = sheet(w, t, omega)
            c = EPS0 * exact(4.3) * exact(w) / exact(s)
            line = {"kind": "parallel_plate", "width_m": w, "separation_m": s, "thickness_m": t, "conductor": "copper", "dielectric": {"relative_permittivity": 4.3, "loss_tangent": 0.02}}
            expected = {**four(2 * r, MU0 * exact(s) / exact(w) + 2 * l, omega * c * exact(0.02), c), "/single_mode_limit_hz": LIGHT / (2 * exact(s) * mp.sqrt(exact(4.3)))}
            yield check("lines/primary-constants", f"plates {w:g} m wide at {f:g} Hz", "Ramo, Whinnery and Van Duzer, Fields and Waves in Communication Electronics, 3rd ed., section 3.17 (from memory), to 30 digits", {"line": line, "frequency_hz": f}, expected, 1e-12)


def twisted_checks():
    for d, big, twists in ((5.1e-4, 9.5e-4, 60), (2.5e-4, 2.9e-4, 400)):
        angle = mp.atan(mp.pi * exact(twists) * exact(big))
        q = mp.mpf("0.25") + mp.mpf("0.0004") * mp.degrees(angle) ** 2
        effective = 1 + q * (exact(2.26) - 1)
        z = MU0 * LIGHT / (mp.pi * mp.sqrt(effective)) * arcosh(exact(big) / exact(d))
        line = {"kind": "twisted_pair", "conductor_diameter_m": d, "insulation_diameter_m": big, "twists_per_m": twists, "conductor": "perfect", "dielectric": {"relative_permittivity": 2.26}}
        source = "Lefferson, IEEE Trans. PHP-7 (1971) 148-154 (from memory), its formula to 30 digits"
        yield check("lines/secondary-constants", f"twisted pair, {twists} twists in a metre", source, {"line": line, "frequency_hz": 1e6}, {"/characteristic_impedance_ohm": mp.mpc(z), "/phase_velocity_m_per_s": LIGHT / mp.sqrt(effective)}, 1e-12)


def debye_checks():
    """The wideband Debye integral 1/(ln 10 (m2 - m1)) times the distribution of single relaxations, by quadrature over their frequencies."""
    er, tangent, f0 = mp.mpf("4.3"), mp.mpf("0.02"), mp.mpf(10) ** 9
    # Relaxations evenly spread over ln w from w1 to w2: eps = einf + k int d(ln u)/(1 + j w/u).
    spread = lambda w: mp.quad(lambda y: 1 / (1 + J * w / mp.e**y), mp.linspace(mp.log(mp.mpf(10) ** 4), mp.log(mp.mpf(10) ** 12), 17))
    at0 = spread(2 * mp.pi * f0)
    k = er * tangent / -at0.imag
    infinite = er - k * at0.real
    for f in (1e4, 1e6, 1e9, 2e10):
        omega = 2 * mp.pi * exact(f)
        eps = infinite + k * spread(omega)
        logarithm = mp.log(exact(3e-3) / exact(1e-3))
        c0 = 2 * mp.pi * EPS0 / logarithm
        line = {"kind": "coaxial", "inner_diameter_m": 1e-3, "outer_diameter_m": 3e-3, "conductor": "perfect", "dielectric": {"relative_permittivity": 4.3, "loss_tangent": 0.02, "model": "wideband_debye", "reference_frequency_hz": 1e9}}
        yield check("lines/primary-constants", f"wideband Debye dielectric at {f:g} Hz", "Djordjevic et al., IEEE Trans. EMC-43 (2001) 662-667: relaxations spread evenly over eight decades, integrated numerically", {"line": line, "frequency_hz": f}, {"/capacitance_f_per_m": c0 * eps.real, "/conductance_s_per_m": -omega * c0 * eps.imag, "/effective_permittivity": eps.real}, 1e-12)


def checks():
    yield from coaxial_checks()
    yield from two_wire_checks()
    yield from proximity_checks()
    yield from plate_checks()
    yield from twisted_checks()
    yield from debye_checks()
    yield from ratio_checks()


if __name__ == "__main__":
    write(__file__, "Lines of round and flat conductors", checks())
