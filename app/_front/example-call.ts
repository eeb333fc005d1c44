/**
 * The call that the front page shows: the first example of the input-impedance calculation, computed by
 * the running engine when the page is drawn, so the page can never show a number that the service would not.
 */
import { calculationPath, type MethodUse } from '@/lib/solvers/calculation';
import { findCalculation } from '@/lib/solvers/registry';

type Column = readonly (number | null)[];
interface ComplexColumn {
  readonly re: Column;
  readonly im: Column;
}

/** The part of the answer that the page draws, by its names in the contract. */
interface InputImpedance {
  readonly frequency_hz: readonly number[];
  readonly input_impedance_ohm: ComplexColumn;
  readonly reflection_at_reference: ComplexColumn;
  readonly vswr: Column;
  readonly return_loss_db: Column;
}

export interface ExampleCall {
  readonly path: string;
  readonly name: string;
  readonly input: Readonly<Record<string, unknown>>;
  readonly result: InputImpedance;
  readonly methods: readonly MethodUse[];
}

export function exampleCall(): ExampleCall | null {
  const calculation = findCalculation('terminations', 'input-impedance');
  if (!calculation) return null;
  const { name, input } = calculation.examples[0];
  const { result, methods } = calculation.solve(calculation.input.parse(input));
  return { path: calculationPath(calculation), name, input: input as Record<string, unknown>, result: result as InputImpedance, methods };
}

/** One entry of a complex column, or null at a pole. */
export function complexAt({ re, im }: ComplexColumn, index: number): { readonly re: number; readonly im: number } | null {
  const [real, imaginary] = [re[index], im[index]];
  return real === null || imaginary === null ? null : { re: real, im: imaginary };
}
