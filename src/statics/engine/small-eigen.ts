/** Eigenvalues and -vectors of one small symmetric matrix; room is reused from call to call. */
export interface SmallEigen {
  readonly values: Float64Array;
  /** vectors[r * size + c]: component r of eigenvector c. */
  readonly vectors: Float64Array;
  readonly work: Float64Array;
}

export function roomForEigen(size: number): SmallEigen {
  return {
    values: new Float64Array(size),
    vectors: new Float64Array(size * size),
    work: new Float64Array(size * size),
  };
}

/** Cyclic Jacobi rotations (Golub & Van Loan, Matrix Computations, 8.5): accurate and short for sizes up to six. */
export function smallSymmetricEigen(matrix: Float64Array, size: number, out: SmallEigen): void {
  const { values, vectors, work } = out;
  for (let i = 0; i < size * size; i++) {
    work[i] = matrix[i];
    vectors[i] = 0;
  }
  for (let i = 0; i < size; i++) vectors[i * size + i] = 1;
  for (let sweep = 0; sweep < 30; sweep++) {
    let rotated = false;
    for (let p = 0; p < size; p++)
      for (let q = p + 1; q < size; q++) rotated = rotate(work, vectors, size, p, q) || rotated;
    if (!rotated) break;
  }
  for (let i = 0; i < size; i++) values[i] = work[i * size + i];
}

function rotate(a: Float64Array, v: Float64Array, size: number, p: number, q: number): boolean {
  const off = a[p * size + q];
  const dp = a[p * size + p];
  const dq = a[q * size + q];
  if (off === 0 || Math.abs(off) < 1e-18 * (Math.abs(dp) + Math.abs(dq)) || Math.abs(off) < 1e-300) return false;
  const theta = (dq - dp) / (2 * off);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (let k = 0; k < size; k++) {
    const kp = a[k * size + p];
    const kq = a[k * size + q];
    a[k * size + p] = c * kp - s * kq;
    a[k * size + q] = s * kp + c * kq;
  }
  for (let k = 0; k < size; k++) {
    const pk = a[p * size + k];
    const qk = a[q * size + k];
    a[p * size + k] = c * pk - s * qk;
    a[q * size + k] = s * pk + c * qk;
  }
  a[p * size + q] = 0;
  a[q * size + p] = 0;
  for (let k = 0; k < size; k++) {
    const kp = v[k * size + p];
    const kq = v[k * size + q];
    v[k * size + p] = c * kp - s * kq;
    v[k * size + q] = s * kp + c * kq;
  }
  return true;
}
