/** Systems of linear equations in real numbers: elimination with partial pivoting, rows in one array. */

/** Overwrites both; the solution stands in `side`. Source: Golub and Van Loan, Matrix Computations, algorithm 3.4.1 (from memory). */
export function solveReal(matrix: Float64Array, side: Float64Array): Float64Array {
  const N = side.length;
  for (let column = 0; column < N; column++) {
    let pivot = column;
    for (let row = column + 1; row < N; row++) if (Math.abs(matrix[row * N + column]) > Math.abs(matrix[pivot * N + column])) pivot = row;
    if (pivot !== column) {
      for (let other = column; other < N; other++) [matrix[pivot * N + other], matrix[column * N + other]] = [matrix[column * N + other], matrix[pivot * N + other]];
      [side[pivot], side[column]] = [side[column], side[pivot]];
    }
    for (let row = column + 1; row < N; row++) {
      const factor = matrix[row * N + column] / matrix[column * N + column];
      if (factor === 0) continue;
      for (let other = column + 1; other < N; other++) matrix[row * N + other] -= factor * matrix[column * N + other];
      side[row] -= factor * side[column];
    }
  }
  for (let row = N - 1; row >= 0; row--) {
    for (let other = row + 1; other < N; other++) side[row] -= matrix[row * N + other] * side[other];
    side[row] /= matrix[row * N + row];
  }
  return side;
}
