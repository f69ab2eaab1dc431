/** How two columns go together whatever their units and logarithms. Pure. */

/** Spearman's ρ; null where a column does not vary. Source: Spearman (1904) Am. J. Psychol. 15, 72. */
export function rankCorrelation(x: readonly number[], y: readonly number[]): number | null {
  const [a, b] = [ranksOf(x), ranksOf(y)];
  const mean = (x.length - 1) / 2;
  const product = (p: readonly number[], q: readonly number[]): number =>
    p.reduce((sum, value, at) => sum + (value - mean) * (q[at]! - mean), 0);
  const size = Math.sqrt(product(a, a) * product(b, b));
  return size > 0 ? product(a, b) / size : null;
}

/** From 0; equal values share the mean of their places. */
function ranksOf(values: readonly number[]): number[] {
  const order = values.map((_, at) => at).sort((p, q) => values[p]! - values[q]!);
  const ranks = new Array<number>(values.length);
  for (let start = 0; start < order.length; ) {
    let end = start;
    while (end < order.length && values[order[end]!] === values[order[start]!]) end++;
    for (let place = start; place < end; place++) ranks[order[place]!] = (start + end - 1) / 2;
    start = end;
  }
  return ranks;
}
