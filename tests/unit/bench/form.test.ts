import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { checkForm } from '@/app/console/bench/_form/check-form';
import type { Field, GroupField } from '@/app/console/bench/_form/field';
import { formOf } from '@/app/console/bench/_form/fields-of-schema';
import { startingValues, valuesOf, type GroupValue, type TypedValue, type UnionValue } from '@/app/console/bench/_form/form-values';
import { sectionsOf } from '@/app/console/bench/_form/sections';
import { calculationPath } from '@/lib/solvers/calculation';
import { frequency } from '@/lib/solvers/nouns/frequency';
import { termination } from '@/lib/solvers/nouns/termination';
import { calculations } from '@/lib/solvers/registry';

const examples = calculations.flatMap((calculation) => calculation.examples.map((example) => ({ title: `${calculationPath(calculation)}: ${example.name}`, calculation, example })));

/** Every field of a tree, each branch once; a chain within a chain is entered once. */
function everyField(field: Field, depth = 0): Field[] {
  if (depth > 12) return [];
  if (field.kind === 'group') return [field, ...field.members.flatMap((member) => everyField(member.field, depth + 1))];
  if (field.kind === 'union') return [field, ...field.variants.flatMap((variant) => everyField(variant.field(), depth + 1))];
  if (field.kind === 'list') return [field, ...everyField(field.item(), depth + 4)];
  return [field];
}

describe('a form holds what a request can say', () => {
  it.each(examples)('$title comes back out of the form as it went in', ({ calculation, example }) => {
    const form = formOf(calculation.input);
    expect(checkForm(calculation.input, form, valuesOf(form, example.input))).toEqual({ input: example.input, errors: [] });
  });

  it.each(calculations.map((calculation) => [calculationPath(calculation), calculation] as const))('%s has a control and a title for every field', (_, calculation) => {
    for (const field of everyField(formOf(calculation.input))) {
      expect(field.title, JSON.stringify(field)).not.toBe('');
      expect(field.kind, `${field.title} would have to be typed as JSON`).not.toBe('json');
    }
  });

  it.each(calculations.map((calculation) => [calculationPath(calculation), calculation] as const))('%s accepts what a newly chosen kind starts from', (_, calculation) => {
    const form = formOf(calculation.input);
    const head = form.members.find(({ field }) => field.kind === 'union');
    if (!head || head.field.kind !== 'union') return;
    const start = valuesOf(form, calculation.examples[0].input) as GroupValue;
    for (const variant of head.field.variants) {
      const chosen: UnionValue = { variant: variant.key, options: { [variant.key]: startingValues(variant.field()) } };
      const { errors } = checkForm(calculation.input, form, { ...start, members: { ...start.members, [head.name]: chosen } });
      // Of a geometry with a sought dimension the others are for the person to say: any of them may be the sought one, so none is filled in; and the sought one of the kind before is none of this.
      expect(errors.filter(({ code }) => code !== 'required_dimension' && code !== 'not_a_dimension'), `${head.name} as ${variant.key}`).toEqual([]);
    }
  });

  it('puts every field of the input under exactly one legend', () => {
    for (const { input } of calculations) {
      const form = formOf(input);
      const shown = sectionsOf(form).flatMap(({ head, members }) => [...(head ? [head.name] : []), ...members.map(({ name }) => name)]);
      expect(shown.toSorted()).toEqual(form.members.map(({ name }) => name).toSorted());
    }
  });
});

describe('shapes', () => {
  const form = formOf(z.strictObject({ termination, frequency_hz: frequency }));
  const roundTrip = (input: unknown) => checkForm(z.unknown(), form, valuesOf(form, input)).input;

  it.each([
    ['open', 100e6],
    [50, [0, 1e6, 10e6]],
    [{ re: 75, im: -30 }, { start: 1e6, stop: 1e9, points: 401, spacing: 'log' }],
    [{ magnitude: 80.8, angle_deg: -21.8 }, { start: 1e6, stop: 1e9, points: 401 }],
    [{ kind: 'series_rlc', resistance_ohm: 50, capacitance_f: 1e-12 }, 1],
    [{ kind: 'table', frequency_hz: [1e6, 1e9], impedance_ohm: { re: [50, 51.5], im: [0, -3] } }, 1],
  ])('%j over %j', (closedBy, frequencies) => {
    expect(roundTrip({ termination: closedBy, frequency_hz: frequencies })).toEqual({ termination: closedBy, frequency_hz: frequencies });
  });

  it('takes the three notations of a complex number as one field and words as one choice each', () => {
    const [closing] = form.members;
    expect(closing.field.kind === 'union' && closing.field.variants.map(({ label }) => label).slice(0, 4)).toEqual(['Impedance', 'Open', 'Short', 'Matched']);
  });

  it('reads rows as they are pasted from a spreadsheet', () => {
    const point = z.strictObject({ frequency_hz: z.number().meta({ 'x-unit': 'Hz' }), attenuation_db_per_m: z.number().meta({ 'x-unit': 'dB/m' }) });
    const schema = z.strictObject({ points: z.array(point) });
    const rows = formOf(schema);
    const typed = { present: true, members: { points: { text: '100 MHz\t12 dB/100 m\n1e9, 0.42', units: ['Hz', 'dB/m'] } } };
    expect(checkForm(schema, rows, typed).input).toEqual({ points: [{ frequency_hz: 1e8, attenuation_db_per_m: 0.12 }, { frequency_hz: 1e9, attenuation_db_per_m: 0.42 }] });
    const short = { present: true, members: { points: { text: '1e8', units: ['Hz', 'dB/m'] } } };
    expect(checkForm(schema, rows, short).errors).toEqual([{ path: 'input.members.points.text', code: 'unreadable', message: 'line 1 has 1 columns; 2 are needed' }]);
  });
});

describe('complaints stand beside their fields', () => {
  const schema = z.strictObject({ length_m: z.number().min(0).meta({ title: 'Length', 'x-unit': 'm' }), termination, frequency_hz: frequency });
  const form: GroupField = formOf(schema);

  function errorsOf(input: Record<string, unknown>, typed: Record<string, string> = {}) {
    const values = valuesOf(form, { length_m: 1, termination: 50, frequency_hz: 1e6, ...input }) as GroupValue;
    const members = Object.fromEntries(Object.entries(values.members).map(([name, value]) => [name, name in typed ? { ...(value as TypedValue), text: typed[name] } : value]));
    return Object.fromEntries(checkForm(schema, form, { ...values, members }).errors.map(({ path, message }) => [path, message]));
  }

  it('in the words of the API, with the title for the name', () => {
    expect(errorsOf({ length_m: -0.3 })).toEqual({ 'input.members.length_m.text': 'Length must be at least 0; got -0.3' });
  });

  it('in the words of the reader of quantities, and every wrong field at once', () => {
    expect(errorsOf({ frequency_hz: { start: 2, stop: 1, points: 0 } }, { length_m: '3 pF' })).toEqual({
      'input.members.length_m.text': 'pF is a capacitance; this field takes m',
      'input.members.frequency_hz.options.object-2.members.points.text': 'Points must be at least 1; got 0',
      'input.members.frequency_hz.options.object-2.members.stop.text': 'Stop must be greater than start (2); got 1',
    });
  });

  it('an empty required field is missing, not zero', () => {
    expect(errorsOf({}, { length_m: ' ' })).toEqual({ 'input.members.length_m.text': 'Length is required (a finite number)' });
  });
});
