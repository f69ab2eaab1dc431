/** The lines of an orbit's drawing: circles of equal distance, apsides, line of sight, the star's disc. Pure. */
import type { Annotation, Shape } from 'plotly.js-dist-min';
import type { Radians } from '../../sim/si.ts';
import { nbsp } from '../words/number.ts';
import { distancesOf, type Plan, spotAt, starSize } from './orbitPlan.ts';
import { conjunctions, distanceAt, type Place } from './orbitShape.ts';

export function circles(plan: Plan): Partial<Shape>[] {
  return distancesOf(plan).map((radius) => ({
    type: 'circle',
    name: 'distance',
    xref: 'x',
    x0: -radius,
    x1: radius,
    yref: 'y',
    y0: -radius,
    y1: radius,
    line: { color: plan.style.theme.hairline, width: 1 },
    layer: 'below',
  }));
}

/** On the line from the star to apoapsis, which lies within the orbit. */
export function circleNames(plan: Plan): Partial<Annotation>[] {
  const { unit, shape, scale, style } = plan;
  const inside = distanceAt(shape, Math.PI) / unit.metres - 34 / scale;
  return distancesOf(plan)
    .filter((radius) => radius < inside)
    .map((radius) => ({
      text: `${Number(radius.toPrecision(6))}${nbsp}${unit.symbol}`,
      showarrow: false,
      x: -radius,
      xref: 'x',
      xanchor: 'center',
      y: 0,
      yref: 'y',
      yanchor: 'middle',
      font: { color: style.theme.quiet, size: 11 },
      bgcolor: style.theme.paper,
      borderpad: 1,
    }));
}

/** The line of apsides; the line of sight, from eclipse through the star and on from transit. */
export function lines(plan: Plan): Partial<Shape>[] {
  const { shape, style, column } = plan;
  const seen = conjunctions(column);
  const [near, far] = [0, Math.PI].map((nu) => spotAt(plan, nu));
  const line = (name: string, from: Place, to: Place, dash: 'dot' | 'dash', color: string): Partial<Shape> => ({
    type: 'line',
    name,
    xref: 'x',
    x0: from.x,
    x1: to.x,
    yref: 'y',
    y0: from.y,
    y1: to.y,
    line: { color, width: 1, dash },
    layer: 'below',
  });
  return [
    ...(shape.eccentricity > 0 ? [line('apsides', far!, near!, 'dot', style.theme.bandEdge)] : []),
    ...(seen === null
      ? []
      : [line('sight', spotAt(plan, seen.eclipse), sightEnd(plan, seen.transit), 'dash', style.theme.quiet)]),
  ];
}

/** Pixels that the line of sight goes on beyond the planet in transit. */
const sightBeyond = { wide: 30, narrow: 18 };

export function sightEnd({ shape, unit, scale, style }: Plan, transit: Radians): Place {
  const r = distanceAt(shape, transit) / unit.metres + (style.narrow ? sightBeyond.narrow : sightBeyond.wide) / scale;
  return { x: r * Math.cos(transit), y: r * Math.sin(transit) };
}

export function starDisc(plan: Plan): Partial<Shape> {
  const { theme } = plan.style;
  const radius = starSize(plan).radius / plan.unit.metres;
  return {
    type: 'circle',
    name: 'star',
    xref: 'x',
    x0: -radius,
    x1: radius,
    yref: 'y',
    y0: -radius,
    y1: radius,
    fillcolor: theme.paper,
    line: { color: theme.ink, width: 1.75 },
  };
}
