/** What every line kind comes down to: its primary constants over frequency, and what to know about them. */
import type { z } from 'zod';
import type { Method, MethodUse, Warning } from '../calculation';

export interface FourColumns {
  readonly resistance: Float64Array;
  readonly inductance: Float64Array;
  readonly conductance: Float64Array;
  readonly capacitance: Float64Array;
}

/** One entry a frequency: ohm/m, H/m, S/m, F/m. */
export interface LineConstants extends FourColumns {
  /** Derivatives to omega, on which group delay rests; left out where the constants are the same at every frequency. */
  readonly slope?: FourColumns;
}

/** What a line given by its geometry tells beside its constants. */
export interface LineGeometry {
  /** H/m; of the field outside the conductors. */
  readonly externalInductance: Float64Array;
  readonly effectivePermittivity: Float64Array;
  /** m, in the (inner) conductor; infinite at direct current, 0 in a perfect conductor. */
  readonly skinDepth: Float64Array;
  /** Where the first higher mode begins to propagate; Infinity where none is known for the kind. */
  readonly singleModeLimitHz: number;
}

export interface LineModel {
  readonly constants: LineConstants;
  /** What the constants rest on; empty where they were given. */
  readonly methods: readonly MethodUse[];
  /** Pointers are relative to the line: '' is the line itself, '/width_m' a field of it. */
  readonly warnings: readonly Warning[];
  readonly geometry?: LineGeometry;
}

/** A line kind: its schema, and what it is over frequency. */
export interface LineKind<Schema extends z.ZodType = z.ZodType> {
  /** A strict object with a literal `kind`; what the fields say only together is refined in it. */
  readonly schema: Schema;
  /** Every method that `model` may name. */
  readonly methods: readonly Method[];
  /** The dimensions that lines/dimension can solve for; left out where the kind is not a geometry. */
  readonly dimensions?: readonly (keyof z.output<Schema> & string)[];
  /** About what the model takes over so many points, on a slow machine; left out where it takes but a few microseconds a point. */
  microseconds?(line: z.output<Schema>, points: number): number;
  /** Pure. Frequencies in Hz, 0 included. Throws `ImpossibleInput` with pointers relative to the line. */
  model(line: z.output<Schema>, frequenciesHz: Float64Array): LineModel;
}

export function defineLineKind<Schema extends z.ZodType>(kind: LineKind<Schema>): LineKind<Schema> {
  return kind;
}

export function constantConstants(length: number, resistance: number, inductance: number, conductance: number, capacitance: number): LineConstants {
  const column = (value: number) => new Float64Array(length).fill(value);
  return { resistance: column(resistance), inductance: column(inductance), conductance: column(conductance), capacitance: column(capacitance) };
}
