"""Dimensions that give a wanted impedance, to 30 digits.

Perfect conductors have closed forms, here solved for the dimension: no search. Strips between planes and coplanar strips are solved by theta
functions of the nome, where the engine uses arithmetic-geometric means; solid copper on its Bessel functions (Schelkunoff 1934); what has only an
approximate formula on the formula, with 60 digits and by secants, which proves the search and not the formula.
Sensitivities are derivatives with all digits. A line with a lossy filling has a complex impedance, of which the real part is the wanted one.
"""

import mpmath as mp

from support import J, LIGHT, check, exact, write

mp.mp.dps = 60

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


def twist(line):
    """Lefferson 1971: the share of the insulation, from the angle of the twist in degrees."""
    degrees = mp.degrees(mp.atan(mp.pi * exact(line["twists_per_m"]) * exact(line["insulation_diameter_m"])))
    return min(mp.mpf(1), mp.mpf("0.25") + mp.mpf("0.0004") * degrees**2)


# What share of the insulation's or the substrate's permittivity beyond 1 the field sees.
SHARES = {"twisted_pair": twist, "coplanar": lambda line: mp.mpf("0.5")}

# kind -> (form factor of the dimensions: Zc = eta / sqrt(effective permittivity) * F, its inverse for each dimension)

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
    "twisted_pair": (
        lambda g: mp.acosh(g["insulation_diameter_m"] / g["conductor_diameter_m"]) / mp.pi,
        {"conductor_diameter_m": lambda g, f: g["insulation_diameter_m"] / mp.cosh(mp.pi * f)},
    ),
    # Wen 1969: F = K(k') / (4 K(k)), k = w / (w + 2 s).
    "coplanar": (
        lambda g: slot(g["width_m"] / (g["width_m"] + 2 * g["gap_m"])),
        {
            "width_m": lambda g, f: 2 * g["gap_m"] * modulus(mp.exp(-4 * mp.pi * f)) / (1 - modulus(mp.exp(-4 * mp.pi * f))),
            "gap_m": lambda g, f: g["width_m"] * (1 / modulus(mp.exp(-4 * mp.pi * f)) - 1) / 2,
        },
    ),
}


def slot(k):
    return mp.ellipk(1 - k**2) / (4 * mp.ellipk(k**2))


def modulus(nome):
    """k = theta2^2 / theta3^2 (DLMF 22.2), where the nome is exp(-pi K'/K)."""
    return (mp.jtheta(2, 0, nome) / mp.jtheta(3, 0, nome)) ** 2


def strip(argument):
    return mp.ellipk(mp.sech(argument) ** 2) / (4 * mp.ellipk(mp.tanh(argument) ** 2))


def strip_argument(factor):
    return mp.asech(modulus(mp.exp(-mp.pi / (4 * factor))))


def perfect(case):
    line, vary = case["line"], case["vary"]
    form, inverses = FORMS[line["kind"]]
    given = {name: exact(value) for name, value in line.items() if name.endswith("_m")}
    # Re(Zc) = eta Re(1/sqrt(er)) F; a constant loss tangent does nothing to the limit at direct current.
    share = SHARES.get(line["kind"], lambda _: mp.mpf(1))(line)
    root = 1 / mp.sqrt(1 + share * (filling(line.get("dielectric")) - 1))
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
    ("twisted_pair", "untwisted, 100 ohm", {"insulation_diameter_m": 0.5e-3, "twists_per_m": 0}, "conductor_diameter_m", 100, 1e7, PTFE),
    ("twisted_pair", "60 turns in a metre, 120 ohm", {"insulation_diameter_m": 1e-3, "twists_per_m": 60}, "conductor_diameter_m", 120, 1e7, {"relative_permittivity": 2.26}),
    ("coplanar", "50 ohm on a thick substrate, the width", {"gap_m": 0.1e-3}, "width_m", 50, 1e9, {"relative_permittivity": 9.8}),
    ("coplanar", "50 ohm on a thick substrate, the gap", {"width_m": 0.3e-3}, "gap_m", 50, 1e9, {"relative_permittivity": 9.8}),
    ("coplanar", "120 ohm, lossy", {"width_m": 0.3e-3}, "gap_m", 120, 1e9, LOSSY),
    ("coplanar", "25 ohm, a fine gap", {"width_m": 1e-3}, "gap_m", 25, 1e9, {"relative_permittivity": 12.9}),
    ("stripline", "planes for 75 ohm over 0.3 mm", {"width_m": 0.3e-3}, "plane_spacing_m", 75, 1e9, PTFE),
]
EXTRA = {
    "coaxial": {"conductor": PERFECT, "shield": PERFECT},
    "two_wire": {"conductor": PERFECT},
    "wire_over_plane": {"conductor": PERFECT},
    "parallel_plate": {"conductor": PERFECT},
    "twisted_pair": {"conductor": PERFECT},
    "coplanar": {"conductor": PERFECT},
    "stripline": {"conductor": PERFECT, "thickness_m": 0},
}


def exact_cases():
    for kind, name, given, vary, wanted, frequency, dielectric in CASES:
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
        value = mp.findroot(lambda x: real(x) - wanted, (start, start * mp.mpf("1.001")), tol=mp.mpf(10) ** -45)
        slope = mp.diff(real, value, h=value * mp.mpf(10) ** -15)
    return {"/value": value, "/achieved_impedance_ohm": copper_impedance(*sizes(value), omega, permittivity), "/sensitivity_ohm_per_m": slope}


def hammerstad_jensen(line):
    """Of a flat strip, without dispersion: equations 1 to 9 of the paper, from memory."""
    er, u = exact(line["dielectric"]["relative_permittivity"]), line["width_m"] / line["height_m"]
    n = mp.mpf
    f = 6 + (2 * mp.pi - 6) * mp.exp(-((n("30.666") / u) ** n("0.7528")))
    a = 1 + mp.log((u**4 + (u / 52) ** 2) / (u**4 + n("0.432"))) / 49 + mp.log(1 + (u / n("18.1")) ** 3) / n("18.7")
    b = n("0.564") * ((er - n("0.9")) / (er + 3)) ** n("0.053")
    effective = (er + 1) / 2 + (er - 1) / 2 * (1 + 10 / u) ** (-a * b)
    return ETA / (2 * mp.pi) * mp.log(f / u + mp.sqrt(1 + 4 / u**2)) / mp.sqrt(effective)


def ghione_naldi(line):
    """A coplanar line over a plane, by the two conformal maps of its halves, from memory."""
    er, w, s, h = exact(line["dielectric"]["relative_permittivity"]), line["width_m"], line["gap_m"], line["height_m"]
    above = slot(w / (w + 2 * s))
    below = slot(mp.tanh(mp.pi * w / (4 * h)) / mp.tanh(mp.pi * (w + 2 * s) / (4 * h)))
    # Admittances of the two halves: 2 K(k)/K(k') = 1/(2 F).
    empty, filled = 1 / (2 * above) + 1 / (2 * below), 1 / (2 * above) + er / (2 * below)
    return ETA / mp.sqrt(empty * filled)


FORMULAS = {"microstrip": hammerstad_jensen, "coplanar": ghione_naldi}
FORMULA_CASES = [
    ("microstrip", "50 ohm on laminate, the width", {"height_m": 1.6e-3, "dispersion": False}, "width_m", 50, 1e8, 4.3),
    ("microstrip", "50 ohm on alumina, the width", {"height_m": 0.635e-3, "dispersion": False}, "width_m", 50, 1e8, 9.8),
    ("microstrip", "75 ohm over 0.5 mm, the height", {"width_m": 0.5e-3, "dispersion": False}, "height_m", 75, 1e8, 2.2),
    ("microstrip", "15 ohm, a wide strip", {"height_m": 0.5e-3, "dispersion": False}, "width_m", 15, 1e8, 4.3),
    ("coplanar", "over a plane, 50 ohm, the width", {"gap_m": 0.2e-3, "height_m": 1e-3, "backed": True}, "width_m", 50, 1e9, 4.3),
    ("coplanar", "over a plane, 60 ohm, the gap", {"width_m": 0.4e-3, "height_m": 1e-3, "backed": True}, "gap_m", 60, 1e9, 4.3),
    ("coplanar", "over a plane, 70 ohm, the height", {"width_m": 1e-3, "gap_m": 0.6e-3, "backed": True}, "height_m", 70, 1e9, 2.2),
]


def by_formula(case):
    line, vary = case["line"], case["vary"]
    sizes = {name: exact(value) for name, value in line.items() if name.endswith("_m")}
    impedance = lambda x: FORMULAS[line["kind"]]({**line, **sizes, vary: x})
    wanted = exact(case["characteristic_impedance_ohm"])
    # In the logarithm of the dimension, which spans decades.
    value = mp.exp(mp.findroot(lambda y: impedance(mp.exp(y)) - wanted, (mp.log(mp.mpf("5e-4")), mp.log(mp.mpf("6e-4")))))
    return {"/value": value, "/achieved_impedance_ohm": mp.mpc(impedance(value)), "/sensitivity_ohm_per_m": mp.diff(impedance, value, h=value * mp.mpf(10) ** -15)}


CLOSED = "closed form of perfect conductors, solved for the dimension, computed to 30 digits (Pozar, Microwave Engineering, 4th ed., table 2.1, from memory)"
THETA = "the modulus by theta functions of the nome (DLMF 22.2), computed to 30 digits; "
SOURCES = {
    "stripline": THETA + "Cohn, Characteristic impedance of the shielded-strip transmission line, IRE Trans. MTT-2 (1954) 52-57",
    "coplanar": THETA + "Wen, Coplanar waveguide, IEEE Trans. MTT-17 (1969) 1087-1090",
    "twisted pair": "formula solved for the wire, computed to 30 digits; Lefferson, Twisted magnet wire transmission line, IEEE Trans. PHP-7 (1971) 148-154 (from memory)",
}
BESSEL = "Bessel functions of solid copper inside a thick copper wall (Schelkunoff, The electromagnetic theory of coaxial transmission lines and cylindrical shields, Bell Syst. Tech. J. 13 (1934) 532-579), the root by secants with 50 digits"
SECANTS = {
    "microstrip": "the root by secants with 60 digits of the formulas of Hammerstad and Jensen, Accurate models for microstrip computer-aided design, MTT-S Digest (1980) 407-409 (from memory)",
    "coplanar": "the root by secants with 60 digits of the conformal maps of Ghione and Naldi, Coplanar waveguides for MMIC applications, IEEE Trans. MTT-35 (1987) 260-267 (from memory)",
}
DIFFERENCES = {"/sensitivity_ohm_per_m": {"tolerance": 1e-10, "reason": "a derivative by extrapolated differences of float64 numbers loses a third of their digits"}}


def checks():
    for name, case in exact_cases():
        yield check("lines/dimension", name, SOURCES.get(name.split(":")[0], CLOSED), case, perfect(case), 1e-12, exceptions=DIFFERENCES)
    for name, given, vary, wanted, frequency, dielectric in COPPER_CASES:
        case = {"line": {"kind": "coaxial", **given, "dielectric": dielectric}, "vary": vary, "characteristic_impedance_ohm": wanted, "frequency_hz": frequency}
        yield check("lines/dimension", f"coaxial, copper: {name}", BESSEL, case, copper(case), 1e-12, exceptions=DIFFERENCES)
    for kind, name, given, vary, wanted, frequency, er in FORMULA_CASES:
        line = {"kind": kind, **given, "thickness_m": 0, "conductor": PERFECT, "dielectric": {"relative_permittivity": er}}
        case = {"line": line, "vary": vary, "characteristic_impedance_ohm": wanted, "frequency_hz": frequency}
        yield check("lines/dimension", f"{kind}: {name}", SECANTS[kind], case, by_formula(case), 1e-12, exceptions=DIFFERENCES)


if __name__ == "__main__":
    write(__file__, "Dimensions", checks())
