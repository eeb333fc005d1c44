import { z } from 'zod';
import { defineCalculation, mergeMethods, type Method, type MethodUse, type Warning } from '../../calculation';
import { element } from '../../elements/element';
import { MatchBands } from '../../elements/match-bands';
import { SourceAndLoad } from '../../elements/terminated-chain';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { line, lineMethods } from '../../lines/line';
import { telegrapherTwoPort } from '../../methods/line-two-port';
import { matchBandwidth } from '../../methods/match-bandwidth';
import { doubleStubMatching, matchByDoubleStub } from '../../methods/match-double-stub';
import { lSectionMatching, matchByLSection } from '../../methods/match-l-section';
import { matchByQuarterWave, quarterWaveMatching } from '../../methods/match-quarter-wave';
import { matchBySingleStub, singleStubMatching } from '../../methods/match-single-stub';
import { isBuildable, type DesignLine, type Match, type MatchAnswer, type MatchingProblem } from '../../methods/matching';
import { lumpedImpedance } from '../../methods/one-port';
import { powerWaves, returnLossDb } from '../../methods/reflection';
import { propagation } from '../../methods/telegrapher';
import { transmissionMatrix } from '../../methods/two-port';
import { complexColumn, frequencyColumn, nullableColumn } from '../../nouns/columns';
import { complexNumber, complexParts } from '../../nouns/complex-number';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { impedanceForms, terminationProblems } from '../../nouns/termination';

const topologyNames = ['l_section', 'quarter_wave', 'single_shunt_stub', 'single_series_stub', 'double_shunt_stub'] as const;
type Topology = (typeof topologyNames)[number];

const needsLine = (topology: Topology): boolean => topology !== 'l_section' && topology !== 'quarter_wave';

const topologyName = z.enum(topologyNames).meta({ title: 'Topology', description: 'One form of matching network.', examples: ['l_section'] });

/** Some two dozen solutions, each over the whole band. */
const mostBandPoints = 2001;

const input = z
  .strictObject({
    load_impedance_ohm: z.union(impedanceForms).meta({ title: 'Load', description: 'The load: an impedance that is the same at every frequency, parts in series or in parallel, or a table. It must have a resistance.', examples: [{ re: 60, im: -80 }], 'x-unit': 'ohm' }),
    source_impedance_ohm: complexNumber.default(50).meta({ title: 'Source impedance', description: 'Impedance of the source, to whose conjugate the load is matched; its real part must be greater than 0.', examples: [50], 'x-unit': 'ohm' }),
    frequency_hz: z.number().min(1e-3).max(1e15).meta({ title: 'Design frequency', description: 'The one frequency at which the match is exact.', examples: [2e9], 'x-unit': 'Hz' }),
    line: line.optional().meta({ title: 'Line', description: 'The line of stubs and connections; of a quarter wave only its velocity counts, and a length of it where the load is complex. Needed for stubs.' }),
    topologies: z.array(topologyName).min(1).max(topologyNames.length).optional().meta({ title: 'Topologies', description: 'Which networks to try; all that the input allows when left out.', examples: [['l_section', 'single_shunt_stub']] }),
    band: frequency.optional().meta({ title: 'Band', description: `Frequencies for the response of each solution, at most ${mostBandPoints}.`, examples: [{ start: 1e9, stop: 3e9, points: 201 }], 'x-unit': 'Hz' }),
    stub_spacing_m: z.number().min(0).max(1e9).optional().meta({ title: 'Stub spacing', description: 'Distance between the stubs of double_shunt_stub; an eighth of a wavelength when left out.', examples: [0.0187], 'x-unit': 'm' }),
  })
  .superRefine(({ line: given, topologies = [] }, context) => {
    const inNeed = topologies.filter(needsLine);
    if (given === undefined && inNeed.length > 0) context.addIssue({ code: 'custom', path: ['line'], params: { code: 'line_needed' }, message: `must be given for ${inNeed.join(', ')}` });
  })
  .meta({ id: 'MatchingInput', title: 'Matching', description: 'A load, a source, the design frequency, and the line that stubs are made of.' });

const width = (db: number) =>
  z.union([z.number(), z.null()]).meta({ title: `At ${db} dB`, description: `Full width around the design frequency over which the return loss stays at ${db} dB or more; null where an edge was not found.`, examples: [3e8], 'x-unit': 'Hz' });

const solution = z
  .strictObject({
    topology: topologyName,
    description: z.string().meta({ title: 'Description', description: 'The network in words.', examples: ['Open shunt stub of 0.1455 wavelengths 0.1098 wavelengths from the load'] }),
    elements: z.array(element).max(3).meta({ title: 'Elements', description: 'From source to load, as networks/cascade takes them; none where the load is matched as it is.', examples: [[{ kind: 'series', inductance_h: 3.9e-8, connection: 'series' }]] }),
    reflection: z
      .strictObject({
        re: z.number().meta({ title: 'Real part', description: 'Real part.', examples: [0] }),
        im: z.number().meta({ title: 'Imaginary part', description: 'Imaginary part.', examples: [0] }),
      })
      .meta({ title: 'Reflection at design', description: 'Power-wave reflection at the source and the design frequency, computed from the elements.', examples: [{ re: 0, im: 0 }] }),
    bandwidth_hz: z.strictObject({ at_10_db: width(10), at_20_db: width(20) }).meta({ title: 'Bandwidth', description: 'Full width around the design frequency.', examples: [{ at_10_db: 9e8, at_20_db: 3e8 }], 'x-unit': 'Hz' }),
    response: z
      .strictObject({
        frequency_hz: frequencyColumn,
        reflection: complexColumn.meta({ title: 'Reflection', description: 'Power-wave reflection at the source.', examples: [{ re: [0.01], im: [-0.02] }], 'x-plot': 'smith', 'x-plot-group': 'Reflection' }),
        return_loss_db: nullableColumn.meta({ title: 'Return loss', description: 'Return loss at the source; null where nothing is reflected.', examples: [[33]], 'x-unit': 'dB', 'x-plot': 'rectangular', 'x-plot-group': 'Return loss' }),
      })
      .optional()
      .meta({ title: 'Response', description: 'Over the band, where one was given.' }),
  })
  .meta({ id: 'MatchingSolution', title: 'Solution', description: 'One network that matches load and source.' });

const output = z
  .strictObject({
    solution_count: z.number().int().min(0).meta({ title: 'Number of solutions', description: 'How many networks were found.', examples: [4], 'x-figure': 1 }),
    load_impedance_ohm: z
      .strictObject({
        re: z.number().meta({ title: 'Real part', description: 'Real part.', examples: [60] }),
        im: z.number().meta({ title: 'Imaginary part', description: 'Imaginary part.', examples: [-80] }),
      })
      .meta({ title: 'Load at design', description: 'Impedance of the load at the design frequency.', examples: [{ re: 60, im: -80 }], 'x-unit': 'ohm', 'x-figure': 2 }),
    solutions: z.array(solution).max(40).meta({ title: 'Solutions', description: 'Every network found, in the order of the topologies.' }),
    impossible: z
      .array(
        z
          .strictObject({ topology: topologyName, reason: z.string().meta({ title: 'Reason', description: 'Why there is no such match.', examples: ['the load has a reactance, which a quarter wave alone cannot match'] }) })
          .meta({ title: 'Impossible', description: 'A topology, or a part of its solutions, that cannot be.' }),
      )
      .max(40)
      .meta({ title: 'Impossible', description: 'What cannot be, and why.' }),
  })
  .meta({ id: 'MatchingResult', title: 'Matching', description: 'Networks that match a load to a source.' });

type Input = z.output<typeof input>;
type Solution = z.output<typeof solution>;

const methodOf: Readonly<Record<Topology, Method>> = {
  l_section: lSectionMatching,
  quarter_wave: quarterWaveMatching,
  single_shunt_stub: singleStubMatching,
  single_series_stub: singleStubMatching,
  double_shunt_stub: doubleStubMatching,
};

/** Above this a network is no match, whatever its formulas say: numbers of 16 digits hold a quality factor of some millions. */
const matched = 1e-9;

export const matching = defineCalculation({
  id: 'matching',
  group: 'terminations',
  title: 'Impedance matching',
  summary: 'Every L section, quarter-wave transformer and stub network that matches a load to a source at one frequency, with bandwidth and response.',
  input,
  output,
  methods: [lSectionMatching, quarterWaveMatching, singleStubMatching, doubleStubMatching, matchBandwidth, transmissionMatrix, powerWaves, telegrapherTwoPort, lumpedImpedance, ...lineMethods],
  cost: { rule: '1 unit, and 1 more per started 100 points of the band', units: ({ band }) => 1 + (band === undefined ? 0 : Math.ceil(pointsOf(band) / 100)) },
  solve(given) {
    const band = given.band === undefined ? undefined : frequenciesHz(given.band);
    refuse(problemsOf(given, band));
    const circuit = new SourceAndLoad(complexParts(given.source_impedance_ohm), given.load_impedance_ohm);
    const load = circuit.impedanceOfLoad(given.frequency_hz);
    refuse(loadProblems(load));
    const design = designOf(given, circuit, load);
    const topologies = topologyNames.filter((each) => given.topologies?.includes(each) ?? (given.line !== undefined || !needsLine(each)));
    const { solutions, impossible, warnings } = collect(given, circuit, design, topologies, band);
    const models = given.line === undefined ? [] : [Float64Array.of(given.frequency_hz), ...(band ? [band] : [])].map((frequencies) => circuit.modelOf(given.line!, frequencies));
    return {
      result: { solution_count: solutions.length, load_impedance_ohm: { re: load.re + 0, im: load.im + 0 }, solutions, impossible },
      methods: mergeMethods([...methodsFor(topologies, given), ...models.flatMap((each) => each.methods)]),
      warnings: distinct([...assumedVelocity(given, solutions), ...models.flatMap((each) => each.warnings), ...warnings]).slice(0, 100),
    };
  },
  examples: [
    {
      name: 'A load of 200 - 100j ohm to 100 ohm at 500 MHz with an L section',
      input: { load_impedance_ohm: { re: 200, im: -100 }, source_impedance_ohm: 100, frequency_hz: 500e6, topologies: ['l_section'], band: { start: 100e6, stop: 1e9, points: 181 } },
      expected: [
        { pointer: '/solutions/0/elements/0/inductance_h', value: 38.8e-9 },
        { pointer: '/solutions/0/elements/1/capacitance_f', value: 0.92e-12 },
        { pointer: '/solutions/1/elements/0/capacitance_f', value: 2.61e-12 },
        { pointer: '/solutions/1/elements/1/inductance_h', value: 46.1e-9 },
      ],
      tolerance: 6e-3,
      source: 'Pozar, Microwave Engineering, 4th ed., example 5.1, to its printed digits (from memory)',
    },
    {
      name: 'The Saltmarsh Cable Works antenna, 60 - 80j ohm, with stubs of a cable',
      input: {
        load_impedance_ohm: { kind: 'series_rlc', resistance_ohm: 60, capacitance_f: 9.947183943243459e-13 },
        source_impedance_ohm: 50,
        frequency_hz: 2e9,
        line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 },
        topologies: ['single_shunt_stub', 'double_shunt_stub'],
        band: { start: 1e9, stop: 3e9, points: 201 },
      },
      expected: [
        { pointer: '/solutions/1/elements/1/length_m', value: 0.11 * 0.149896229 },
        { pointer: '/solutions/1/elements/0/length_m', value: 0.095 * 0.149896229 },
        { pointer: '/solutions/3/elements/1/length_m', value: 0.26 * 0.149896229 },
        { pointer: '/solutions/3/elements/0/length_m', value: 0.405 * 0.149896229 },
      ],
      tolerance: 6e-3,
      source: 'Pozar, Microwave Engineering, 4th ed., example 5.2: distances 0.110 and 0.260, shorted stubs 0.095 and 0.405 wavelengths (from memory)',
    },
    {
      name: 'A quarter wave from 10 ohm to 50 ohm at 3 GHz',
      input: { load_impedance_ohm: 10, frequency_hz: 3e9, topologies: ['quarter_wave'], line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 0.66 } },
      expected: [{ pointer: '/solutions/0/elements/0/line/characteristic_impedance_ohm', value: 22.36 }],
      tolerance: 3e-4,
      source: 'Pozar, Microwave Engineering, 4th ed., example 5.5 (from memory)',
    },
  ],
});

function refuse(problems: readonly InputProblem[]): void {
  if (problems.length > 0) throw new ImpossibleInput(problems);
}

function problemsOf(given: Input, band: Float64Array | undefined): InputProblem[] {
  const source = complexParts(given.source_impedance_ohm);
  const wanted = Float64Array.of(given.frequency_hz, ...(band && band.length <= mostBandPoints ? band : []));
  return [
    ...terminationProblems(given.load_impedance_ohm, wanted, '/load_impedance_ohm'),
    ...(source.re > 0 ? [] : [{ pointer: '/source_impedance_ohm', code: 'source_without_resistance', detail: `source_impedance_ohm must have a real part greater than 0; got ${source.re}` }]),
    ...(band && band.length > mostBandPoints ? [{ pointer: '/band', code: 'too_large', detail: `band must have at most ${mostBandPoints} points; got ${band.length}` }] : []),
  ];
}

function loadProblems(load: { readonly re: number; readonly im: number }): InputProblem[] {
  if (load.re > 0 && Number.isFinite(load.re) && Number.isFinite(load.im)) return [];
  const got = Number.isFinite(load.re) ? load.re : 'an open circuit';
  return [{ pointer: '/load_impedance_ohm', code: 'load_without_resistance', detail: `load_impedance_ohm must have a resistance greater than 0 at frequency_hz, or it takes no power in that could be matched; got ${got}` }];
}

function designOf(given: Input, circuit: SourceAndLoad, load: MatchingProblem['load']): MatchingProblem {
  return { load, source: complexParts(given.source_impedance_ohm), frequencyHz: given.frequency_hz, line: designLine(given, circuit) };
}

function designLine({ line: given, frequency_hz }: Input, circuit: SourceAndLoad): DesignLine | undefined {
  if (given === undefined) return undefined;
  const frequencies = Float64Array.of(frequency_hz);
  const { attenuationNpPerM, phaseRadPerM, characteristicImpedance } = propagation(circuit.modelOf(given, frequencies).constants, frequencies);
  const [re, im] = [characteristicImpedance.re[0], characteristicImpedance.im[0]];
  if (!(phaseRadPerM[0] > 0 && re > 0)) {
    refuse([{ pointer: '/line', code: 'no_wavelength', detail: 'line must have a wavelength and an impedance at frequency_hz to be cut to length; its phase does not turn along it' }]);
  }
  return { line: given, attenuationNpPerM: attenuationNpPerM[0], phaseRadPerM: phaseRadPerM[0], characteristicImpedance: { re, im } };
}

function answerOf(topology: Topology, design: MatchingProblem, spacingM: number | undefined): MatchAnswer {
  switch (topology) {
    case 'l_section':
      return matchByLSection(design);
    case 'quarter_wave':
      return matchByQuarterWave(design);
    case 'single_shunt_stub':
      return matchBySingleStub(design, design.line!, 'admittance');
    case 'single_series_stub':
      return matchBySingleStub(design, design.line!, 'impedance');
    case 'double_shunt_stub':
      return matchByDoubleStub(design, design.line!, spacingM);
  }
}

/** Each network is judged by its own circuit before it counts as a solution. */
function collect(given: Input, circuit: SourceAndLoad, design: MatchingProblem, topologies: readonly Topology[], band: Float64Array | undefined) {
  const at = Float64Array.of(given.frequency_hz);
  const bands = new MatchBands(circuit, given.frequency_hz, tablesOf(given), design.line?.phaseRadPerM ?? 0);
  const columns = new ResultColumns();
  const warnings: Warning[] = [];
  const solutions: Solution[] = [];
  const impossible: { topology: Topology; reason: string }[] = [];
  for (const topology of topologies) {
    const { matches, reasons } = answerOf(topology, design, given.stub_spacing_m);
    impossible.push(...reasons.map((reason) => ({ topology, reason })));
    for (const match of matches) {
      if (!isBuildable(match.elements)) {
        impossible.push({ topology, reason: `${match.description}: a length is beyond 1e9 m` });
        continue;
      }
      const reflected = circuit.reflection(match.elements, at);
      if (!(reflected.magnitude[0] < matched)) {
        impossible.push({ topology, reason: `${match.description}: so sharp a match is beyond numbers of 16 digits, which leave a reflection of ${Number.isFinite(reflected.magnitude[0]) ? reflected.magnitude[0].toPrecision(2) : 'no value'}` });
        continue;
      }
      const pointer = `/solutions/${solutions.length}`;
      const { bandwidth, warnings: open } = bands.of(match.elements, pointer);
      warnings.push(...open);
      solutions.push({
        topology,
        description: match.description,
        elements: [...match.elements],
        reflection: { re: reflected.re[0] + 0, im: reflected.im[0] + 0 },
        bandwidth_hz: bandwidth,
        ...(band && { response: responseOf(match, circuit, band, columns, pointer) }),
      });
    }
  }
  return { solutions, impossible, warnings: [...columns.warnings, ...warnings] };
}

function responseOf(match: Match, circuit: SourceAndLoad, band: Float64Array, columns: ResultColumns, pointer: string): Solution['response'] {
  const reflected = circuit.response(match.elements, band);
  const { magnitude, absorbed } = reflected;
  return {
    frequency_hz: finiteColumn(band),
    reflection: columns.complex(reflected, { pointer: `${pointer}/response/reflection`, code: 'no_value', reason: 'there is no forward wave to compare with' }),
    return_loss_db: columns.real(returnLossDb({ magnitude, absorbed }), { pointer: `${pointer}/response/return_loss_db`, code: 'no_reflection', reason: 'nothing is reflected, so the return loss is infinite' }),
  };
}

/** The frequencies of load and line where they are tables, which end. */
function tablesOf(given: Input): (readonly number[])[] {
  return [given.load_impedance_ohm, given.line].flatMap((each) => (typeof each === 'object' && 'frequency_hz' in each && Array.isArray(each.frequency_hz) ? [each.frequency_hz as number[]] : []));
}

function assumedVelocity({ line: given }: Input, solutions: readonly Solution[]): Warning[] {
  const index = solutions.findIndex(({ topology }) => topology === 'quarter_wave');
  if (given !== undefined || index < 0) return [];
  return [{ code: 'velocity_assumed', pointer: `/solutions/${index}/elements/0/line/velocity_factor`, detail: 'line was not given, so the quarter wave is taken at the velocity of light in vacuum; on another line it is shorter by the velocity factor' }];
}

function methodsFor(topologies: readonly Topology[], given: Input): MethodUse[] {
  const hasParts = topologies.includes('l_section') || (typeof given.load_impedance_ohm === 'object' && 'kind' in given.load_impedance_ohm && given.load_impedance_ohm.kind !== 'table');
  const hasLines = topologies.some((each) => each !== 'l_section');
  return [
    ...topologies.map((each) => methodOf[each]),
    matchBandwidth,
    transmissionMatrix,
    powerWaves,
    ...(hasLines ? [telegrapherTwoPort] : []),
    ...(hasParts ? [lumpedImpedance] : []),
  ].map((method) => ({ method, inRange: true }));
}

/** The line tells the same of itself at the design frequency and over the band. */
function distinct(warnings: readonly Warning[]): Warning[] {
  return [...new Map(warnings.map((each) => [`${each.code} ${each.pointer} ${each.detail}`, each])).values()];
}
