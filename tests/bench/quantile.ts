/** The value below which that part (0 … 1) of the values lies; the nearest that occurs, NaN of none. */
export function quantile(values: readonly number[], part: number): number {
  const sorted = [...values].sort((a, b) => a - b)
  const index = Math.min(sorted.length - 1, Math.max(0, Math.ceil(part * sorted.length) - 1))
  return sorted[index] ?? Number.NaN
}
