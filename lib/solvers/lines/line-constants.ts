/** What every line kind comes down to: its primary constants over frequency. */
import type { z } from 'zod';

/** One entry a frequency: ohm/m, H/m, S/m, F/m. */
export interface LineConstants {
  readonly resistance: Float64Array;
  readonly inductance: Float64Array;
  readonly conductance: Float64Array;
  readonly capacitance: Float64Array;
}

/** A line kind: its schema, and its constants over frequency. */
export interface LineKind<Schema extends z.ZodType> {
  readonly schema: Schema;
  constants(line: z.output<Schema>, frequenciesHz: Float64Array): LineConstants;
}

export function defineLineKind<Schema extends z.ZodType>(kind: LineKind<Schema>): LineKind<Schema> {
  return kind;
}

export function constantConstants(length: number, resistance: number, inductance: number, conductance: number, capacitance: number): LineConstants {
  const column = (value: number) => new Float64Array(length).fill(value);
  return { resistance: column(resistance), inductance: column(inductance), conductance: column(conductance), capacitance: column(capacitance) };
}
