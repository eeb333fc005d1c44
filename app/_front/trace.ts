/** From numbers to the picture: scales with round ticks, and paths that break where a value does not exist. */
export interface Scale {
  readonly ticks: readonly number[];
  place(value: number): number;
}

/** Maps `[least, most]` to `[from, to]`; `about` is how many ticks are wanted. */
export function linearScale(least: number, most: number, from: number, to: number, about: number): Scale {
  const step = roundStep((most - least) / about);
  const first = Math.ceil(least / step - 1e-9);
  const last = Math.floor(most / step + 1e-9);
  return {
    ticks: Array.from({ length: last - first + 1 }, (_, index) => (first + index) * step),
    place: (value) => from + ((value - least) / (most - least)) * (to - from),
  };
}

export function pathOf(x: Scale, y: Scale, abscissae: readonly number[], ordinates: readonly (number | null)[]): string {
  let path = '';
  let pen = 'M';
  abscissae.forEach((abscissa, index) => {
    const ordinate = ordinates[index];
    if (ordinate === null) {
      pen = 'M';
      return;
    }
    path += `${pen}${x.place(abscissa).toFixed(1)},${y.place(ordinate).toFixed(1)}`;
    pen = 'L';
  });
  return path;
}

function roundStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  return power * ([1, 2, 2.5, 5, 10].find((factor) => factor * power >= rough * (1 - 1e-9)) ?? 10);
}
