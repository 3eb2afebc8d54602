/**
 * Cholesky factor of a symmetric positive definite matrix (row-major, size × size), lower triangle; null where the matrix
 * is not positive definite to working precision, i.e. the unknowns cannot be told apart. The input is not changed.
 */
export function choleskyFactor(matrix: Float64Array, size: number): Float64Array | null {
  const factor = Float64Array.from(matrix);
  for (let j = 0; j < size; j++) {
    let diagonal = factor[j * size + j];
    for (let k = 0; k < j; k++) diagonal -= factor[j * size + k] * factor[j * size + k];
    if (!(diagonal > 1e-10 * Math.abs(matrix[j * size + j]))) return null;
    const root = Math.sqrt(diagonal);
    factor[j * size + j] = root;
    for (let i = j + 1; i < size; i++) {
      let sum = factor[i * size + j];
      for (let k = 0; k < j; k++) sum -= factor[i * size + k] * factor[j * size + k];
      factor[i * size + j] = sum / root;
    }
  }
  return factor;
}

/** Solves factor · factorᵀ · x = right, in place. */
export function choleskySolve(factor: Float64Array, size: number, right: Float64Array): Float64Array {
  for (let i = 0; i < size; i++) {
    let sum = right[i];
    for (let k = 0; k < i; k++) sum -= factor[i * size + k] * right[k];
    right[i] = sum / factor[i * size + i];
  }
  for (let i = size - 1; i >= 0; i--) {
    let sum = right[i];
    for (let k = i + 1; k < size; k++) sum -= factor[k * size + i] * right[k];
    right[i] = sum / factor[i * size + i];
  }
  return right;
}
