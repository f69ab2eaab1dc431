/** An axis of a grid as Plotly sets it. Pure. */
import type { Layout } from 'plotly.js-dist-min';
import type { GridAxis } from '../../sim/studies/grid/gridReport.ts';
import { axisTitle } from '../words/along.ts';
import { axisPlace, rangeOf } from '../words/gridAxes.ts';
import { exact, raised } from '../words/number.ts';
import { axisStyle } from './chartLayout.ts';
import type { FigureStyle } from './figure.ts';
import { logTicks } from './logTicks.ts';
import { plainLabel } from './plainLabel.ts';
import { multiples } from './roomyTicks.ts';

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
    ...(axis.log ? (spansDecades(range) ? decadeTicks(range, style) : logTicks(range, style.narrow ? 5 : 9)) : {}),
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

function spansDecades([from, to]: readonly [number, number]): boolean {
  return Math.floor(to + 1e-9) - Math.ceil(from - 1e-9) >= 2;
}

/** Powers of ten in letters of the common size; Plotly's own are a quarter larger. `range` is in powers. */
export function decadeTicks(
  [from, to]: readonly [number, number],
  { narrow }: FigureStyle,
): { tickmode: 'array'; tickvals: number[]; ticktext: string[] } {
  const step = Math.max(1, Math.ceil((to - from) / (narrow ? 5 : 10)));
  const powers = multiples(step, from, to);
  return {
    tickmode: 'array',
    tickvals: powers.map((power) => 10 ** power),
    ticktext: powers.map((power) => (Math.abs(power) < 3 ? exact(10 ** power) : `10${raised(power)}`)),
  };
}
