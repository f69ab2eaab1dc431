/** Figure: how far the temperature of each state is from that of one case, at the same place of the orbit. Pure. */
import { type Column, columnName } from '../words/columns.ts';
import { fixed, nbsp } from '../words/number.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { type ChartLine, traceOf } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { namesBesideLines } from './lineNames.ts';
import { momentsAlong } from './moments.ts';
import { orbitAxis } from './orbitAxis.ts';
import { plainLabel } from './plainLabel.ts';
import { plainReading } from './reading.ts';
import { stateLook } from './temperatureLines.ts';
import { throughOrbit } from './throughOrbit.ts';
import { values } from './variables.ts';
import type { View } from './view.ts';

const plotHeight = { wide: 400, narrow: 300 };

/** Periodic columns; `reference` is one of them. Each is compared at equal shares of its own period. */
export function temperatureDifference(columns: readonly Column[], reference: Column, style: FigureStyle): Figure {
  const axis = orbitAxis((style.reading ?? plainReading).axis, columns);
  const others = columns.filter((column) => column !== reference);
  const lines = others.map((column): ChartLine => {
    const { time, rows } = axis.span(column);
    const anomaly = values(column.dataset, 'meanAnomaly');
    const apart = difference(column, reference);
    const x = time.map((t) => t / axis.unit.seconds);
    return { ...stateLook(column, style.theme), x, y: rows.map((row) => apart(anomaly[row]! / turn)) };
  });
  const name = columnName(reference);
  const all = lines.flatMap(({ y }) => y);
  const [low, high] = [Math.min(0, ...all), Math.max(0, ...all)];
  const air = Math.max(0.5, 0.06 * (high - low));
  const view: View = style.view ?? {
    x: [axis.from / axis.unit.seconds, axis.to / axis.unit.seconds],
    y: [low - air, high + air],
  };
  return {
    name: 'temperature-difference-through-the-orbit',
    title: `Temperature minus that of “${name}”`,
    textAlternative: lines.map((line) => finding(line)).join(' '),
    caption: `At equal shares of the period after periapsis, from a quarter of it before. Above zero: warmer than “${name}”.`,
    lines,
    data: lines.map((line) => traceOf(line, '%{y:+.1f} K')),
    layout: layoutOf(lines, view, axis.title, name, style),
    moments: momentsAlong(others, axis.span, axis.unit.seconds, (column) => difference(column, reference)),
  };
}

const turn = 2 * Math.PI;

/** How far a column is from the reference, at a share of the period. */
function difference(column: Column, reference: Column): (share: number) => number {
  const [own, other] = [column, reference].map(({ dataset }) => throughOrbit(dataset, 'temperature'));
  return (share) => own!(turn * share) - other!(turn * share);
}

function layoutOf(
  lines: readonly ChartLine[],
  view: View,
  axisTitle: string,
  name: string,
  style: FigureStyle,
): Figure['layout'] {
  const { narrow, theme } = style;
  const height = narrow ? plotHeight.narrow : plotHeight.wide;
  const margin = narrow ? { l: 56, r: 12, t: 30, b: 46 } : { l: 64, r: 224, t: 34, b: 50 };
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'x unified',
    xaxis: {
      ...axisStyle(style),
      title: { text: axisTitle, standoff: 8 },
      range: [...view.x],
      nticks: narrow ? 5 : 10,
      showgrid: false,
    },
    yaxis: {
      ...axisStyle(style),
      title: { text: narrow ? 'Difference (K)' : `Temperature minus “${plainLabel(name, 24)}” (K)`, standoff: 10 },
      range: [...view.y],
      gridcolor: theme.hairline,
      zeroline: true,
      zerolinecolor: theme.ink,
      zerolinewidth: 1,
    },
    annotations: narrow ? [] : namesBesideLines(lines, view, height, style),
  };
}

function finding({ plainName, y }: ChartLine): string {
  const [low, high] = [Math.min(...y), Math.max(...y)];
  return `${plainName}: from ${signed(low)} to ${signed(high)}.`;
}

function signed(value: number): string {
  return `${value > 0 ? '+' : ''}${fixed(value, 1)}${nbsp}K`;
}
