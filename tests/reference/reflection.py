"""Reference values for terminations/reflection: published tables, textbook examples, and 30 digits by circuits instead of the solver's formulas.

Routes: a one-port is driven by a source of 1 V behind the reference, and what goes into it is compared with what the source can give; Gamma is
turned into voltage and current by the definition of the waves; a standing-wave ratio s is related to power by s + 1/s + 2 = 4 P_available/P,
which has neither |Gamma| nor a difference in it.
"""

import mpmath as mp

from support import J, check, complex_of, exact, write

CALCULATION = "terminations/reflection"
CIRCUIT = "a source behind the reference drives the one-port, and the powers are compared (Kurokawa, IEEE Trans. MTT-13 (1965) 194-202), computed to 30 digits"


def decibels(ratio):
    return 10 * mp.log10(ratio)


def ratio_of(taken):
    """s from s + 1/s = 4/taken - 2, taken = P/P_available."""
    half = 2 / taken - 1
    return half + mp.sqrt(half * half - 1)


def of_taken(taken):
    """What follows from the part of the available power that is taken in."""
    answer = {}
    if taken < 1:
        answer["/return_loss_db"] = -decibels(1 - taken)
    if 0 < taken:
        answer["/vswr"] = ratio_of(taken)
        answer["/mismatch_loss_db"] = -decibels(taken)
    else:
        answer["/vswr"] = answer["/mismatch_loss_db"] = None
    return answer


def from_impedance(z, zr):
    current = 1 / (z + zr)
    voltage = z * current
    taken = 4 * mp.re(zr) * mp.re(voltage * mp.conj(current))
    return {"/impedance_ohm": z, "/reflection": voltage - mp.conj(zr) * current, **of_taken(taken)}


def from_reflection(gamma, zr):
    voltage = mp.conj(zr) + gamma * zr
    current = 1 - gamma
    answer = {"/reflection": gamma, "/reflection_magnitude": abs(gamma), **of_taken(1 - mp.re(gamma * mp.conj(gamma)))}
    answer["/impedance_ohm"] = None if current == 0 else voltage / current
    return answer


def impedance_cases():
    yield "75 - 30j on 50 ohm", {"re": 75, "im": -30}, 50
    yield "nearly a short: 1e-12 ohm and a reactance", {"re": 1e-12, "im": 40}, 50
    yield "nearly an open: 1e12 ohm", 1e12, 50
    yield "nearly reactive, 1e-13 ohm behind 1 Mohm", {"re": 1e-13, "im": -1e6}, 50
    yield "nearly matched by 1e-10", {"re": 50.000000005, "im": 0}, 50
    yield "nearly matched by 1e-13 of reactance", {"re": 50, "im": 5e-12}, 50
    yield "complex reference", {"re": 20, "im": 300}, {"re": 40, "im": -25}
    yield "nearly the conjugate of a complex reference", {"re": 40.00000001, "im": 25.00000002}, {"re": 40, "im": -25}
    yield "equal to a complex reference, which does reflect", {"re": 40, "im": -25}, {"re": 40, "im": -25}
    yield "an active one-port", {"re": -20, "im": 12}, 50
    yield "beside the pole of an active one-port", {"re": -49.999999999, "im": 0}, 50
    yield "a large reference", {"re": 3, "im": -2}, 1e9


def reflection_cases():
    yield "0.2 - 0.3j on 50 ohm", {"re": 0.2, "im": -0.3}, 50
    yield "1e-12 short of a whole reflection", 0.999999999999, 50
    yield "1e-12 short of the opposite", -0.999999999999, 75
    yield "tiny", {"re": 1e-15, "im": -3e-16}, 50
    yield "complex reference", {"re": 0.6, "im": 0.55}, {"re": 40, "im": -25}
    yield "a short on a complex reference, nearly", {"re": -0.43820224719, "im": -0.89887640449}, {"re": 40, "im": -25}
    yield "beside an open", {"re": 0.9999999, "im": 1e-7}, 50
    yield "more than whole", {"re": -1.5, "im": 0.4}, 50
    yield "whole, imaginary", {"re": 0, "im": 1}, 50


def published():
    # Tables of VSWR, return loss, reflection and mismatch loss; every value to its printed digits.
    table = (("1.05", "32.256", "0.0244", "0.003"), ("1.10", "26.444", "0.0476", "0.010"), ("1.20", "20.828", "0.0909", "0.036"), ("1.50", "13.979", "0.2000", "0.177"), ("2.00", "9.542", "0.3333", "0.512"), ("3.00", "6.021", "0.5000", "1.249"), ("5.00", "3.522", "0.6667", "2.553"), ("10.00", "1.743", "0.8182", "4.807"))
    source = "table of VSWR, return loss, reflection coefficient and mismatch loss, as in any handbook of microwaves (from memory)"
    for vswr, loss, size, mismatch in table:
        expected = {"/return_loss_db": loss, "/reflection_magnitude": size, "/mismatch_loss_db": mismatch, "/impedance_ohm": None, "/reflection": None}
        reason = "half a unit of the last printed digit"
        exceptions = {pointer: {"tolerance": 0.52 * 10.0 ** -len(value.split(".")[1]) / float(value), "reason": reason} for pointer, value in expected.items() if value}
        yield check(CALCULATION, f"VSWR {vswr} in the table", source, {"vswr": float(vswr)}, expected, 1e-12, exceptions=exceptions)
    examples = (
        ("40 + 70j on 100 ohm", "Pozar, Microwave Engineering, 4th ed., example 2.2 (from memory)", {"re": 40, "im": 70}, 100, {"/reflection_magnitude": "0.59", "/vswr": "3.87", "/return_loss_db": "4.6"}),
        ("100 + 50j on 50 ohm", "Ulaby, Fundamentals of Applied Electromagnetics, chapter 2, the reflection 0.45 at 26.6 degrees (from memory)", {"re": 100, "im": 50}, 50, {"/reflection_magnitude": "0.45", "/vswr": "2.6"}),
    )
    for name, source, z, zr, expected in examples:
        exceptions = {pointer: {"tolerance": 0.52 * 10.0 ** -len(value.split(".")[1]) / float(value), "reason": "half a unit of the last printed digit"} for pointer, value in expected.items()}
        yield check(CALCULATION, f"textbook: {name}", source, {"impedance_ohm": z, "reference_impedance_ohm": zr}, expected, 1e-2, exceptions=exceptions)


def checks():
    yield from published()
    for name, z, zr in impedance_cases():
        yield check(CALCULATION, f"from an impedance: {name}", CIRCUIT, {"impedance_ohm": z, "reference_impedance_ohm": zr}, from_impedance(complex_of(z), complex_of(zr)), 1e-12)
    for name, gamma, zr in reflection_cases():
        yield check(CALCULATION, f"from a reflection: {name}", CIRCUIT, {"reflection": gamma, "reference_impedance_ohm": zr}, from_reflection(complex_of(gamma), complex_of(zr)), 1e-12)
    for degrees in (0.000001, 33, 90, -179.9999):
        given = {"magnitude": 1, "angle_deg": degrees}
        angle = exact(degrees) * mp.pi / 180
        expected = {"/reflection": mp.expj(angle), "/impedance_ohm": J * 50 * mp.cot(angle / 2), "/vswr": None, "/return_loss_db": mp.mpf(0), "/mismatch_loss_db": None}
        yield check(CALCULATION, f"a whole reflection at {degrees:g} degrees", "Z = j Z0 cot(angle/2) of a reactance (Pozar, 4th ed., section 2.3), computed to 30 digits", {"reflection": given}, expected, 1e-12)
    for s in (1, 1.0000000001, 1.37, 4e3, 1e12):
        taken = 4 / (exact(s) + 1 / exact(s) + 2)
        loss = -decibels(1 - taken) if s > 1 else None
        yield check(CALCULATION, f"from a VSWR of {s}", CIRCUIT, {"vswr": s}, {"/vswr": exact(s), "/return_loss_db": loss, "/mismatch_loss_db": -decibels(taken), "/reflection_magnitude": mp.sqrt(1 - taken), "/reflection": None}, 1e-12)
    for loss in (0, 1e-10, 3.5, 14, 250, 6000):
        back = mp.mpf(10) ** (-exact(loss) / 10)
        taken = 1 - back
        expected = {"/return_loss_db": exact(loss), "/reflection_magnitude": mp.sqrt(back), "/vswr": ratio_of(taken) if taken else None, "/mismatch_loss_db": -decibels(taken) if taken else None, "/impedance_ohm": None}
        yield check(CALCULATION, f"from a return loss of {loss} dB", CIRCUIT, {"return_loss_db": loss}, expected, 1e-12)
    yield check(CALCULATION, "a whole reflection by its parts, which are rounded", "0.6^2 + 0.8^2 = 1: Z = Z0 (1 + Gamma)/(1 - Gamma) = 100j, nothing is taken in (Pozar, 4th ed., section 2.3)", {"reflection": {"re": 0.6, "im": 0.8}}, {"/impedance_ohm": mp.mpc(0, 100), "/vswr": None, "/return_loss_db": mp.mpf(0), "/mismatch_loss_db": None}, 1e-12)
    yield check(CALCULATION, "open", "Gamma = 1 of an open (Pozar, 4th ed., section 2.3)", {"impedance_ohm": "open", "reference_impedance_ohm": {"re": 40, "im": -25}}, {"/reflection": mp.mpc(1), "/impedance_ohm": None, "/return_loss_db": mp.mpf(0), "/vswr": None, "/mismatch_loss_db": None}, 1e-15)
    yield check(CALCULATION, "short", "Gamma = -1 of a short (Pozar, 4th ed., section 2.3)", {"impedance_ohm": "short"}, {"/reflection": mp.mpc(-1), "/impedance_ohm": mp.mpc(0), "/return_loss_db": mp.mpf(0), "/vswr": None, "/mismatch_loss_db": None}, 1e-15)


if __name__ == "__main__":
    write(__file__, "Reflection", checks())
