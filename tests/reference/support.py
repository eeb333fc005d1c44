"""What the generators of reference values share: exact numbers, lines, terminations, and how checks are written.

A generator is a script NAME.py beside its NAME.json. It ends in `write(__file__, title, checks)`; run by itself it writes the file, and with
--check it says whether the file is up to date. Needs mpmath (Debian: python3-mpmath).

A check: calculation, name, source, input, tolerance, expected (pointer into the result -> value), and where needed
- comparison: "equal" (default), "at_most" or "at_least" the published value;
- exceptions: pointer -> {tolerance, reason}, where float64 or the publication does not hold the claim;
- locator inside `source`: equation, table, page.
Values are strings of 30 digits, {re, im} of such strings, true/false, or null where there is none. A pointer that ends at a column means its first entry.
"""

import json
import pathlib
import sys

import mpmath as mp

mp.mp.dps = 130
LIGHT = mp.mpf(299792458)
J = mp.mpc(0, 1)


def exact(number):
    return mp.mpf(float(number)) if not isinstance(number, str) else mp.mpf(number)


def complex_of(value):
    if isinstance(value, dict):
        return mp.mpc(exact(value["re"]), exact(value["im"]))
    return mp.mpc(exact(value))


def constants(line):
    if line["kind"] == "lossless":
        z0 = exact(line["characteristic_impedance_ohm"])
        v = exact(line["velocity_factor"]) * LIGHT
        return mp.mpf(0), z0 / v, mp.mpf(0), 1 / (z0 * v)
    return tuple(exact(line[name]) for name in ("resistance_ohm_per_m", "inductance_h_per_m", "conductance_s_per_m", "capacitance_f_per_m"))


def per_metre(line, omega):
    r, l, g, c = constants(line)
    return r + J * omega * l, g + J * omega * c


def abcd_of_line(line, length, omega):
    """exp of the telegrapher matrix by squaring a Taylor series."""
    z, y = per_metre(line, omega)
    length = exact(length)
    matrix = mp.matrix([[0, z * length], [y * length, 0]])
    size = max(abs(z * length), abs(y * length), abs(mp.sqrt(abs(z * y)) * length))
    squarings = max(0, int(mp.ceil(mp.log(size + 1, 2))) + 8)
    small = matrix / mp.mpf(2) ** squarings
    term = mp.eye(2)
    total = mp.eye(2)
    for k in range(1, 60):
        term = term * small / k
        total += term
    for _ in range(squarings):
        total = total * total
    return total


def parts_impedance(parts, connection, omega):
    """None stands for an open."""
    values = {name: exact(parts[name]) for name in ("resistance_ohm", "inductance_h", "capacitance_f") if name in parts}
    each = []
    if "resistance_ohm" in values:
        each.append(mp.mpc(values["resistance_ohm"]))
    if "inductance_h" in values:
        each.append(J * omega * values["inductance_h"])
    if "capacitance_f" in values:
        each.append(None if omega == 0 or values["capacitance_f"] == 0 else 1 / (J * omega * values["capacitance_f"]))
    if connection == "series":
        return None if None in each else mp.fsum(each)
    admittance = mp.mpc(0)
    for impedance in each:
        if impedance is None:
            continue
        if impedance == 0:
            return mp.mpc(0)
        admittance += 1 / impedance
    return None if admittance == 0 else 1 / admittance


def termination_impedance(value, omega, zc):
    if value == "open":
        return None
    if value == "short":
        return mp.mpc(0)
    if value == "matched":
        return zc
    if isinstance(value, dict) and "kind" in value:
        return parts_impedance(value, "series" if value["kind"] == "series_rlc" else "parallel", omega)
    return complex_of(value)


def zc_of(line, omega):
    """What a line must be closed by to look the same from either end: Z = (a Z + b)/(c Z + d), where a = d."""
    total = abcd_of_line(line, short_length(line, omega), omega)
    root = mp.sqrt(total[0, 1] / total[1, 0])
    return root if mp.re(root) >= 0 else -root


def short_length(line, omega):
    """A twentieth of a radian or of a neper at most, whichever comes first."""
    z, y = per_metre(line, omega)
    return mp.mpf(2) ** -int(mp.ceil(mp.log(20 * abs(mp.sqrt(abs(z * y))), 2)))


def digits(value):
    # What the working precision leaves of an exact zero.
    if abs(value) < mp.mpf(10) ** -100:
        return "0.0"
    return mp.nstr(value, 30, strip_zeros=True, min_fixed=0, max_fixed=0)


def written(value):
    if value is None or isinstance(value, (bool, str)):
        return value
    if isinstance(value, mp.mpc):
        return {"re": digits(value.real), "im": digits(value.imag)}
    return digits(mp.mpf(value))


def check(calculation, name, source, given, expected, tolerance, **more):
    return {"calculation": calculation, "name": name, "source": source, "input": given, "tolerance": tolerance, **more, "expected": {pointer: written(value) for pointer, value in expected.items()}}


def write(script, title, checks):
    target = pathlib.Path(script).with_suffix(".json")
    text = json.dumps({"title": title, "checks": list(checks)}, indent=1) + "\n"
    if "--check" in sys.argv:
        sys.exit(0 if target.exists() and target.read_text() == text else f"{target.name} differs from what {pathlib.Path(script).name} makes")
    target.write_text(text)
