/** Sums and sizes of vectors. */
export function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

export function length(a: Float64Array): number {
  return Math.sqrt(dot(a, a));
}

/** The largest of the values without their signs; NaN where one is, 0 of none. */
export function largest(values: Float64Array): number {
  return values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}
