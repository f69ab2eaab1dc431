/** A second axis above a chart, zooming with the first: the same times in other words. Pure. */
import type { Data, Layout } from 'plotly.js-dist-min';
import type { FigureStyle } from './figure.ts';

/** Places in the first axis's own unit, and the words there. */
export interface TopTicks {
  readonly places: number[];
  readonly labels: string[];
}

/** For `layout.xaxis2`. */
export function topAxisLayout(
  { places, labels }: TopTicks,
  range: readonly [number, number],
  { theme }: FigureStyle,
): Partial<Layout['xaxis']> {
  return {
    overlaying: 'x',
    matches: 'x',
    side: 'top',
    anchor: 'free',
    position: 1,
    range: [...range],
    tickmode: 'array',
    tickvals: places,
    ticktext: labels,
    ticks: 'outside',
    ticklen: 5,
    tickcolor: theme.quiet,
    tickfont: { color: theme.quiet, size: 12 },
    linecolor: theme.hairline,
    showline: true,
    showgrid: false,
    zeroline: false,
  };
}

/** Plotly draws an axis only where some trace stands on it: one invisible point. */
export function topAxisAnchor(name: string, x: number, y: number): Data {
  return {
    type: 'scatter',
    mode: 'markers',
    name,
    x: [x],
    y: [y],
    xaxis: 'x2',
    marker: { opacity: 0 },
    hoverinfo: 'skip',
  };
}
