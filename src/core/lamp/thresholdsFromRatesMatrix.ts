/** A symmetric matrix as its rows. */
export type Matrix = readonly (readonly number[])[]

/** Sum over all rows r of r·rᵀ, with `extra` added along the diagonal. */
export function normalMatrix(rows: Matrix, extra: readonly number[]): number[][] {
  return extra.map((added, i) =>
    extra.map((_, j) =>
      rows.reduce((sum, row) => sum + (row[i] as number) * (row[j] as number), i === j ? added : 0),
    ),
  )
}

/**
 * Inverse of a symmetric positive definite matrix, by Cholesky's way; null where it is none, or so nearly
 * that no figure of the inverse would be left.
 */
export function inverseOf(matrix: Matrix): number[][] | null {
  const size = matrix.length
  // Scaled to ones along the diagonal, so that units do not count in what is called singular.
  const scale = matrix.map((row, i) => 1 / Math.sqrt(row[i] as number))
  if (!scale.every((value) => Number.isFinite(value))) return null
  const factor: number[][] = []
  for (let i = 0; i < size; i++) {
    const row: number[] = []
    factor.push(row)
    for (let j = 0; j <= i; j++) {
      let sum = (matrix[i]?.[j] as number) * (scale[i] as number) * (scale[j] as number)
      for (let k = 0; k < j; k++) sum -= (row[k] as number) * (factor[j]?.[k] as number)
      if (j < i) row.push(sum / (factor[j]?.[j] as number))
      else if (sum > 1e-13) row.push(Math.sqrt(sum))
      else return null
    }
  }
  const columns = scale.map((_, i) => solveWith(factor, i))
  return scale.map((a, i) => scale.map((b, j) => a * b * (columns[j]?.[i] as number)))
}

/** Column `index` of the inverse of factor·factorᵀ. */
function solveWith(factor: Matrix, index: number): number[] {
  const size = factor.length
  const forward: number[] = []
  for (let i = 0; i < size; i++) {
    let sum = i === index ? 1 : 0
    for (let k = 0; k < i; k++) sum -= (factor[i]?.[k] as number) * (forward[k] as number)
    forward.push(sum / (factor[i]?.[i] as number))
  }
  const column = new Array<number>(size).fill(0)
  for (let i = size - 1; i >= 0; i--) {
    let sum = forward[i] as number
    for (let k = i + 1; k < size; k++) sum -= (factor[k]?.[i] as number) * (column[k] as number)
    column[i] = sum / (factor[i]?.[i] as number)
  }
  return column
}

/** Matrix times vector. */
export function timesVector(matrix: Matrix, vector: readonly number[]): number[] {
  return matrix.map((row) => row.reduce((sum, value, j) => sum + value * (vector[j] as number), 0))
}
