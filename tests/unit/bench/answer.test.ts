import { describe, expect, it } from 'vitest';
import { cellColumnsOf } from '@/app/console/bench/_answer/cells';
import { figuresOf } from '@/app/console/bench/_answer/figures-of';
import { resultView, type ResultPart } from '@/app/console/bench/_answer/result-view';
import { showAt } from '@/app/console/bench/_answer/show-value';
import { readerOf } from '@/app/console/bench/_form/json-schema';
import { csvOf } from '@/app/console/bench/_plot/save';
import { decodeInput, encodeInput } from '@/app/console/bench/_link/input-in-link';
import { snippetsOf } from '@/app/console/bench/_snippet/snippets';
import { calculationPath } from '@/lib/solvers/calculation';
import { calculations, findCalculation } from '@/lib/solvers/registry';

const examples = calculations.flatMap((calculation) => calculation.examples.map((example) => ({ title: `${calculationPath(calculation)}: ${example.name}`, calculation, example })));

/** How many numbers, words and nulls an answer has, however deep. */
function leaves(value: unknown): number {
  if (typeof value !== 'object' || value === null) return 1;
  return Object.values(value).reduce<number>((sum, each) => sum + leaves(each), 0);
}

function shownLeaves({ axis, singles, columns, texts, lists, parts, absent }: ResultPart): number {
  const quantities = [...(axis ? [axis] : []), ...singles, ...columns];
  const own = quantities.reduce((sum, { re, im, words }) => sum + re.length + im.length + words.length, 0);
  const inner = [...parts, ...lists.flatMap(({ records }) => records)].reduce((sum, part) => sum + shownLeaves(part), 0);
  return own + inner + texts.length + absent.length;
}

describe('an answer is shown whole', () => {
  it.each(examples)('$title', ({ calculation, example }) => {
    const { result } = calculation.solve(calculation.input.parse(example.input));
    const part = resultView(readerOf(calculation.output, 'output'), result);
    expect(shownLeaves(part)).toBe(leaves(result));
    expect(figuresOf(part).length).toBeGreaterThan(0);
  });
});

describe('numbers for people', () => {
  const { input, output, solve } = findCalculation('terminations', 'input-impedance')!;
  const { result } = solve(
    input.parse({ line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 }, length_m: 0.749481145, termination: 'short', frequency_hz: [50e6, 100e6] }),
  );
  const part = resultView(readerOf(output, 'output'), result);
  const impedance = part.columns.find(({ name }) => name === 'input_impedance_ohm')!;

  it('a pole is a dash among the figures, in the table, and nothing in the file', () => {
    expect(showAt(impedance, 0)).toEqual({ value: '0\u2009+\u200950.00j', unit: 'ohm' });
    expect(showAt(impedance, 1).value).toBe('—');
    expect(cellColumnsOf([impedance]).map(({ title, cell }) => [title, cell(1)])).toEqual([
      ['Re Input impedance', '—'],
      ['Im Input impedance', '—'],
    ]);
    expect(csvOf([part.axis!, impedance]).split('\r\n')[0]).toBe('frequency_hz,input_impedance_ohm.re,input_impedance_ohm.im');
    expect(csvOf([part.axis!, impedance]).split('\r\n')[2]).toBe('100000000,,');
  });
});

describe('what leaves the page', () => {
  it.each(examples)('the link of $title reopens its input', async ({ example }) => {
    const fragment = await encodeInput(example.input);
    expect(fragment).toMatch(/^1\.[A-Za-z0-9_-]+$/);
    expect(await decodeInput(`#${fragment}`)).toEqual(example.input);
  });

  it('a link that holds nothing readable opens nothing', async () => {
    expect(await decodeInput('#1.nonsense')).toBeUndefined();
    expect(await decodeInput('#section')).toBeUndefined();
  });

  it('snippets carry the exact input, quoted for their language', () => {
    const input = { name: "it's", on: true, none: null, numbers: [1e-9, 2.5e-7] };
    const [curl, python, javascript] = snippetsOf('https://lines.example', 'lines/dimension', input).map(({ code }) => code);
    expect(curl).toContain(`-d '{"name":"it'\\''s","on":true,"none":null,"numbers":[1e-9,2.5e-7]}'`);
    expect(python).toContain(`body = {"name": "it's", "on": True, "none": None, "numbers": [1e-9, 2.5e-7]}`);
    expect(javascript).toContain('https://lines.example/api/v1/lines/dimension');
  });
});
