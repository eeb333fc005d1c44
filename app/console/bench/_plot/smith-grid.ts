/**
 * The chart of P. H. Smith, "Transmission line calculator", Electronics, January 1939: the reflection plane
 * with circles of constant resistance r, centre r/(1+r) and radius 1/(1+r), and of constant reactance x,
 * centre 1 + j/x and radius 1/|x|, both relative to the reference impedance.
 */
export interface Circle {
  readonly re: number;
  readonly im: number;
  readonly radius: number;
}

export const shownResistances = [0.2, 0.5, 1, 2, 5] as const;
export const shownReactances = [0.2, 0.5, 1, 2, 5] as const;

export function resistanceCircle(resistance: number): Circle {
  return { re: resistance / (1 + resistance), im: 0, radius: 1 / (1 + resistance) };
}

export function reactanceCircle(reactance: number): Circle {
  return { re: 1, im: 1 / reactance, radius: 1 / Math.abs(reactance) };
}

/** Where a circle of constant reactance meets the rim: the reflection of a pure reactance. */
export function rimOf(reactance: number): { readonly re: number; readonly im: number } {
  const size = 1 + reactance * reactance;
  return { re: (reactance * reactance - 1) / size, im: (2 * reactance) / size };
}
