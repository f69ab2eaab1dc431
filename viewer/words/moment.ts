/** When something happens, in words: counted from the nearest periapsis, or from the start of a run. Pure. */
import type { Seconds } from '../../sim/si.ts';
import { type Column, periodOf } from './columns.ts';
import { fixed, nbsp, type TimeUnit, timeDecimals } from './number.ts';

/** `12.1 d after periapsis`. */
export function moment(time: Seconds, column: Column, unit: TimeUnit): string {
  if (column.isForwardRun) return time === 0 ? 'at the start' : `${timeText(time, column, unit)} after the start`;
  const offset = fromPeriapsis(time, column);
  if (offset === 0) return 'at periapsis';
  return `${timeText(Math.abs(offset), column, unit)} ${offset < 0 ? 'before' : 'after'} periapsis`;
}

/** In the last quarter of the orbit the next periapsis is the one that a reader thinks of. */
function fromPeriapsis(time: Seconds, column: Column): Seconds {
  const period = periodOf(column);
  return time > 0.75 * period ? time - period : time;
}

/** About a thousandth of the orbit. */
export function timeText(seconds: Seconds, column: Column, unit: TimeUnit): string {
  return `${fixed(seconds / unit.seconds, timeDecimals(periodOf(column), unit, 1))}${nbsp}${unit.symbol}`;
}
