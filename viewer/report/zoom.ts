/** What a reader's mouse asks of a figure. */
import type { Layout, PlotlyHTMLElement } from 'plotly.js-dist-min';
import type { View } from '../figures/view.ts';

export interface ZoomAnswers {
  zoomed(view: View): void;
  /** A double click: back to the whole. */
  left(): void;
}

type Drawn = PlotlyHTMLElement & { readonly layout: Partial<Layout> };

export function watchZoom(plot: HTMLElement, answers: ZoomAnswers): void {
  const drawn = plot as unknown as Drawn;
  drawn.on('plotly_relayout', (change) => {
    const isZoom = Object.keys(change).some((key) => /^[xy]axis\d?\.range/.test(key));
    const { xaxis, yaxis } = drawn.layout;
    if (isZoom) answers.zoomed({ x: ends(xaxis?.range), y: ends(yaxis?.range) });
  });
  drawn.on('plotly_doubleclick', () => answers.left());
}

function ends(range: readonly unknown[] | undefined): [number, number] {
  return [Number(range?.[0]), Number(range?.[1])];
}
