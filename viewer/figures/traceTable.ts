/** What the traces of a figure show, as a table: for figures whose builder gives none. Pure. */
import type { Layout } from 'plotly.js-dist-min';
import type { CsvValue } from '../words/csv.ts';
import type { Figure } from './figure.ts';
import { type FigureColumn, type FigureTable, words } from './figureTable.ts';
import { plainLabel } from './plainLabel.ts';

/** A trace as any kind of chart may have it. */
interface Trace {
  readonly type?: string;
  readonly name?: string;
  readonly mode?: string;
  readonly visible?: boolean | 'legendonly';
  readonly opacity?: number;
  readonly x?: ArrayLike<unknown>;
  readonly y?: ArrayLike<unknown>;
  readonly z?: ArrayLike<ArrayLike<unknown>>;
  readonly base?: number | ArrayLike<number>;
  readonly orientation?: string;
  readonly xaxis?: string;
  readonly yaxis?: string;
  readonly fill?: string;
  readonly hoverinfo?: string;
  readonly line?: { readonly color?: unknown; readonly width?: number };
  readonly marker?: {
    readonly opacity?: unknown;
    readonly size?: unknown;
    readonly color?: unknown;
    readonly colorbar?: ColourBar;
  };
  readonly colorbar?: ColourBar;
  readonly error_x?: Bars;
  readonly error_y?: Bars;
}

interface ColourBar {
  readonly title?: string | { readonly text?: string };
}

interface Bars {
  readonly array?: ArrayLike<number>;
  readonly arrayminus?: ArrayLike<number>;
  readonly symmetric?: boolean;
}

interface Axis {
  readonly type?: string;
  readonly title?: string | { readonly text?: string };
  readonly matches?: string;
}

/** Cells of one point, by the column that they belong to. */
type Point = readonly (readonly [FigureColumn, CsvValue])[];

const series = words('series');

export function traceTable(figure: Figure): FigureTable {
  const traces = withoutRepeats((figure.data as readonly Trace[]).filter(isShown));
  const points = traces.flatMap((trace, at) => {
    const before = traces.slice(0, at).filter(({ name }) => name === trace.name).length;
    const name: Point = [[series, seriesName(trace, before, figure)]];
    return pointsOf(trace, figure.layout).map((point): Point => [...name, ...point]);
  });
  const columns = new Map(points.flatMap((point) => point.map(([column]) => [keyOf(column), column])));
  const rows = points.map((point) => {
    const cells = new Map(point.map(([column, value]) => [keyOf(column), value]));
    return [...columns.keys()].map((key) => cells.get(key) ?? null);
  });
  return { columns: columns.size === 0 ? [series] : [...columns.values()], rows };
}

function keyOf({ name, unit }: FigureColumn): string {
  return `${name}\n${unit}`;
}

/** Not what only carries words, spans an axis, or shades. The lower edge of a band is unseen and yet a line of numbers. */
function isShown(trace: Trace, at: number, all: readonly Trace[]): boolean {
  const { visible, opacity, marker, mode, line, fill } = trace;
  if (visible === false || visible === 'legendonly' || opacity === 0 || marker?.opacity === 0) return false;
  if (mode === 'text' || fill === 'toself') return false;
  const isEdge = fill !== undefined || all[at + 1]?.fill === 'tonexty' || all[at + 1]?.fill === 'tonextx';
  return isEdge || !isTransparent(line?.color);
}

function isTransparent(colour: unknown): boolean {
  return typeof colour === 'string' && /^(?:transparent|rgba\(.*,\s*0(?:\.0*)?\))$/.test(colour);
}

/** A line drawn again as its own rim, or as contours of colours that are there, is the same data once more. */
function withoutRepeats(traces: readonly Trace[]): Trace[] {
  const places = ({ x, y, z, xaxis, yaxis }: Trace): string =>
    JSON.stringify(z === undefined ? [Array.from(x ?? []), Array.from(y ?? []), xaxis, yaxis] : rowsOf(z));
  const known = traces.map(places);
  return traces.filter((trace, at) => {
    if (trace.hoverinfo !== 'skip') return true; // two cases may well be alike
    const same = traces.filter((_, other) => known[other] === known[at]);
    return same.every(({ hoverinfo }) => hoverinfo === 'skip') && trace === same.at(-1);
  });
}

/** In full, where a legend knows it: labels are cut and written for Plotly. `before` tells apart what was cut to the same. */
function seriesName({ name = '' }: Trace, before: number, { lines }: Figure): string {
  const alike = lines.filter(({ plainName }) => plainLabel(plainName, 60) === name);
  return (alike[before] ?? alike[0])?.plainName ?? plain(name);
}

function pointsOf(trace: Trace, layout: Partial<Layout>): Point[] {
  const x = axisOf(trace.xaxis ?? 'x', layout);
  const y = axisOf(trace.yaxis ?? 'y', layout);
  return trace.z === undefined ? linePoints(trace, x, y) : gridPoints(trace, trace.z, x, y);
}

interface NamedAxis {
  readonly column: FigureColumn;
  readonly isLog: boolean;
}

function linePoints(trace: Trace, x: NamedAxis, y: NamedAxis): Point[] {
  const { marker, base, orientation } = trace;
  const isFlat = orientation === 'h';
  const count = Math.max(trace.x?.length ?? 0, trace.y?.length ?? 0);
  const colours = titled(marker?.colorbar?.title) ?? words('colour value');
  return Array.from({ length: count }, (_, at) => [
    [x.column, cell(trace.x?.[at])],
    [y.column, cell(trace.y?.[at])],
    ...(trace.type === 'bar' && base !== undefined ? span(trace, (isFlat ? x : y).column, at) : []),
    ...ends(trace.error_x, trace.x, x.column, at),
    ...ends(trace.error_y, trace.y, y.column, at),
    ...numberIn(marker?.size, words('size'), at),
    ...numberIn(marker?.color, colours, at),
  ]);
}

/** Where a floating bar begins and ends. */
function span({ base, orientation, x, y }: Trace, column: FigureColumn, at: number): Point {
  const from = typeof base === 'number' ? base : (base?.[at] ?? 0);
  const length = Number((orientation === 'h' ? x : y)?.[at]);
  return [
    [{ ...column, name: `${column.name} from` }, from],
    [{ ...column, name: `${column.name} to` }, from + length],
  ];
}

function ends(bars: Bars | undefined, middles: ArrayLike<unknown> | undefined, column: FigureColumn, at: number) {
  if (bars?.array === undefined) return [];
  const middle = Number(middles?.[at]);
  const below = bars.symmetric === false ? (bars.arrayminus ?? bars.array) : bars.array;
  return [
    [{ ...column, name: `${column.name} low` }, middle - below[at]!],
    [{ ...column, name: `${column.name} high` }, middle + bars.array[at]!],
  ] as const;
}

function numberIn(values: unknown, column: FigureColumn, at: number): Point {
  if (typeof values !== 'object' || values === null) return [];
  const value = (values as ArrayLike<unknown>)[at];
  return typeof value === 'number' ? [[column, value]] : [];
}

/** A row for each cell; where a map gives the edges of its cells, at their middles. */
function gridPoints(trace: Trace, z: ArrayLike<ArrayLike<unknown>>, x: NamedAxis, y: NamedAxis): Point[] {
  const rows = rowsOf(z);
  const across = placesOf(trace.x, rows[0]?.length ?? 0, x);
  const up = placesOf(trace.y, rows.length, y);
  const column = titled(trace.colorbar?.title) ?? words(plain(trace.name ?? 'value'));
  return rows.flatMap((row, at) =>
    row.map(
      (value, place): Point => [
        [x.column, across[place] ?? place],
        [y.column, up[at] ?? at],
        [column, cell(value)],
      ],
    ),
  );
}

function placesOf(values: ArrayLike<unknown> | undefined, count: number, { isLog }: NamedAxis): CsvValue[] {
  const given = Array.from(values ?? [], cell);
  if (given.length !== count + 1) return given;
  return given.slice(1).map((next, at) => {
    const [low, high] = [Number(given[at]), Number(next)];
    return isLog ? Math.sqrt(low * high) : (low + high) / 2;
  });
}

function rowsOf(z: ArrayLike<ArrayLike<unknown>>): unknown[][] {
  return Array.from(z, (row) => Array.from(row));
}

function cell(value: unknown): CsvValue {
  return typeof value === 'number' || typeof value === 'string' ? value : null;
}

/** Panels that zoom together say once what their axis is. */
function axisOf(id: string, layout: Partial<Layout>): NamedAxis {
  const axes = layout as Readonly<Record<string, Axis | undefined>>;
  const named = (axis: string): Axis | undefined => axes[`${axis[0]}axis${axis.slice(1)}`];
  const own = named(id);
  const root = own?.matches ?? id;
  const family = Object.entries(axes).flatMap(([key, axis]) =>
    key.startsWith(`${id[0]}axis`) && axis?.matches === root ? [axis] : [],
  );
  const title = [own, named(root), ...family].flatMap((axis) => titled(axis?.title) ?? [])[0];
  return { column: title ?? words(id[0]!), isLog: own?.type === 'log' };
}

/** `Temperature (K)` → the name and the unit; null where nothing is written. */
function titled(title: Axis['title']): FigureColumn | null {
  const text = plain((typeof title === 'string' ? title : title?.text) ?? '');
  const [, name, unit] = /^(.*\S)\s*\(([^()]*)\)$/.exec(text) ?? [];
  if (name !== undefined && unit !== undefined) return { name, unit };
  return text === '' ? null : words(text);
}

/** A label as text: markup taken away, what stood for its signs put back. */
function plain(label: string): string {
  return label
    .replaceAll(/<br>/g, ' ')
    .replaceAll(/<[^>]*>/g, '')
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&amp;', '&')
    .trim();
}
