/** What a band figure shows, for those who cannot see it. Pure. */
import { type Percentiles, percentileLevels } from '../../sim/studies/spread/percentiles.ts';
import type { SpreadBand } from '../../sim/studies/spread/spreadReport.ts';
import { latitudeText } from './latitude.ts';
import { fixed, nbsp, unitText } from './number.ts';
import { wordingOf } from './spreadNumber.ts';

/** Where the median is highest, how wide the band is there, and where it is widest. */
export function bandSentence({ along, positions, unit, levels }: SpreadBand): string {
  const [low, , median, , high] = levels as [Float64Array, Float64Array, Float64Array, Float64Array, Float64Array];
  const widths = high.map((value, at) => value - low[at]!);
  const [peak, widest] = [highest(median), highest(widths)];
  const percentiles = Object.fromEntries(
    percentileLevels.map((level, at) => [level, levels[at]![peak]!]),
  ) as Percentiles;
  const summary = { mean: median[peak]!, percentiles, defined: 1 };
  const words = wordingOf(summary, null, { one: 1, symbol: unitText(unit) });
  const place = (at: number): string =>
    along === 'latitude' ? `at ${latitudeText(positions[at]!)}` : `${orbitShare(positions[at]!)} periapsis`;
  const interval = words.interval(low[peak]!, high[peak]!);
  if (isFlat(median) && isFlat(widths))
    return `the median is ${words.text(median[peak]!)} (95${nbsp}%: ${interval}), the same ${along === 'latitude' ? 'at every latitude' : 'all through the orbit'}.`;
  return `the median is highest ${place(peak)}, ${words.text(median[peak]!)} (95${nbsp}%: ${interval}); the 95${nbsp}% band is widest ${place(widest)}, ${words.text(widths[widest]!)}.`;
}

/** `12 % of an orbit after`; in the last quarter the next periapsis is nearer to mind. */
function orbitShare(position: number): string {
  const share = position > 0.75 ? position - 1 : position;
  if (Math.abs(share) < 0.005) return 'at';
  return `${fixed(100 * Math.abs(share), 0)}${nbsp}% of an orbit ${share < 0 ? 'before' : 'after'}`;
}

/** What varies by less than anyone would show has no highest place. */
function isFlat(values: Float64Array): boolean {
  const most = values[highest(values)]!;
  return values.every((value) => most - value <= 1e-6 * Math.abs(most));
}

function highest(values: Float64Array): number {
  return values.reduce((best, value, at) => (value > values[best]! ? at : best), 0);
}
