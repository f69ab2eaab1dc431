/** A line of a chart, from which its trace, its label beside the line and its legend entry are all made. Pure. */
import type { Data, ScatterData } from 'plotly.js-dist-min';
import type { CaseMarker } from './theme.ts';
import type { View } from './view.ts';

export type Dash = 'solid' | 'dash' | 'dot' | 'dashdot';

/** How a line looks, wherever a sample of it stands. */
export interface LineLook {
  readonly colour: string;
  readonly dash: Dash;
  readonly marker: Marker | null;
  /** The colour of a map on which it lies. */
  readonly ground?: string;
  /** Edge that sets it off from the ground. */
  readonly casing?: string;
}

/** An entry of a legend. */
export interface LegendLine extends LineLook {
  /** As a reader sees it. */
  readonly plainName: string;
}

export interface ChartLine extends LegendLine {
  /** The same, safe as a Plotly label. */
  readonly name: string;
  /** The same, short enough to stand beside the line. */
  readonly shortName: string;
  readonly x: number[];
  readonly y: number[];
  readonly width: number;
  /** A line to compare with: the signs of the states that it belongs to, none where it belongs to all; null for a state. */
  readonly referenceFor: readonly Owner[] | null;
}

export interface Marker {
  readonly shape: CaseMarker;
  readonly open: boolean;
}

export interface Owner {
  readonly marker: Marker;
  readonly colour: string;
}

const glyphs = { circle: '●', square: '■', 'triangle-up': '▲', diamond: '◆', cross: '✚', star: '★', hexagon: '⬢' };
const openGlyphs = { circle: '○', square: '□', 'triangle-up': '△', diamond: '◇', cross: '✛', star: '☆', hexagon: '⬡' };

/** How many markers a line carries: enough to tell lines apart, too few to read as measurements. */
const markersShown = 14;

export function traceOf(line: ChartLine, hovertemplate: string): Data {
  const { marker, colour } = line;
  const drawn: Partial<ScatterData> = {
    type: 'scatter',
    name: line.name,
    x: line.x,
    y: line.y,
    line: { color: colour, width: line.width, dash: line.dash },
    hovertemplate,
  };
  if (marker === null) return { ...drawn, mode: 'lines' };
  const symbol = marker.open ? (`${marker.shape}-open` as const) : marker.shape;
  return { ...drawn, mode: 'lines+markers', marker: { symbol, size: 8, color: colour, maxdisplayed: markersShown } };
}

/** A marker as a character. */
export function glyph({ shape, open }: Marker): string {
  return (open ? openGlyphs : glyphs)[shape];
}

/** Where the line leaves the view on the right, or ends within it; null where it does so out of sight. */
export function lastInView(
  { x, y }: { readonly x: readonly number[]; readonly y: readonly number[] },
  view: View,
): number | null {
  const [left, right] = view.x;
  const beyond = x.findIndex((at) => at > right);
  const last = beyond < 0 ? x.length - 1 : beyond;
  if (last === 0 || x[last]! < left) return null;
  const share = Math.min(1, (right - x[last - 1]!) / (x[last]! - x[last - 1]!));
  const value = y[last - 1]! + share * (y[last]! - y[last - 1]!);
  return value >= view.y[0] && value <= view.y[1] ? value : null;
}
