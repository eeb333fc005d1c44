/** Systems of linear equations in complex numbers: elimination with partial pivoting, rows in one array. */

export interface ComplexVector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface ComplexMatrix extends ComplexVector {
  readonly size: number;
}

export interface Factors {
  readonly matrix: ComplexMatrix;
  readonly order: Int32Array;
}

/** In place. Source: Golub and Van Loan, Matrix Computations, algorithm 3.4.1 (from memory). Throws where the matrix is singular to the last bit. */
export function factorize(matrix: ComplexMatrix): Factors {
  const { size: N, re, im } = matrix;
  const order = new Int32Array(N);
  for (let column = 0; column < N; column++) {
    const pivot = pivotOf(matrix, column);
    order[column] = pivot;
    if (pivot !== column) swapRows(matrix, pivot, column);
    const [pRe, pIm] = [re[column * N + column], im[column * N + column]];
    const divisor = pRe * pRe + pIm * pIm;
    if (!(divisor > 0)) throw new RangeError('singular matrix');
    for (let row = column + 1; row < N; row++) {
      const at = row * N + column;
      const [fRe, fIm] = [(re[at] * pRe + im[at] * pIm) / divisor, (im[at] * pRe - re[at] * pIm) / divisor];
      [re[at], im[at]] = [fRe, fIm];
      if (fRe === 0 && fIm === 0) continue;
      for (let other = column + 1; other < N; other++) {
        const [uRe, uIm] = [re[column * N + other], im[column * N + other]];
        re[row * N + other] -= fRe * uRe - fIm * uIm;
        im[row * N + other] -= fRe * uIm + fIm * uRe;
      }
    }
  }
  return { matrix, order };
}

/** Solves in place of the right side. */
export function solveFactorized({ matrix: { size: N, re, im }, order }: Factors, side: ComplexVector): void {
  for (let row = 0; row < N; row++) {
    const pivot = order[row];
    if (pivot === row) continue;
    [side.re[row], side.re[pivot]] = [side.re[pivot], side.re[row]];
    [side.im[row], side.im[pivot]] = [side.im[pivot], side.im[row]];
  }
  for (let row = 0; row < N; row++) subtract(row, 0, row);
  for (let row = N - 1; row >= 0; row--) {
    subtract(row, row + 1, N);
    const [dRe, dIm] = [re[row * N + row], im[row * N + row]];
    const divisor = dRe * dRe + dIm * dIm;
    const [xRe, xIm] = [side.re[row], side.im[row]];
    side.re[row] = (xRe * dRe + xIm * dIm) / divisor;
    side.im[row] = (xIm * dRe - xRe * dIm) / divisor;
  }

  function subtract(row: number, from: number, to: number): void {
    for (let column = from; column < to; column++) {
      const at = row * N + column;
      side.re[row] -= re[at] * side.re[column] - im[at] * side.im[column];
      side.im[row] -= re[at] * side.im[column] + im[at] * side.re[column];
    }
  }
}

function pivotOf({ size: N, re, im }: ComplexMatrix, column: number): number {
  let best = column;
  let most = -1;
  for (let row = column; row < N; row++) {
    const value = Math.abs(re[row * N + column]) + Math.abs(im[row * N + column]);
    if (value > most) [best, most] = [row, value];
  }
  return best;
}

function swapRows({ size: N, re, im }: ComplexMatrix, first: number, second: number): void {
  for (let column = 0; column < N; column++) {
    const [p, q] = [first * N + column, second * N + column];
    [re[p], re[q]] = [re[q], re[p]];
    [im[p], im[q]] = [im[q], im[p]];
  }
}
