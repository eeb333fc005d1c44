"""Wires and cables as handbooks have them, and the crowding of current in near wires to more than 12 digits.

The crowding is found by another route than the solver's: the fields inside and outside are matched at points of one wire's surface, the other being
its mirror image, reversed. The solver expands one wire's field about the other and takes the difference from perfect wires.
"""

import mpmath as mp

from round import COPPER, MU0, arcosh, diffusion, wire
from support import J, LIGHT, check, exact, write

PRIMARY, SECONDARY = "lines/primary-constants", "lines/secondary-constants"


def logarithmic_slopes(m_a, count):
    """z I'(n)/I(n) for n up to count, downwards from two Bessel functions."""
    above, here = mp.besseli(count + 1, m_a), mp.besseli(count, m_a)
    result = [None] * (count + 1)
    for n in range(count, -1, -1):
        result[n] = m_a * above / here + n
        above, here = here, above + 2 * n / m_a * here
    return result


def crowded(d, s, f, rho, mu_r, count):
    """R and L of two wires; lengths in units of the radius."""
    a, s = exact(d) / 2, 2 * exact(s) / exact(d)
    omega = 2 * mp.pi * exact(f)
    inside = [each / mu_r for each in logarithmic_slopes(diffusion(omega, rho, mu_r) * a, count)]
    size = 2 * count + 1
    matrix, side = mp.zeros(size, size), mp.zeros(size, 1)
    # Unknowns: b(1..count) outside, alpha(1..count) inside, and the mean of A on the surface. First A, then its slope along the radius.
    for k in range(size):
        radial = k > count
        theta = mp.pi * (2 * (k - count) - 1) / size if radial else mp.pi * (2 * k + 1) / (2 * (count + 1))
        outward = mp.expj(theta)
        other = s - outward
        power = mp.mpf(1)
        for n in range(1, count + 1):
            power /= other
            cosine = mp.cos(n * theta)
            if radial:
                matrix[k, n - 1] = -n * cosine - mp.re(n * power / other * outward)
                matrix[k, count + n - 1] = -inside[n] * cosine
            else:
                matrix[k, n - 1] = cosine - mp.re(power)
                matrix[k, count + n - 1] = -cosine
        if radial:
            side[k] = mp.re(outward / other)
        else:
            matrix[k, size - 1] = -1
            side[k] = -mp.log(abs(other))
    mean = mp.lu_solve(matrix, side)[size - 1]
    r, l = wire(d, omega, rho, mu_r)
    z = 2 * (r + J * omega * l) + J * omega * MU0 / mp.pi * mean
    return z.real, z.imag / omega


def crowding_checks():
    source = "matching of the fields at points of the wires' surface; Carson, Philosophical Magazine 41 (1921) 607-633 treats the same problem (from memory)"
    steel = {"resistivity_ohm_m": 1.6e-7, "relative_permeability": 100}
    cases = [
        (1e-3, 1.5e-3, "copper", 18, (60, 3e4, 2e6)),
        (5e-4, 6e-4, "copper", 26, (1e5, 1e7)),
        (1e-3, 1.06e-3, "copper", 44, (5e4,)),
        (2e-3, 4e-3, steel, 14, (60, 1e5)),
    ]
    with mp.workdps(24):
        for d, s, material, count, frequencies in cases:
            rho, mu_r = (COPPER, 1) if material == "copper" else (exact(material["resistivity_ohm_m"]), exact(material["relative_permeability"]))
            name = "copper" if material == "copper" else "steel"
            for f in frequencies:
                r, l = crowded(d, s, f, rho, mu_r, count)
                given = {"line": {"kind": "two_wire", "conductor_diameter_m": d, "spacing_m": s, "conductor": material}, "frequency_hz": f}
                yield check(PRIMARY, f"two {name} wires of {d:g} m, {s:g} m apart, at {f:g} Hz", f"{source}; {2 * count + 1} unknowns", given, {"/resistance_ohm_per_m": r, "/inductance_h_per_m": l}, 1e-11)


def direct_current_checks():
    """Uniform current: the geometric mean distance of a circle from itself is a exp(-1/4), from another circle the distance of their centres."""
    for d, s in ((1e-3, 1.001e-3), (1e-3, 1.3e-3), (3.264e-3, 0.3048)):
        inductance = MU0 / mp.pi * (mp.log(2 * exact(s) / exact(d)) + mp.mpf(1) / 4)
        given = {"line": {"kind": "two_wire", "conductor_diameter_m": d, "spacing_m": s}, "frequency_hz": 0}
        yield check(PRIMARY, f"two wires of {d:g} m, {s:g} m apart, at direct current", "geometric mean distances, Maxwell, Treatise on Electricity and Magnetism, article 692; Grover, Inductance Calculations, chapter 5 (from memory)", given, {"/inductance_h_per_m": inductance, "/resistance_ohm_per_m": 8 * COPPER / (mp.pi * exact(d) ** 2)}, 1e-13)


KELVIN = {1: ("1.00519", "0.99741"), 2: ("1.07816", "0.96113"), 3: ("1.31809", "0.84517"), 4: ("1.67787", "0.68632"), 5: ("2.04272", "0.55597"), 10: ("3.79857", "0.28162")}


def handbook_checks():
    for x, (resistance, inductance) in KELVIN.items():
        a = mp.mpf("0.5e-3")
        f = float((x / a) ** 2 * COPPER / MU0 / (2 * mp.pi))
        outside = MU0 / mp.pi * arcosh(mp.mpf(100))
        given = {"line": {"kind": "two_wire", "conductor_diameter_m": 1e-3, "spacing_m": 0.1, "conductor": "copper", "proximity": False}, "frequency_hz": f}
        expected = {"/resistance_ohm_per_m": 2 * mp.mpf(resistance) * COPPER / (mp.pi * a * a), "/inductance_h_per_m": outside + mp.mpf(inductance) * MU0 / (4 * mp.pi)}
        yield check(PRIMARY, f"ratios to direct current at x = {x}", "Bureau of Standards Circular 74 (1924), table 19: R/R0 and L/L0 of a round wire, five decimals (from memory)", given, expected, 5e-6)
    mile = mp.mpf("1609.344")
    for gauge, d, l, c in (("165", 4.191e-3, "3.37e-3", "0.00915e-6"), ("104", 2.6416e-3, "3.66e-3", "0.00835e-6")):
        given = {"line": {"kind": "two_wire", "conductor_diameter_m": d, "spacing_m": 0.3048, "conductor": "copper_hard_drawn"}, "frequency_hz": 1000}
        insulators = {"/capacitance_f_per_m": {"tolerance": 0.02, "reason": "the published capacitance counts the insulators on the poles, some 1.5 percent"}}
        yield check(PRIMARY, f"open telephone line of {gauge} mil copper, 12 inches apart", "constants of open-wire telephone lines at 1 kHz for a loop mile, as in Everitt, Communication Engineering (from memory)", given, {"/inductance_h_per_m": mp.mpf(l) / mile, "/capacitance_f_per_m": mp.mpf(c) / mile}, 2e-3, exceptions=insulators)
    impedance = "/characteristic_impedance_ohm/re"
    for s, z in ((0.075, 600), (0.0195, 438.9), (0.005, 276)):
        given = {"line": {"kind": "two_wire", "conductor_diameter_m": 1e-3, "spacing_m": s, "conductor": "perfect"}, "frequency_hz": 1e7}
        yield check(SECONDARY, f"open-wire feeder, spacing of {s / 1e-3:g} diameters", "276 log10(2 s/d), Terman, Radio Engineers' Handbook (1943), section 3 (from memory): 1 percent where s is five diameters or more", given, {impedance: 276 * mp.log10(2 * exact(s) / mp.mpf("1e-3"))}, 5e-3)
    given = {"line": {"kind": "wire_over_plane", "conductor_diameter_m": 1e-3, "height_m": 0.01, "conductor": "perfect"}, "frequency_hz": 1e7}
    yield check(SECONDARY, "wire ten diameters over ground", "138 log10(4 h/d), Terman, Radio Engineers' Handbook (1943), section 3 (from memory)", given, {impedance: 138 * mp.log10(mp.mpf(40))}, 5e-3)


def cable_checks():
    for name, d, big, ohms, least, most in (("7 mm air line", 3.04e-3, 7e-3, 50, "18e9", "19.6e9"), ("3.5 mm air line", 1.52e-3, 3.5e-3, 50, "34e9", "38.8e9")):
        line = {"kind": "coaxial", "inner_diameter_m": d, "outer_diameter_m": big, "conductor": "perfect", "dielectric": "air"}
        yield check(SECONDARY, f"{name}: impedance", "IEEE Std 287, precision air lines: 50 ohm (from memory)", {"line": line, "frequency_hz": 1e9}, {"/characteristic_impedance_ohm/re": mp.mpf(ohms)}, 1e-3)
        yield check(PRIMARY, f"{name}: single mode at least so far", "IEEE Std 287, precision air lines: use to 18 GHz and 34 GHz (from memory)", {"line": line, "frequency_hz": 1e9}, {"/single_mode_limit_hz": least}, 0, comparison="at_least")
        yield check(PRIMARY, f"{name}: single mode at most so far", "cutoff of TE11 above the frequencies of use by less than a seventh (from memory)", {"line": line, "frequency_hz": 1e9}, {"/single_mode_limit_hz": most}, 0, comparison="at_most")
    foot = mp.mpf("0.3048")
    # Diameter a stranded centre counts for (0.97 of 19 strands, 0.939 of 7), diameter over the dielectric, ohm, most pF/ft, most dB per 100 ft at 400 MHz.
    cables = (("0.87/2.95 mm", 8.7e-4, 2.95e-3, 50, "32.2", "14"), ("2.12/7.25 mm", 2.12e-3, 7.25e-3, 50, "32.2", "5.5"), ("0.58/3.71 mm", 5.8e-4, 3.71e-3, 75, "22", "9"))
    for name, d, big, ohms, picofarad, decibel in cables:
        line = {"kind": "coaxial", "inner_diameter_m": d, "outer_diameter_m": big, "shield_thickness_m": 1.5e-4, "conductor": "copper", "dielectric": "polyethylene"}
        given = {"line": line, "frequency_hz": 4e8}
        source = "MIL-C-17, cables with solid polyethylene (from memory): "
        yield check(SECONDARY, f"polyethylene cable {name}: impedance", source + f"{ohms} ohm, 3 ohm either way", given, {"/characteristic_impedance_ohm/re": mp.mpf(ohms)}, 3 / ohms)
        yield check(PRIMARY, f"polyethylene cable {name}: capacitance within its limit", source + f"at most {picofarad} pF/ft", given, {"/capacitance_f_per_m": mp.mpf(picofarad) * mp.mpf(10) ** -12 / foot}, 0, comparison="at_most")
        yield check(SECONDARY, f"polyethylene cable {name}: attenuation within its limit at 400 MHz", source + f"at most {decibel} dB per 100 ft, with a braid where here is a tube", given, {"/attenuation_db_per_m": mp.mpf(decibel) / (100 * foot)}, 0, comparison="at_most")


def thin_skin_checks():
    """Rs over the circumference, to the second order in the skin depth."""
    for f in (1e9, 1e11):
        omega = 2 * mp.pi * exact(f)
        depth = mp.sqrt(2 * COPPER / (omega * MU0))
        d, big = exact(3e-3), exact(7e-3)
        rs = COPPER / depth
        line = {"kind": "coaxial", "inner_diameter_m": 3e-3, "outer_diameter_m": 7e-3, "conductor": "copper"}
        # I0/I1 = 1 + 1/(2 z) and K0/K1 = 1 - 1/(2 z): half a skin depth of radius less for the wire, more for the hole.
        r = rs / (mp.pi * d) * (1 + depth / d) + rs / (mp.pi * big) * (1 - depth / big)
        second = float((2 * depth / d) ** 2)
        yield check(PRIMARY, f"coaxial line with a thin skin, {f:g} Hz", "Rs/(pi d) + Rs/(pi D) (Pozar, 4th ed., example 2.5, from memory), each over a circumference half a skin depth inside the metal; to the second order in skin depth over radius", {"line": line, "frequency_hz": f}, {"/resistance_ohm_per_m": r}, second)


def checks():
    yield from crowding_checks()
    yield from direct_current_checks()
    yield from handbook_checks()
    yield from cable_checks()
    yield from thin_skin_checks()


if __name__ == "__main__":
    write(__file__, "Wires and cables of the handbooks, and crowding of current in near wires", checks())
