/** An observed thickness between two consecutive shared horizons of one section, as indices into the horizon order. */
export interface ObservedThickness {
  readonly from: number;
  readonly to: number;
  readonly thicknessM: number;
}

/**
 * Consensus positions R of K shared horizons, R_0 = 0: least squares of the observed thicknesses,
 * minimise sum (R_to - R_from - d)^2. A section that lacks a horizon between two others contributes its long interval.
 *
 * @param horizons number of horizons K >= 1.
 * @param observed thicknesses in metres; together they must connect all horizons.
 * @returns K positions in metres.
 * @throws RangeError where the thicknesses do not connect all horizons.
 *
 * Common stratigraphic practice; the least squares are ours.
 */
export function consensusPositions(horizons: number, observed: readonly ObservedThickness[]): number[] {
  const size = horizons - 1;
  const matrix = Array.from({ length: size }, () => new Float64Array(size + 1));
  const add = (row: number, column: number, value: number) => {
    if (row >= 0 && column >= 0) matrix[row][column] += value;
  };
  for (const { from, to, thicknessM } of observed) {
    const [a, b] = [from - 1, to - 1];
    add(a, a, 1);
    add(b, b, 1);
    add(a, b, -1);
    add(b, a, -1);
    add(a, size, -thicknessM);
    add(b, size, thicknessM);
  }
  return [0, ...solve(matrix)];
}

/** Gaussian elimination with row pivoting of an augmented matrix. */
function solve(matrix: Float64Array[]): number[] {
  const size = matrix.length;
  for (let column = 0; column < size; column++) {
    let pivot = column;
    for (let row = column + 1; row < size; row++)
      if (Math.abs(matrix[row][column]) > Math.abs(matrix[pivot][column])) pivot = row;
    if (Math.abs(matrix[pivot][column]) < 1e-9)
      throw new RangeError(
        "consensusPositions: expected thicknesses that connect all horizons, got a horizon without one; align on fewer horizons",
      );
    [matrix[column], matrix[pivot]] = [matrix[pivot], matrix[column]];
    for (let row = column + 1; row < size; row++) {
      const factor = matrix[row][column] / matrix[column][column];
      for (let k = column; k <= size; k++) matrix[row][k] -= factor * matrix[column][k];
    }
  }
  const solution = Array.from({ length: size }, () => 0);
  for (let row = size - 1; row >= 0; row--) {
    let rest = matrix[row][size];
    for (let k = row + 1; k < size; k++) rest -= matrix[row][k] * solution[k];
    solution[row] = rest / matrix[row][row];
  }
  return solution;
}
