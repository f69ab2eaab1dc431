/** Equal-area bands from the south pole to the north: x = sin(latitude), edges at (2i − N)/N. */
export interface Bands {
  readonly count: number;
  /** sin(latitude) at the middle of each band. */
  readonly sine: Float64Array;
  readonly cosine: Float64Array;
  /** Latitude of the middle, rad. */
  readonly latitude: Float64Array;
  /** sin(latitude) of the edges, count + 1; exactly symmetric about the equator. */
  readonly edges: Float64Array;
}

export function equalAreaBands(count: number): Bands {
  const sine = Float64Array.from({ length: count }, (_, i) => (2 * i + 1 - count) / count);
  return {
    count,
    sine,
    cosine: sine.map((x) => Math.sqrt((1 - x) * (1 + x))),
    latitude: sine.map(Math.asin),
    edges: Float64Array.from({ length: count + 1 }, (_, i) => (2 * i - count) / count),
  };
}

/** Mean over the globe: bands have equal areas. */
export function globalMean(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
