/** Periapsis and apoapsis in a panel whose axis is the share of the orbit. Pure. */
import type { Annotation, Shape } from 'plotly.js-dist-min';
import type { FigureStyle } from './figure.ts';
import type { Panel } from './panels.ts';

const apsidesAt = [
  { at: 0, label: 'periapsis', strong: true },
  { at: 0.5, label: 'apoapsis', strong: false },
] as const;

export function apsides(panel: Panel, { theme }: FigureStyle): Partial<Shape>[] {
  return apsidesAt.map(({ at, label, strong }) => ({
    type: 'line',
    name: label,
    xref: panel.x,
    x0: at,
    x1: at,
    yref: `${panel.y} domain` as 'y',
    y0: 0,
    y1: 1,
    line: { color: strong ? theme.ink : theme.bandEdge, width: 1, dash: strong ? 'solid' : 'dot' },
    layer: 'below',
  }));
}

export function apsisNames(panel: Panel, { theme }: FigureStyle): Partial<Annotation>[] {
  return apsidesAt.map(({ at, label, strong }) => ({
    text: strong ? `<b>${label}</b>` : label,
    showarrow: false,
    font: { color: strong ? theme.ink : theme.quiet, size: 12 },
    x: at,
    xref: panel.x,
    xanchor: 'left',
    xshift: 2,
    y: panel.yDomain[1],
    yref: 'paper',
    yanchor: 'top',
  }));
}
