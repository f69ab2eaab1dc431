/** Names and values at the folds of a trace, clear of its lines. Pure. */
import type { Annotation } from 'plotly.js-dist-min';
import { type Along, alongText } from '../words/along.ts';
import type { TraceCase } from '../words/arcs.ts';
import { type ClimateEnd, climateEnds } from '../words/climates.ts';
import { axisPlace } from '../words/gridAxes.ts';
import { glyph } from './chartLine.ts';
import type { FigureStyle } from './figure.ts';
import { plainLabel } from './plainLabel.ts';
import { spreadLabels } from './spreadLabels.ts';
import type { caseMarker } from './theme.ts';
import type { View } from './view.ts';

export interface CaseLook {
  readonly oneCase: TraceCase;
  readonly name: string;
  readonly colour: string;
  readonly shape: ReturnType<typeof caseMarker>;
}

interface Frame {
  readonly view: View;
  readonly height: number;
  readonly style: FigureStyle;
}

/** `height`: of the panel of temperatures, in pixels. */
export function foldLabels(
  looks: readonly CaseLook[],
  along: Along,
  view: View,
  height: number,
  style: FigureStyle,
): Partial<Annotation>[] {
  const frame = { view, height, style };
  const ends = looks.flatMap((look) => climateEnds(look.oneCase, along).map((end): LookedEnd => ({ end, look })));
  if (looks.length > 1) return uprightLabels(ends, along, frame);
  return ends.map(({ end }) => ({ ...foldAnchor(end, along, style), ...labelBeside(end, along, frame) }));
}

function foldAnchor({ point }: ClimateEnd, along: Along, { theme }: FigureStyle): Partial<Annotation> {
  const font = { color: theme.ink, size: 12 };
  return { x: axisPlace(along, point.value), xref: 'x', y: point.temperatureMean, yref: 'y', showarrow: false, font };
}

/** On the outer side of the fold, where no line runs; where there is no room outside, in the free corner, with a leader. */
function labelBeside({ point, liesAbove, next, name }: ClimateEnd, along: Along, frame: Frame): Partial<Annotation> {
  const { view, style } = frame;
  const needed = style.narrow ? 0.3 : 0.16;
  const share = (axisPlace(along, point.value) - view.x[0]) / (view.x[1] - view.x[0]);
  const text = `${name} climate ends<br><b>${plainLabel(alongText(point.value, along))}</b>`;
  const side = liesAbove ? 'left' : 'right';
  if ((liesAbove ? share : 1 - share) < needed) {
    const room = (liesAbove ? share : 1 - share) * roughWidth(style) - 6;
    return { text, align: side, xanchor: side, ...toEdge({ point, next }, frame), ax: liesAbove ? -room : room };
  }
  const away = liesAbove ? 'right' : 'left';
  return { text, align: away, xanchor: away, yanchor: 'middle', xshift: liesAbove ? -10 : 10 };
}

/** Several cases: upright at the edge of the panel away from the jump, spread so that neighbours keep clear of each other. */
function uprightLabels(ends: readonly LookedEnd[], along: Along, frame: Frame): Partial<Annotation>[] {
  const { view, style } = frame;
  const width = roughWidth(style);
  return [true, false].flatMap((down) => {
    const row = ends.filter(({ end }) => jumpsDown(end) === down);
    const wanted = row.map(
      ({ end }) => ((axisPlace(along, end.point.value) - view.x[0]) / (view.x[1] - view.x[0])) * width,
    );
    const places = spreadLabels(wanted, 20, 8, width - 8);
    return row.map(({ end, look: { colour, shape } }, at) => ({
      ...foldAnchor(end, along, style),
      text: `<span style="color:${colour}">${glyph({ shape, open: true })}</span> ${plainLabel(alongText(end.point.value, along))}`,
      textangle: -90,
      xanchor: 'center',
      ...inwards(toEdge(end, frame), jumpsDown(end) ? 38 : -38),
      ax: places[at]! - wanted[at]!,
      arrowcolor: colour,
    }));
  });
}

/** Held by its middle, which turned text keeps. */
function inwards(leader: Partial<Annotation>, pixels: number): Partial<Annotation> {
  return { ...leader, yanchor: 'middle', ay: Number(leader.ay) + pixels };
}

interface LookedEnd {
  readonly end: ClimateEnd;
  readonly look: CaseLook;
}

/** Rough width of the plot in pixels: for the room between labels only. */
function roughWidth({ narrow }: FigureStyle): number {
  return narrow ? 290 : 780;
}

function jumpsDown({ point, next }: Pick<ClimateEnd, 'point' | 'next'>): boolean {
  return next === null || next < point.temperatureMean;
}

/** A leader from the fold to the upper edge of the panel, to the lower one from a fold that jumps up. */
function toEdge(end: Pick<ClimateEnd, 'point' | 'next'>, { view, height, style }: Frame): Partial<Annotation> {
  const share = (end.point.temperatureMean - view.y[0]) / (view.y[1] - view.y[0]);
  const isUp = jumpsDown(end);
  return {
    showarrow: true,
    arrowhead: 0,
    arrowwidth: 0.75,
    arrowcolor: style.theme.quiet,
    standoff: 6,
    yanchor: isUp ? 'top' : 'bottom',
    ay: isUp ? 4 - (1 - share) * height : share * height - 4,
  };
}
