/** Windows drawn: temperature windows as bands across the chart, instellation windows as bars of time beneath it. Pure. */
import type { Annotation, Shape } from 'plotly.js-dist-min';
import type { Window } from '../../sim/world.ts';
import type { FigureStyle } from './figure.ts';
import { type Course, freeCorner } from './freeCorner.ts';
import type { AxisUnit } from './orbitAxis.ts';
import { plainLabel } from './plainLabel.ts';
import type { TemperatureLine } from './temperatureLines.ts';
import { caseColour } from './theme.ts';
import type { View } from './view.ts';
import { distinctWindows, type Stretch, stretchesInside } from './windowSpans.ts';

export interface Drawing {
  readonly shapes: Partial<Shape>[];
  readonly annotations: Partial<Annotation>[];
}

export interface Frame {
  readonly low: number;
  readonly high: number;
}

/** What the bands share a chart with. */
export interface Surround {
  readonly lines: readonly Course[];
  /** Written at the upper edge, to the right of where it begins. */
  readonly topNames: readonly { readonly text: string; readonly x: number }[];
  readonly view: View;
  /** Pixels that stand for the view's height. */
  readonly height: number;
}

/** Bands, named inside where the frame shows them, each name where it meets the fewest lines. */
export function temperatureBands(windows: readonly Window[], surround: Surround, style: FigureStyle): Drawing {
  return {
    shapes: windows.map((window) => ({
      type: 'rect',
      name: plainLabel(window.name),
      xref: 'paper',
      x0: 0,
      x1: 1,
      yref: 'y',
      y0: window.from,
      y1: window.to,
      fillcolor: style.theme.band,
      line: { color: style.theme.bandEdge, width: 0.75 },
      layer: 'below',
    })),
    annotations: windows
      .filter((window) => isShown(window, frameOf(surround.view)))
      .map((window) => bandName(window, surround, style)),
  };
}

function bandName(window: Window, surround: Surround, style: FigureStyle): Partial<Annotation> {
  const { lines, topNames, view, height } = surround;
  const frame = frameOf(view);
  const label = plainLabel(window.name, longestName(style));
  const low = Math.max(window.from, frame.low);
  const high = Math.min(window.to, frame.high);
  const plotWidth = style.narrow ? 300 : 800;
  const widthOf = (text: string): number => ((text.length * letterWidth) / plotWidth) * (view.x[1] - view.x[0]);
  const labelHeight = (lineHeight / height) * (frame.high - frame.low);
  const top = frame.high - labelHeight / 2;
  const names = topNames.map(({ text, x }): Course => ({ x: [x, x + widthOf(text)], y: [top, top] }));
  const band = { left: view.x[0], right: view.x[1], low, high };
  const { side, edge } = freeCorner([...lines, ...names], band, widthOf(label), labelHeight);
  return {
    ...quietText(label, style, side),
    y: edge === 'top' ? high : low,
    yref: 'y',
    yanchor: edge,
  };
}

function frameOf({ y: [low, high] }: View): Frame {
  return { low, high };
}

export function isShown(window: Window, { low, high }: Frame): boolean {
  return window.to > low && window.from < high;
}

/** A row of bars: when the instellation lies inside one window. */
export interface BarRow {
  readonly name: string;
  readonly colour: string;
  readonly stretches: readonly Stretch[];
}

/** One row a window where all cases agree on the times, otherwise one a case. */
export function instellationRows(lines: readonly TemperatureLine[], { theme }: FigureStyle): BarRow[] {
  const columns = lines.map(({ column }) => column);
  return distinctWindows(columns, 'instellation').flatMap((window) => {
    const rows = lines
      .filter(({ column }) => column.stateIndex === 0 && column.windows.some((own) => sameWindow(own, window)))
      .map(({ column, span }) => ({
        name: `${window.name}: ${column.caseName}`,
        colour: caseColour(theme, column.caseIndex),
        stretches: stretchesInside(column.dataset, span, window),
      }));
    const length = Math.max(...lines.map(({ span }) => span.time.at(-1)! - span.time[0]!));
    const agree = rows.every(({ stretches }) => sameStretches(stretches, rows[0]!.stretches, length));
    return agree ? [{ ...rows[0]!, name: window.name, colour: theme.bandEdge }] : rows;
  });
}

export const barRowHeight = 28;

/** `total` is the height in pixels of bars and chart together. */
export function instellationBars(rows: readonly BarRow[], total: number, unit: AxisUnit, style: FigureStyle): Drawing {
  const foot = (row: number): number => ((rows.length - 1 - row) * barRowHeight + 4) / total;
  return {
    shapes: rows.flatMap(({ name, colour, stretches }, row) =>
      stretches.map(({ from, to }) => ({
        type: 'rect',
        name: plainLabel(name),
        xref: 'x',
        x0: from / unit.seconds,
        x1: to / unit.seconds,
        yref: 'paper',
        y0: foot(row),
        y1: foot(row) + 6 / total,
        fillcolor: colour,
        line: { width: 0 },
      })),
    ),
    annotations: rows.map(({ name }, row) => ({
      ...quietText(plainLabel(`instellation in “${name}”`, longestName(style)), style, 'left'),
      y: foot(row) + 6 / total,
      yref: 'paper',
      yanchor: 'bottom',
    })),
  };
}

/** Rough size of the small letters on a chart, in pixels. */
const letterWidth = 7;
const lineHeight = 20;

function longestName({ narrow }: FigureStyle): number {
  return narrow ? 30 : 60;
}

function quietText(label: string, { theme }: FigureStyle, side: 'left' | 'right'): Partial<Annotation> {
  return {
    text: label,
    showarrow: false,
    font: { color: theme.quiet, size: 12 },
    x: side === 'left' ? 0 : 1,
    xref: 'paper',
    xanchor: side,
    xshift: side === 'left' ? 4 : -4,
  };
}

function sameWindow(a: Window, b: Window): boolean {
  return a.of === b.of && a.name === b.name && a.from === b.from && a.to === b.to;
}

/** To within a ten-millionth of the axis or a millionth of itself, so that rounding does not draw the same bar twice. */
function sameStretches(a: readonly Stretch[], b: readonly Stretch[], length: number): boolean {
  const close = (one: number, other: number): boolean =>
    Math.abs(one - other) <= Math.max(1e-7 * length, 1e-6 * Math.max(Math.abs(one), Math.abs(other)));
  return a.length === b.length && a.every((s, index) => close(s.from, b[index]!.from) && close(s.to, b[index]!.to));
}
