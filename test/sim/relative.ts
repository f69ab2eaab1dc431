/** |actual − expected| / |expected|; |actual| where 0 is expected. NaN stays NaN, which is below no tolerance. */
export function relativeError(actual: number, expected: number): number {
  return expected === 0 ? Math.abs(actual) : Math.abs((actual - expected) / expected);
}
