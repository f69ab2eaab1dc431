/** A mark for one moment of the orbit over a drawn figure: nothing of the figure itself is drawn anew. */
import type { MomentPlace } from '../figures/moments.ts';
import { svgElement } from './element.ts';

/** What Plotly knows of an axis that it has drawn: from data to pixels. */
interface DrawnAxis {
  readonly _offset: number;
  readonly _length: number;
  d2p(value: number): number;
}

interface DrawnPlot {
  readonly _fullLayout?: { readonly xaxis?: DrawnAxis; readonly yaxis?: DrawnAxis };
}

const dot = 5;

/** The layer lies over `plot`; `places` empties it. */
export function momentLayer(plot: HTMLElement): {
  readonly element: SVGSVGElement;
  show(places: readonly MomentPlace[]): void;
} {
  const layer = svgElement('svg', { class: 'moment-layer', 'aria-hidden': 'true' });
  return {
    element: layer,
    show(places) {
      const { xaxis, yaxis } = (plot as unknown as DrawnPlot)._fullLayout ?? {};
      layer.replaceChildren(...(xaxis && yaxis ? places.flatMap((place) => sign(place, xaxis, yaxis)) : []));
    },
  };
}

/** Nothing where the place is out of view. */
function sign({ x, y, caseIndex }: MomentPlace, xaxis: DrawnAxis, yaxis: DrawnAxis): SVGElement[] {
  const across = xaxis.d2p(x);
  if (!(across >= -1 && across <= xaxis._length + 1)) return [];
  const left = xaxis._offset + across;
  if (y === null) {
    const [top, foot] = [yaxis._offset, yaxis._offset + yaxis._length];
    return [svgElement('path', { d: `M${left.toFixed(1)} ${top}V${foot}`, class: 'moment-line' })];
  }
  const down = yaxis.d2p(y);
  if (!(down >= -1 && down <= yaxis._length + 1)) return [];
  const circle = svgElement('circle', {
    cx: left.toFixed(1),
    cy: (yaxis._offset + down).toFixed(1),
    r: String(dot),
    class: 'moment-dot',
  });
  if (caseIndex !== null) circle.style.setProperty('fill', `var(--case-${caseIndex % 5})`);
  return [circle];
}
