/** A name beside every line of a chart. Pure. */
import type { Annotation } from 'plotly.js-dist-min';
import { type ChartLine, glyph, lastInView, type Owner } from './chartLine.ts';
import type { FigureStyle } from './figure.ts';
import { lineLabels } from './lineLabels.ts';
import type { View } from './view.ts';

/** A name for every line that the view shows, where the line leaves it. */
export function namesBesideLines(
  lines: readonly ChartLine[],
  view: View,
  height: number,
  style: FigureStyle,
): Partial<Annotation>[] {
  const labels = lines.flatMap((line) => {
    const value = lastInView(line, view);
    return value === null ? [] : [{ text: lineName(line), value, colour: line.colour }];
  });
  const [low, high] = view.y;
  return lineLabels(labels, { low, high, height }, style);
}

/** A line's name with its sign, or those of whom it belongs to; safe as a Plotly label. */
export function lineName({ shortName, marker, colour, referenceFor }: ChartLine): string {
  const sign = (owner: Owner): string => `<span style="color:${owner.colour}">${glyph(owner.marker)}</span>`;
  const signs = marker ? [{ marker, colour }] : (referenceFor ?? []);
  const words = referenceFor ? `<i>${shortName}</i>` : shortName;
  return [...signs.map(sign), words].join(' ');
}
