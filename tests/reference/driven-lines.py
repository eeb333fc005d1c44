"""Reference values for terminations/power-budget and terminations/standing-wave, to 30 digits.

Routes other than the solvers': voltage and current come from the Taylor series of the telegrapher equations or their matrix exponential by squaring (no
square root, no characteristic impedance, no waves); what the line dissipates is the integral of R |I|^2 + G |V|^2, found as a block of a 4 x 4 matrix
exponential (Van Loan, IEEE Trans. AC-23 (1978) 395-404) and held against the difference of the powers at both ends; maxima and minima are sought where the
computed slope of |V|^2 changes sign along the line, then by bisection of that slope.
"""

import mpmath as mp

from support import J, abcd_of_line, check, complex_of, exact, per_metre, termination_impedance, write, zc_of
from telegrapher import CABLE, CRYOGENIC, FIFTY, LEAKY, LOSSY, ON_CHIP, TELEPHONE

BUDGET = "terminations/power-budget"
WAVE = "terminations/standing-wave"
SOURCE = "Taylor series and matrix exponential of the telegrapher equations, powers by Poynting's theorem with the integral as a block of a matrix exponential (Van Loan 1978), computed to 30 digits"
DB = 10 / mp.log(10)


class Line:
    """Voltage and current at x from the termination, of which v and i are given."""

    def __init__(self, case, omega):
        self.case, self.omega = case, omega
        self.z, self.y = per_metre(case["line"], omega)
        self.length = exact(case["length_m"])
        zc = zc_of(case["line"], omega) if case["termination"] == "matched" else None
        load = termination_impedance(case["termination"], omega, zc)
        self.v, self.i = (mp.mpc(1), mp.mpc(0)) if load is None else (mp.mpc(load), mp.mpc(1))
        self.delivered = mp.re(self.v * mp.conj(self.i))

    def at(self, x):
        """V and I; the series is good as long as its largest term leaves 30 of the 130 digits."""
        square = self.z * self.y * x * x
        if abs(square) > 3600:
            m = abcd_of_line(self.case["line"], mp.nstr(x, 120), self.omega)
            return m[0, 0] * self.v + m[0, 1] * self.i, m[1, 0] * self.v + m[1, 1] * self.i
        even, odd, term, k = mp.mpc(0), mp.mpc(0), mp.mpc(1), 0
        while k < 4 or abs(term) > mp.eps / 1000:
            even += term
            odd += term / (2 * k + 1)
            k += 1
            term *= square / ((2 * k - 1) * (2 * k))
        return even * self.v + self.z * x * odd * self.i, even * self.i + self.y * x * odd * self.v

    def slope(self, x):
        v, i = self.at(x)
        return mp.re(mp.conj(v) * self.z * i)

    def dissipated(self):
        """Of x^T Q x over the length, Q = diag(G, R)."""
        a = mp.matrix([[0, self.z], [self.y, 0]]) * self.length
        block = mp.zeros(4, 4)
        for row in range(2):
            for column in range(2):
                block[row, column] = -mp.conj(a[column, row])
                block[row + 2, column + 2] = a[row, column]
        block[0, 2], block[1, 3] = mp.re(self.y) * self.length, mp.re(self.z) * self.length
        size = max(abs(each) for each in block)
        squarings = max(0, int(mp.ceil(mp.log(size + 1, 2)))) + 8
        small = block / mp.mpf(2) ** squarings
        term, total = mp.eye(4), mp.eye(4)
        for k in range(1, 45):
            term = term * small / k
            total += term
        for _ in range(squarings):
            total = total * total
        upper = mp.matrix([[total[0, 2], total[0, 3]], [total[1, 2], total[1, 3]]])
        lower = mp.matrix([[total[2, 2], total[2, 3]], [total[3, 2], total[3, 3]]])
        form = lower.transpose_conj() * upper
        state = mp.matrix([self.v, self.i])
        return mp.re((state.transpose_conj() * form * state)[0])

    def extrema(self):
        """(x, is a maximum) by scanning; ends count where the slope vanishes there."""
        turn = abs(mp.sqrt(abs(self.z * self.y))) * self.length
        steps = 10 * (3 + int(turn))
        if self.case["name"] in FOUND:
            return FOUND[self.case["name"]]
        found, xs = [], [self.length * k / steps for k in range(steps + 1)]
        with mp.workdps(60):
            slopes = [self.slope(x) for x in xs]
        zero = [abs(s) < mp.mpf(10) ** -45 * max(abs(t) for t in slopes) for s in slopes]
        for k in range(steps + 1):
            if zero[k]:
                near = slopes[k + 1] if k < steps else -slopes[k - 1]
                found.append((xs[k], near < 0))
            elif k < steps and not zero[k + 1] and (slopes[k] > 0) != (slopes[k + 1] > 0):
                low, high = xs[k], xs[k + 1]
                with mp.workdps(60):
                    root = mp.findroot(self.slope, (low, high), solver="anderson", tol=mp.mpf(10) ** -70, verify=False)
                found.append((root, slopes[k] > 0))
        FOUND[self.case["name"]] = found
        return found


# The extrema of a case serve both calculations.
FOUND = {}


def cleared(size, largest):
    """What the search for a place leaves of a voltage or current that vanishes there."""
    return size if size > mp.mpf(10) ** -40 * largest else mp.mpf(0)


def power_budget(case):
    omega = 2 * mp.pi * exact(case["frequency_hz"])
    line = Line(case, omega)
    zs = complex_of(case.get("source_impedance_ohm", 50))
    available = exact(case.get("available_power_w", 1))
    v, i = line.at(line.length)
    into = mp.re(v * mp.conj(i))
    if case["name"].find("200 dB") < 0:
        integral = line.delivered + line.dissipated()
        assert abs(integral - into) <= mp.mpf(10) ** -40 * (abs(into) + abs(v) * abs(i)), case["name"]
    # The source that makes V + Zs I = Vs has |Vs|^2 / (4 Rs) to give.
    gain = available * 4 * mp.re(zs) / abs(v + zs * i) ** 2
    peak = max(abs(line.at(x)[0]) for x in [mp.mpf(0), line.length] + [x for x, top in line.extrema() if top]) if case["name"].find("200 dB") < 0 else abs(v)
    z, y = line.z, line.y
    # Re sqrt(z y): alpha^2 - beta^2 and 2 alpha beta are the parts of z y.
    matched = mp.re(mp.sqrt(z * y)) * line.length * 2 * DB
    answer = {
        "/available_power_w": available,
        "/power_into_line_w": gain * into,
        "/power_delivered_w": gain * line.delivered,
        "/matched_line_loss_db": matched,
        "/peak_voltage_v": mp.sqrt(2 * gain) * peak,
    }
    if into > 0:
        answer["/source_mismatch_loss_db"] = -DB * mp.log(gain * into / available)
    if line.delivered > 0:
        total = DB * mp.log(into / line.delivered)
        answer["/total_line_loss_db"] = total
        answer["/additional_loss_db"] = total - matched
        answer["/transducer_loss_db"] = DB * mp.log(available / (gain * line.delivered))
    else:
        answer["/total_line_loss_db"] = answer["/additional_loss_db"] = answer["/transducer_loss_db"] = None
    return answer


def standing_wave(case):
    omega = 2 * mp.pi * exact(case["frequency_hz"])
    line = Line(case, omega)
    zs = complex_of(case.get("source_impedance_ohm", 50))
    points = case["points"]
    v, i = line.at(line.length)
    gain = complex_of(case.get("source_voltage_v", 1)) / (v + zs * i)
    answer = {"/voltage_v": gain * v, "/current_a": gain * i}
    for k in sorted({0, 1, points // 2, points - 1}):
        answer[f"/position_m/{k}"] = line.length * k / (points - 1)
        v, i = line.at(line.length - line.length * k / (points - 1))
        answer[f"/voltage_magnitude_v/{k}"] = abs(gain * v)
        answer[f"/current_magnitude_a/{k}"] = abs(gain * i)
        answer[f"/power_w/{k}"] = abs(gain) ** 2 * mp.re(v * mp.conj(i))
    if case["name"].find("[ends only]") < 0:
        extrema = sorted(((line.length - x, top) for x, top in line.extrema()), key=lambda each: each[0])
        for name, wanted in (("maxima", True), ("minima", False)):
            listed = [z for z, top in extrema if top == wanted]
            for k in sorted({0, len(listed) - 1} if listed else set()):
                v, i = line.at(line.length - listed[k])
                answer[f"/{name}/{k}/position_m"] = listed[k]
                answer[f"/{name}/{k}/voltage_v"] = cleared(abs(gain * v), abs(gain))
                answer[f"/{name}/{k}/current_a"] = cleared(abs(gain * i), abs(gain))
    if case["termination"] not in ("open", "short") and omega:
        zc = zc_of(case["line"], omega)
        size = abs((line.v - zc * line.i) / (line.v + zc * line.i))
        answer["/vswr_at_termination"] = (1 + size) / (1 - size) if size < 1 else None
    return answer


RLC = {"kind": "series_rlc", "resistance_ohm": 3, "inductance_h": 2e-8, "capacitance_f": 5e-11}
LOADS = [
    ("cable into 75 - 30j ohm", CABLE, 3.2, {"re": 75, "im": -30}, 1e8, {}),
    ("cable into its own impedance", CABLE, 3.2, "matched", 1e8, {"source_impedance_ohm": {"re": 45, "im": 20}}),
    ("cable into nearly its own impedance", CABLE, 3.2, 50.01, 1e8, {}),
    ("lossy line into 20 + 300j ohm", LOSSY, 0.7, {"re": 20, "im": 300}, 94.3125e6, {"source_impedance_ohm": {"re": 40, "im": -25}}),
    ("telephone line at 1 kHz, whose impedance is complex, into 600 ohm", TELEPHONE, 5000, 600, 1000, {"source_impedance_ohm": 600}),
    ("telephone line at 300 Hz into an inductive load: negative additional loss", TELEPHONE, 2000, {"re": 100, "im": 400}, 300, {"source_impedance_ohm": 600}),
    ("line on a chip into 50 ohm", ON_CHIP, 2e-3, 50, 5e9, {}),
    ("very low loss, into 75 ohm", CRYOGENIC, 12.25, 75, 1e8, {}),
    ("very low loss, a millimetre", CRYOGENIC, 1e-3, {"re": 75, "im": 12}, 1e8, {}),
    ("leaking line at 1 GHz into 50 ohm", LEAKY, 0.2, 50, 1e9, {}),
    ("series R-L-C", CABLE, 1.7, RLC, 2.1e8, {}),
    ("electrically tiny into 120 ohm", CABLE, 1e-9, 120, 1e6, {}),
    ("without loss into 20 + 45j ohm", FIFTY, 3.1, {"re": 20, "im": 45}, 2e8, {}),
    ("direct current into 75 ohm", CABLE, 3.2, 75, 0, {}),
    ("direct current, no conductance, 50 ohm", ON_CHIP, 2e-3, 50, 0, {}),
    ("an active load", CABLE, 1.7, {"re": -20, "im": 12}, 2.1e8, {}),
    ("close by a short of 1e-9 ohm", CABLE, 1.7, {"re": 1e-9, "im": 12}, 2.1e8, {}),
]
REACTIVE = [
    ("cable, open", CABLE, 3.2, "open", 1e8, {}),
    ("lossy line, short", LOSSY, 0.7, "short", 94.3125e6, {}),
    ("cable into a reactance", CABLE, 0.9, {"re": 0, "im": 35}, 1e8, {}),
    ("direct current, open, leaking", CABLE, 3.2, "open", 0, {}),
    ("direct current, no conductance, short", ON_CHIP, 2e-3, "short", 0, {}),
    ("line on a chip, open", ON_CHIP, 2e-3, "open", 5e9, {}),
    ("very low loss, open: minima of 1e-9 V", CRYOGENIC, 3.3, "open", 1e8, {}),
    ("very low loss, short: currents of 1e-11 A at the maxima", CRYOGENIC, 3.3, "short", 1e8, {}),
    ("line on a chip at 1 kHz, open: the least voltage is at the open end", ON_CHIP, 2e-3, "open", 1000, {}),
    ("without loss, open", FIFTY, 3.1, "open", 2e8, {}),
]
FAR = [
    ("200 dB of loss into 20 + 300j ohm", LOSSY, 230.3, {"re": 20, "im": 300}, 1e8, {"source_impedance_ohm": {"re": 40, "im": -25}}),
    ("200 dB of loss into its own impedance", LOSSY, 230.3, "matched", 1e8, {}),
]


def cases():
    for name, line, length, termination, frequency, more in LOADS + REACTIVE + FAR:
        given = {"line": line, "length_m": length, "termination": termination, "frequency_hz": frequency, **more}
        yield BUDGET, {"name": name, **given, "available_power_w": 25}
        only = " [ends only]" if name.find("200 dB") >= 0 else ""
        yield WAVE, {"name": name + only, **given, "source_voltage_v": {"re": 2.4, "im": -1.8}, "points": 7}


COMPUTE = {BUDGET: power_budget, WAVE: standing_wave}


def published():
    digits = "half a unit of the last printed digit"
    yield check(
        WAVE,
        "textbook: impedance by a slotted line",
        "Pozar, Microwave Engineering, 4th ed., example 2.4: 47.3 + 19.7j on 50 ohm, a wavelength of 4.0 cm, minima 1.48 cm from the load and half a wave on, VSWR 1.5 (from memory)",
        {"line": {"kind": "lossless", "characteristic_impedance_ohm": 50, "velocity_factor": 1}, "length_m": 0.04, "termination": {"re": 47.3, "im": 19.7}, "frequency_hz": 7.49481145e9, "points": 5},
        {"/vswr_at_termination": "1.5", "/minima/1/position_m": "0.0252", "/minima/0/position_m": "0.0052"},
        1e-12,
        exceptions={"/vswr_at_termination": {"tolerance": 0.034, "reason": digits}, "/minima/1/position_m": {"tolerance": 2.1e-3, "reason": digits}, "/minima/0/position_m": {"tolerance": 1e-2, "reason": digits}},
    )
    # A line of Heaviside's kind, R/L = G/C, has a real impedance at every frequency, here 50 ohm; alpha = sqrt(R G).
    line = {"kind": "rlgc", "resistance_ohm_per_m": 0.25, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 1e-4, "capacitance_f_per_m": 1e-10}
    for load, length in ((100, 20), (150, 300), (10, 1e-4)):
        a = mp.exp(2 * mp.sqrt(exact(0.25) * exact(1e-4)) * exact(length))
        gamma = abs(exact(load) - 50) / (exact(load) + 50)
        total = DB * mp.log((a * a - gamma**2) / (a * (1 - gamma**2)))
        source = "loss of a mismatched line, 10 log10((a^2 - |Gamma|^2)/(a (1 - |Gamma|^2))), a = 10^(matched loss/10): radio handbooks, and Pozar, 4th ed., equations 2.92 to 2.94 (from memory)"
        given = {"line": line, "length_m": length, "termination": load, "frequency_hz": 3e7}
        yield check(BUDGET, f"handbook: loss of {length:g} m with a VSWR of {max(load / 50, 50 / load):g}", source, given, {"/total_line_loss_db": total, "/matched_line_loss_db": DB * mp.log(a), "/additional_loss_db": total - DB * mp.log(a)}, 1e-12)


def checks():
    yield from published()
    for calculation, case in cases():
        given = {key: value for key, value in case.items() if key != "name"}
        yield check(calculation, case["name"].replace(" [ends only]", ""), SOURCE, given, COMPUTE[calculation](case), 1e-12)


if __name__ == "__main__":
    write(__file__, "Driven lines: power and standing waves", checks())
