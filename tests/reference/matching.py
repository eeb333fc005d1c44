"""Reference values for matching: what textbooks print, and every network found to 30 digits by another route.

The route: the whole circuit, source, network and load, is solved by nodal analysis; its two unknown parts or lengths are sought by Newton's
method from a grid of starts over all they may be, and what is found is refined with 40 digits. No formula of a matching network is used. A length
of line is the power series of the telegrapher equations in z y l^2, without square root, hyperbolic function or characteristic impedance.
"""

import math

import mpmath as mp

from support import LIGHT, check, complex_of, exact, per_metre, write

HALF_TURN = math.pi


def eliminate(matrix, right):
    """Gauss with partial pivoting, for complex numbers of either precision."""
    size = len(right)
    for column in range(size):
        pivot = max(range(column, size), key=lambda row: abs(matrix[row][column]))
        matrix[column], matrix[pivot] = matrix[pivot], matrix[column]
        right[column], right[pivot] = right[pivot], right[column]
        for row in range(column + 1, size):
            factor = matrix[row][column] / matrix[column][column]
            if factor != 0:
                for k in range(column + 1, size):
                    matrix[row][k] -= factor * matrix[column][k]
                right[row] -= factor * right[column]
    for row in reversed(range(size)):
        for k in range(row + 1, size):
            right[row] -= matrix[row][k] * right[k]
        right[row] /= matrix[row][row]
    return right


def length_of_line(z, y, length):
    """(A, B, C) of cosh and sinh by their series in z y l^2."""
    square = z * y * length * length
    even = odd = term = 1 + 0 * square
    k = 0
    while abs(term) > (1e-18 if isinstance(square, complex) else mp.mpf(10) ** -45) * abs(even) and k < 200:
        k += 2
        term = term * square / (k * (k - 1))
        even += term
        odd += term / (k + 1)
    return even, z * length * odd, y * length * odd


def reflection(network, zs, zl):
    """Power wave at the source. Network: (kind, value) from source to load; value is z of a series or shunt branch as a pair (v, i), or A, B, C."""
    nodes = sum(1 for kind, _ in network if kind != "shunt")
    branches = len(network) + sum(1 for kind, _ in network if kind == "line")
    size = nodes + 1 + branches
    zero = 0 * zs
    matrix = [[zero] * size for _ in range(size)]
    right = [zero] * size
    matrix[0][0] += 1 / zs
    right[0] += 1 / zs
    matrix[nodes][nodes] += 1 / zl
    node, row = 0, nodes + 1
    for kind, value in network:
        if kind == "line":
            a, b, c = value
            matrix[node][row] += 1
            matrix[node + 1][row + 1] -= 1
            for target, first, second in ((row, (node, 1), (node + 1, -a)), (row + 1, (row, 1), (node + 1, -c))):
                matrix[target][first[0]] += first[1]
                matrix[target][second[0]] += second[1]
            matrix[row][row + 1] -= b
            matrix[row + 1][row + 1] -= a
            node, row = node + 1, row + 2
        else:
            v, i = value
            matrix[node][row] += 1
            # i (V1 - V2) = v I
            matrix[row][node] += i
            matrix[row][row] -= v
            if kind == "series":
                matrix[node + 1][row] -= 1
                matrix[row][node + 1] -= i
                node += 1
            row += 1
    v0 = eliminate(matrix, right)[0]
    return v0 - zs.conjugate() * (1 - v0) / zs


class Case:
    """One problem in both precisions; `network(unknowns, f, native)` makes the circuit."""

    def __init__(self, given):
        self.given = given
        self.frequency = exact(given["frequency_hz"])
        self.zs = complex_of(given.get("source_impedance_ohm", 50))
        self.line = given.get("line")
        self.known = {}

    def at(self, omega, number):
        """Load, and z and y of the line, in the precision of `number`."""
        key = (omega, number)
        if key not in self.known:
            values = (self.load(mp.mpf(omega)), *(per_metre(self.line, mp.mpf(omega)) if self.line else (0, 0)))
            self.known[key] = tuple(number(each) for each in values)
        return self.known[key]

    def load(self, omega):
        load = self.given["load_impedance_ohm"]
        if not (isinstance(load, dict) and "kind" in load):
            return complex_of(load)
        r, l, c = (exact(load[name]) if name in load else None for name in ("resistance_ohm", "inductance_h", "capacitance_f"))
        if load["kind"] == "series_rlc":
            return (r or 0) + 1j * omega * (l or 0) + (1 / (1j * omega * c) if c is not None else 0)
        return 1 / ((1 / r if r is not None else 0) + (1 / (1j * omega * l) if l is not None else 0) + 1j * omega * (c or 0))

    def beta(self):
        """Of the line, to scale lengths; sign and size from z y alone."""
        z, y = per_metre(self.line, 2 * mp.pi * self.frequency)
        return abs(mp.im(mp.sqrt(z * y)))

    def gamma(self, form, unknowns, frequency=None, native=True):
        omega = 2 * mp.pi * (self.frequency if frequency is None else frequency)
        kind = complex if native else mp.mpc
        real = float if native else mp.mpf
        omega = real(omega)
        return reflection(form(self, [real(each) for each in unknowns], omega, kind), kind(self.zs), self.at(omega, kind)[0])

    def line_part(self, omega, length, number):
        _, z, y = self.at(omega, number)
        return length_of_line(z, y, length)


def l_section(series_first):
    """Unknowns X and B at the design frequency; over frequency each is a coil or a capacitor."""

    def form(case, unknowns, omega, number):
        x, b = unknowns
        design = (float if number is complex else mp.mpf)(2 * mp.pi * case.frequency)
        ratio = omega / design
        series = ("series", (number(0, x * ratio), number(1)) if x > 0 else (number(0, x / ratio), number(1)))
        shunt = ("shunt", (number(1), number(0, b * ratio)) if b > 0 else (number(1), number(0, b / ratio)))
        return [series, shunt] if series_first else [shunt, series]

    return form


def stub_pair(kind, total, number):
    a, b, c = total
    return (a, c) if kind == "open" else (b, a)


def single_stub(way, kind):
    """Unknowns: phase to the load and of the stub, in radians of beta at the design frequency."""

    def form(case, unknowns, omega, number):
        beta = float(case.scale) if number is complex else case.scale
        distance, stub = (case.line_part(omega, each / beta, number) for each in unknowns)
        return [(way, stub_pair(kind, stub, number)), ("line", distance)]

    return form


def double_stub(at_source, at_load, spacing):
    def form(case, unknowns, omega, number):
        real = float if number is complex else mp.mpf
        beta = real(case.scale)
        first, second = (case.line_part(omega, each / beta, number) for each in unknowns)
        between = case.line_part(omega, real(spacing), number)
        return [("shunt", stub_pair(at_source, first, number)), ("line", between), ("shunt", stub_pair(at_load, second, number))]

    return form


def quarter_wave(case, unknowns, omega, number):
    """Unknowns: distance in radians and the logarithm of the transformer's impedance."""
    real = float if number is complex else mp.mpf
    distance, logarithm = unknowns
    impedance = math.exp(logarithm) if number is complex else mp.exp(logarithm)
    turn = omega / real(2 * mp.pi * case.frequency) * real(mp.pi / 2)
    total = length_of_line(number(0, turn * impedance), number(0, turn / impedance), real(1))
    return [("line", total), ("line", case.line_part(omega, distance / real(case.scale), number))]


def newton(case, form, start):
    """From a start, in float; None where it leads nowhere."""
    u = list(start)
    for _ in range(25):
        value = case.gamma(form, u)
        slopes = []
        for k in (0, 1):
            h = 1e-6 * (abs(u[k]) + 1e-3)
            moved = list(u)
            moved[k] += h
            slopes.append((case.gamma(form, moved) - value) / h)
        f, s = slopes
        determinant = f.real * s.imag - f.imag * s.real
        if determinant == 0:
            return None
        step = ((value.imag * s.real - value.real * s.imag) / determinant, (value.real * f.imag - value.imag * f.real) / determinant)
        longest = max(abs(step[k]) / (0.5 * (abs(u[k]) + case.least[k])) for k in (0, 1))
        factor = 1 / max(1, longest)
        u = [u[k] + factor * step[k] for k in (0, 1)]
        if not all(case.low[k] < u[k] < case.high[k] for k in (0, 1)):
            return None
        if longest < 1e-10:
            return (u, slopes) if abs(case.gamma(form, u)) < 1e-9 else None
    return None


def refine(case, form, u, slopes):
    """With the slopes of float kept, each turn gains some six digits."""
    f, s = (mp.mpc(each) for each in slopes)
    determinant = f.real * s.imag - f.imag * s.real
    u = [mp.mpf(each) for each in u]
    for _ in range(12):
        value = case.gamma(form, u, native=False)
        if abs(value) < mp.mpf(10) ** -38:
            break
        u[0] += (value.imag * s.real - value.real * s.imag) / determinant
        u[1] += (value.real * f.imag - value.imag * f.real) / determinant
    assert abs(case.gamma(form, u, native=False)) < mp.mpf(10) ** -36
    return u


def within_half_wave(case, hit):
    """Without loss a length and half a wave more are the same; the shorter is meant, and a whole half wave is none."""
    if hit is None or case.line is None or case.line["kind"] != "lossless" or case.high[0] > 4 or case.high[1] > 4:
        return hit
    return [0.0 if math.pi - each % math.pi < 1e-9 else each % math.pi for each in hit[0]], hit[1]


def search(case, form, starts):
    found = []
    for start in starts:
        hit = within_half_wave(case, newton(case, form, start))
        if hit and not any(all(abs(hit[0][k] - other[0][k]) < 1e-5 * (abs(other[0][k]) + 1e-3) for k in (0, 1)) for other in found):
            found.append(hit)
    return [refine(case, form, *each) for each in found]


def width(case, form, unknowns, db):
    """From the design frequency outward in steps of a thousandth to where the return loss is lost, then by the secant with 40 digits."""
    limit = mp.mpf(10) ** (-mp.mpf(db) / 20)
    edges = []
    for sign in (-1, 1):
        k = 1
        size = lambda f, native=True: abs(case.gamma(form, unknowns, f, native))
        while size(case.frequency * (1 + mp.mpf(sign * k) / 1000)) <= limit:
            k += 1
            if k > (990 if sign < 0 else 9000):
                return None
        low, high = (case.frequency * (1 + mp.mpf(sign * each) / 1000) for each in (k - 1, k))
        for _ in range(25):
            middle = (low + high) / 2
            low, high = (middle, high) if size(middle) <= limit else (low, middle)
        edges.append(mp.findroot(lambda f: size(f, False) - limit, (low, high), solver="secant", tol=1e-60))
    return edges[1] - edges[0]


GRID = [0.05 + 0.4 * k for k in range(8)]
FINE = [0.04 + 0.26 * k for k in range(12)]


def lengths_case(case, grid=GRID):
    case.scale = case.beta()
    case.low, case.high, case.least = (-1e-9, -1e-9), (HALF_TURN + 0.05, HALF_TURN + 0.05), (0.2, 0.2)
    return [(u, v) for u in grid for v in grid]


def lc(kind, value, omega):
    """Name and value of the part that has the reactance (series) or susceptance (shunt)."""
    if kind == "series":
        return ("inductance_h", value / omega) if value > 0 else ("capacitance_f", -1 / (value * omega))
    return ("capacitance_f", value / omega) if value > 0 else ("inductance_h", -1 / (value * omega))


def solve_l(case):
    size = float(abs(case.zs)) ** 0.5 * float(abs(case.load(2 * mp.pi * case.frequency))) ** 0.5
    case.low, case.high, case.least = (-1e4 * size, -1e4 / size), (1e4 * size, 1e4 / size), (1e-3 * size, 1e-3 / size)
    logs = [sign * 10 ** (0.5 * k) for k in range(-3, 4) for sign in (1, -1)]
    starts = [(x * size, b / size) for x in logs for b in logs]
    omega = 2 * mp.pi * case.frequency
    answers = []
    for series_first in (True, False):
        form = l_section(series_first)
        for x, b in sorted(search(case, form, starts), key=lambda each: -each[1]):
            parts = [lc("series", x, omega), lc("shunt", b, omega)]
            answers.append((form, (x, b), parts if series_first else parts[::-1]))
    return answers


def solve_single(case, way):
    starts = lengths_case(case)
    kinds = [(kind, each) for kind in ("open", "short") for each in search(case, single_stub(way, kind), starts)]
    # The nearer of two places first; loss sets the two kinds of stub a little apart.
    places = sorted(each[0] for _, each in kinds)
    middle = max(zip(places, places[1:]), key=lambda pair: pair[1] - pair[0])[1]
    kinds.sort(key=lambda pair: (pair[1][0] >= middle, pair[0]))
    return [(single_stub(way, kind), each, [("length_m", each[1] / case.scale)] + line_of(case, each[0])) for kind, each in kinds]


def line_of(case, distance):
    """Left out where it has no length."""
    return [] if abs(distance) < 1e-12 else [("length_m", distance / case.scale)]


def solve_double(case):
    starts = lengths_case(case, FINE)
    spacing = exact(case.given["stub_spacing_m"]) if "stub_spacing_m" in case.given else mp.pi / 4 / case.scale
    found = []
    for at_source in ("open", "short"):
        for at_load in ("open", "short"):
            form = double_stub(at_source, at_load, spacing)
            for each in search(case, form, starts):
                susceptance = mp.tan(each[1]) if at_load == "open" else -mp.cot(each[1])
                found.append((susceptance, at_source, at_load, form, each))
    middle = sum(each[0] for each in found) / len(found)
    found.sort(key=lambda each: (each[0] < middle, each[1], each[2]))
    return [(form, each, [("length_m", each[0] / case.scale), ("length_m", spacing), ("length_m", each[1] / case.scale)]) for _, _, _, form, each in found]


def solve_quarter(case):
    case.scale = case.beta()
    case.low, case.high, case.least = (-1e-9, -5), (HALF_TURN + 0.05, 12), (0.2, 0.5)
    starts = [(u, v) for u in GRID for v in (1, 3, 5, 7)]
    found = sorted(search(case, quarter_wave, starts), key=lambda each: -each[1])
    z, y = per_metre(case.line, 2 * mp.pi * case.frequency)
    quarter = mp.pi / 2 / case.scale
    return [(quarter_wave, each, [("line/characteristic_impedance_ohm", mp.exp(each[1]), "length_m", quarter), ("length_m", each[0] / case.scale)]) for each in found]


SOLVE = {
    "l_section": solve_l,
    "quarter_wave": solve_quarter,
    "single_shunt_stub": lambda case: solve_single(case, "shunt"),
    "single_series_stub": lambda case: solve_single(case, "series"),
    "double_shunt_stub": solve_double,
}


def expected(given, with_width):
    case = Case(given)
    answer = {"/load_impedance_ohm": mp.mpc(case.load(2 * mp.pi * case.frequency))}
    with mp.workdps(45):
        solutions = SOLVE[given["topologies"][0]](case)
        for number, (form, unknowns, elements) in enumerate(solutions):
            for index, parts in enumerate(elements):
                for name, value in zip(parts[::2], parts[1::2]):
                    answer[f"/solutions/{number}/elements/{index}/{name}"] = value
            answer[f"/solutions/{number}/reflection"] = mp.mpc(0)
            if with_width:
                for db in (10, 20):
                    answer[f"/solutions/{number}/bandwidth_hz/at_{db}_db"] = width(case, form, unknowns, db)
    answer["/solution_count"] = mp.mpf(len(solutions))
    return answer, len(solutions)


FIFTY = {"kind": "lossless", "characteristic_impedance_ohm": 50, "velocity_factor": 0.66}
CABLE = {"kind": "rlgc", "resistance_ohm_per_m": 0.12, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 2.5e-5, "capacitance_f_per_m": 1e-10}
LOSSY = {"kind": "rlgc", "resistance_ohm_per_m": 8, "inductance_h_per_m": 2.5e-7, "conductance_s_per_m": 1e-3, "capacitance_f_per_m": 1e-10}


def problems():
    """name, given, number of solutions, whether with bandwidths"""
    antenna = {"re": 60, "im": -80}
    parts = {"kind": "series_rlc", "resistance_ohm": 18, "inductance_h": 3e-8, "capacitance_f": 2e-11}
    yield "L section, 200 - 100j to 100 ohm", {"load_impedance_ohm": {"re": 200, "im": -100}, "source_impedance_ohm": 100, "frequency_hz": 500e6, "topologies": ["l_section"]}, 2, True
    yield "L section, complex source and load, all four", {"load_impedance_ohm": {"re": 25, "im": 70}, "source_impedance_ohm": {"re": 40, "im": -90}, "frequency_hz": 145e6, "topologies": ["l_section"]}, 4, False
    yield "L section, load of parts", {"load_impedance_ohm": parts, "frequency_hz": 145e6, "topologies": ["l_section"]}, 4, True
    yield "L section, load in parallel parts", {"load_impedance_ohm": {"kind": "parallel_rlc", "resistance_ohm": 900, "capacitance_f": 4e-12}, "frequency_hz": 145e6, "topologies": ["l_section"]}, 2, True
    yield "L section, small resistance", {"load_impedance_ohm": {"re": 0.8, "im": 3.1}, "source_impedance_ohm": 50, "frequency_hz": 13.56e6, "topologies": ["l_section"]}, 2, True
    for name, line in (("lossless line", FIFTY), ("cable", CABLE), ("lossy line", LOSSY)):
        base = {"frequency_hz": 100e6, "line": line}
        yield f"quarter wave, complex load, {name}", {"load_impedance_ohm": antenna, **base, "topologies": ["quarter_wave"]}, 2, line is FIFTY
        yield f"shunt stub, {name}", {"load_impedance_ohm": antenna, **base, "topologies": ["single_shunt_stub"]}, 4, line is CABLE
        yield f"series stub, {name}", {"load_impedance_ohm": {"re": 100, "im": 80}, **base, "topologies": ["single_series_stub"]}, 4, False
        yield f"double stub, {name}", {"load_impedance_ohm": antenna, **base, "topologies": ["double_shunt_stub"], "stub_spacing_m": 0.23}, 8, False
    yield "shunt stub, complex source", {"load_impedance_ohm": {"re": 30, "im": 45}, "source_impedance_ohm": {"re": 65, "im": -25}, "frequency_hz": 100e6, "line": FIFTY, "topologies": ["single_shunt_stub"]}, 4, True
    yield "series stub, complex source, cable", {"load_impedance_ohm": {"re": 30, "im": 45}, "source_impedance_ohm": {"re": 65, "im": -25}, "frequency_hz": 100e6, "line": CABLE, "topologies": ["single_series_stub"]}, 4, False
    yield "series stub, RL = Z0", {"load_impedance_ohm": {"re": 50, "im": 60}, "frequency_hz": 100e6, "line": FIFTY, "topologies": ["single_series_stub"]}, 4, False
    yield "shunt stub, GL = Y0", {"load_impedance_ohm": {"re": 20, "im": 24.49489742783178}, "frequency_hz": 100e6, "line": FIFTY, "topologies": ["single_shunt_stub"]}, 4, False
    yield "shunt stub, load of parts", {"load_impedance_ohm": parts, "frequency_hz": 145e6, "line": CABLE, "topologies": ["single_shunt_stub"]}, 4, True
    yield "double stub, eighth of a wave, complex source", {"load_impedance_ohm": antenna, "source_impedance_ohm": {"re": 45, "im": 20}, "frequency_hz": 100e6, "line": FIFTY, "topologies": ["double_shunt_stub"]}, 8, True
    yield "double stub, a third of a wavelength and more", {"load_impedance_ohm": {"re": 60, "im": 10}, "frequency_hz": 100e6, "line": FIFTY, "topologies": ["double_shunt_stub"], "stub_spacing_m": 0.7}, 8, False


SOURCE = "nodal analysis of the whole circuit, its unknowns by Newton's method from a grid of starts, refined to 30 digits"


def quarter_wave_width(load, source, db):
    """Pozar, 4th ed., equation 5.33, of a frequency-independent resistance."""
    limit = mp.mpf(10) ** (-mp.mpf(db) / 20)
    return 2 - 4 / mp.pi * mp.acos(limit / mp.sqrt(1 - limit * limit) * 2 * mp.sqrt(load * source) / abs(load - source))


UNIT = {"kind": "lossless", "characteristic_impedance_ohm": 50, "velocity_factor": 1}


def printed():
    """Textbook examples, to their printed digits. At 299.792458 MHz in vacuum a wavelength is 1 m, so lengths in metres are in wavelengths."""

    def example(number, name, given, values, how, rounding):
        for pointer, value in values.items():
            locator = pointer.removeprefix("/solutions/").replace("/", " ")
            source = f"Pozar, Microwave Engineering, 4th ed., example {number} (from memory), {how}"
            yield check("terminations/matching", f"{name}: {locator}", source, given, {pointer: value}, float(f"{1.0001 * rounding(value):.4g}"))

    wave = {"frequency_hz": 299792458, "line": UNIT}
    # Its parts were computed from these rounded values, and so carry their rounding.
    x, b, omega = mp.mpf("1.22") * 100, (mp.mpf("0.29") / 100, mp.mpf("0.69") / 100), 2 * mp.pi * 500000000
    yield from example("5.1", "L section of a textbook", {"load_impedance_ohm": {"re": 200, "im": -100}, "source_impedance_ohm": 100, "frequency_hz": 500e6, "topologies": ["l_section"]}, {
        "/solutions/0/elements/0/inductance_h": x / omega, "/solutions/1/elements/0/capacitance_f": 1 / (x * omega)}, "from its x = 1.22 and -1.22 to the printed digits", lambda _: 0.005 / 1.22)
    yield from example("5.1", "L section of a textbook", {"load_impedance_ohm": {"re": 200, "im": -100}, "source_impedance_ohm": 100, "frequency_hz": 500e6, "topologies": ["l_section"]}, {
        "/solutions/0/elements/1/capacitance_f": b[0] / omega}, "from its b = 0.29 to the printed digits", lambda _: 0.005 / 0.29)
    yield from example("5.1", "L section of a textbook", {"load_impedance_ohm": {"re": 200, "im": -100}, "source_impedance_ohm": 100, "frequency_hz": 500e6, "topologies": ["l_section"]}, {
        "/solutions/1/elements/1/inductance_h": 1 / (b[1] * omega)}, "from its b = -0.69 to the printed digits", lambda _: 0.005 / 0.69)
    chart = ("read from a chart to 0.001 wavelengths", lambda value: 0.001 / float(value))
    yield from example("5.2", "shunt stub of a textbook", {"load_impedance_ohm": {"re": 60, "im": -80}, **wave, "topologies": ["single_shunt_stub"]}, {
        "/solutions/1/elements/1/length_m": mp.mpf("0.110"), "/solutions/1/elements/0/length_m": mp.mpf("0.095"), "/solutions/3/elements/1/length_m": mp.mpf("0.260"), "/solutions/3/elements/0/length_m": mp.mpf("0.405")}, *chart)
    yield from example("5.3", "series stub of a textbook", {"load_impedance_ohm": {"re": 100, "im": 80}, **wave, "topologies": ["single_series_stub"]}, {
        "/solutions/0/elements/1/length_m": mp.mpf("0.120"), "/solutions/0/elements/0/length_m": mp.mpf("0.397"), "/solutions/2/elements/1/length_m": mp.mpf("0.463"), "/solutions/2/elements/0/length_m": mp.mpf("0.103")}, *chart)
    yield from example("5.4", "double stub of a textbook", {"load_impedance_ohm": {"re": 60, "im": -80}, **wave, "topologies": ["double_shunt_stub"]}, {
        "/solutions/0/elements/2/length_m": mp.mpf("0.146"), "/solutions/0/elements/0/length_m": mp.mpf("0.204"), "/solutions/4/elements/2/length_m": mp.mpf("0.482"), "/solutions/4/elements/0/length_m": mp.mpf("0.350")}, *chart)
    yield from example("5.5", "quarter wave of a textbook", {"load_impedance_ohm": 10, "frequency_hz": 3e9, "topologies": ["quarter_wave"]}, {"/solutions/0/elements/0/line/characteristic_impedance_ohm": mp.mpf("22.36")}, "to its printed digits", lambda value: 0.005 / float(value))


def beside_the_forbidden_region():
    """A conductance just below and just above Y0/sin^2(beta s), at an eighth of a wavelength twice that of the line."""
    for name, ohm, count in (("below", 25.001, 8), ("above", 24.999, 0)):
        given = {"load_impedance_ohm": ohm, "frequency_hz": 299792458, "line": UNIT, "topologies": ["double_shunt_stub"]}
        values = {"/solution_count": mp.mpf(count)}
        if count == 0:
            values["/impossible/0/topology"] = "double_shunt_stub"
        yield check("terminations/matching", f"two stubs {name} the forbidden region", "G <= Y0/sin^2(beta s) (Pozar, Microwave Engineering, 4th ed., section 5.3, from memory)", given, values, 1e-12)


def checks():
    yield from printed()
    for load, source in ((10, 50), (300, 75), (200, 50)):
        given = {"load_impedance_ohm": load, "source_impedance_ohm": source, "frequency_hz": 3e9, "line": UNIT, "topologies": ["quarter_wave"]}
        values = {"/solutions/0/elements/0/line/characteristic_impedance_ohm": mp.sqrt(load * source), "/solutions/0/elements/0/length_m": LIGHT / 12e9}
        for db in (10, 20):
            values[f"/solutions/0/bandwidth_hz/at_{db}_db"] = quarter_wave_width(load, source, db) * 3e9
        yield check("terminations/matching", f"quarter wave from {source} to {load} ohm", "Z = sqrt(Rs RL); closed form of the bandwidth (Pozar, Microwave Engineering, 4th ed., equation 5.33, from memory), to 30 digits", given, values, 1e-12)
    yield from beside_the_forbidden_region()
    for name, given, count, with_width in problems():
        values, found = expected(given, with_width)
        assert found == count, (name, found, count)
        yield check("terminations/matching", name, SOURCE, given, values, 1e-12)


if __name__ == "__main__":
    write(__file__, "Matching networks", checks())
