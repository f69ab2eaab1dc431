/** The season as solar longitude, above the time axis. Pure. */
import type { Layout } from 'plotly.js-dist-min';
import { radiansPerDegree } from '../../sim/constants.ts';
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { TimeUnit } from '../words/number.ts';
import type { FigureStyle } from './figure.ts';
import type { Span } from './orbitSpan.ts';
import { multiples, roomyTicks } from './roomyTicks.ts';
import { type TopTicks, topAxisLayout } from './topAxis.ts';
import { values } from './variables.ts';

/** Solar longitude through a span, in degrees, running on past 360 so that it increases. */
export interface Seasons {
  readonly time: readonly number[];
  readonly longitudeDeg: readonly number[];
}

export function seasonsOf(dataset: Dataset, span: Span, unit: TimeUnit): Seasons {
  const longitude = values(dataset, 'solarLongitude');
  let turns = 0;
  const longitudeDeg = span.rows.map((row, at) => {
    const before = at === 0 ? 0 : longitude[span.rows[at - 1]!]!;
    if (longitude[row]! < before - Math.PI) turns++;
    return longitude[row]! / radiansPerDegree + 360 * turns;
  });
  return { time: span.time.map((t) => t / unit.seconds), longitudeDeg };
}

/** Solar longitude at a time of the first axis, 0 … 360. */
export function seasonAt({ time, longitudeDeg }: Seasons, at: number): number {
  const after = Math.min(
    time.length - 1,
    Math.max(
      1,
      time.findIndex((t) => t >= at),
    ),
  );
  const share = (at - time[after - 1]!) / (time[after]! - time[after - 1]!);
  return onCircle(longitudeDeg[after - 1]! + share * (longitudeDeg[after]! - longitudeDeg[after - 1]!));
}

/** Equinoxes and solstices before all others. */
const steps = [90, 30, 10, 5, 1];

/** Ticks for the times in view; `room` is the share of the view's length that a tick needs. */
export function seasonTicks(
  { time, longitudeDeg }: Seasons,
  [from, to]: readonly [number, number],
  room: number,
): TopTicks {
  const [first, last] = [longitudeDeg[0]!, longitudeDeg.at(-1)!];
  const ticks = roomyTicks({
    levels: steps.map((step) => multiples(step, first, last)),
    place: (value) => {
      const at = timeOf(value, time, longitudeDeg);
      return at >= from && at <= to ? at : null;
    },
    gap: room * (to - from),
    enough: Math.floor(0.5 / room),
  });
  return {
    places: ticks.map(({ place }) => place),
    labels: ticks.map(({ value }) => `${onCircle(value)}°`),
  };
}

/** By straight lines between rows. */
function timeOf(longitude: number, time: readonly number[], longitudes: readonly number[]): number {
  const after = Math.max(
    1,
    longitudes.findIndex((value) => value >= longitude),
  );
  const [left, right] = [longitudes[after - 1]!, longitudes[after]!];
  const share = right > left ? (longitude - left) / (right - left) : 0;
  return time[after - 1]! + share * (time[after]! - time[after - 1]!);
}

/** For `layout.xaxis2`. */
export function seasonAxisLayout(
  seasons: Seasons,
  range: readonly [number, number],
  style: FigureStyle,
): Partial<Layout['xaxis']> {
  const ticks = seasonTicks(seasons, range, style.narrow ? 0.13 : 0.055);
  return {
    ...topAxisLayout(ticks, range, style),
    title: { text: title(style), standoff: 6, font: { color: style.theme.quiet, size: 12 } },
  };
}

function title({ narrow }: FigureStyle): string {
  return `Solar longitude L<sub>s</sub>${narrow ? '' : ' (0°: northern spring equinox)'}`;
}

function onCircle(degrees: number): number {
  return ((degrees % 360) + 360) % 360;
}
