"""Reference values for lines, terminations and cascades, to 30 digits.

Made by other routes than the solvers': a length of line is the matrix exponential of the telegrapher equations
d/dz [V; I] = -[0 Z; Y 0] [V; I] (no square root, no hyperbolic function, no characteristic impedance), and a cascade is
solved by nodal analysis of the whole circuit, driven from each port in turn. Inputs are taken as the exact values of
their float64 numbers.
"""

import mpmath as mp

from support import abcd_of_line, check, complex_of, exact, parts_impedance, short_length, termination_impedance, write, zc_of

def gamma_of(line, omega):
    length = short_length(line, omega)
    total = abcd_of_line(line, length, omega)
    # The eigenvalues of the exponential are exp(+-gamma l), and alpha and beta have the same sign.
    trace = (total[0, 0] + total[1, 1]) / 2
    gamma = mp.log(trace + mp.sqrt(trace * trace - 1)) / length
    return gamma if mp.im(gamma) >= 0 else -gamma


def secondary(case):
    line, omega = case["line"], 2 * mp.pi * exact(case["frequency_hz"])
    gamma = gamma_of(line, omega)
    zc = zc_of(line, omega)
    beta = mp.im(gamma)
    return {
        "/propagation_constant_per_m": gamma,
        "/characteristic_impedance_ohm": zc,
        "/attenuation_db_per_m": mp.re(gamma) * 20 / mp.log(10),
        "/phase_velocity_m_per_s": omega / beta,
        "/delay_s_per_m": beta / omega,
        "/wavelength_m": 2 * mp.pi / beta,
        "/group_velocity_m_per_s": 1 / group_delay(lambda w: mp.im(gamma_of(line, w)), omega),
        "/attenuation_np_per_m": mp.re(gamma),
        "/phase_constant_rad_per_m": mp.im(gamma),
    }


def group_delay(function, omega):
    """Of a phase, by Richardson's extrapolation of central differences with 130 digits in hand."""
    h = omega * mp.mpf(10) ** -12
    return (8 * (function(omega + h) - function(omega - h)) - (function(omega + 2 * h) - function(omega - 2 * h))) / (12 * h)


def input_impedance(case):
    omega = 2 * mp.pi * exact(case["frequency_hz"])
    line = case["line"]
    total = abcd_of_line(line, case["length_m"], omega)
    zc = zc_of(line, omega) if omega else None
    load = termination_impedance(case["termination"], omega, zc)
    v, i = (mp.mpc(1), mp.mpc(0)) if load is None else (load, mp.mpc(1))
    vin = total[0, 0] * v + total[0, 1] * i
    iin = total[1, 0] * v + total[1, 1] * i
    reference = complex_of(case.get("reference_impedance_ohm", 50))
    gamma = (vin - mp.conj(reference) * iin) / (vin + reference * iin)
    answer = {"/reflection_at_reference": gamma}
    if abs(iin) > mp.mpf(10) ** -40:
        answer["/input_impedance_ohm"] = vin / iin
    if abs(vin) > mp.mpf(10) ** -40:
        answer["/input_admittance_s"] = iin / vin
    if zc is not None:
        far = (v - zc * i) / (v + zc * i)
        near = (vin - zc * iin) / (vin + zc * iin)
        answer["/characteristic_impedance_ohm"] = zc
        answer["/reflection_at_termination"] = far
        answer["/reflection_at_input"] = near
    size = abs(gamma)
    if 0 < size < 1 - mp.mpf(10) ** -30 and case["name"].find("[no ratio]") < 0:
        answer["/vswr"] = (1 + size) / (1 - size)
        answer["/return_loss_db"] = -20 * mp.log10(size)
    return answer


def nodal(case, omega, driven, z1, z2):
    """Voltages at the two ends with a unit source behind z1 (driven = 1) or z2 (driven = 2)."""
    rows = []  # unknowns: node voltages 0..n, then a current for every branch that is not an admittance
    nodes = 0
    admittances, branches = [], []
    for element in case["elements"]:
        kind = element["kind"]
        if kind == "line":
            total = abcd_of_line(element["line"], element["length_m"], omega)
            branches.append(("abcd", nodes, nodes + 1, total))
            nodes += 1
        elif kind == "transformer":
            n = exact(element["turns_ratio"])
            branches.append(("abcd", nodes, nodes + 1, mp.matrix([[n, 0], [0, 1 / n]])))
            nodes += 1
        elif kind == "series":
            z = complex_of(element["impedance_ohm"]) if "impedance_ohm" in element else parts_impedance(element, element.get("connection", "series"), omega)
            branches.append(("z", nodes, nodes + 1, z))
            nodes += 1
        elif kind == "shunt":
            z = complex_of(element["impedance_ohm"]) if "impedance_ohm" in element else parts_impedance(element, element.get("connection", "series"), omega)
            branches.append(("ground", nodes, None, z))
        elif kind.startswith("series_"):
            total = abcd_of_line(element["line"], element["length_m"], omega)
            branches.append(("z", nodes, nodes + 1, total[0, 0] / total[1, 0] if kind == "series_open_stub" else total[0, 1] / total[1, 1]))
            nodes += 1
        else:
            total = abcd_of_line(element["line"], element["length_m"], omega)
            if kind == "open_stub":
                admittances.append((nodes, total[1, 0] / total[0, 0]))
            else:
                branches.append(("ground", nodes, None, total[0, 1] / total[1, 1]))
    count = nodes + 1
    extra = sum(2 if kind == "abcd" else 1 for kind, *_ in branches)
    matrix = mp.zeros(count + extra, count + extra)
    source = mp.zeros(count + extra, 1)
    for node, y in admittances:
        matrix[node, node] += y
    for node, z, number in ((0, z1, 1), (nodes, z2, 2)):
        matrix[node, node] += 1 / z
        if driven == number:
            source[node] += 1 / z
    row = count
    for kind, p, q, value in branches:
        if kind == "z":
            matrix[p, row] += 1
            matrix[q, row] -= 1
            if value is None:
                matrix[row, row] = 1
            else:
                matrix[row, p], matrix[row, q], matrix[row, row] = 1, -1, -value
            row += 1
        elif kind == "ground":
            matrix[p, row] += 1
            if value is None:
                matrix[row, row] = 1
            else:
                matrix[row, p], matrix[row, row] = 1, -value
            row += 1
        else:
            # i1 leaves node p into the two-port, i2 leaves it into node q.
            matrix[p, row] += 1
            matrix[q, row + 1] -= 1
            matrix[row, p], matrix[row, q], matrix[row, row + 1] = 1, -value[0, 0], -value[0, 1]
            matrix[row + 1, row], matrix[row + 1, q], matrix[row + 1, row + 1] = 1, -value[1, 0], -value[1, 1]
            row += 2
    solution = mp.lu_solve(matrix, source)
    return solution[0], solution[nodes]


def scattering(case, omega):
    given = case.get("reference_impedance_ohm", 50)
    z1, z2 = (complex_of(each) for each in (given if isinstance(given, list) else [given, given]))
    r1, r2 = mp.re(z1), mp.re(z2)
    v1, v2 = nodal(case, omega, 1, z1, z2)
    w1, w2 = nodal(case, omega, 2, z1, z2)
    # Power waves: b = (V - Z* I) / (2 sqrt R), and a = 1 / (2 sqrt R) for a unit source behind Z.
    i1, j2 = (1 - v1) / z1, (1 - w2) / z2
    return {
        "/s/s11": v1 - mp.conj(z1) * i1,
        "/s/s21": (v2 + mp.conj(z2) * v2 / z2) * mp.sqrt(r1 / r2),
        "/s/s12": (w1 + mp.conj(z1) * w1 / z1) * mp.sqrt(r2 / r1),
        "/s/s22": w2 - mp.conj(z2) * j2,
    }


def transmission(elements, omega):
    """A, B, C and D as the product of the elements' matrices."""
    total = mp.eye(2)
    for element in elements:
        kind = element["kind"]
        if kind in ("series", "shunt"):
            z = complex_of(element["impedance_ohm"]) if "impedance_ohm" in element else parts_impedance(element, element.get("connection", "series"), omega)
            own = mp.matrix([[1, z], [0, 1]]) if kind == "series" else mp.matrix([[1, 0], [0 if z is None else 1 / z, 1]])
        elif kind == "transformer":
            own = mp.matrix([[exact(element["turns_ratio"]), 0], [0, 1 / exact(element["turns_ratio"])]])
        else:
            own = abcd_of_line(element["line"], element["length_m"], omega)
            if kind != "line":
                z = own[0, 0] / own[1, 0] if "open" in kind else own[0, 1] / own[1, 1]
                own = mp.matrix([[1, z], [0, 1]]) if kind.startswith("series") else mp.matrix([[1, 0], [1 / z, 1]])
        total = total * own
    return total[0, 0], total[0, 1], total[1, 0], total[1, 1]


def open_and_shorted(case, omega):
    """Z11 and Y11 at port 1, from the circuit with port 2 open and shorted."""
    a, b, c, d = transmission(case["elements"], omega)
    answer = {}
    if c != 0:
        answer |= {"/z/z11": a / c, "/z/z12": 1 / c, "/z/z21": 1 / c, "/z/z22": d / c}
    if b != 0:
        answer |= {"/y/y11": d / b, "/y/y12": -1 / b, "/y/y21": -1 / b, "/y/y22": a / b}
    return answer


def cascade(case):
    omega = 2 * mp.pi * exact(case["frequency_hz"])
    answer = scattering(case, omega)
    given = case.get("reference_impedance_ohm", 50)
    z1 = complex_of(given[0] if isinstance(given, list) else given)
    s11 = answer["/s/s11"]
    if abs(1 - s11) > mp.mpf(10) ** -40:
        answer["/input_impedance_ohm"] = (mp.conj(z1) + s11 * z1) / (1 - s11)
    s21, s12, s22 = answer["/s/s21"], answer["/s/s12"], answer["/s/s22"]
    if abs(s11) > mp.mpf(10) ** -40:
        answer["/return_loss_db"] = -20 * mp.log10(abs(s11))
    answer["/reciprocal"] = True
    answer["/passive"] = True
    if s21 != 0:
        # [b1; a1] = T [a2; b2], from b1 = S11 a1 + S12 a2 and b2 = S21 a1 + S22 a2.
        answer |= {"/t/t11": s12 - s11 * s22 / s21, "/t/t12": s11 / s21, "/t/t21": -s22 / s21, "/t/t22": 1 / s21}
        answer |= open_and_shorted(case, omega)
        answer |= zip(("/abcd/a", "/abcd/b", "/abcd/c", "/abcd/d"), transmission(case["elements"], omega))
        answer["/insertion_loss_db"] = -20 * mp.log10(abs(answer["/s/s21"]))
        if omega:
            reference = mp.arg(answer["/s/s21"])
            phase = lambda w: mp.arg(scattering(case, w)["/s/s21"] / mp.expj(reference))
            answer["/group_delay_s"] = -group_delay(phase, omega)
    return answer


CABLE = {"kind": "rlgc", "resistance_ohm_per_m": 0.12, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 2.5e-5, "capacitance_f_per_m": 1e-10}
LOSSY = {"kind": "rlgc", "resistance_ohm_per_m": 40, "inductance_h_per_m": 3e-7, "conductance_s_per_m": 2e-3, "capacitance_f_per_m": 1.2e-10}
TELEPHONE = {"kind": "rlgc", "resistance_ohm_per_m": 0.168, "inductance_h_per_m": 6.1e-7, "conductance_s_per_m": 1e-10, "capacitance_f_per_m": 5.2e-11}
ON_CHIP = {"kind": "rlgc", "resistance_ohm_per_m": 5e4, "inductance_h_per_m": 0, "conductance_s_per_m": 0, "capacitance_f_per_m": 2e-10}
CRYOGENIC = {"kind": "rlgc", "resistance_ohm_per_m": 1e-9, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 1e-13, "capacitance_f_per_m": 1e-10}
LEAKY = {"kind": "rlgc", "resistance_ohm_per_m": 0, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 0.3, "capacitance_f_per_m": 1e-10}
FIFTY = {"kind": "lossless", "characteristic_impedance_ohm": 50, "velocity_factor": 0.66}
SEVENTY = {"kind": "lossless", "characteristic_impedance_ohm": 75, "velocity_factor": 0.84}
LINES = {"cable": CABLE, "lossy": LOSSY, "telephone": TELEPHONE, "on chip": ON_CHIP, "cryogenic": CRYOGENIC, "leaky": LEAKY, "fifty": FIFTY}


def cases():
    for name, line in LINES.items():
        for frequency in (1, 50e3, 1e8, 7.3e9):
            yield "lines/secondary-constants", {"name": f"{name} line at {frequency:g} Hz", "line": line, "frequency_hz": frequency}
    loads = {
        "75-30j": {"re": 75, "im": -30},
        "open": "open",
        "short": "short",
        "series RLC": {"kind": "series_rlc", "resistance_ohm": 3, "inductance_h": 2e-8, "capacitance_f": 5e-11},
        "parallel RLC": {"kind": "parallel_rlc", "resistance_ohm": 900, "inductance_h": 4e-8, "capacitance_f": 2e-11},
    }
    for name, line, length in (("cable", CABLE, 3.2), ("lossy", LOSSY, 0.7), ("telephone", TELEPHONE, 2000), ("on chip", ON_CHIP, 2e-3)):
        for load, termination in loads.items():
            frequency = 1e5 if name == "telephone" else 94.3125e6
            yield "terminations/input-impedance", {"name": f"{name} line closed by {load}", "line": line, "length_m": length, "termination": termination, "frequency_hz": frequency}
    more = [
        ("direct current into 75 ohm", CABLE, 3.2, 75, 0, 50),
        ("direct current, open, leaking", CABLE, 3.2, "open", 0, 50),
        ("direct current, no conductance, 50 ohm", ON_CHIP, 2e-3, 50, 0, 50),
        ("200 dB of loss, short", LOSSY, 200 * 0.115129254649702 / 0.1, "short", 1e8, 50),
        ("200 dB of loss, complex reference", LOSSY, 230.3, {"re": 20, "im": 300}, 1e8, {"re": 40, "im": -25}),
        ("electrically tiny, open", CABLE, 1e-9, "open", 1e6, 50),
        ("electrically tiny, short", CABLE, 1e-9, "short", 1e6, 50),
        ("length 0", CABLE, 0, {"re": 12, "im": 7}, 1e9, 50),
        ("beside the pole of a shorted quarter wave", CRYOGENIC, 0.5000001, "short", 1e8, 50),
        ("beside the zero of an open quarter wave", CABLE, 0.49999, "open", 1e8, 50),
        ("very low loss, 75 ohm", CRYOGENIC, 12.25, 75, 1e8, 50),
        ("half wave repeats the load", FIFTY, 0.9893151114, {"re": 20, "im": 45}, 1e8, 50),
        ("complex reference", CABLE, 1.7, {"re": 33, "im": 12}, 2.1e8, {"re": 45, "im": 20}),
        ("active load [no ratio]", CABLE, 1.7, {"re": -20, "im": 12}, 2.1e8, 50),
        ("long, many turns", CABLE, 40, 60, 1e9, 75),
        ("leaking line at 1 GHz", LEAKY, 0.2, 50, 1e9, 50),
    ]
    for name, line, length, termination, frequency, reference in more:
        yield "terminations/input-impedance", {"name": name, "line": line, "length_m": length, "termination": termination, "frequency_hz": frequency, "reference_impedance_ohm": reference}
    chains = [
        ("one cable", [{"kind": "line", "line": CABLE, "length_m": 3.2}], 1e8, 50),
        ("two unlike lines", [{"kind": "line", "line": CABLE, "length_m": 1.1}, {"kind": "line", "line": SEVENTY, "length_m": 0.37}], 3.3e8, 50),
        ("low-pass filter", [{"kind": "shunt", "capacitance_f": 5.08e-11}, {"kind": "series", "inductance_h": 8.7e-8}, {"kind": "shunt", "capacitance_f": 5.08e-11}], 1.2e8, 50),
        ("filter of resonators", [{"kind": "series", "inductance_h": 3e-8, "capacitance_f": 4e-11, "resistance_ohm": 0.2}, {"kind": "shunt", "inductance_h": 2e-8, "capacitance_f": 6e-11, "resistance_ohm": 4000, "connection": "parallel"}, {"kind": "series", "inductance_h": 3e-8, "capacitance_f": 4e-11, "connection": "parallel"}], 1.43e8, 50),
        ("attenuator", [{"kind": "series", "resistance_ohm": 16.61}, {"kind": "shunt", "resistance_ohm": 66.93}, {"kind": "series", "resistance_ohm": 16.61}], 1e6, 50),
        ("stubs", [{"kind": "open_stub", "line": CABLE, "length_m": 0.31}, {"kind": "line", "line": CABLE, "length_m": 0.22}, {"kind": "short_stub", "line": SEVENTY, "length_m": 0.41}], 2.2e8, 50),
        ("series stubs", [{"kind": "series_open_stub", "line": CABLE, "length_m": 0.31}, {"kind": "line", "line": CABLE, "length_m": 0.22}, {"kind": "series_short_stub", "line": SEVENTY, "length_m": 0.41}], 2.2e8, 50),
        ("transformer", [{"kind": "transformer", "turns_ratio": 2}, {"kind": "line", "line": CABLE, "length_m": 0.6}, {"kind": "series", "impedance_ohm": {"re": 4, "im": -9}}], 1.7e8, [50, 12.5]),
        ("complex references", [{"kind": "line", "line": LOSSY, "length_m": 0.5}, {"kind": "shunt", "impedance_ohm": {"re": 200, "im": 90}}], 4e8, [{"re": 50, "im": 10}, {"re": 75, "im": -20}]),
        ("200 dB of loss", [{"kind": "line", "line": LOSSY, "length_m": 80}, {"kind": "shunt", "capacitance_f": 2e-12}], 1e8, 50),
        ("direct current through parts", [{"kind": "series", "inductance_h": 1e-8, "resistance_ohm": 3}, {"kind": "shunt", "capacitance_f": 1e-12}, {"kind": "line", "line": CABLE, "length_m": 30}], 0, 50),
        ("direct current stopped by a capacitor", [{"kind": "series", "capacitance_f": 1e-9}, {"kind": "shunt", "resistance_ohm": 200}], 0, 50),
        ("electrically tiny", [{"kind": "line", "line": CABLE, "length_m": 1e-8}, {"kind": "line", "line": LOSSY, "length_m": 1e-8}], 1e6, 50),
        ("twelve sections", [{"kind": "line", "line": SEVENTY if k % 2 else CABLE, "length_m": 0.05 + 0.01 * k} for k in range(12)], 9e8, 50),
        ("twelve long cables", [{"kind": "line", "line": SEVENTY if k % 2 else FIFTY, "length_m": 0.5 + 0.03 * k} for k in range(12)], 1e9, 50),
        ("RC line on a chip", [{"kind": "series", "resistance_ohm": 200}, {"kind": "line", "line": ON_CHIP, "length_m": 3e-3}, {"kind": "shunt", "capacitance_f": 3e-14}], 5e9, 50),
    ]
    for name, elements, frequency, reference in chains:
        yield "networks/cascade", {"name": name, "elements": elements, "frequency_hz": frequency, "reference_impedance_ohm": reference, "include": ["abcd", "s", "z", "y", "t"]}


COMPUTE = {"lines/secondary-constants": secondary, "terminations/input-impedance": input_impedance, "networks/cascade": cascade}


SOURCE = "matrix exponential of the telegrapher equations and nodal analysis of the whole circuit (Pozar, Microwave Engineering, 4th ed., section 2.1), computed to 30 digits"

# Where float64 does not keep 1e-12 of the value itself, how far it does, and why.
NEAR_POLE = {"tolerance": 1e-9, "reason": "a phase within 3e-7 of a quarter turn is known to 2e-16, so what is inverse to that distance is known to 6e-10"}
TINY = "the reflection of a line of 1e-8 m, 3e-9, is the difference of matrix entries near 1: it is right to 1e-16 of a whole reflection"
EXCEPTIONS = {
    "beside the pole of a shorted quarter wave": {"/input_impedance_ohm": NEAR_POLE, "/input_admittance_s": NEAR_POLE},
    "electrically tiny": {
        **{pointer: {"tolerance": 1e-8, "reason": TINY} for pointer in ("/s/s11", "/s/s22", "/t/t12", "/t/t21", "/return_loss_db")},
        "/insertion_loss_db": {"tolerance": 1e-7, "reason": TINY},
    },
}


def checks():
    for calculation, case in cases():
        given = {key: value for key, value in case.items() if key != "name"}
        more = {"exceptions": EXCEPTIONS[case["name"]]} if case["name"] in EXCEPTIONS else {}
        yield check(calculation, case["name"], SOURCE, given, COMPUTE[calculation](case), 1e-12, **more)


if __name__ == "__main__":
    write(__file__, "Lines, terminations and cascades", checks())
