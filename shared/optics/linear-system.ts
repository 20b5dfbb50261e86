/**
 * Solves a square system by Gaussian elimination with row pivoting, in place: `right` becomes the answer.
 *
 * @param matrix size × size, row by row; destroyed
 * @param right  size values; receives the answer
 * @returns false when the system has no single answer
 */
export function solveInPlace(matrix: Float64Array, right: Float64Array, size: number): boolean {
  for (let column = 0; column < size; column++) {
    let pivot = column
    for (let row = column + 1; row < size; row++) {
      if (Math.abs(matrix[row * size + column]!) > Math.abs(matrix[pivot * size + column]!)) pivot = row
    }
    const lead = matrix[pivot * size + column]!
    if (!(Math.abs(lead) > 1e-300)) return false
    if (pivot !== column) swapRows(matrix, right, size, pivot, column)
    for (let row = column + 1; row < size; row++) {
      const factor = matrix[row * size + column]! / lead
      if (factor === 0) continue
      for (let k = column; k < size; k++) matrix[row * size + k]! -= factor * matrix[column * size + k]!
      right[row]! -= factor * right[column]!
    }
  }
  for (let row = size - 1; row >= 0; row--) {
    let sum = right[row]!
    for (let k = row + 1; k < size; k++) sum -= matrix[row * size + k]! * right[k]!
    right[row] = sum / matrix[row * size + row]!
  }
  return right.every(Number.isFinite)
}

function swapRows(matrix: Float64Array, right: Float64Array, size: number, a: number, b: number): void {
  for (let k = 0; k < size; k++) {
    const kept = matrix[a * size + k]!
    matrix[a * size + k] = matrix[b * size + k]!
    matrix[b * size + k] = kept
  }
  const kept = right[a]!
  right[a] = right[b]!
  right[b] = kept
}
