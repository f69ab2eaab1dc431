/** An axis of a grid as Plotly sets it. Pure. */
import type { Layout } from 'plotly.js-dist-min';
import type { GridAxis } from '../../sim/studies/grid/gridReport.ts';
import { axisTitle } from '../words/along.ts';
import { axisPlace, rangeOf } from '../words/gridAxes.ts';
import { axisStyle } from './chartLayout.ts';
import type { FigureStyle } from './figure.ts';
import { plainLabel } from './plainLabel.ts';

export function gridAxisLayout(
  axis: GridAxis,
  range: readonly [number, number],
  style: FigureStyle,
): Partial<Layout['xaxis']> {
  return {
    ...axisStyle(style),
    type: axis.log ? 'log' : 'linear',
    title: { text: plainLabel(axisTitle(rangeOf(axis)), 60), standoff: 8 },
    range: [...range],
    nticks: style.narrow ? 5 : 10,
    ...(axis.log && spansDecade(range) ? { dtick: decadeStep(range, style) } : {}),
    exponentformat: 'power',
    showgrid: false,
  };
}

/** Ends of an axis as places. */
export function axisRange(axis: GridAxis): [number, number] {
  return [axisPlace(axis, axis.nodes[0]!), axisPlace(axis, axis.nodes.at(-1)!)];
}

/** Values that bound the cells of the nodes: halfway between neighbours, and the outermost nodes themselves. */
export function cellEdges(axis: GridAxis): number[] {
  const places = Array.from(axis.nodes, (value) => axisPlace(axis, value));
  const between = places.slice(1).map((place, at) => (place + places[at]!) / 2);
  return [places[0]!, ...between, places.at(-1)!].map((place) => (axis.log ? 10 ** place : place));
}

function spansDecade([from, to]: readonly [number, number]): boolean {
  return Math.floor(to + 1e-9) - Math.ceil(from - 1e-9) >= 2;
}

function decadeStep([from, to]: readonly [number, number], { narrow }: FigureStyle): number {
  return Math.max(1, Math.ceil((to - from) / (narrow ? 5 : 10)));
}
