/**
 * Solves a small symmetric positive definite system by Cholesky's method; null where a pivot is at or below `least` of its row: singular.
 * @param matrix by rows; its lower half is overwritten
 */
export function solveDefinite(matrix: Float64Array, right: Float64Array, least: Float64Array): Float64Array | null {
  const n = right.length;
  const x = right.slice();
  for (let k = 0; k < n; k++) {
    const row = k * n;
    for (let j = 0; j <= k; j++) {
      const other = j * n;
      let sum = matrix[row + j];
      for (let i = 0; i < j; i++) sum -= matrix[row + i] * matrix[other + i];
      if (j < k) matrix[row + j] = sum / matrix[other + j];
      else if (!(sum > least[k])) return null;
      else matrix[row + k] = Math.sqrt(sum);
    }
    let sum = x[k];
    for (let i = 0; i < k; i++) sum -= matrix[row + i] * x[i];
    x[k] = sum / matrix[row + k];
  }
  for (let k = n - 1; k >= 0; k--) {
    let sum = x[k];
    for (let i = k + 1; i < n; i++) sum -= matrix[i * n + k] * x[i];
    x[k] = sum / matrix[k * n + k];
  }
  return x;
}
