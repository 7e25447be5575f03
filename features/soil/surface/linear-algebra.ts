/** Small dense linear algebra on row-major Float64Arrays, for symmetric positive definite matrices. */

/** Dot product of two runs of `length` numbers, in four lanes so that the processor can overlap them. */
function dot(a: Float64Array, fromA: number, b: Float64Array, fromB: number, length: number): number {
  let s0 = 0;
  let s1 = 0;
  let s2 = 0;
  let s3 = 0;
  let k = 0;
  for (; k + 3 < length; k += 4) {
    s0 += (a[fromA + k] as number) * (b[fromB + k] as number);
    s1 += (a[fromA + k + 1] as number) * (b[fromB + k + 1] as number);
    s2 += (a[fromA + k + 2] as number) * (b[fromB + k + 2] as number);
    s3 += (a[fromA + k + 3] as number) * (b[fromB + k + 3] as number);
  }
  for (; k < length; k++) s0 += (a[fromA + k] as number) * (b[fromB + k] as number);
  return s0 + s1 + (s2 + s3);
}

/**
 * Cholesky factor in place: the lower triangle of `matrix` (size × size) becomes L with L·Lᵀ = matrix; the upper is left as it
 * was. Returns false, with the matrix spoilt, when it is not positive definite.
 */
export function choleskyInPlace(matrix: Float64Array, size: number): boolean {
  for (let i = 0; i < size; i++) {
    const rowI = i * size;
    for (let j = 0; j <= i; j++) {
      const rowJ = j * size;
      const rest = (matrix[rowI + j] as number) - dot(matrix, rowI, matrix, rowJ, j);
      if (i === j) {
        if (!(rest > 0)) return false;
        matrix[rowI + i] = Math.sqrt(rest);
      } else matrix[rowI + j] = rest / (matrix[rowJ + j] as number);
    }
  }
  return true;
}

/** Solves L·x = b in place. */
export function solveLowerInPlace(factor: Float64Array, size: number, right: Float64Array): Float64Array {
  for (let i = 0; i < size; i++) {
    right[i] = ((right[i] as number) - dot(factor, i * size, right, 0, i)) / (factor[i * size + i] as number);
  }
  return right;
}

/** Solves Lᵀ·x = b in place. */
export function solveUpperInPlace(factor: Float64Array, size: number, right: Float64Array): Float64Array {
  for (let i = size - 1; i >= 0; i--) {
    const value = (right[i] as number) / (factor[i * size + i] as number);
    right[i] = value;
    for (let k = 0; k < i; k++) right[k] = (right[k] as number) - value * (factor[i * size + k] as number);
  }
  return right;
}

/** Diagonal of (L·Lᵀ)⁻¹. */
export function inverseDiagonal(factor: Float64Array, size: number): Float64Array {
  const diagonal = new Float64Array(size);
  const column = new Float64Array(size);
  for (let j = 0; j < size; j++) {
    column[j] = 1 / (factor[j * size + j] as number);
    let sum = (column[j] as number) ** 2;
    for (let i = j + 1; i < size; i++) {
      const value = -dot(factor, i * size + j, column, j, i - j) / (factor[i * size + i] as number);
      column[i] = value;
      sum += value * value;
    }
    diagonal[j] = sum;
  }
  return diagonal;
}
