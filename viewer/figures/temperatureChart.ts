/** Temperature against time: what the chart of one orbit and that of a run from a start have in common. Pure. */
import type { Layout } from 'plotly.js-dist-min';
import type { Seconds, TdbSeconds } from '../../sim/si.ts';
import { findingValue } from '../words/columns.ts';
import { list } from '../words/number.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { type ChartLine, traceOf } from './chartLine.ts';
import { type DateAxis, dateAxisLayout, dateTicks } from './dateAxis.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { namesBesideLines } from './lineNames.ts';
import type { AxisUnit } from './orbitAxis.ts';
import { originalLine, type TemperatureLine, temperatureLines } from './temperatureLines.ts';
import { topAxisAnchor } from './topAxis.ts';
import { extremes } from './variables.ts';
import type { View } from './view.ts';
import {
  barRowHeight,
  type Drawing,
  type Frame,
  instellationBars,
  instellationRows,
  isShown,
  temperatureBands,
} from './windowBands.ts';
import { distinctWindows } from './windowSpans.ts';

/** A moment worth a vertical line. */
export interface Moment {
  readonly at: Seconds;
  readonly label: string;
  readonly strong: boolean;
}

export interface TemperatureChart {
  readonly lines: readonly TemperatureLine[];
  /** What some of the lines were before: thin, and named by hovering alone. */
  readonly originals?: readonly TemperatureLine[];
  readonly from: Seconds;
  readonly to: Seconds;
  readonly unit: AxisUnit;
  readonly timeTitle: string;
  readonly moments: readonly Moment[];
  /** Date of zero on the time axis, where it is known. */
  readonly zeroDate: TdbSeconds | null;
  /** Dates stand at the foot instead of the numbers, and no second axis above. */
  readonly datesBelow?: boolean;
  readonly style: FigureStyle;
}

const plotHeight = { wide: 400, narrow: 300 };

export function temperatureFigure(
  chart: TemperatureChart,
  words: Pick<Figure, 'name' | 'title' | 'textAlternative' | 'caption'>,
): Figure {
  const { unit, style, originals = [] } = chart;
  const lines = temperatureLines(chart.lines, unit, style.theme);
  const whole = temperatureFrame([...chart.lines, ...originals]);
  const view = style.view ?? {
    x: [chart.from / unit.seconds, chart.to / unit.seconds],
    y: [whole.low, whole.high],
  };
  const before = originals.map((line) => originalLine(line, unit, style.theme));
  const traces = [...before, ...lines].map((line) => traceOf(line, '%{y:.1f} K'));
  const layout = temperatureLayout(chart, lines, view);
  const dates = chart.zeroDate === null ? null : { zero: chart.zeroDate, unit, atMost: style.narrow ? 3 : 7 };
  return {
    ...words,
    caption: [words.caption, ...windowWords(chart, whole)].join(' '),
    lines,
    data: dates && !chart.datesBelow ? [...traces, topAxisAnchor('dates', view.x[0], view.y[0])] : traces,
    layout: dates ? withDates(chart, layout, dates, view) : layout,
  };
}

function withDates(
  { datesBelow, style }: TemperatureChart,
  layout: Partial<Layout>,
  dates: DateAxis,
  view: View,
): Partial<Layout> {
  if (!datesBelow) return { ...layout, xaxis2: dateAxisLayout(dates, view.x, style) };
  const { places, labels } = dateTicks(dates, view.x[0], view.x[1]);
  const ticks = { tickmode: 'array', tickvals: places, ticktext: labels } as const;
  return { ...layout, xaxis: { ...layout.xaxis, ...ticks, title: { text: 'Date (UTC)', standoff: 8 } } };
}

/** The range of temperatures shown: every line and the textbook values, with a little air; windows do not stretch it. */
export function temperatureFrame(lines: readonly TemperatureLine[]): Frame {
  const seen = lines.flatMap(({ column }) => [
    ...extremes(column.dataset, 'temperature'),
    ...extremes(column.dataset, 'steadyTemperature'),
    ...[findingValue(column, 'equilibriumTemperature')].filter((value) => value !== null),
  ]);
  const [low, high] = [Math.min(...seen), Math.max(...seen)];
  const air = Math.max(1, 0.06 * (high - low));
  return { low: Math.max(0, low - air), high: high + air };
}

function temperatureLayout(chart: TemperatureChart, lines: readonly ChartLine[], view: View): Partial<Layout> {
  const { style, unit } = chart;
  const { theme, narrow } = style;
  const rows = instellationRows(chart.lines, style);
  const height = narrow ? plotHeight.narrow : plotHeight.wide;
  const below = rows.length * barRowHeight;
  const total = height + below;
  const margin = margins(style);
  const topNames = chart.moments.map(({ at, label }) => ({ text: label, x: at / unit.seconds }));
  const drawings = [
    temperatureBands(temperatureWindows(chart), { lines, topNames, view, height }, style),
    instellationBars(rows, total, unit, style),
    momentLines(chart),
  ];
  return {
    height: total + margin.t + margin.b,
    margin,
    ...plainLayout(style),
    hovermode: 'x unified',
    xaxis: {
      ...axisStyle(style),
      title: { text: chart.timeTitle, standoff: 8 },
      range: [...view.x],
      anchor: 'free',
      position: 0,
      nticks: narrow ? 5 : 10,
      unifiedhovertitle: { text: `%{x:.4~g}${unit.symbol === '°' ? '' : ' '}${unit.symbol}` },
      showgrid: false,
    },
    yaxis: {
      ...axisStyle(style),
      title: { text: 'Temperature (K)', standoff: 10 },
      range: [...view.y],
      domain: [below / total, 1],
      gridcolor: theme.hairline,
    },
    shapes: drawings.flatMap(({ shapes }) => shapes),
    annotations: [
      ...drawings.flatMap(({ annotations }) => annotations),
      ...(narrow ? [] : namesBesideLines(lines, view, height, style)),
    ],
  };
}

function momentLines({ moments, unit, style }: TemperatureChart): Drawing {
  const { theme } = style;
  return {
    shapes: moments.map(({ at, label, strong }) => ({
      type: 'line',
      name: label,
      xref: 'x',
      x0: at / unit.seconds,
      x1: at / unit.seconds,
      yref: 'paper',
      y0: 0,
      y1: 1,
      line: { color: strong ? theme.ink : theme.bandEdge, width: 1, dash: strong ? 'solid' : 'dot' },
      layer: 'below',
    })),
    annotations: moments
      .filter(({ label }) => label !== '')
      .map(({ at, label, strong }) => ({
        text: strong ? `<b>${label}</b>` : label,
        showarrow: false,
        font: { color: strong ? theme.ink : theme.quiet, size: 12 },
        x: at / unit.seconds,
        xref: 'x',
        xanchor: 'left',
        xshift: 2,
        y: 1,
        yref: 'paper',
        yanchor: 'top',
      })),
  };
}

function temperatureWindows({ lines }: TemperatureChart): ReturnType<typeof distinctWindows> {
  return distinctWindows(
    lines.map(({ column }) => column),
    'temperature',
  );
}

/** What the caption says of windows: what the shading is, and which lie outside the temperatures shown. */
function windowWords(chart: TemperatureChart, frame: Frame): string[] {
  const windows = temperatureWindows(chart);
  const hidden = windows.filter((window) => !isShown(window, frame)).map(({ name }) => `“${name}”`);
  const hasBars = instellationRows(chart.lines, chart.style).length > 0;
  return [
    ...(windows.length > hidden.length ? ['Shaded: temperature windows.'] : []),
    ...(hasBars ? ['Bars under the chart: when the instellation lies within a window.'] : []),
    ...(hidden.length > 0 ? [`Outside the temperatures shown: ${list(hidden)}.`] : []),
  ];
}

function margins({ narrow }: FigureStyle): { l: number; r: number; t: number; b: number } {
  return narrow ? { l: 56, r: 12, t: 30, b: 46 } : { l: 64, r: 224, t: 34, b: 50 };
}
