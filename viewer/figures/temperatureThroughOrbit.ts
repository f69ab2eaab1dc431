/** Figure: temperature through one orbit, every periodic state beside its steady value. Pure. */
import type { Seconds } from '../../sim/si.ts';
import { answerFor } from '../words/answer.ts';
import { type Column, columnName, commonTimeUnit, periodOf } from '../words/columns.ts';
import { hasLatitude } from '../words/latitude.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { orbitSpan, quarterBefore } from './orbitSpan.ts';
import { type Moment, type TemperatureChart, temperatureFigure } from './temperatureChart.ts';
import type { TemperatureLine } from './temperatureLines.ts';

/** Columns of periodic states only; at least one. `originals` are what some of them were: thin lines beside. */
export function temperatureThroughOrbit(
  columns: readonly Column[],
  style: FigureStyle,
  originals: readonly Column[] = [],
): Figure {
  const periods = columns.map(periodOf);
  const longest = Math.max(...periods);
  const unit = commonTimeUnit(columns);
  const chart: TemperatureChart = {
    lines: columns.map(lineOf),
    originals: originals.map(lineOf),
    from: -quarterBefore * longest,
    to: (1 - quarterBefore) * longest,
    unit,
    timeTitle: `Time after periapsis (${unit.symbol})`,
    moments: [{ at: 0, label: 'periapsis', strong: true }, ...apoapsis(periods)],
    zeroDate: sharedDate(columns, periods),
    style,
  };
  return temperatureFigure(chart, {
    name: 'temperature-through-the-orbit',
    title: columns.some(hasLatitude) ? 'Area-mean temperature through the orbit' : 'Temperature through the orbit',
    textAlternative: columns.map((column) => `${columnName(column)}: ${answerFor(column, unit)}`).join(' '),
    caption: [caption(columns, periods), ...(originals.length > 0 ? [thinLines] : [])].join(' '),
  });
}

const thinLines = 'Thin: the same cases before their numbers were moved.';

function lineOf(column: Column): TemperatureLine {
  return { column, span: orbitSpan(column.dataset, periodOf(column)) };
}

/** Half an orbit after periapsis, where every case agrees on it. */
function apoapsis(periods: readonly Seconds[]): readonly Moment[] {
  return allEqual(periods) ? [{ at: periods[0]! / 2, label: 'apoapsis', strong: false }] : [];
}

/** The date of periapsis, where every case has the same one and the same period. */
function sharedDate(columns: readonly Column[], periods: readonly Seconds[]): number | null {
  const dates = columns.map(({ periapsisTime }) => periapsisTime);
  return allEqual(periods) && dates.every((date) => date === dates[0]) ? dates[0]! : null;
}

function allEqual(periods: readonly Seconds[]): boolean {
  return periods.every((period) => Math.abs(period - periods[0]!) <= 1e-9 * periods[0]!);
}

function caption(columns: readonly Column[], periods: readonly Seconds[]): string {
  const span = allEqual(periods)
    ? 'One whole orbit, from a quarter before periapsis.'
    : 'One whole orbit of each case, from a quarter of it before periapsis; the cases have different periods.';
  if (columns.some(hasLatitude)) {
    return `${span} Solid: the temperature, as its mean over the area. Dashed: the steady value, the temperature that would emit at once what the area absorbs and what comes from inside.`;
  }
  return `${span} Solid: the temperature with its heat store. Dashed: the steady value, what a surface without heat store would have at that moment.`;
}
