/**
 * The inverse of a symmetric positive matrix of `size` rows, row after row; null where it has none.
 * Rows and columns are scaled to a unit diagonal first, so that volts and millivolts mix safely.
 */
export function invertNormal(matrix: Float64Array, size: number): Float64Array | null {
  const scale = new Float64Array(size)
  for (let i = 0; i < size; i++) {
    const diagonal = matrix[i * size + i] as number
    if (!(diagonal > 0 && Number.isFinite(diagonal))) return null
    scale[i] = 1 / Math.sqrt(diagonal)
  }
  // Gauss–Jordan in place; a positive matrix needs no change of rows.
  const a = Float64Array.from(
    matrix,
    (value, k) => value * (scale[Math.floor(k / size)] as number) * (scale[k % size] as number),
  )
  for (let pivot = 0; pivot < size; pivot++) {
    const under = a[pivot * size + pivot] as number
    if (!(under > 1e-13)) return null
    a[pivot * size + pivot] = 1
    for (let j = 0; j < size; j++) a[pivot * size + j] = (a[pivot * size + j] as number) / under
    for (let i = 0; i < size; i++) {
      if (i === pivot) continue
      const factor = a[i * size + pivot] as number
      a[i * size + pivot] = 0
      for (let j = 0; j < size; j++) {
        a[i * size + j] = (a[i * size + j] as number) - factor * (a[pivot * size + j] as number)
      }
    }
  }
  return a.map(
    (value, k) => value * (scale[Math.floor(k / size)] as number) * (scale[k % size] as number),
  )
}
