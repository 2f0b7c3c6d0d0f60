// Small dense real systems.

import { invariant } from '../errors.ts';

/** Solves A X = B by elimination with partial pivoting; A and B are overwritten, X is left in B.
 *  @param a  n × n, row by row
 *  @param b  n × columns, row by row
 *  Throws: invariant when A is singular to working precision. */
export function solveInPlace(a: Float64Array, b: Float64Array, n: number, columns: number): void {
  for (let k = 0; k < n; k++) {
    let pivot = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(a[i * n + k]!) > Math.abs(a[pivot * n + k]!)) pivot = i;
    invariant(a[pivot * n + k] !== 0, 'solveInPlace: singular matrix');
    if (pivot !== k) {
      for (let j = k; j < n; j++) [a[k * n + j], a[pivot * n + j]] = [a[pivot * n + j]!, a[k * n + j]!];
      for (let j = 0; j < columns; j++)
        [b[k * columns + j], b[pivot * columns + j]] = [b[pivot * columns + j]!, b[k * columns + j]!];
    }
    const inverse = 1 / a[k * n + k]!;
    for (let i = k + 1; i < n; i++) {
      const factor = a[i * n + k]! * inverse;
      if (factor === 0) continue;
      for (let j = k + 1; j < n; j++) a[i * n + j]! -= factor * a[k * n + j]!;
      for (let j = 0; j < columns; j++) b[i * columns + j]! -= factor * b[k * columns + j]!;
    }
  }
  for (let k = n - 1; k >= 0; k--) {
    const inverse = 1 / a[k * n + k]!;
    for (let j = 0; j < columns; j++) {
      let sum = b[k * columns + j]!;
      for (let i = k + 1; i < n; i++) sum -= a[k * n + i]! * b[i * columns + j]!;
      b[k * columns + j] = sum * inverse;
    }
  }
}
