"""Reference values for two-ports: conversions, and cascades that hold two-ports given by their matrices.

No conversion formula is used. A two-port is two linear equations between the voltages and the currents into its ports (V1, I1, V2, I2): its own
definition, written out. What is asked for is found by setting the two independent quantities of its definition in turn and solving the four
equations. A cascade is solved the same way, all its elements' equations at once.
"""

import mpmath as mp

import support
from support import abcd_of_line, check, exact, parts_impedance, write

# Voltages and currents into the ports.
V1, I1, V2, I2 = ([mp.mpc(1 if k == n else 0) for k in range(4)] for n in range(4))


def complex_of(value):
    if isinstance(value, dict) and "magnitude" in value:
        return exact(value["magnitude"]) * mp.expjpi(exact(value["angle_deg"]) / 180)
    return support.complex_of(value)


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


def flat(elements):
    for element in elements:
        if element["kind"] == "cascade":
            for _ in range(element.get("repeat", 1)):
                yield from flat(element["elements"])
        else:
            yield element


def equations(element, omega):
    """Two rows that vanish on (V1, I1, V2, I2)."""
    kind = element["kind"]
    if kind == "two_port":
        source = element["representation"]
        x = [complex_of(element["values"][name]) for name in NAMES[source]]
        (d1, d2), (i1, i2) = definition(source, both(element.get("reference_impedance_ohm", 50)))
        return row((1, d1), (-x[0], i1), (-x[1], i2)), row((1, d2), (-x[2], i1), (-x[3], i2))
    if kind == "line":
        total = abcd_of_line(element["line"], element["length_m"], omega)
        return row((1, V1), (-total[0, 0], V2), (total[0, 1], I2)), row((1, I1), (-total[1, 0], V2), (total[1, 1], I2))
    if kind == "transformer":
        n = exact(element["turns_ratio"])
        return row((1, V1), (-n, V2)), row((n, I1), (1, I2))
    z = complex_of(element["impedance_ohm"]) if "impedance_ohm" in element else parts_impedance(element, element.get("connection", "series"), omega)
    if kind == "series":
        return row((1, I1), (1, I2)), (row((1, I1)) if z is None else row((1, V1), (-1, V2), (-z, I1)))
    return row((1, V1), (-1, V2)), (row((1, I1), (1, I2)) if z is None else row((1, V1), (-z, I1), (-z, I2)))


def solved(case, omega):
    """Voltages and currents into both ends with a unit source behind the reference of port 1, and of port 2."""
    elements = list(flat(case["elements"]))
    references = both(case.get("reference_impedance_ohm", 50))
    count = len(elements)
    matrix = mp.zeros(2 * count + 2, 2 * count + 2)
    for k, element in enumerate(elements):
        for line, (v1, i1, v2, i2) in enumerate(equations(element, omega)):
            # The current to the right at a node leaves one element and enters the next.
            for column, value in ((2 * k, v1), (2 * k + 1, i1), (2 * k + 2, v2), (2 * k + 3, -i2)):
                matrix[2 * k + line, column] = value
    end = 2 * count
    matrix[end, 0], matrix[end, 1] = 1, references[0]
    matrix[end + 1, end], matrix[end + 1, end + 1] = 1, -references[1]
    factors, order = mp.mp.LU_decomp(matrix)
    for driven in (0, 1):
        source = mp.zeros(2 * count + 2, 1)
        source[end + driven] = 1
        x = mp.mp.U_solve(factors, mp.mp.L_solve(factors, source, order))
        yield (x[0], x[1]), (x[end], -x[end + 1])


def scattering_of(case, omega):
    z1, z2 = both(case.get("reference_impedance_ohm", 50))
    answer = {}
    for driven, z, ends in zip((1, 2), (z1, z2), solved(case, omega)):
        a = 1 / (2 * mp.sqrt(mp.re(z)))
        for port, own, (v, i) in zip((1, 2), (z1, z2), ends):
            answer[port, driven] = (v - mp.conj(own) * i) / (2 * mp.sqrt(mp.re(own))) / a
    return answer


def cascade(case):
    omega = 2 * mp.pi * exact(case["frequency_hz"])
    s = scattering_of(case, omega)
    s11, s12, s21, s22 = s[1, 1], s[1, 2], s[2, 1], s[2, 2]
    z1, _ = both(case.get("reference_impedance_ohm", 50))
    answer = {"/s/s11": s11, "/s/s12": s12, "/s/s21": s21, "/s/s22": s22, "/input_impedance_ohm": (mp.conj(z1) + s11 * z1) / (1 - s11)}
    determinant = s11 * s22 - s12 * s21
    if s12 * s21 != 0:
        answer["/rollett_stability_factor"] = (1 - abs(s11) ** 2 - abs(s22) ** 2 + abs(determinant) ** 2) / (2 * abs(s12 * s21))
    answer["/stability_measure"] = (1 - abs(s11) ** 2) / (abs(s22 - determinant * mp.conj(s11)) + abs(s12 * s21))
    if s21 != 0:
        answer["/insertion_loss_db"] = -20 * mp.log10(abs(s21))
        h = omega * mp.mpf(10) ** -12
        phase = lambda w: mp.arg(scattering_of(case, w)[2, 1] / s21)
        answer["/group_delay_s"] = -(8 * (phase(omega + h) - phase(omega - h)) - (phase(omega + 2 * h) - phase(omega - 2 * h))) / (12 * h)
    gain = max(mp.svd_c(mp.matrix([[s11, s12], [s21, s22]]), compute_uv=False))
    answer["/passive"] = bool(gain <= 1 + mp.mpf(10) ** -12)
    answer["/reciprocal"] = bool(abs(s12 - s21) <= mp.mpf(10) ** -12 * max(abs(s12), abs(s21)))
    return answer


CABLE = {"kind": "rlgc", "resistance_ohm_per_m": 0.12, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 2.5e-5, "capacitance_f_per_m": 1e-10}
SEVENTY = {"kind": "lossless", "characteristic_impedance_ohm": 75, "velocity_factor": 0.84}


def given(kind, values, reference=None):
    return {"kind": "two_port", "representation": kind, "values": values} | ({} if reference is None else {"reference_impedance_ohm": reference})


def length(metres, line=CABLE):
    return {"kind": "line", "line": line, "length_m": metres}


def nested(elements, repeat=1):
    return {"kind": "cascade", "elements": elements, "repeat": repeat}


TRANSISTOR = {"s11": polar(0.894, -60.6), "s12": polar(0.02, 62.4), "s21": polar(3.122, 123.6), "s22": polar(0.781, -27.6)}
PAD = {"s11": rect(0.02, 0.01), "s12": 0.3, "s21": 0.3, "s22": rect(-0.01, 0.02)}
LADDER = [{"kind": "series", "inductance_h": 2.5e-9, "resistance_ohm": 1e-3}, {"kind": "shunt", "capacitance_f": 1e-12}]


def cascade_cases():
    for kind, values in GENERAL.items():
        yield f"general {kind} between a line and a resistor", [length(0.4), given(kind, values, [rect(50, 12), rect(75, -30)] if kind in "st" else None), {"kind": "shunt", "resistance_ohm": 330}], 2e8, [rect(45, 5), rect(60, -8)]
    yield "S of another reference alone", [given("s", GENERAL["s"], 75)], 1e9, 50
    yield "isolator between unlike lines", [length(0.3, SEVENTY), given("s", {"s11": rect(0.05, 0.02), "s12": 0.01, "s21": 0.93, "s22": rect(0.04, -0.03)}), length(0.5)], 9e8, 50
    yield "ideal isolator between unlike lines", [length(0.3, SEVENTY), given("s", {"s11": rect(0.05, 0.02), "s12": 0, "s21": 0.93, "s22": rect(0.04, -0.03)}), length(0.5)], 9e8, 50
    yield "isolator turned round", [length(0.3, SEVENTY), given("s", {"s11": rect(0.05, 0.02), "s12": 0.93, "s21": 0, "s22": rect(0.04, -0.03)}), length(0.5)], 9e8, 50
    yield "what passes nothing", [length(0.3, SEVENTY), given("s", {"s11": rect(0.5, 0.2), "s12": 0, "s21": 0, "s22": rect(0.4, -0.3)}), length(0.5)], 9e8, 50
    yield "two isolators face to face", [given("s", {"s11": rect(0.1, 0.2), "s12": 0, "s21": 0.9, "s22": 0.3}), length(0.1), given("s", {"s11": rect(-0.2, 0.1), "s12": 0.8, "s21": 0, "s22": 0.1})], 9e8, 50
    yield "two amplifiers that pass one way", [given("s", {"s11": rect(0.1, 0.2), "s12": 0, "s21": 9, "s22": 0.3}), length(0.1), given("s", {"s11": rect(-0.2, 0.1), "s12": 0, "s21": rect(3, 7), "s22": 0.1})], 9e8, 50
    yield "transistor behind a pad", [given("s", PAD), given("s", TRANSISTOR), {"kind": "series", "inductance_h": 1e-9}], 2e9, 50
    yield "gyrator turns a capacitor into a coil", [given("z", GYRATOR), {"kind": "shunt", "capacitance_f": 1e-11}, given("z", GYRATOR)], 1e8, 75
    yield "cascade within a cascade", [length(0.2), nested([{"kind": "shunt", "capacitance_f": 3e-12}, nested([length(0.1, SEVENTY), {"kind": "series", "resistance_ohm": 4}]), given("y", GENERAL["y"])]), length(0.3)], 4e8, 50
    yield "artificial line of 15 sections", [nested(LADDER, 15)], 1e9, 50
    yield "repeats within repeats", [nested([nested(LADDER, 3), length(0.01)], 4)], 2e9, [50, 75]
    yield "twelve pads of 10 dB", [nested([given("s", PAD)], 12)], 1e6, 50
    yield "eleven amplifiers", [nested([given("s", {"s11": rect(0.2, -0.1), "s12": rect(1e-4, 2e-4), "s21": rect(-25, 18), "s22": rect(0.1, 0.15)}), length(0.05)], 11)], 1.5e9, 50
    yield "ABCD of a long lossy line", [given("abcd", {"a": rect(5e4, 2e4), "b": rect(2.5e6, 1e6), "c": rect(1e3, 4e2), "d": rect(5e4, 2.1e4)}), length(0.2)], 1e8, 50
    yield "T of 40 dB of gain", [given("t", {"t11": rect(2e-3, 1e-3), "t12": rect(1e-3, 0), "t21": rect(-2e-3, 1e-3), "t22": rect(8e-3, -6e-3)}), length(0.2)], 1e8, 50


CIRCUIT = "the equations of all elements of the chain at once, each two-port by its own definition and each line by the matrix exponential of the telegrapher equations, solved to 30 digits; K and mu by their definitions"

# Where float64 does not keep 1e-12 of the value itself, how far it does, and why.
EXCEPTIONS = {}


def cascade_checks():
    for name, elements, frequency, reference in cascade_cases():
        case = {"elements": elements, "frequency_hz": frequency, "reference_impedance_ohm": reference}
        more = {"exceptions": EXCEPTIONS[name]} if name in EXCEPTIONS else {}
        yield check("networks/cascade", name, CIRCUIT, case, cascade(case), 1e-12, **more)
    yield from published_cascades()


def published_cascades():
    def published(name, source, elements, expected, tolerance, **more):
        return check("networks/cascade", name, source, {"elements": elements, "frequency_hz": 1e9, **more}, expected, tolerance)

    lossy = {"s11": 0.15, "s12": polar(0.85, -45), "s21": polar(0.85, 45), "s22": 0.2}
    pozar = "Pozar, Microwave Engineering, 4th ed., "
    yield published("a two-port by its S, matched", pozar + "example 4.4 (from memory): return loss 16.5 dB, neither reciprocal nor lossless", [given("s", lossy)], {"/return_loss_db": mp.mpf("16.5"), "/reciprocal": False}, 2e-3)
    # -0.452 at port 1 with port 2 shorted, 6.9 dB.
    yield published("a two-port by its S, shorted", pozar + "example 4.4 (from memory): reflection -0.452, which is 18.87 ohm", [given("s", lossy)], {"/input_impedance_ohm": 50 * (1 - mp.mpf("0.452")) / (1 + mp.mpf("0.452"))}, 2e-3, termination="short")
    yield published("stability of a transistor", "Pozar, Microwave Engineering, 3rd ed., example 11.2 (from memory): K = 0.607", [given("s", TRANSISTOR)], {"/rollett_stability_factor": mp.mpf("0.607"), "/passive": False}, 2e-3)
    hemt = {"s11": polar(0.869, -159), "s12": polar(0.031, -9), "s21": polar(4.25, 61), "s22": polar(0.507, -117)}
    yield published("stability of a gallium nitride transistor", pozar + "example 12.2 (from memory): K = 0.383, mu = 0.678", [given("s", hemt)], {"/rollett_stability_factor": mp.mpf("0.383"), "/stability_measure": mp.mpf("0.678"), "/reciprocal": False}, 2e-3)
    yield published("attenuators add in decibels", "published table of 50 ohm pi attenuators (from memory): 96.25 and 71.15 ohm for 10 dB; four of them 40 dB",
                    [nested([{"kind": "shunt", "resistance_ohm": 96.25}, {"kind": "series", "resistance_ohm": 71.15}, {"kind": "shunt", "resistance_ohm": 96.25}], 4)], {"/insertion_loss_db": mp.mpf(40)}, 2e-4)
    yield published("a through is a through", "definition of S: matched, and all passes", [given("s", THROUGH), given("s", THROUGH, 75)], {"/s/s11": mp.mpf(0), "/s/s21": mp.mpf(1), "/insertion_loss_db": mp.mpf(0), "/abcd/a": mp.mpf(1), "/abcd/b": mp.mpf(0), "/z/z11": None, "/y/y11": None}, 1e-12, include=["abcd", "s", "z", "y"])
    sweep = [1e9, 1.1e9, 1.3e9, 1.4e9]
    delay = mp.mpf("2.5e-10")
    turns = [mp.expj(-2 * mp.pi * f * delay) for f in sweep]
    through = {"s11": 0, "s22": 0} | {name: {"re": [float(mp.re(t)) for t in turns], "im": [float(mp.im(t)) for t in turns]} for name in ("s12", "s21")}
    yield check("networks/cascade", "a plain delay by its phase over a sweep", "delay = -d arg(S21)/d omega of exp(-j omega 0.25 ns), whose phase is a straight line", {"elements": [given("s", through)], "frequency_hz": sweep},
                {f"/group_delay_s/{k}": delay for k in range(4)}, 1e-11)


def checks():
    yield from conversion_checks()
    yield from cascade_checks()


if __name__ == "__main__":
    write(__file__, "Two-ports", checks())
