/** A second time axis with calendar dates, above the first and zooming with it. Pure. */
import type { Layout } from 'plotly.js-dist-min';
import type { TdbSeconds } from '../../sim/si.ts';
import { utcMillis } from '../words/date.ts';
import { calendarTicks } from './calendarTicks.ts';
import type { FigureStyle } from './figure.ts';
import type { AxisUnit } from './orbitAxis.ts';
import { type TopTicks, topAxisLayout } from './topAxis.ts';

export interface DateAxis {
  /** The date of zero on the time axis. */
  readonly zero: TdbSeconds;
  readonly unit: AxisUnit;
  readonly atMost: number;
}

/** Tick places in the time axis's own unit, and their words: for the range in view, so that zooming brings finer dates. */
export function dateTicks({ zero, unit, atMost }: DateAxis, from: number, to: number): TopTicks {
  const start = utcMillis(zero + from * unit.seconds);
  const end = utcMillis(zero + to * unit.seconds);
  const ticks = calendarTicks(start, end, atMost);
  const perMilli = (to - from) / (end - start);
  return {
    places: ticks.map(({ utcMillis: at }) => from + (at - start) * perMilli),
    labels: ticks.map(({ label }) => label),
  };
}

/** The axis itself, for `layout.xaxis2`. */
export function dateAxisLayout(
  dates: DateAxis,
  range: readonly [number, number],
  style: FigureStyle,
): Partial<Layout['xaxis']> {
  return topAxisLayout(dateTicks(dates, range[0], range[1]), range, style);
}
