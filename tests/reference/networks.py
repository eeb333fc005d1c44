"""Reference values for two-ports: conversions, and cascades that hold two-ports given by their matrices.

No conversion formula is used. A two-port is two linear equations between the voltages and the currents into its ports (V1, I1, V2, I2): its own
definition, written out. What is asked for is found by setting the two independent quantities of its definition in turn and solving the four
equations. A cascade is solved the same way, all its elements' equations at once.
"""

import mpmath as mp

from support import check, complex_of, write

# Voltages and currents into the ports.
V1, I1, V2, I2 = ([mp.mpc(1 if k == n else 0) for k in range(4)] for n in range(4))


def row(*terms):
    """The row of a linear equation: sum of coefficient times row."""
    return [mp.fsum(c * r[k] for c, r in terms) for k in range(4)]


def waves(references):
    """Rows of a1, b1, a2, b2 as Kurokawa defines them."""
    z1, z2 = references
    k1, k2 = 2 * mp.sqrt(mp.re(z1)), 2 * mp.sqrt(mp.re(z2))
    return row((1 / k1, V1), (z1 / k1, I1)), row((1 / k1, V1), (-mp.conj(z1) / k1, I1)), row((1 / k2, V2), (z2 / k2, I2)), row((1 / k2, V2), (-mp.conj(z2) / k2, I2))


def definition(kind, references):
    """What depends on what: two dependent rows, two independent ones."""
    a1, b1, a2, b2 = waves(references)
    return {
        "abcd": ((V1, I1), (V2, row((-1, I2)))),
        "z": ((V1, V2), (I1, I2)),
        "y": ((I1, I2), (V1, V2)),
        "s": ((b1, b2), (a1, a2)),
        "t": ((b1, a1), (a2, b2)),
    }[kind]


NAMES = {kind: tuple(f"{kind}{k}" for k in ("11", "12", "21", "22")) for kind in "szyt"} | {"abcd": ("a", "b", "c", "d")}


def convert(source, target, values, references, wanted):
    """Entries by name."""
    x = [complex_of(values[name]) for name in NAMES[source]]
    (d1, d2), (i1, i2) = definition(source, references)
    equations = [row((1, d1), (-x[0], i1), (-x[1], i2)), row((1, d2), (-x[2], i1), (-x[3], i2))]
    (e1, e2), (j1, j2) = definition(target, wanted)
    matrix = mp.matrix(equations + [j1, j2])
    first, second = mp.lu_solve(matrix, mp.matrix([0, 0, 1, 0])), mp.lu_solve(matrix, mp.matrix([0, 0, 0, 1]))
    of = lambda r, s: mp.fsum(r[k] * s[k] for k in range(4))
    return dict(zip(NAMES[target], (of(e1, first), of(e1, second), of(e2, first), of(e2, second))))


def both(reference):
    return tuple(complex_of(each) for each in (reference if isinstance(reference, list) else [reference, reference]))


def polar(magnitude, angle):
    return {"magnitude": magnitude, "angle_deg": angle}


def rect(re, im=0):
    return {"re": re, "im": im}


GENERAL = {
    "abcd": {"a": rect(0.7, 0.31), "b": rect(12, 41), "c": rect(2e-3, 9e-3), "d": rect(0.62, -0.17)},
    "s": {"s11": rect(0.31, -0.42), "s12": rect(0.02, 0.05), "s21": rect(-2.9, 1.7), "s22": rect(0.45, 0.2)},
    "z": {"z11": rect(61, 18), "z12": rect(11, -7), "z21": rect(240, 90), "z22": rect(88, -35)},
    "y": {"y11": rect(0.02, 5e-3), "y12": rect(-1e-4, -7e-4), "y21": rect(0.04, -0.015), "y22": rect(1e-3, 6e-3)},
    "t": {"t11": rect(0.4, -0.3), "t12": rect(-0.1, 0.22), "t21": rect(0.15, 0.05), "t22": rect(1.2, 0.9)},
}
THROUGH = {"s11": 0, "s12": 1, "s21": 1, "s22": 0}
ISOLATOR = {"s11": 0, "s12": 0, "s21": 1, "s22": 0}
BACKWARD = {"s11": rect(0.1, 0.2), "s12": 1, "s21": 0, "s22": rect(-0.3, 0.1)}
SERIES = {"s11": 1 / 3, "s12": 2 / 3, "s21": 2 / 3, "s22": 1 / 3}
SHUNT = {"s11": -1 / 3, "s12": 2 / 3, "s21": 2 / 3, "s22": -1 / 3}
TRANSFORMER = {"a": 3, "b": 0, "c": 0, "d": 1 / 3}
GYRATOR = {"z11": 0, "z12": -75, "z21": 75, "z22": 0}

SYSTEM = "the definitions of both representations as four linear equations between V1, I1, V2 and I2 (Kurokawa 1965, equation 1, for the waves), solved to 30 digits"


def conversion_cases():
    """name, from, to, values, reference, wanted."""
    for source in GENERAL:
        for target in GENERAL:
            if source == target and source not in "st":
                continue
            yield f"general {source} to {target}, complex and unequal references", source, target, GENERAL[source], [rect(50, 12), rect(75, -30)], [rect(40, -9), rect(120, 25)]
    for target in "z", "y":
        yield f"backward isolator to {target}", "s", target, BACKWARD, 50, 50
    for target in "abcd", "z", "y", "t":
        yield f"isolator to {target}", "s", target, ISOLATOR, 50, 50
    yield "through to another reference", "s", "s", THROUGH, 50, [75, 30]
    yield "isolator to another reference", "s", "s", ISOLATOR, 50, rect(75, 20)
    yield "shunt resistor to Z", "s", "z", SHUNT, 50, 50
    yield "series resistor to Y", "s", "y", SERIES, 50, 50
    yield "transformer to S", "abcd", "s", TRANSFORMER, 50, 50
    yield "gyrator to S", "z", "s", GYRATOR, 50, 75
    yield "gyrator to ABCD", "z", "abcd", GYRATOR, 50, 50
    yield "very large impedances to S", "z", "s", {"z11": 1e12, "z12": 3e11, "z21": rect(2e11, 5e11), "z22": rect(1e9, -1e12)}, 50, 50
    yield "very small impedances to Y", "z", "y", {"z11": 1e-12, "z12": 3e-13, "z21": rect(2e-13, 5e-13), "z22": rect(1e-12, -1e-12)}, 50, 50
    yield "very large and small references", "z", "s", GENERAL["z"], 50, [1e12, 1e-12]
    yield "a high tee that hardly differs from a series element", "s", "z", {"s11": 0.9999, "s12": 5e-5, "s21": 5e-5, "s22": 0.9999}, 50, 50
    yield "an amplifier of 40 dB to T", "s", "t", {"s11": rect(0.1, -0.02), "s12": rect(1e-5, 2e-5), "s21": rect(-80, 60), "s22": rect(0.03, 0.01)}, 50, 75


def conversion_checks():
    for name, source, target, values, reference, wanted in conversion_cases():
        given = {"from": source, "to": target, "values": values, "reference_impedance_ohm": reference, "to_reference_impedance_ohm": wanted}
        answer = convert(source, target, values, both(reference), both(wanted))
        yield check("networks/convert", name, SYSTEM, given, {f"/values/{key}": value for key, value in answer.items()}, 1e-12)
    yield from published_conversions()


def no(kind):
    return {f"/values/{name}": None for name in NAMES[kind]}


def conversion(name, source, start, target, values, expected, tolerance, **more):
    return check("networks/convert", name, source, {"from": start, "to": target, "values": values, **more}, {f"/values/{key}": value for key, value in expected.items()}, tolerance)


def published_conversions():
    circuits = "element values and definitions of Z, Y and ABCD (Pozar, Microwave Engineering, 4th ed., section 4.2 and table 4.1, from memory)"
    yield check("networks/convert", "a series resistor has no Z", circuits, {"from": "s", "to": "z", "values": SERIES}, no("z"), 1e-12)
    yield check("networks/convert", "a shunt resistor has no Y", circuits, {"from": "s", "to": "y", "values": SHUNT}, no("y"), 1e-12)
    for kind in "zy":
        yield check("networks/convert", f"a through has no {kind.upper()}", circuits, {"from": "s", "to": kind, "values": THROUGH}, no(kind), 1e-12)
        yield check("networks/convert", f"an ideal transformer has no {kind.upper()}", circuits, {"from": "abcd", "to": kind, "values": TRANSFORMER}, no(kind), 1e-12)
    for kind in "abcd", "t":
        yield check("networks/convert", f"what passes nothing has no {kind}", "S21 = 0 leaves port 2 without any relation to port 1", {"from": "s", "to": kind, "values": BACKWARD}, no(kind), 1e-12)
    yield check("networks/convert", "a negative resistance of twice the reference has no S", "1/S11 = 1 + 2 Z0/Z vanishes at Z = -2 Z0 (Pozar, 4th ed., section 4.3, from memory)",
                {"from": "abcd", "to": "s", "values": {"a": 1, "b": -100, "c": 0, "d": 1}}, no("s"), 1e-12)

    pads = "published table of 50 ohm attenuators (from memory): "
    # dB, pi shunt, pi series, tee series, tee shunt: to the digits of the table.
    for loss, shunt, through, arm, leg, tolerance in ((3, 292.4, 17.61, 8.55, 141.93, 2e-4), (6, 150.48, 37.35, 16.61, 66.93, 2e-4), (10, 96.25, 71.15, 25.97, 35.14, 2e-4), (20, 61.11, 247.5, 40.91, 10.10, 6e-4)):
        gain = mp.mpf(10) ** (-mp.mpf(loss) / 20)
        y, t = 1 / shunt, 1 / through
        matched = {"s11": mp.mpf(0), "s21": gain, "s12": gain}
        yield conversion(f"pi attenuator of {loss} dB", f"{pads}{shunt} and {through} ohm for {loss} dB", "y", "s", {"y11": y + t, "y12": -t, "y21": -t, "y22": y + t}, matched, tolerance)
        yield conversion(f"tee attenuator of {loss} dB", f"{pads}{arm} and {leg} ohm for {loss} dB", "z", "s", {"z11": arm + leg, "z12": leg, "z21": leg, "z22": arm + leg}, matched, tolerance)
    n = mp.mpf(3)
    yield conversion("transformer of 3 to 1", "S11 = (n^2 - 1)/(n^2 + 1), S21 = 2n/(n^2 + 1) (Collin, Foundations for Microwave Engineering, 2nd ed., chapter 4, from memory)", "abcd", "s", TRANSFORMER,
                     {"s11": (n * n - 1) / (n * n + 1), "s12": 2 * n / (n * n + 1), "s21": 2 * n / (n * n + 1), "s22": (1 - n * n) / (n * n + 1)}, 1e-12)
    yield conversion("gyrator at its own resistance", "Tellegen, The gyrator, Philips Research Reports 3 (1948) 81-101 (from memory): matched both ways, and the sign changes one way", "z", "s", GYRATOR,
                     {"s11": mp.mpf(0), "s12": mp.mpf(-1), "s21": mp.mpf(1), "s22": mp.mpf(0)}, 1e-12, to_reference_impedance_ohm=75)
    zc = mp.mpc(50, -20)
    same = {"a": 1, "b": 0, "c": 0, "d": 1}
    yield conversion("a through between complex references reflects unless they are conjugate", "Kurokawa 1965, equation 10: Gamma = (Z - Zr*)/(Z + Zr), with Marks and Williams 1995 on the waves of a complex reference",
                     "abcd", "s", same, {"s11": (zc - mp.conj(zc)) / (2 * zc), "s21": 2 * mp.re(zc) / (2 * zc)}, 1e-12, to_reference_impedance_ohm=rect(50, -20))
    yield conversion("a through between conjugate references", "Kurokawa 1965: conjugate match takes all the available power", "abcd", "s", same, {"s11": mp.mpf(0), "s12": mp.mpf(1), "s21": mp.mpf(1), "s22": mp.mpf(0)}, 1e-12,
                     to_reference_impedance_ohm=[rect(50, -20), rect(50, 20)])


def checks():
    yield from conversion_checks()


if __name__ == "__main__":
    write(__file__, "Two-ports", checks())
