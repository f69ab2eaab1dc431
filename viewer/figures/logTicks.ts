/** Round numbers on a logarithmic axis of a few decades: 1, 2, 5, 10, …, in letters of the common size. Pure. */
import { exact } from '../words/number.ts';

/** `range` is in powers of ten; at most `most` ticks where 1, 10, 100, … are no more than that. */
export function logTicks(
  [from, to]: readonly [number, number],
  most: number,
): { tickmode: 'array'; tickvals: number[]; ticktext: string[] } {
  const powers = Array.from({ length: Math.ceil(to) - Math.floor(from) + 1 }, (_, at) => Math.floor(from) + at);
  const within = (value: number): boolean => Math.log10(value) >= from - 1e-9 && Math.log10(value) <= to + 1e-9;
  const candidates = [[1, 1.5, 2, 3, 4, 5, 6, 7, 8, 9], [1, 2, 3, 5, 7], [1, 2, 5], [1, 3], [1]].map((steps) =>
    powers.flatMap((power) => steps.map((step) => Number(`${step}e${power}`))).filter(within),
  );
  const tickvals = candidates.find((ticks) => ticks.length <= most) ?? candidates.at(-1)!;
  return { tickmode: 'array', tickvals, ticktext: tickvals.map(exact) };
}
