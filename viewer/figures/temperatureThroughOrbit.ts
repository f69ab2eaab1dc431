/** Figure: temperature through one orbit, every periodic state beside its steady value. Pure. */
import { answerFor } from '../words/answer.ts';
import { type Column, columnName, commonTimeUnit, periodOf } from '../words/columns.ts';
import { hasLatitude } from '../words/latitude.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { momentsAlong, temperatureAt } from './moments.ts';
import { allEqual, type OrbitAxis, orbitAxis } from './orbitAxis.ts';
import { plainReading } from './reading.ts';
import { type Moment, type TemperatureChart, temperatureFigure } from './temperatureChart.ts';

/** Columns of periodic states only; at least one. `originals` are what some of them were: thin lines beside. */
export function temperatureThroughOrbit(
  columns: readonly Column[],
  style: FigureStyle,
  originals: readonly Column[] = [],
): Figure {
  const { axis: wanted } = style.reading ?? plainReading;
  const axis = orbitAxis(wanted, [...columns, ...originals]);
  const lineOf = (column: Column) => ({ column, span: axis.span(column) });
  const chart: TemperatureChart = {
    lines: columns.map(lineOf),
    originals: originals.map(lineOf),
    from: axis.from,
    to: axis.to,
    unit: axis.unit,
    timeTitle: axis.title,
    moments: momentsOn(axis, columns),
    zeroDate: axis.zeroDate,
    datesBelow: axis.name === 'date',
    style,
  };
  const figure = temperatureFigure(chart, {
    name: 'temperature-through-the-orbit',
    title: columns.some(hasLatitude) ? 'Area-mean temperature through the orbit' : 'Temperature through the orbit',
    textAlternative: columns
      .map((column) => `${columnName(column)}: ${answerFor(column, commonTimeUnit(columns))}`)
      .join(' '),
    caption: [caption(columns, axis), ...(originals.length > 0 ? [thinLines] : [])].join(' '),
  });
  return { ...figure, moments: momentsAlong(columns, axis.span, axis.unit.seconds, temperatureAt) };
}

const thinLines = 'Thin: the same cases before their numbers were moved.';

/** Periapsis is zero on every axis but that of seasons, where it may be anywhere. */
export function momentsOn(axis: OrbitAxis, columns: readonly Column[]): readonly Moment[] {
  const places = columns.map((column) => {
    const { time, rows } = axis.span(column);
    return time[rows.indexOf(0, 1)] ?? 0; // the first point may stand a turn away
  });
  const isShared = axis.name !== 'solarLongitude' || places.every((place) => Math.abs(place - places[0]!) < 1e-6);
  const periapsis = axis.name === 'solarLongitude' ? places[0]! : 0;
  return [
    ...(isShared ? [{ at: periapsis, label: 'periapsis', strong: true }] : []),
    ...(axis.apoapsis === null ? [] : [{ at: axis.apoapsis, label: 'apoapsis', strong: false }]),
  ];
}

function caption(columns: readonly Column[], { name }: OrbitAxis): string {
  const periods = columns.map(periodOf);
  const span =
    name === 'trueAnomaly'
      ? 'One whole orbit, from apoapsis to apoapsis.'
      : name === 'solarLongitude'
        ? 'One whole orbit, from one northern spring equinox to the next.'
        : allEqual(periods) || name === 'phase'
          ? 'One whole orbit, from a quarter before periapsis.'
          : 'One whole orbit of each case, from a quarter of it before periapsis; the cases have different periods.';
  if (columns.some(hasLatitude)) {
    return `${span} Solid: the temperature, as its mean over the area. Dashed: the steady value, the temperature that would emit at once what the area absorbs and what comes from inside.`;
  }
  return `${span} Solid: the temperature with its heat store. Dashed: the steady value, what a surface without heat store would have at that moment.`;
}
