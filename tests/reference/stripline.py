"""Reference values for striplines, by other routes than the solver's conformal maps of the whole cross-section.

- A strip without thickness in the middle: Cohn's elliptic integrals, by mpmath to 30 digits.
- Without thickness off the middle: the integral equation of the strip's charge with the Green's function of two planes, in Chebyshev polynomials
  over the root of the edge's singularity, to 15 digits and more.
- A rectangle: the same integral equation round its whole boundary, by Nystrom's method with the logarithm integrated apart and nodes that
  crowd into the corners (Kress, Linear Integral Equations, 3rd ed., section 12.3, from memory), in float64; 1e-6 on all but wide strips.
- A rectangle to 30 digits: points on the axis of the map are chosen, and mpmath integrates the sides that they give, where the solver seeks the
  points of given sides.
- Resistance where the skin is thin: the power that the surface current leaves in strip and planes, Rs times the integral of its square, from that
  same charge. The solver takes the derivative of the inductance instead.
- Wheeler's formula of 1978, and a textbook's example, within what they are good for.
"""

import math

import mpmath as mp

from support import LIGHT, check, exact, write

MU0 = mp.mpf("1.25663706127e-6")
EPS0 = 1 / (MU0 * LIGHT**2)
ETA0 = MU0 * LIGHT
COPPER = 1 / mp.mpf(58e6)


def flat_in_the_middle(w, b):
    """C/eps."""
    x = mp.pi * w / (2 * b)
    return 4 * mp.ellipk(mp.tanh(x) ** 2) / mp.ellipk(mp.sech(x) ** 2)


def flat(w, g1, g2, count):
    """C/eps by collocation at the zeros of a Chebyshev polynomial."""
    b, half = g1 + g2, w / 2
    cosines = [mp.cos(mp.pi * k / (2 * count)) for k in range(4 * count)]
    nodes = [cosines[2 * i + 1] for i in range(count)]

    def smooth(distance):
        x = mp.pi * distance / b
        ratio = 2 * (mp.sinh(x / 2) / distance) ** 2 if distance else (mp.pi / b) ** 2 / 2
        return mp.log((mp.cosh(x) - mp.cos(2 * mp.pi * g1 / b)) / ratio)

    kernel = {}
    for i in range(count):
        for j in range(count):
            kernel[i, j] = smooth(half * (nodes[i] - nodes[j]))
    orders = range(0, count, 2)
    rows = [i for i in range(count // 2)]
    matrix = mp.matrix(len(rows), len(rows))
    for row, i in enumerate(rows):
        for column, n in enumerate(orders):
            polynomial = [cosines[n * (2 * j + 1) % (4 * count)] for j in range(count)]
            regular = mp.pi / count * mp.fsum(kernel[i, j] * polynomial[j] for j in range(count))
            singular = 2 * mp.pi * (mp.log(2) if n == 0 else polynomial[i] / n) - (2 * mp.pi * mp.log(half) if n == 0 else 0)
            matrix[row, column] = (singular + regular) / (4 * mp.pi)
    solution = mp.lu_solve(matrix, mp.ones(len(rows), 1))
    return mp.pi * solution[0]


def mapped(low, left, right, high):
    """(w, t, g1, g2, C/eps) with b = pi from the distances p2 - p1, c1 - p2, p3 - c2, p4 - p3 where c2 - c1 = 1; w as measured below the strip."""
    p1, p2, c1, c2, p3, p4 = points = [-low - left, -left, mp.mpf(0), mp.mpf(1), 1 + right, 1 + right + high]

    def side(start, end):
        others = [(point, 1 if point in (c1, c2) else -1) for point in points if point not in (start, end)]
        powers = [1 if point in (c1, c2) else -1 for point in (start, end)]
        middle, half = (start + end) / 2, (end - start) / 2

        # u = middle + half sin(phi) takes the roots at both ends away.
        def integrand(phi):
            u = middle + half * mp.sin(phi)
            value = mp.mpf(1)
            for point, power in others:
                value *= abs(u - point) ** power
            root = mp.sqrt(value)
            near, far = mp.sqrt(half * (1 + mp.sin(phi))), mp.sqrt(half * (1 - mp.sin(phi)))
            return root * (near ** (powers[0] + 1)) * (far ** (powers[1] + 1))

        return mp.quad(integrand, mp.linspace(-mp.pi / 2, mp.pi / 2, 4))

    modulus = (p3 - p2) * (p4 - p1) / ((p3 - p1) * (p4 - p2))
    complement = (p2 - p1) * (p4 - p3) / ((p3 - p1) * (p4 - p2))
    return 2 * side(p2, c1), side(c1, c2), side(p1, p2), side(p3, p4), 2 * mp.ellipk(modulus) / mp.ellipk(complement), 2 * side(c2, p3)


def crowded(s, p):
    """Kress's map of 0..1 to itself with its derivative; p - 1 derivatives vanish at the ends."""

    def v(x):
        return (1 / p - 0.5) * (1 - 2 * x) ** 3 + (2 * x - 1) / p + 0.5

    def slope(x):
        return -6 * (1 / p - 0.5) * (1 - 2 * x) ** 2 + 2 / p

    first, last = v(s) ** p, v(1 - s) ** p
    d_first, d_last = p * v(s) ** (p - 1) * slope(s), p * v(1 - s) ** (p - 1) * slope(1 - s)
    return first / (first + last), (d_first * last + first * d_last) / (first + last) ** 2


def rectangle(w, t, g1, g2, count, p, with_planes=False):
    """(C/eps, integral of the squared surface charge over that of the charge squared): boundary of the strip with `count` nodes a side."""
    b = g1 + t + g2
    c = math.pi / b
    centre = g1 + t / 2
    corners = [(-w / 2, -t / 2), (w / 2, -t / 2), (w / 2, t / 2), (-w / 2, t / 2)]
    total = 4 * count
    nodes = []
    for side in range(4):
        (x0, y0), (x1, y1) = corners[side], corners[(side + 1) % 4]
        for i in range(count):
            near, slope = crowded((i + 0.5) / count, p)
            far, _ = crowded(1 - (i + 0.5) / count, p)
            at = (lambda start, end: start + (end - start) * near if near < 0.5 else end - (end - start) * far)
            nodes.append((at(x0, x1), at(y0, y1), math.hypot(x1 - x0, y1 - y0) * slope * 4 / (2 * math.pi)))
    # Weights that integrate ln(4 sin^2) exactly.
    weights = [-(2 * math.pi / total) * (2 * sum(math.cos(m * 2 * math.pi * j / total) / m for m in range(1, total // 2)) + 2 * math.cos(math.pi * j) / total) for j in range(total)]
    mirrored = [{0: 0, 1: 3, 2: 2, 3: 1}[i // count] * count + count - 1 - i % count for i in range(total)]
    right = [i for i in range(total) if nodes[i][0] > 0]

    def regular(i, j):
        (xi, yi, speed), (xj, yj, _) = nodes[i], nodes[j]
        dx, dy, sy = c * (xi - xj), c * (yi - yj), c * (yi + yj + 2 * centre)
        below = 2 * math.sinh(dx / 2) ** 2 + 2 * math.sin(sy / 2) ** 2
        if i == j:
            return math.log((c * speed) ** 2 / 2) - math.log(below)
        above = 2 * math.sinh(dx / 2) ** 2 + 2 * math.sin(dy / 2) ** 2
        return math.log(above / below) - math.log(4 * math.sin(math.pi * (i - j) / total) ** 2)

    step = 2 * math.pi / total
    entry = lambda i, j: weights[(i - j) % total] + step * regular(i, j)
    charge = solved([[-(entry(i, j) + entry(i, mirrored[j])) / (4 * math.pi) for j in right] + [1.0] for i in right])
    whole = 2 * step * sum(charge)
    on_strip = 2 * step * sum(each * each / nodes[i][2] for each, i in zip(charge, right))
    everywhere = {i: each for each, i in zip(charge, right)}
    everywhere.update({mirrored[i]: each for each, i in zip(charge, right)})

    def on_plane(x, height):
        return step / (2 * b) * sum(each * math.sin(c * height(nodes[i][1])) / (2 * math.sinh(c * (x - nodes[i][0]) / 2) ** 2 + 2 * math.sin(c * height(nodes[i][1]) / 2) ** 2) for i, each in everywhere.items())

    end = w / 2 + 5 * b
    points = int(12 * end / min(g1, g2)) if with_planes else 0
    on_planes = 0
    for k in range(points + 1 if points else 0):
        x = k * end / points
        both = on_plane(x, lambda y: centre + y) ** 2 + on_plane(x, lambda y: b - centre - y) ** 2
        on_planes += (1 if k in (0, points) else 2) * both * end / points
    return whole, (on_strip + on_planes) / whole**2


def solved(rows):
    """By elimination with pivots; the last column is the right side."""
    size = len(rows)
    for k in range(size):
        best = max(range(k, size), key=lambda row: abs(rows[row][k]))
        rows[k], rows[best] = rows[best], rows[k]
        pivot = rows[k]
        for row in rows[k + 1 :]:
            factor = row[k] / pivot[k]
            for column in range(k, size + 1):
                row[column] -= factor * pivot[column]
    values = [0.0] * size
    for k in reversed(range(size)):
        values[k] = (rows[k][size] - sum(rows[k][j] * values[j] for j in range(k + 1, size))) / rows[k][k]
    return values


def resistance_factor(w, t, g1, g2):
    """1/m. What is missed in the corners falls as 1/n for this crowding: one step of Richardson."""
    coarse, fine = (rectangle(w, t, g1, g2, count, 3, True)[1] for count in (20, 40))
    return 2 * fine - coarse


def wheeler(w, t, b):
    """ohm, in vacuum: Wheeler, Transmission-line properties of a strip line between parallel planes, IEEE Trans. MTT-26 (1978) 866-876 (from memory)."""
    x = t / b
    power = 2 / (1 + 2 * x / (3 * (1 - x)))
    widening = x / (mp.pi * (1 - x)) * (1 - mp.log((x / (2 - x)) ** 2 + (mp.mpf("0.0796") * x / (w / b + mp.mpf("1.1") * x)) ** power) / 2)
    y = 8 / mp.pi / (w / (b - t) + widening)
    return 30 * mp.log(1 + y / 2 * (y + mp.sqrt(y * y + mp.mpf("6.27"))))


def line(w, b, t=0, offset=0, **more):
    given = {"kind": "stripline", "width_m": w, "plane_spacing_m": b, "thickness_m": t, "offset_m": offset, "conductor": "perfect", **more}
    return {name: value for name, value in given.items() if value != 0}


def rounded(value, figures):
    """So that the last digits of another machine's logarithm are not seen."""
    return mp.mpf(f"{value:.{figures}g}")


def gaps(w, b, t=0, offset=0):
    w, b, t, offset = exact(w), exact(b), exact(t), exact(offset)
    return w, t, (b - t) / 2 - offset, (b - t) / 2 + offset


def primary(name, source, given, capacitance, er, tolerance):
    """Of a line without loss: C and L from C/eps."""
    expected = {"/capacitance_f_per_m": er * EPS0 * capacitance, "/inductance_h_per_m": MU0 / capacitance, "/external_inductance_h_per_m": MU0 / capacitance, "/effective_permittivity": er}
    return check("lines/primary-constants", name, source, {"line": given, "frequency_hz": 1e9}, expected, tolerance)


def impedance(name, source, given, value, tolerance):
    return check("lines/secondary-constants", name, source, {"line": given, "frequency_hz": 1e9}, {"/characteristic_impedance_ohm": mp.mpf(value)}, tolerance)


COHN = "Cohn, Characteristic impedance of the shielded-strip transmission line, IRE Trans. MTT-2 (1954), elliptic integrals by mpmath to 30 digits"
CHARGE = "integral equation of the strip's charge between two planes in Chebyshev polynomials, by collocation to 15 digits or more"
MAP = "Schwarz-Christoffel map from chosen points to sides, and complete elliptic integrals, by mpmath to 30 digits (in the middle: Bates, IRE Trans. MTT-4 (1956) 28-33, from memory)"
BOUNDARY = "integral equation of the charge round the strip (Kress, Linear Integral Equations, 3rd ed., section 12.3, from memory), 48 nodes a side, good to 1e-6, on a wide strip to 1e-5"
POWER = "power that the surface current leaves in strip and planes, from the charge round the strip (Kress), good to 1e-3; joined to direct current as the method says"
WHEELER = "Wheeler, Transmission-line properties of a strip line between parallel planes, IEEE Trans. MTT-26 (1978) 866-876 (from memory); good to 0.55 %"
POZAR = "Pozar, Microwave Engineering, 4th ed., example 3.5 (from memory)"


def checks():
    for ratio in (0.001, 0.05, 0.25, 0.8, 2.0, 7.5, 60.0):
        w, b = ratio * 1e-3, 1e-3
        yield primary(f"strip without thickness, w/b = {ratio:g}", COHN, line(w, b, dielectric={"relative_permittivity": 2.2}), flat_in_the_middle(exact(w), exact(b)), exact(2.2), 1e-12)
        yield impedance(f"impedance of a strip without thickness, w/b = {ratio:g}", COHN, line(w, b), ETA0 / flat_in_the_middle(exact(w), exact(b)), 1e-12)

    mp.mp.dps = 40
    for ratio, share, count in ((0.05, 0.2, 24), (0.3, 0.1, 36), (0.3, 0.6, 36), (0.8, 0.35, 56), (1.2, 0.5, 80), (0.1, 0.9, 60)):
        w, b, offset = ratio * 1e-3, 1e-3, 0.5e-3 * share
        w_, _, g1, g2 = gaps(w, b, 0, offset)
        yield primary(f"strip without thickness off the middle, w/b = {ratio:g}, {share:g} of the way", CHARGE, line(w, b, 0, offset, dielectric={"relative_permittivity": 4.3}), flat(w_, min(g1, g2), max(g1, g2), count), exact(4.3), 1e-12)

    # The third is where the upper side of the strip is as wide as the lower: of itself where all is even, else from mpmath's findroot.
    for low, left, right, high in ((3, 2, 2, 3), (20, 1, 1, 20), ("0.05", 4, 4, "0.05"), (5, 2, "2.39069249054197907001584766784500686", 40), ("0.4", 1, "1.57655204934467398338980971047780023", 3)):
        low, left, right, high = mp.mpf(low), mp.mpf(left), mp.mpf(right), mp.mpf(high)
        w, t, g1, g2, capacitance, _ = mapped(low, left, right, high)
        # The float64 numbers of the line are within 1e-16 of these.
        unit = mp.mpf("1e-3") / mp.pi
        given = line(float(w * unit), float((g1 + t + g2) * unit), float(t * unit), float((g2 - g1) / 2 * unit) if low != high else 0, dielectric={"relative_permittivity": 3.0})
        yield primary(f"thick strip to 30 digits, w/b = {float(w / mp.pi):.3g}, t/b = {float(t / mp.pi):.3g}, gaps {float(g1 / mp.pi):.3g} and {float(g2 / mp.pi):.3g}", MAP, given, capacitance, exact(3.0), 1e-12)

    for ratio, thickness, share, er in ((0.05, 0.01, 0, 1.0), (0.1, 0.1, 0, 2.2), (0.2, 0.2, 0, 4.3), (0.5, 0.05, 0, 9.8), (1.0, 0.2, 0, 12.9), (2.0, 0.1, 0, 2.2), (0.3, 0.05, 0.3, 4.3), (0.3, 0.2, -0.5, 2.2), (1.0, 0.1, 0.4, 3.5), (0.5, 0.3, 0.2, 9.8), (0.08, 0.3, 0, 3.0)):
        w, b, t = ratio * 1e-3, 1e-3, thickness * 1e-3
        offset = 0.5 * (b - t) * share
        value, _ = rectangle(*(float(each) for each in gaps(w, b, t, offset)), 48, 5)
        yield primary(f"thick strip, w/b = {ratio:g}, t/b = {thickness:g}, {share:g} of the way off", BOUNDARY, line(w, b, t, offset, dielectric={"relative_permittivity": er}), rounded(value, 7), exact(er), 1e-5 if ratio > 1 else 1e-6)

    for ratio, thickness, tolerance in ((0.05, 0.05, 0.01), (0.1, 0.2, 0.0055), (0.1, 0.01, 0.0055), (0.35, 0.1, 0.0055), (0.8, 0.02, 0.0055), (2.0, 0.2, 0.0055), (5.0, 0.1, 0.0055)):
        w, b, t = ratio * 2e-3, 2e-3, thickness * 2e-3
        yield impedance(f"Wheeler's formula, w/b = {ratio:g}, t/b = {thickness:g}", WHEELER, line(w, b, t, dielectric={"relative_permittivity": 2.5}), wheeler(exact(w), exact(t), exact(b)) / mp.sqrt(exact(2.5)), tolerance)

    for ratio, thickness, share, frequency in ((0.3, 0.05, 0, 1e10), (1.0, 0.1, 0, 1e9), (0.2, 0.2, 0, 5e9), (0.4, 0.05, 0.4, 2e9), (0.8, 0.2, -0.3, 3e10)):
        w, b, t = ratio * 1e-3, 1e-3, thickness * 1e-3
        offset = 0.5 * (b - t) * share
        surface = mp.sqrt(mp.pi * exact(frequency) * MU0 * COPPER)
        skin = surface * rounded(resistance_factor(*(float(each) for each in gaps(w, b, t, offset))), 5)
        direct = COPPER / (exact(w) * exact(t))
        series = mp.sqrt(direct**2 + 2 * mp.mpc(0, 1) * skin**2)
        given = {"line": line(w, b, t, offset, conductor="copper"), "frequency_hz": frequency}
        yield check("lines/primary-constants", f"resistance, w/b = {ratio:g}, t/b = {thickness:g}, {share:g} of the way off", POWER, given, {"/resistance_ohm_per_m": series.real}, 2e-3)
        at_rest = {"line": line(w, b, t, offset, conductor="copper"), "frequency_hz": 0}
        yield check("lines/primary-constants", f"resistance at direct current, w/b = {ratio:g}, t/b = {thickness:g}, {share:g} of the way off", "resistivity over the section of the strip, planes of none; IEC 60028", at_rest, {"/resistance_ohm_per_m": direct}, 1e-12)

    example = {"er": 2.2, "tangent": 0.001}
    filled = {"dielectric": {"relative_permittivity": example["er"], "loss_tangent": example["tangent"]}}
    yield impedance("the 50 ohm line of an example", POZAR + ": b = 0.32 cm, er = 2.20, W = 0.266 cm for 50 ohm; the formula used there is good to 1 %", line(2.66e-3, 3.2e-3, **filled), 50, 0.01)
    yield check("lines/secondary-constants", "dielectric loss of an example", POZAR + ": alpha_d = 0.155 Np/m at 10 GHz", {"line": line(2.66e-3, 3.2e-3, **filled), "frequency_hz": 1e10}, {"/attenuation_np_per_m": mp.mpf("0.155")}, 0.0033)
    yield check("lines/secondary-constants", "loss of conductor and dielectric of an example", POZAR + ": alpha = 0.277 Np/m with copper of 0.01 mm; by a formula that approximates the resistance to some percent", {"line": line(2.66e-3, 3.2e-3, 1e-5, conductor="copper", **filled), "frequency_hz": 1e10}, {"/attenuation_np_per_m": mp.mpf("0.277")}, 0.03)
    er, w, b = exact(4.3), exact(3e-4), exact(8e-4)
    limit = LIGHT / (mp.sqrt(er) * (2 * w + mp.pi * b / 2))
    depth = mp.sqrt(2 * COPPER / (2 * mp.pi * exact(2e9) * MU0))
    given = {"line": line(3e-4, 8e-4, 1.7e-5, conductor="copper", dielectric={"relative_permittivity": 4.3}), "frequency_hz": 2e9}
    yield check("lines/primary-constants", "first higher mode and skin depth", "Howe, Stripline Circuit Design, 1974 (from memory): wavelength 2w + pi b/2; definition of the skin depth", given, {"/single_mode_limit_hz": limit, "/skin_depth_m": depth}, 1e-12)


if __name__ == "__main__":
    write(__file__, "Striplines", checks())
