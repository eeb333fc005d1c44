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


def checks():
    yield from coaxial_checks()
    yield from ratio_checks()


if __name__ == "__main__":
    write(__file__, "Lines of round and flat conductors", checks())
