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
  const sign = ({ marker, colour }: Owner): string => `<span style="color:${colour}">${glyph(marker)}</span>`;
  const labels = lines.flatMap((line) => {
    const { shortName, marker, colour, referenceFor } = line;
    const value = lastInView(line, view);
    if (value === null) return [];
    const signs = marker ? [{ marker, colour }] : (referenceFor ?? []);
    const words = referenceFor ? `<i>${shortName}</i>` : shortName;
    return [{ text: [...signs.map(sign), words].join(' '), value, colour }];
  });
  const [low, high] = view.y;
  return lineLabels(labels, { low, high, height }, style);
}
