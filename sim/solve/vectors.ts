/** Sums over vectors. */
export function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

export function length(a: Float64Array): number {
  return Math.sqrt(dot(a, a));
}
