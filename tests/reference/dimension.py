"""Dimensions that give a wanted impedance, to 30 digits.

Perfect conductors have closed forms, here solved for the dimension: no search. Strips between planes are solved on the elliptic integrals
themselves (Cohn 1954), with 130 digits, where the engine uses arithmetic-geometric means; solid copper on its Bessel functions (Schelkunoff 1934).
Sensitivities are the analytic derivatives. A line with a lossy filling has a complex impedance, of which the real part is the wanted one.
"""

import mpmath as mp

from support import J, LIGHT, check, exact, write

MU = mp.mpf("1.25663706127e-6")
ETA = MU * LIGHT
COPPER = 1 / mp.mpf(58000000)
PERFECT = "perfect"


def filling(dielectric):
    """Complex relative permittivity."""
    if dielectric is None:
        return mp.mpf(1)
    er, tangent = exact(dielectric["relative_permittivity"]), exact(dielectric.get("loss_tangent", 0))
    return er * (1 - J * tangent)


# kind -> (form factor of the dimensions: Zc = eta / sqrt(er) * F, its inverse for each dimension)

FORMS = {
    "coaxial": (
        lambda g: mp.log(g["outer_diameter_m"] / g["inner_diameter_m"]) / (2 * mp.pi),
        {
            "inner_diameter_m": lambda g, f: g["outer_diameter_m"] * mp.exp(-2 * mp.pi * f),
            "outer_diameter_m": lambda g, f: g["inner_diameter_m"] * mp.exp(2 * mp.pi * f),
        },
    ),
    "two_wire": (
        lambda g: mp.acosh(g["spacing_m"] / g["conductor_diameter_m"]) / mp.pi,
        {
            "spacing_m": lambda g, f: g["conductor_diameter_m"] * mp.cosh(mp.pi * f),
            "conductor_diameter_m": lambda g, f: g["spacing_m"] / mp.cosh(mp.pi * f),
        },
    ),
    "wire_over_plane": (
        lambda g: mp.acosh(2 * g["height_m"] / g["conductor_diameter_m"]) / (2 * mp.pi),
        {
            "height_m": lambda g, f: g["conductor_diameter_m"] * mp.cosh(2 * mp.pi * f) / 2,
            "conductor_diameter_m": lambda g, f: 2 * g["height_m"] / mp.cosh(2 * mp.pi * f),
        },
    ),
    "parallel_plate": (
        lambda g: g["separation_m"] / g["width_m"],
        {"separation_m": lambda g, f: g["width_m"] * f, "width_m": lambda g, f: g["separation_m"] / f},
    ),
    # Cohn 1954: F = K(k) / (4 K(k')), k = sech(pi w / 2b). K takes the parameter m = k^2.
    "stripline": (
        lambda g: strip(mp.pi * g["width_m"] / (2 * g["plane_spacing_m"])),
        {
            "width_m": lambda g, f: 2 * g["plane_spacing_m"] / mp.pi * strip_argument(f),
            "plane_spacing_m": lambda g, f: mp.pi * g["width_m"] / (2 * strip_argument(f)),
        },
    ),
}


def strip(argument):
    return mp.ellipk(mp.sech(argument) ** 2) / (4 * mp.ellipk(mp.tanh(argument) ** 2))


def strip_argument(factor):
    """The nome gives the modulus without a search: q = exp(-pi K'/K), k = theta2^2 / theta3^2 (DLMF 22.2)."""
    nome = mp.exp(-mp.pi / (4 * factor))
    k = (mp.jtheta(2, 0, nome) / mp.jtheta(3, 0, nome)) ** 2
    return mp.asech(k)


def perfect(case):
    line, vary = case["line"], case["vary"]
    form, inverses = FORMS[line["kind"]]
    given = {name: exact(value) for name, value in line.items() if name.endswith("_m")}
    # Re(Zc) = eta Re(1/sqrt(er)) F; a constant loss tangent does nothing to the limit at direct current.
    root = 1 / mp.sqrt(filling(line.get("dielectric")))
    scale = mp.re(root) * ETA
    wanted = exact(case["characteristic_impedance_ohm"])
    value = inverses[vary](given, wanted / scale)
    slope = mp.diff(lambda x: form({**given, vary: x}), value) * scale
    return {"/value": value, "/achieved_impedance_ohm": mp.mpc(ETA * root * form({**given, vary: value})), "/sensitivity_ohm_per_m": slope}


# Every case is a wire of a made-up maker, but of ordinary size.
PTFE = {"relative_permittivity": 2.1}
LOSSY = {"relative_permittivity": 4.3, "loss_tangent": 0.02}
VERY_LOSSY = {"relative_permittivity": 6, "loss_tangent": 0.8}
CASES = [
    ("coaxial", "air line of 7 mm, 50 ohm", {"outer_diameter_m": 7e-3}, "inner_diameter_m", 50, 1e9, None),
    ("coaxial", "air line of 3.5 mm, 50 ohm", {"outer_diameter_m": 3.5e-3}, "inner_diameter_m", 50, 18e9, None),
    ("coaxial", "shield over 0.9 mm in PTFE, 75 ohm", {"inner_diameter_m": 0.9e-3}, "outer_diameter_m", 75, 1e8, PTFE),
    ("coaxial", "at direct current", {"inner_diameter_m": 0.9e-3}, "outer_diameter_m", 93, 0, PTFE),
    ("coaxial", "fine wire, 300 ohm", {"outer_diameter_m": 10e-3}, "inner_diameter_m", 300, 1e6, None),
    ("coaxial", "tube in a tube, 2 ohm", {"outer_diameter_m": 50e-3}, "inner_diameter_m", 2, 1e6, None),
    ("coaxial", "lossy filling", {"outer_diameter_m": 4e-3}, "inner_diameter_m", 50, 1e9, LOSSY),
    ("coaxial", "very lossy filling", {"inner_diameter_m": 1e-3}, "outer_diameter_m", 35, 1e9, VERY_LOSSY),
    ("two_wire", "open pair, 600 ohm", {"conductor_diameter_m": 2e-3}, "spacing_m", 600, 3e6, None),
    ("two_wire", "open pair, 300 ohm", {"spacing_m": 20e-3}, "conductor_diameter_m", 300, 3e6, None),
    ("two_wire", "close pair, 100 ohm", {"conductor_diameter_m": 0.5e-3}, "spacing_m", 100, 1e8, {"relative_permittivity": 2.26}),
    ("two_wire", "conductors that nearly touch, 20 ohm", {"spacing_m": 5e-3}, "conductor_diameter_m", 20, 1e6, None),
    ("wire_over_plane", "wire over a chassis, 200 ohm", {"conductor_diameter_m": 1e-3}, "height_m", 200, 1e7, None),
    ("wire_over_plane", "wire over a chassis, 50 ohm", {"height_m": 1e-3}, "conductor_diameter_m", 50, 1e7, None),
    ("wire_over_plane", "in a lossy filling", {"height_m": 4e-3}, "conductor_diameter_m", 90, 1e7, LOSSY),
    ("parallel_plate", "bus bar, 5 ohm", {"width_m": 40e-3, "thickness_m": 1e-3}, "separation_m", 5, 1e5, None),
    ("parallel_plate", "foil on a film, 1 ohm", {"separation_m": 0.1e-3, "thickness_m": 35e-6}, "width_m", 1, 1e5, PTFE),
    ("stripline", "50 ohm between planes 1 mm apart", {"plane_spacing_m": 1e-3}, "width_m", 50, 1e9, LOSSY),
    ("stripline", "120 ohm, a narrow strip", {"plane_spacing_m": 1e-3}, "width_m", 120, 1e9, None),
    ("stripline", "10 ohm, a wide strip", {"plane_spacing_m": 0.5e-3}, "width_m", 10, 1e9, PTFE),
    ("stripline", "planes for 75 ohm over 0.3 mm", {"width_m": 0.3e-3}, "plane_spacing_m", 75, 1e9, PTFE),
]
EXTRA = {
    "coaxial": {"conductor": PERFECT, "shield": PERFECT},
    "two_wire": {"conductor": PERFECT},
    "wire_over_plane": {"conductor": PERFECT},
    "parallel_plate": {"conductor": PERFECT},
    "stripline": {"conductor": PERFECT, "thickness_m": 0},
}
KINDS = ("coaxial", "coaxial, copper")


def exact_cases():
    for kind, name, given, vary, wanted, frequency, dielectric in CASES:
        if kind not in KINDS:
            continue
        line = {"kind": kind, **given, **EXTRA[kind], **({"dielectric": dielectric} if dielectric else {})}
        yield f"{kind.replace('_', ' ')}: {name}", {"line": line, "vary": vary, "characteristic_impedance_ohm": wanted, "frequency_hz": frequency}


def copper_impedance(inner, outer, omega, permittivity):
    """Schelkunoff 1934: solid wire inside, a thick wall outside, both of copper; magnetic field between them, no field beyond."""
    gamma = mp.sqrt(J * omega * MU / COPPER)
    own = mp.sqrt(J * omega * MU * COPPER)
    a, b = inner / 2, outer / 2
    inside = own / (2 * mp.pi * a) * mp.besseli(0, gamma * a) / mp.besseli(1, gamma * a)
    wall = own / (2 * mp.pi * b) * mp.besselk(0, gamma * b) / mp.besselk(1, gamma * b)
    series = inside + wall + J * omega * MU / (2 * mp.pi) * mp.log(b / a)
    shunt = J * omega * 2 * mp.pi * permittivity / (MU * LIGHT**2) / mp.log(b / a)
    return mp.sqrt(series / shunt)


COPPER_CASES = [
    ("50 ohm at 100 MHz", {"outer_diameter_m": 2.95e-3}, "inner_diameter_m", 50, 1e8, {"relative_permittivity": 2.26}),
    ("75 ohm at 1 MHz", {"inner_diameter_m": 0.9e-3}, "outer_diameter_m", 75, 1e6, {"relative_permittivity": 1.5, "loss_tangent": 0.0002}),
    ("50 ohm at 10 kHz, where the field fills the wire", {"outer_diameter_m": 2.95e-3}, "inner_diameter_m", 50, 1e4, {"relative_permittivity": 2.26}),
    ("50 ohm at 10 GHz, microscopic", {"outer_diameter_m": 0.1e-3}, "inner_diameter_m", 50, 1e10, {"relative_permittivity": 2.1, "loss_tangent": 0.0007}),
]


def copper(case):
    line, vary = case["line"], case["vary"]
    omega, permittivity = 2 * mp.pi * exact(case["frequency_hz"]), filling(line["dielectric"])
    other = exact(line["outer_diameter_m" if vary == "inner_diameter_m" else "inner_diameter_m"])
    sizes = lambda x: (x, other) if vary == "inner_diameter_m" else (other, x)
    real = lambda x: mp.re(copper_impedance(*sizes(x), omega, permittivity))
    wanted = exact(case["characteristic_impedance_ohm"])
    ratio = mp.exp(2 * mp.pi * wanted * mp.sqrt(mp.re(permittivity)) / ETA)
    start = other / ratio if vary == "inner_diameter_m" else other * ratio
    with mp.workdps(50):
        value = mp.findroot(lambda x: real(x) - wanted, (start, start * mp.mpf("1.001")), tol=mp.mpf(10) ** -80)
        slope = mp.diff(real, value, h=value * mp.mpf(10) ** -15)
    return {"/value": value, "/achieved_impedance_ohm": copper_impedance(*sizes(value), omega, permittivity), "/sensitivity_ohm_per_m": slope}


CLOSED = "closed form of perfect conductors, solved for the dimension, computed to 30 digits; strips by theta functions of the nome (Cohn, Characteristic impedance of the shielded-strip transmission line, IRE Trans. MTT-2 (1954) 52-57; DLMF 22.2), derivative analytic"
BESSEL = "Bessel functions of solid copper inside a thick copper wall (Schelkunoff, The electromagnetic theory of coaxial transmission lines and cylindrical shields, Bell Syst. Tech. J. 13 (1934) 532-579), the root by secants with 50 digits"
DIFFERENCES = {"/sensitivity_ohm_per_m": {"tolerance": 1e-9, "reason": "a derivative by extrapolated differences of float64 numbers loses a third of their digits"}}


def checks():
    for name, case in exact_cases():
        yield check("lines/dimension", name, CLOSED, case, perfect(case), 1e-12, exceptions=DIFFERENCES)
    if "coaxial, copper" in KINDS:
        for name, given, vary, wanted, frequency, dielectric in COPPER_CASES:
            case = {"line": {"kind": "coaxial", **given, "dielectric": dielectric}, "vary": vary, "characteristic_impedance_ohm": wanted, "frequency_hz": frequency}
            yield check("lines/dimension", f"coaxial, copper: {name}", BESSEL, case, copper(case), 1e-12, exceptions=DIFFERENCES)


if __name__ == "__main__":
    write(__file__, "Dimensions", checks())
