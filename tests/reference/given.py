"""Reference values for lines given by a table or a data sheet, and for primary constants from secondary ones.

Made by other routes than the solvers': gamma and Zc from the matrix exponential of the telegrapher equations, group velocity from phase
constants at neighbouring frequencies, cubics between rows by de Casteljau's construction. Inputs are the exact values of their float64 numbers.
"""

import mpmath as mp

from support import abcd_of_line, check, complex_of, exact, short_length, write, zc_of

EXPONENTIAL = "matrix exponential of the telegrapher equations with the constants of the row, computed to 30 digits"


def gamma_of(line, omega):
    length = short_length(line, omega)
    total = abcd_of_line(line, length, omega)
    trace = (total[0, 0] + total[1, 1]) / 2
    gamma = mp.log(trace + mp.sqrt(trace * trace - 1)) / length
    return gamma if mp.im(gamma) > 0 else -gamma


def constant(r, l, g, c):
    """A line of support.py that keeps its numbers of many digits."""
    text = lambda value: mp.nstr(mp.mpf(value), 60)
    return {"kind": "rlgc", "resistance_ohm_per_m": text(r), "inductance_h_per_m": text(l), "conductance_s_per_m": text(g), "capacitance_f_per_m": text(c)}


def secondary_of(constants_at, frequency):
    """`constants_at` gives R, L, G, C at a frequency."""
    f = exact(frequency)
    line, omega = constant(*constants_at(f)), 2 * mp.pi * f
    gamma = gamma_of(line, omega)
    return {
        "/propagation_constant_per_m": gamma,
        "/characteristic_impedance_ohm": zc_of(line, omega),
        "/attenuation_np_per_m": mp.re(gamma),
        "/phase_velocity_m_per_s": omega / mp.im(gamma),
    }


def group_velocity_of(constants_at, frequency):
    """Richardson's extrapolation of central differences of beta, with 130 digits in hand."""
    f = exact(frequency)
    beta = lambda at: mp.im(gamma_of(constant(*constants_at(at)), 2 * mp.pi * at))
    h = f * mp.mpf(10) ** -12
    slope = (8 * (beta(f + h) - beta(f - h)) - (beta(f + 2 * h) - beta(f - 2 * h))) / (12 * h)
    return 2 * mp.pi / slope


# A cable of twisted pairs, measured at six frequencies.
TABLE = {
    "kind": "rlgc_table",
    "frequency_hz": [0, 1e4, 1e5, 1e6, 1e7, 1e8],
    "resistance_ohm_per_m": [0.172, 0.174, 0.189, 0.44, 1.37, 4.3],
    "inductance_h_per_m": [6.2e-7, 6.15e-7, 6e-7, 5.3e-7, 4.95e-7, 4.85e-7],
    "conductance_s_per_m": [0, 1e-9, 1.5e-8, 2e-7, 3e-6, 4.1e-5],
    "capacitance_f_per_m": [4.9e-11, 4.9e-11, 4.9e-11, 4.88e-11, 4.86e-11, 4.85e-11],
}
QUANTITIES = ("resistance_ohm_per_m", "inductance_h_per_m", "conductance_s_per_m", "capacitance_f_per_m")


def row(table, index):
    return lambda _: tuple(exact(table[name][index]) for name in QUANTITIES)


def monotone_slopes(x, y):
    """Slopes of parabolas through three neighbours by divided differences, then the circle of Fritsch and Carlson."""
    n = len(x)
    d = [(y[k + 1] - y[k]) / (x[k + 1] - x[k]) for k in range(n - 1)]
    if n == 2:
        return [d[0], d[0]]
    bend = [(d[k + 1] - d[k]) / (x[k + 2] - x[k]) for k in range(n - 2)]
    m = [d[0] - bend[0] * (x[1] - x[0])] + [d[k - 1] + bend[k - 1] * (x[k] - x[k - 1]) for k in range(1, n - 1)] + [d[-1] + bend[-1] * (x[-1] - x[-2])]
    neighbours = [[d[0]]] + [[d[k - 1], d[k]] for k in range(1, n - 1)] + [[d[-1]]]
    for k in range(n):
        signs = {mp.sign(each) for each in neighbours[k]}
        if len(signs) > 1 or m[k] * neighbours[k][0] <= 0:
            m[k] = mp.mpf(0)
    for k in range(n - 1):
        size = mp.hypot(m[k], m[k + 1])
        if size > 3 * abs(d[k]):
            m[k], m[k + 1] = m[k] * 3 * abs(d[k]) / size, m[k + 1] * 3 * abs(d[k]) / size
    return m


def read_monotone(x, y, at):
    m = monotone_slopes(x, y)
    k = max(index for index in range(len(x) - 1) if x[index] <= at)
    h, t = x[k + 1] - x[k], (at - x[k]) / (x[k + 1] - x[k])
    points = [y[k], y[k] + h * m[k] / 3, y[k + 1] - h * m[k + 1] / 3, y[k + 1]]
    while len(points) > 1:
        points = [left + t * (right - left) for left, right in zip(points, points[1:])]
    return points[0]


def between(table):
    x = [exact(each) for each in table["frequency_hz"]]
    columns = [[exact(each) for each in table[name]] for name in QUANTITIES]
    return lambda f: tuple(read_monotone(x, column, f) for column in columns)


def table_checks():
    name = "lines/secondary-constants"
    for index, frequency in enumerate(TABLE["frequency_hz"]):
        if frequency:
            yield check(name, f"table of constants at its row of {frequency:g} Hz", EXPONENTIAL, {"line": TABLE, "frequency_hz": frequency}, secondary_of(row(TABLE, index), frequency), 1e-12)
    for frequency in (2.5e3, 3.7e4, 5.1e5, 2.2e6, 9e7):
        source = "Fritsch and Carlson 1980, cubics by de Casteljau's construction; matrix exponential; phase constants at neighbouring frequencies; to 30 digits"
        expected = {**secondary_of(between(TABLE), frequency), "/group_velocity_m_per_s": group_velocity_of(between(TABLE), frequency)}
        yield check(name, f"table of constants between rows, at {frequency:g} Hz", source, {"line": TABLE, "frequency_hz": frequency}, expected, 1e-12)
    yield check(name, "table of constants held above its last row", EXPONENTIAL, {"line": TABLE, "frequency_hz": 1e9}, secondary_of(row(TABLE, 5), 1e9), 1e-12)
    held = {**TABLE, "frequency_hz": [1e3, 1e4, 1e5, 1e6, 1e7, 1e8]}
    yield check(name, "table of constants held below its first row", EXPONENTIAL, {"line": held, "frequency_hz": 10}, {**secondary_of(row(held, 0), 10), "/group_velocity_m_per_s": group_velocity_of(row(held, 0), 10)}, 1e-12)
    one = {"kind": "rlgc_table", "frequency_hz": [1e6], "resistance_ohm_per_m": [0.12], "inductance_h_per_m": [2.5e-7], "conductance_s_per_m": [2.5e-5], "capacitance_f_per_m": [1e-10]}
    yield check(name, "table of one row", EXPONENTIAL, {"line": one, "frequency_hz": 1e8}, {**secondary_of(row(one, 0), 1e8), "/group_velocity_m_per_s": group_velocity_of(row(one, 0), 1e8)}, 1e-12)
    straight = {"kind": "rlgc_table", "frequency_hz": [0, 1e6, 4e6], "resistance_ohm_per_m": [1, 2, 5], "inductance_h_per_m": [4e-7, 3e-7, 0], "conductance_s_per_m": [0, 1e-6, 4e-6], "capacitance_f_per_m": [1e-10, 1e-10, 1e-10]}
    line = lambda f: (1 + f / 10**6, exact(4e-7) - f / 10**6 * (exact(4e-7) - exact(3e-7)), f / 10**6 * exact(1e-6), exact(1e-10))
    yield check(name, "table on straight lines", "straight lines through the rows; matrix exponential, computed to 30 digits", {"line": straight, "frequency_hz": 2.5e6}, {**secondary_of(line, 2.5e6), "/group_velocity_m_per_s": group_velocity_of(line, 2.5e6)}, 1e-12)


def pair(r0, ac, l0, l1, fm, b, c, g0, ge):
    """R, L, G, C per metre of a parametric pair; the given numbers are per kilometre."""
    def at(f):
        x = (f / fm) ** b
        return (r0**4 + ac * f * f) ** mp.mpf("0.25") / 1000, (l0 + l1 * x) / (1 + x) / 1000, g0 * f**ge / 1000, c / 1000
    return at


PAIRS = {
    "0.4 mm": pair(*(mp.mpf(each) for each in ("286.17578", "0.14769620", "675.36888e-6", "488.95186e-6", "806.33863e3", "0.92930728", "49e-9", "43e-9", "0.70"))),
    "0.5 mm": pair(*(mp.mpf(each) for each in ("174.55888", "0.053073481", "617.29539e-6", "478.97099e-6", "553.760e3", "1.1529766", "50e-9", "0.23487476e-12", "1.38"))),
}
PAIR_SOURCE = "parametric model of telephone pairs with its published coefficients (ITU-T G.996.1; coefficients from memory)"


def pair_table(at, frequencies):
    rows = [at(exact(f)) for f in frequencies]
    return {"kind": "rlgc_table", "frequency_hz": frequencies, **{name: [float(each[k]) for each in rows] for k, name in enumerate(QUANTITIES)}}


def pair_checks():
    """Twenty rows a decade, read between them: how well a table of that density stands for the model."""
    frequencies = [float(mp.nstr(mp.mpf(10) ** (3 + mp.mpf(k) / 20), 6)) for k in range(81)]
    for name, at in PAIRS.items():
        table = pair_table(at, frequencies)
        for frequency in (11.1e3, 138e3, 552e3, 1.104e6, 8.5e6):
            yield check("lines/secondary-constants", f"telephone pair of {name}, twenty rows a decade, at {frequency / 1e3:g} kHz", PAIR_SOURCE + "; twenty rows a decade read between the rows to 1e-4", {"line": table, "frequency_hz": frequency}, secondary_of(at, frequency), 1e-4)


# Published insertion loss, dB for 100 m, at MHz.
CATEGORY_6 = {1: 2.0, 4: 3.8, 8: 5.3, 10: 6.0, 16: 7.6, 20: 8.5, 25: 9.5, 31.25: 10.7, 62.5: 15.4, 100: 19.8, 200: 29.0, 250: 32.8}
CATEGORY_5E = {1: 2.0, 4: 4.1, 8: 5.8, 10: 6.5, 16: 8.2, 20: 9.3, 25: 10.4, 31.25: 11.7, 62.5: 17.0, 100: 22.0}


def sheet(attenuation, z0=100, velocity=0.65):
    return {"kind": "datasheet", "characteristic_impedance_ohm": z0, "velocity_factor": velocity, "attenuation": attenuation}


def points(values):
    return {"points": [{"frequency_hz": mhz * 1e6, "attenuation_db_per_m": float(mp.mpf(str(db)) / 100)} for mhz, db in values.items()]}


def wave_of(z0, velocity, db_per_m, frequency):
    """A data sheet's own statement: gamma = alpha + j w/v, and the same velocity for a group."""
    v = exact(velocity) * 299792458
    alpha = db_per_m * mp.log(10) / 20
    return {
        "/propagation_constant_per_m": mp.mpc(alpha, 2 * mp.pi * exact(frequency) / v),
        "/attenuation_db_per_m": db_per_m,
        "/attenuation_np_per_m": alpha,
        "/characteristic_impedance_ohm": mp.mpc(exact(z0)),
        "/phase_velocity_m_per_s": v,
        "/group_velocity_m_per_s": v,
    }


def law_of(k1, k2, reference, frequency):
    ratio = exact(frequency) / exact(reference)
    return exact(k1) * mp.sqrt(ratio) + exact(k2) * ratio


def data_sheet_checks():
    name = "lines/secondary-constants"
    stated = "gamma = alpha + j w/v, Zc = Z0 as the data sheet states them, computed to 30 digits"
    for z0, velocity, k1, k2, reference, frequency in ((50, 0.66, 0.066, 0.004, 1e8, 1e9), (75, 0.82, 0.19, 0, 1e9, 5e6), (100, 0.65, 0.01808, 0.00017, 1e6, 2.5e8), (50, 0.695, 0.25, 1.5, 1e9, 4e10), (120, 0.7, 0.0003, 0, 1e3, 1)):
        line = sheet({"sqrt_db_per_m": k1, "linear_db_per_m": k2, "reference_frequency_hz": reference}, z0, velocity)
        yield check(name, f"data sheet by its law, {z0} ohm at {frequency:g} Hz", stated, {"line": line, "frequency_hz": frequency}, wave_of(z0, velocity, law_of(k1, k2, reference, frequency), frequency), 1e-12)
    sampled = points({1: 0, 10: 0, 100: 0})["points"]
    for each in sampled:
        each["attenuation_db_per_m"] = float(law_of(0.01808, 0.00017, 1e6, each["frequency_hz"]))
    for frequency in (1e6, 3e6, 5.5e7, 1e8):
        yield check(name, f"three points of a law give it back at {frequency:g} Hz", "k1 sqrt f + k2 f itself, computed to 30 digits", {"line": sheet({"points": sampled}), "frequency_hz": frequency}, wave_of(100, 0.65, law_of(0.01808, 0.00017, 1e6, frequency), frequency), 1e-12)
    for frequency, near, db in ((2e5, 1e6, 2.0), (1e9, 2.5e8, 32.8)):
        value = exact(float(mp.mpf(str(db)) / 100)) * mp.sqrt(exact(frequency) / exact(near))
        yield check(name, f"data sheet points left at {frequency:g} Hz", "scaled by the root of frequency from the nearest point, computed to 30 digits", {"line": sheet(points(CATEGORY_6)), "frequency_hz": frequency}, wave_of(100, 0.65, value, frequency), 1e-12)
    for title, table, kept, left in (("6", CATEGORY_6, (1, 4, 10, 31.25, 100, 250), (8, 16, 20, 25, 62.5, 200)), ("5e", CATEGORY_5E, (1, 4, 10, 25, 100), (8, 16, 20, 31.25, 62.5))):
        line = sheet(points({mhz: table[mhz] for mhz in kept}))
        for mhz in left:
            source = f"insertion loss of category {title} cable, ANSI/TIA-568-C.2 (table from memory): the other rows of the table, to the 0.05 dB of its digits at either"
            yield check(name, f"category {title} cable between rows, {mhz} MHz", source, {"line": line, "frequency_hz": mhz * 1e6}, {"/attenuation_db_per_m": mp.mpf(str(table[mhz])) / 100}, float(mp.mpf("0.1") / mp.mpf(str(table[mhz]))))
    for mhz, limit in CATEGORY_6.items():
        line = sheet({"sqrt_db_per_m": 0.01808, "linear_db_per_m": 0.00017, "reference_frequency_hz": 1e6})
        yield check(name, f"category 6 limit at {mhz} MHz", "1.808 sqrt f + 0.017 f + 0.2/sqrt f in dB for 100 m, ANSI/TIA-568-C.2 (from memory): the first two terms stay within the whole", {"line": line, "frequency_hz": mhz * 1e6}, {"/attenuation_db_per_m": (mp.mpf("1.808") * mp.sqrt(mhz) + mp.mpf("0.017") * mhz + mp.mpf("0.2") / mp.sqrt(mhz)) / 100}, 0, comparison="at_most")
    # The whole line: a terminated length of data sheet cable, by the exponential.
    line = sheet({"sqrt_db_per_m": 0.066, "linear_db_per_m": 0.004, "reference_frequency_hz": 1e8}, 50, 0.66)
    for frequency in (0, 3e6, 1e9):
        alpha = law_of(0.066, 0.004, 1e8, frequency) * mp.log(10) / 20
        v = exact(0.66) * 299792458
        whole = constant(alpha * 50, 50 / v, alpha / 50, 1 / (50 * v))
        total = abcd_of_line(whole, 7.5, 2 * mp.pi * exact(frequency))
        zin = (total[0, 0] * 75 + total[0, 1]) / (total[1, 0] * 75 + total[1, 1])
        yield check("terminations/input-impedance", f"data sheet cable of 7.5 m into 75 ohm at {frequency:g} Hz", "matrix exponential of the telegrapher equations, computed to 30 digits", {"line": line, "length_m": 7.5, "termination": 75, "frequency_hz": frequency}, {"/input_impedance_ohm": zin, "/reflection_at_reference": (zin - 50) / (zin + 50)}, 1e-12)


def polar(value):
    if isinstance(value, dict) and "magnitude" in value:
        return exact(value["magnitude"]) * mp.expj(exact(value["angle_deg"]) * mp.pi / 180)
    return complex_of(value)


def back(gamma, zc, frequency):
    """By magnitudes and angles: |Z| = |gamma| |Zc|, the angles add; |Y| = |gamma| / |Zc|, they subtract."""
    g, z, omega = polar(gamma), polar(zc), 2 * mp.pi * exact(frequency)
    (gs, ga), (zs, za) = mp.polar(g), mp.polar(z)
    series, shunt = mp.rect(gs * zs, ga + za), mp.rect(gs / zs, ga - za)
    expected = {"/resistance_ohm_per_m": mp.re(series), "/conductance_s_per_m": mp.re(shunt)}
    if omega == 0:
        return {**expected, "/inductance_h_per_m": None, "/capacitance_f_per_m": None}
    return {**expected, "/inductance_h_per_m": mp.im(series) / omega, "/capacitance_f_per_m": mp.im(shunt) / omega}


def double(value):
    return {"re": float(mp.re(value)), "im": float(mp.im(value))}


MODEL = "R, L, G, C of the model, of which the input is gamma and Zc by matrix exponential, rounded to 16 digits"


def from_secondary_checks():
    name = "lines/from-secondary"
    source = "gamma Zc and gamma / Zc by magnitude and angle, computed to 30 digits"
    cases = {
        "cable": ({"re": 0.0018, "im": 3.14}, {"re": 50, "im": -0.009}, 1e8),
        "line without loss": ({"re": 0, "im": 4.2}, 75, 1.5e8),
        "very good line": ({"re": 1e-9, "im": 41.9}, {"re": 50, "im": -1e-9}, 2e9),
        "line on a chip": ({"re": 5590.2, "im": 5615.5}, {"re": 44.7, "im": -44.5}, 5e9),
        "impedance by magnitude and angle": ({"magnitude": 0.0123, "angle_deg": 88.5}, {"magnitude": 118, "angle_deg": -12}, 1e5),
        "angles of 45 degrees": ({"magnitude": 0.02, "angle_deg": 45}, {"magnitude": 900, "angle_deg": -45}, 800),
        "direct current": (2e-5, 2500, 0),
        "one hertz": ({"re": 1.1e-6, "im": 1.2e-6}, {"re": 4100, "im": -3900}, 1),
        "very small impedance": ({"re": 0.4, "im": 300}, {"re": 1e-9, "im": -2e-12}, 1e9),
        "very large impedance": ({"re": 0.4, "im": 300}, {"re": 9e11, "im": -2e10}, 1e9),
        "no conductance left": ({"re": 0.3, "im": 0.4}, {"re": 30, "im": -40}, 1e6),
        "not passive": ({"re": 0.001, "im": 2}, {"re": 50, "im": 3}, 1e8),
    }
    for title, (gamma, zc, frequency) in cases.items():
        yield check(name, title, source, {"frequency_hz": frequency, "propagation_constant_per_m": gamma, "characteristic_impedance_ohm": zc}, back(gamma, zc, frequency), 1e-12)
    for title, at in PAIRS.items():
        for frequency in (1e3, 138e3, 1.104e6, 3e7):
            constants = at(exact(frequency))
            line, omega = constant(*constants), 2 * mp.pi * exact(frequency)
            gamma, zc = double(gamma_of(line, omega)), double(zc_of(line, omega))
            # A part that is a k-th of the whole is known to k units of rounding of the input.
            gain = max(abs(omega * constants[1] / constants[0]), abs(omega * constants[3] / constants[2]), 1)
            given = {"frequency_hz": frequency, "propagation_constant_per_m": {part: [gamma[part]] for part in gamma}, "characteristic_impedance_ohm": {part: [zc[part]] for part in zc}}
            expected = dict(zip(("/resistance_ohm_per_m", "/inductance_h_per_m", "/conductance_s_per_m", "/capacitance_f_per_m"), constants))
            exceptions = {}
            reason = "gamma and Zc of 16 digits know this part of the whole, some 1/%d of it, no better" % int(gain)
            for pointer, ratio in (("/resistance_ohm_per_m", omega * constants[1] / constants[0]), ("/conductance_s_per_m", omega * constants[3] / constants[2])):
                if ratio > 1000:
                    exceptions[pointer] = {"tolerance": float(mp.nstr(ratio * mp.mpf("1e-15"), 1)), "reason": reason}
            more = {"exceptions": exceptions} if exceptions else {}
            yield check(name, f"telephone pair of {title} at {frequency / 1e3:g} kHz", PAIR_SOURCE + "; " + MODEL, given, expected, 1e-12, **more)


def checks():
    yield from table_checks()
    yield from pair_checks()
    yield from data_sheet_checks()
    yield from from_secondary_checks()


if __name__ == "__main__":
    write(__file__, "Lines by table and by data sheet", checks())
