// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
/**
 * Solves a tridiagonal system in place by elimination without pivoting (Thomas); meant for the diagonally dominant matrices
 * of a strip. `lower[i]` multiplies x[i−1], `upper[i]` x[i+1]. `diagonal` and `right` are overwritten; the answer is in `right`.
 * A pivot of 0 is replaced by a tiny one: the caller sees a huge step there, not a NaN.
 */
export function solveTridiagonal(
  n: number,
  lower: Float64Array,
  diagonal: Float64Array,
  upper: Float64Array,
  right: Float64Array,
): void {
  if (n === 0) return
  let pivot = diagonal[0]! || 1e-300
  diagonal[0] = pivot
  for (let i = 1; i < n; i++) {
    const factor = lower[i]! / pivot
    pivot = diagonal[i]! - factor * upper[i - 1]!
    if (pivot === 0) pivot = 1e-300
    diagonal[i] = pivot
    right[i] = right[i]! - factor * right[i - 1]!
  }
  let x = right[n - 1]! / diagonal[n - 1]!
  right[n - 1] = x
  for (let i = n - 2; i >= 0; i--) {
    x = (right[i]! - upper[i]! * x) / diagonal[i]!
    right[i] = x
  }
}
