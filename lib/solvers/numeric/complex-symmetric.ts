/** Systems of linear equations whose matrix is complex and symmetric, rows in one array. */

export interface ComplexVector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export const complexVector = (length: number): ComplexVector => ({ re: new Float64Array(length), im: new Float64Array(length) });

/**
 * Solves A x = b in place of b; only the diagonal of A and what stands right of it are read, and they are written over.
 * Source: symmetric elimination, Golub and Van Loan, Matrix Computations, section 4.1 (from memory). Range: Re x*Ax > 0 for every x. Accuracy: some units
 * of rounding times the condition. Throws nothing. The trap: without pivots the entries may grow; where A = 1 - B and |B| < 1 they cannot grow by more than
 * about 1/(1 - |B|).
 */
export function solveSymmetric({ re, im }: ComplexVector, { re: bRe, im: bIm }: ComplexVector): void {
  const N = bRe.length;
  for (let k = 0; k < N; k++) {
    const pivot = k * N;
    const divisor = re[pivot + k] * re[pivot + k] + im[pivot + k] * im[pivot + k];
    const [pRe, pIm] = [re[pivot + k] / divisor, -im[pivot + k] / divisor];
    for (let row = k + 1; row < N; row++) {
      const fRe = re[pivot + row] * pRe - im[pivot + row] * pIm;
      const fIm = re[pivot + row] * pIm + im[pivot + row] * pRe;
      bRe[row] -= fRe * bRe[k] - fIm * bIm[k];
      bIm[row] -= fRe * bIm[k] + fIm * bRe[k];
      for (let at = row * N + row, above = pivot + row; above < pivot + N; at++, above++) {
        re[at] -= fRe * re[above] - fIm * im[above];
        im[at] -= fRe * im[above] + fIm * re[above];
      }
    }
  }
  for (let row = N - 1; row >= 0; row--) {
    const diagonal = row * N + row;
    let [sumRe, sumIm] = [bRe[row], bIm[row]];
    for (let column = row + 1, at = diagonal + 1; column < N; column++, at++) {
      sumRe -= re[at] * bRe[column] - im[at] * bIm[column];
      sumIm -= re[at] * bIm[column] + im[at] * bRe[column];
    }
    const divisor = re[diagonal] * re[diagonal] + im[diagonal] * im[diagonal];
    bRe[row] = (sumRe * re[diagonal] + sumIm * im[diagonal]) / divisor;
    bIm[row] = (sumIm * re[diagonal] - sumRe * im[diagonal]) / divisor;
  }
}
