/**
 * Solution of a symmetric tridiagonal system, without pivoting: for diagonally dominant or positive
 * definite matrices, as chains of springs give.
 * @param diagonal n numbers
 * @param beside n − 1 numbers, beside the diagonal on both sides
 * @param right n numbers
 * @returns n numbers, or undefined where the matrix is singular
 * Source: Press et al., Numerical Recipes, 3rd ed., section 2.4 (Thomas' algorithm).
 */
export const solveTridiagonal = (
  diagonal: readonly number[],
  beside: readonly number[],
  right: readonly number[],
): number[] | undefined => {
  const size = diagonal.length
  const pivots = new Float64Array(size)
  const solution = new Float64Array(size)
  const largest = diagonal.reduce((most, value) => Math.max(most, Math.abs(value)), 0)
  for (let i = 0; i < size; i++) {
    const above = i === 0 ? 0 : (beside[i - 1] ?? 0) / (pivots[i - 1] ?? 1)
    pivots[i] = (diagonal[i] ?? 0) - above * (i === 0 ? 0 : (beside[i - 1] ?? 0))
    if (Math.abs(pivots[i] ?? 0) <= 1e-13 * largest) return undefined
    solution[i] = (right[i] ?? 0) - above * (i === 0 ? 0 : (solution[i - 1] ?? 0))
  }
  for (let i = size - 1; i >= 0; i--) {
    const below = i === size - 1 ? 0 : (beside[i] ?? 0) * (solution[i + 1] ?? 0)
    solution[i] = ((solution[i] ?? 0) - below) / (pivots[i] ?? 1)
  }
  return Array.from(solution)
}
