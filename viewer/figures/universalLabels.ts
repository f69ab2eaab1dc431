/** Words on and beside the chart of plain worlds. Pure. */
import type { Annotation, Shape } from 'plotly.js-dist-min';
import type { FigureStyle } from './figure.ts';
import { plainLabel } from './plainLabel.ts';
import { spreadLabels } from './spreadLabels.ts';
import type { PlacedCase } from './universalMap.ts';
import type { View } from './view.ts';

/** Markers nearer than this along the chart, in pixels, have names that could touch. */
const nameRoom = 190;
const letters = 24;

/** Beside the markers on paper-white, apart from each other. `size`: of the chart on the page, in pixels. */
export function placeNames(
  placed: readonly PlacedCase[],
  view: View,
  size: { readonly width: number; readonly height: number },
): Partial<Annotation>[] {
  const share = (value: number, [from, to]: readonly [number, number]): number => (value - from) / (to - from);
  const spots = placed.map(({ name, place }) => {
    const x = Math.log10(place.storeNumber);
    return { name, x, y: place.eccentricity, across: share(x, view.x), up: share(place.eccentricity, view.y) };
  });
  return neighbours(spots, nameRoom / size.width).flatMap((near) => {
    const wanted = near.map(({ up }) => up * size.height);
    const heights = spreadLabels(wanted, 21, 10, size.height - 10);
    return near.map(({ name, x, y, across }, at) => {
      const isRight = across > 0.72;
      return {
        x,
        y,
        ax: isRight ? -26 : 26,
        ay: wanted[at]! - heights[at]!,
        text: plainLabel(name, letters),
        showarrow: true,
        arrowhead: 0,
        arrowwidth: 1,
        arrowcolor: '#000000',
        standoff: 6,
        xanchor: isRight ? 'right' : 'left',
        yanchor: 'middle',
        bgcolor: '#ffffff',
        borderpad: 2,
        font: { color: '#000000', size: 12 },
      } satisfies Partial<Annotation>;
    });
  });
}

/** From left to right in groups without a gap of `room`. */
function neighbours<T extends { readonly across: number }>(spots: readonly T[], room: number): T[][] {
  const groups: T[][] = [];
  for (const spot of [...spots].sort((a, b) => a.across - b.across)) {
    const last = groups.at(-1)?.at(-1);
    if (last !== undefined && spot.across - last.across < room) groups.at(-1)!.push(spot);
    else groups.push([spot]);
  }
  return groups;
}

/** Beside the map: a sample of the dashed line. */
export function dampingKey({ theme }: FigureStyle): { shapes: Partial<Shape>[]; annotations: Partial<Annotation>[] } {
  const sample = {
    type: 'line',
    xref: 'paper',
    yref: 'paper',
    xsizemode: 'pixel',
    ysizemode: 'pixel',
    xanchor: 1,
    yanchor: 1,
    x0: 18,
    x1: 46,
    y0: -92,
    y1: -92,
  } as const;
  return {
    shapes: [
      { ...sample, line: { color: '#000000', width: 2.5 } },
      { ...sample, line: { color: '#ffffff', width: 1.25, dash: 'dash' } },
    ],
    annotations: [
      {
        text: 'damping: swing over<br>steady swing',
        showarrow: false,
        align: 'left',
        font: { color: theme.ink, size: 12 },
        x: 1,
        xref: 'paper',
        xanchor: 'left',
        xshift: 54,
        y: 1,
        yref: 'paper',
        yanchor: 'top',
        yshift: -83,
      },
    ],
  };
}
