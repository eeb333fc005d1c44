/** Conversion of a two-port's matrix between ABCD, S, Z, Y and T, and from one reference impedance to another. */
import { z } from 'zod';
import { defineCalculation } from '../../calculation';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { powerWaves } from '../../methods/reflection';
import { coordinatesOf, isInWaves, matrixOf, referredTo, toVoltages, toWaves, type Entries, type Matrix, type PortReferences, type Representation } from '../../methods/two-port-coordinates';
import { tOrder, twoPortConversion } from '../../methods/two-port-parameters';
import { frequencyColumn } from '../../nouns/columns';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { optionalPortReferenceImpedances, portReferenceImpedances, portReferences, referenceProblems } from '../../nouns/reference-impedance';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { columnProblems, entriesOf, isColumn, namesOf, namingProblems, partsAt, representations, twoPortColumns, twoPortValues, type NumberOrColumn, type TwoPortValues } from '../../nouns/two-port-values';

const representation = (title: string, description: string, example: Representation) => z.enum(representations).meta({ title, description, examples: [example] });

const input = z
  .strictObject({
    from: representation('From', 'What values is.', 'z'),
    to: representation('To', 'What to answer.', 's'),
    values: twoPortValues,
    frequency_hz: frequency.optional().meta({ title: 'Frequency', description: 'What the columns belong to; answered beside them.', examples: [[1e6, 10e6]], 'x-unit': 'Hz' }),
    reference_impedance_ohm: portReferenceImpedances.meta({
      title: 'Reference impedance',
      description: 'What S and T in values refer to, as power waves, and those in the answer too where nothing else is given: one for both ports, or a list of two. Real parts must be greater than 0.',
      examples: [50, [50, 75]],
      'x-unit': 'ohm',
    }),
    to_reference_impedance_ohm: optionalPortReferenceImpedances({ title: 'Reference impedance of the answer', description: 'What S and T in the answer refer to; reference_impedance_ohm when left out.' }),
  })
  .meta({ id: 'ConvertInput', title: 'Convert', description: 'The matrix of a two-port, and what to make of it.' });

const output = z
  .strictObject({
    frequency_hz: frequencyColumn.optional(),
    values: z.union([twoPortColumns.abcd, twoPortColumns.s, twoPortColumns.z, twoPortColumns.y, twoPortColumns.t]).meta({ title: 'Values', description: 'The entries asked for, one a frequency; null where the matrix does not exist.' }),
    t_order: z.literal(tOrder).optional().meta({ title: 'Order of T', description: 'Which waves T joins.', examples: [tOrder] }),
  })
  .meta({ id: 'ConvertResult', title: 'Converted', description: 'The matrix of the two-port as it was asked for.' });

const reasons: Readonly<Record<Representation, string>> = {
  abcd: 'nothing passes from port 1 to port 2, so there are no transmission parameters',
  t: 'nothing passes from port 1 to port 2, so there are no transfer scattering parameters',
  z: 'no current is left with open ports, so there are no impedance parameters',
  y: 'no voltage is left with shorted ports, so there are no admittance parameters',
  s: 'the two-port drives these references by itself, so there are no scattering parameters',
};

export const convert = defineCalculation({
  id: 'convert',
  group: 'networks',
  title: 'Convert',
  summary: 'A two-port’s matrix from one of ABCD, S, Z, Y and T to another, with any reference impedances.',
  input,
  output,
  methods: [twoPortConversion, powerWaves],
  cost: { rule: '1 unit per started 1,000 points', units: ({ values, frequency_hz }) => Math.ceil(pointsIn(values, frequency_hz) / 1000) },
  solve(given) {
    const { from, to, values, frequency_hz, reference_impedance_ohm, to_reference_impedance_ohm } = given;
    const problems: InputProblem[] = [
      ...namingProblems(values, from, '/values'),
      ...referenceProblems(reference_impedance_ohm),
      ...(to_reference_impedance_ohm === undefined ? [] : referenceProblems(to_reference_impedance_ohm, '/to_reference_impedance_ohm')),
      ...columnProblems(values, '/values', frequency_hz === undefined ? undefined : pointsOf(frequency_hz)),
    ];
    if (problems.length > 0) throw new ImpossibleInput(problems);

    const references = portReferences(reference_impedance_ohm);
    const wanted = to_reference_impedance_ohm === undefined ? references : portReferences(to_reference_impedance_ohm);
    const entries = entriesOf(values, from);
    const points = pointsIn(values, frequency_hz);
    // What is the same at every frequency is converted once.
    const distinct = entries.some(isColumn) ? points : 1;
    const each = Array.from({ length: distinct }, (_, index) => convertedAt(entries, index, { from, to, references, wanted }));
    const at = (index: number) => each[distinct === 1 ? 0 : index];

    const columns = new ResultColumns();
    const column = (entry: 0 | 1 | 2 | 3) => ({ re: Float64Array.from({ length: points }, (_, index) => at(index).entries[entry].re), im: Float64Array.from({ length: points }, (_, index) => at(index).entries[entry].im) });
    const converted = Object.fromEntries(
      namesOf(to).map((name, entry) => [name, columns.complex(column(entry as 0), { pointer: `/values/${name}`, code: 'does_not_exist', reason: reasons[to] }, (index) => !at(index).exists)]),
    );
    const inWaves = isInWaves(from) || isInWaves(to);
    return {
      result: {
        ...(frequency_hz !== undefined && { frequency_hz: finiteColumn(frequenciesHz(frequency_hz)) }),
        // By the names of `to`, which is one of the union's branches.
        values: converted as unknown as z.output<typeof twoPortColumns.s>,
        ...(to === 't' && { t_order: tOrder }),
      },
      methods: [{ method: twoPortConversion, inRange: true }, ...(inWaves ? [{ method: powerWaves, inRange: true }] : [])],
      warnings: [...columns.warnings, ...reciprocityWarnings(each.some(({ takenAsReciprocal }) => takenAsReciprocal))],
    };
  },
  examples: [
    {
      name: 'A 10 dB pi attenuator: its admittances as scattering parameters',
      input: { from: 'y', to: 's', values: { y11: 1 / 96.2475 + 1 / 71.1513, y12: -1 / 71.1513, y21: -1 / 71.1513, y22: 1 / 96.2475 + 1 / 71.1513 } },
      expected: [
        { pointer: '/values/s11/re/0', value: 0 },
        { pointer: '/values/s21/re/0', value: 0.316227766 },
      ],
      tolerance: 1e-5,
      source: 'Published table of 50 ohm pi attenuators: 96.25 and 71.15 ohm for 10 dB (from memory), with the further digits of its own formula; 10 dB is 0.316227766',
    },
    {
      name: 'A sensor’s series resistor of 50 ohm, measured in 50 ohm and wanted in 75 ohm',
      input: {
        from: 's',
        to: 's',
        values: { s11: { re: [1 / 3, 1 / 3], im: [0, 0] }, s12: 2 / 3, s21: 2 / 3, s22: { re: [1 / 3, 1 / 3], im: [0, 0] } },
        frequency_hz: [1e6, 10e6],
        reference_impedance_ohm: 50,
        to_reference_impedance_ohm: 75,
      },
      expected: [
        { pointer: '/values/s11/re/1', value: 0.25 },
        { pointer: '/values/s21/re/0', value: 0.75 },
      ],
      tolerance: 1e-12,
      source: 'Of a series impedance, S11 = Z/(Z + 2 Z0) and S21 = 2 Z0/(Z + 2 Z0) (Pozar, 4th ed., section 4.3, from memory)',
    },
    {
      name: 'A series resistor of 50 ohm has no impedance parameters',
      input: { from: 's', to: 'z', values: { s11: 1 / 3, s12: 2 / 3, s21: 2 / 3, s22: 1 / 3 } },
      expected: [{ pointer: '/values/z11/re/0', value: null }],
      tolerance: 1e-12,
      source: 'With open ports no current can flow through a series element (Pozar, 4th ed., section 4.2, from memory)',
    },
  ],
});

interface Conversion {
  readonly from: Representation;
  readonly to: Representation;
  readonly references: PortReferences;
  readonly wanted: PortReferences;
}

interface Converted extends Matrix {
  readonly takenAsReciprocal: boolean;
}

/** At one frequency. What is asked for as it was given comes back to the bit. */
function convertedAt(entries: Entries<NumberOrColumn>, index: number, { from, to, references, wanted }: Conversion): Converted {
  const given: Matrix['entries'] = [partsAt(entries[0], index), partsAt(entries[1], index), partsAt(entries[2], index), partsAt(entries[3], index)];
  const sameWaves = areEqual(references, wanted);
  if (from === to && (!isInWaves(from) || sameWaves)) return { entries: given, exists: true, takenAsReciprocal: false };
  const start = coordinatesOf(from, given);
  const { takenAsReciprocal } = start;
  if (isInWaves(from) && isInWaves(to)) return { ...matrixOf(to, sameWaves ? start : referredTo(start, references, wanted)), takenAsReciprocal };
  if (isInWaves(from)) return { ...matrixOf(to, toVoltages(start, references)), takenAsReciprocal };
  return { ...matrixOf(to, isInWaves(to) ? toWaves(start, wanted) : start), takenAsReciprocal };
}

function areEqual(first: PortReferences, second: PortReferences): boolean {
  return first.every(({ re, im }, port) => re === second[port].re && im === second[port].im);
}

function pointsIn(values: TwoPortValues, frequency_hz: z.output<typeof input>['frequency_hz']): number {
  if (frequency_hz !== undefined) return pointsOf(frequency_hz);
  const column = (Object.values(values) as NumberOrColumn[]).find(isColumn);
  return column ? column.re.length : 1;
}

function reciprocityWarnings(takenAsReciprocal: boolean) {
  if (!takenAsReciprocal) return [];
  return [{ code: 'taken_as_reciprocal', pointer: '/values', detail: 'the determinant is lost in the rounding of the entries given and may be 1; the two-port is taken as reciprocal, S12 = S21' }];
}
