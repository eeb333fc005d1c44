"""Reference values for electrical length and for lumped ladders, to 30 digits.

Made by other routes than the solvers': a length of line is the matrix exponential of the telegrapher equations, lumped parts are added up by
Kirchhoff's laws, and errors are differences of impedances formed with 130 digits in hand. Inputs are the exact values of their float64 numbers.
"""

import mpmath as mp

from support import LIGHT, abcd_of_line, check, complex_of, constants, exact, per_metre, termination_impedance, write, zc_of

CABLE = {"kind": "rlgc", "resistance_ohm_per_m": 0.12, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 2.5e-5, "capacitance_f_per_m": 1e-10}
LOSSY = {"kind": "rlgc", "resistance_ohm_per_m": 40, "inductance_h_per_m": 3e-7, "conductance_s_per_m": 2e-3, "capacitance_f_per_m": 1.2e-10}
TELEPHONE = {"kind": "rlgc", "resistance_ohm_per_m": 0.168, "inductance_h_per_m": 6.1e-7, "conductance_s_per_m": 1e-10, "capacitance_f_per_m": 5.2e-11}
ON_CHIP = {"kind": "rlgc", "resistance_ohm_per_m": 5e4, "inductance_h_per_m": 0, "conductance_s_per_m": 0, "capacitance_f_per_m": 2e-10}
HUNDRED = {"kind": "lossless", "characteristic_impedance_ohm": 100, "velocity_factor": 0.66}
SOURCE = "matrix exponential of the line against Kirchhoff's laws for the parts, and bisection for the length, computed to 30 digits"


def ratio(load, total):
    """(V, I) at the near end."""
    v, i = (mp.mpc(1), mp.mpc(0)) if load is None else (load, mp.mpc(1))
    return total[0, 0] * v + total[0, 1] * i, total[1, 0] * v + total[1, 1] * i


def chain(*parts):
    """Series ("z") and shunt ("y") parts from the near end to the far end."""
    total = mp.eye(2)
    for kind, value in parts:
        total = total * (mp.matrix([[1, value], [0, 1]]) if kind == "z" else mp.matrix([[1, 0], [value, 1]]))
    return total


def relative(exact_pair, model_pair):
    """None where it is infinite."""
    (v, i), (vm, im) = exact_pair, model_pair
    if vm * i == v * im:
        return mp.mpf(0)
    return None if im == 0 or v == 0 else abs(vm * i / (im * v) - 1)


def reflected(exact_pair, model_pair, reference):
    gamma = lambda pair: (pair[0] - reference * pair[1]) / (pair[0] + reference * pair[1])
    return abs(gamma(model_pair) - gamma(exact_pair))


def first_length(line, load, omega, tolerance):
    """By steps of a hundredth of a quarter wave or of a neper, then by halving."""
    z, y = per_metre(line, omega)
    step = 1 / abs(mp.sqrt(abs(z * y))) / 64
    error = lambda length: relative(ratio(load, abcd_of_line(line, mp.nstr(length, 60), omega)), (load, mp.mpc(1)))
    low, high = mp.mpf(0), step
    while error(high) < tolerance:
        low, high = high, high + step
        if high > 200 * step:
            return None
    f = lambda length: error(length) - tolerance
    low = max(low, high * mp.mpf(10) ** -9)
    return mp.findroot(f, (low, high), solver="anderson", tol=mp.mpf(10) ** -70, maxsteps=200)


def electrical(case, longest=True):
    line, f = case["line"], exact(case["frequency_hz"])
    omega = 2 * mp.pi * f
    length, tolerance = exact(case["length_m"]), exact(case.get("tolerance", 0.05))
    z, y = (each * length for each in per_metre(line, omega))
    zc = zc_of(line, omega)
    load = termination_impedance(case.get("termination", 50), omega, zc)
    near = ratio(load, abcd_of_line(line, case["length_m"], omega))
    models = {"as_wire": mp.eye(2), "as_section": chain(("z", z), ("y", y)), "as_pi_section": chain(("y", y / 2), ("z", z), ("y", y / 2))}
    # t = gamma l by its own exponential, unwrapped from a short length of the same line.
    k = max(1, int(abs(mp.sqrt(abs(z * y)))) * 4 + 4)
    part = abcd_of_line(line, mp.nstr(length / k, 60), omega)
    trace = (part[0, 0] + part[1, 1]) / 2
    t = mp.log(trace + mp.sqrt(trace * trace - 1))
    t = k * (t if mp.im(t) > 0 else -t)
    answer = {
        "/length_wavelengths": mp.im(t) / (2 * mp.pi),
        "/length_deg": mp.im(t) * 180 / mp.pi,
        "/delay_s": mp.im(t) / omega,
        "/attenuation_db": mp.re(t) * 20 / mp.log(10) if mp.re(t) > mp.mpf(10) ** -60 else mp.mpf(0),
    }
    for name, total in models.items():
        answer[f"/lumped_error/{name}"] = relative(near, ratio(load, total))
        answer[f"/lumped_error/{name}_reflection"] = reflected(near, ratio(load, total), abs(zc))
    as_wire = answer["/lumped_error/as_wire"]
    answer["/treat_as_line"] = as_wire is None or as_wire > tolerance or ("rise_time_s" in case and mp.im(t) / omega > exact(case["rise_time_s"]) / 6)
    if longest:
        answer["/longest_lumped_length_m"] = first_length(line, load, omega, tolerance)
    answer["/rules/0/verdict"] = bool(mp.im(t) > mp.pi / 5)
    if "rise_time_s" in case:
        answer["/rules/1/verdict"] = bool(mp.im(t) / omega > exact(case["rise_time_s"]) / 6)
        answer["/rules/2/verdict"] = bool(mp.im(t) / omega > exact(case["rise_time_s"]) / 2)
    return answer


def electrical_checks():
    name = "lines/electrical-length"
    cases = {
        "sensor lead into 1 kohm": {"line": HUNDRED, "length_m": 1.2, "frequency_hz": 1e6, "termination": 1000, "rise_time_s": 2e-8},
        "sensor lead at 10 kHz": {"line": HUNDRED, "length_m": 1.2, "frequency_hz": 1e4, "termination": 1000},
        "cable into 75-30j ohm": {"line": CABLE, "length_m": 0.02, "frequency_hz": 1e8, "termination": {"re": 75, "im": -30}, "rise_time_s": 1e-9},
        "cable into 10 ohm at 1 %": {"line": CABLE, "length_m": 0.3, "frequency_hz": 3e7, "termination": 10, "tolerance": 0.01},
        "long cable into 51 ohm": {"line": CABLE, "length_m": 3.2, "frequency_hz": 1e8, "termination": 51, "rise_time_s": 1e-7, "tolerance": 0.01},
        "lossy line into 50 ohm": {"line": LOSSY, "length_m": 0.7, "frequency_hz": 9.43125e7},
        "telephone line into a capacitor": {"line": TELEPHONE, "length_m": 40, "frequency_hz": 1e5, "termination": {"kind": "series_rlc", "capacitance_f": 2e-9}},
        "telephone line into a coil": {"line": TELEPHONE, "length_m": 2000, "frequency_hz": 1e4, "termination": {"kind": "series_rlc", "resistance_ohm": 30, "inductance_h": 1e-3}},
        "line on a chip into 1 kohm": {"line": ON_CHIP, "length_m": 2e-3, "frequency_hz": 5e9, "termination": 1000},
        "electrically tiny": {"line": CABLE, "length_m": 1e-6, "frequency_hz": 1e6, "termination": 200},
        "large error allowed": {"line": LOSSY, "length_m": 0.1, "frequency_hz": 2e8, "termination": 300, "tolerance": 0.4},
    }
    for title, given in cases.items():
        yield check(name, title, SOURCE, given, electrical(given), 1e-12)
    for title, termination, longest in (("open", "open", 0), ("short", "short", 0), ("matched", "matched", None)):
        given = {"line": CABLE, "length_m": 0.4, "frequency_hz": 1e8, "termination": termination}
        expected = {**electrical(given, longest=False), "/longest_lumped_length_m": longest if longest is None else mp.mpf(longest)}
        if title == "matched":
            expected["/lumped_error/as_wire"] = expected["/lumped_error/as_wire_reflection"] = mp.mpf(0)
            expected["/treat_as_line"] = False
        yield check(name, f"cable, {title}", SOURCE, given, expected, 1e-12)
    direct = {"line": TELEPHONE, "length_m": 2000, "frequency_hz": 0, "termination": 600}
    r, g = exact(0.168) * 2000, exact(1e-10) * 2000
    near = ratio(mp.mpf(600), abcd_of_line(TELEPHONE, 2000, mp.mpf(0)))
    yield check(name, "direct current", SOURCE, direct, {"/lumped_error/as_wire": relative(near, (mp.mpf(600), mp.mpf(1))), "/lumped_error/as_section": relative(near, ratio(mp.mpf(600), chain(("z", r), ("y", g)))), "/lumped_error/as_pi_section": relative(near, ratio(mp.mpf(600), chain(("y", g / 2), ("z", r), ("y", g / 2)))), "/longest_lumped_length_m": first_length(TELEPHONE, mp.mpc(600), mp.mpf(0), exact(0.05)), "/length_deg": mp.mpf(0)}, 1e-12)
    quarter = {"line": {"kind": "lossless", "characteristic_impedance_ohm": 50, "velocity_factor": 1}, "length_m": 0.749481145, "frequency_hz": 1e8, "termination": 25}
    yield check(name, "quarter wave from 25 to 100 ohm", "Quarter-wave transformer, Zin = Zc^2/ZL (Pozar, Microwave Engineering, 4th ed., section 2.5, from memory): 25 ohm for 100 ohm is wrong by 3/4, reflection -1/3 for 1/3 by 2/3", quarter, {"/length_deg": mp.mpf(90), "/lumped_error/as_wire": mp.mpf("0.75"), "/lumped_error/as_wire_reflection": mp.mpf(2) / 3}, 1e-12)
    yield check(name, "half wave repeats its load", "a half wave leaves every impedance as it is (Pozar, Microwave Engineering, 4th ed., section 2.3, from memory)", {**quarter, "length_m": 1.49896229}, {"/length_deg": mp.mpf(180), "/lumped_error/as_wire": mp.mpf(0), "/treat_as_line": True}, 1e-12)
    yield check(name, "1 cm is a wavelength at 30 GHz in air", "lambda = c/f; common practice", {**quarter, "length_m": 0.01, "frequency_hz": 3e10}, {"/length_wavelengths": mp.mpf("0.01") * 3 * 10**10 / LIGHT, "/rules/0/verdict": True, "/treat_as_line": True}, 1e-12)


def checks():
    yield from electrical_checks()


if __name__ == "__main__":
    write(__file__, "Electrical length and lumped ladders", checks())
