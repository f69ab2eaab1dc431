/** What stands to the right of a map: the colour bar, and beneath it a sample of every line on its own ground. Pure. */
import type { Annotation, ColorBar, Shape } from 'plotly.js-dist-min';
import type { FigureStyle } from './figure.ts';
import type { MapLine } from './mapLines.ts';
import type { Drawing } from './windowBands.ts';

/** All in pixels, from the map's upper right corner to the right and down. */
const indent = 18;
const barLength = 176;
const keyTop = 66;
const sampleWidth = 28;
const sampleHeight = 14;
const lineHeight = 16;
const entryGap = 8;

/** To the right of the map; under it on a phone. `height` is the map's, `below` what its own axis needs, in pixels. */
export function colourBar(title: string, height: number, below: number, style: FigureStyle): Partial<ColorBar> {
  const { theme, narrow } = style;
  const place: Partial<ColorBar> = narrow
    ? { x: 0.5, xanchor: 'center', y: -below / height, yanchor: 'top', len: 1, xpad: 0 }
    : { x: 1, xanchor: 'left', xpad: indent, y: 1, yanchor: 'top', len: barLength, lenmode: 'pixels' };
  return {
    ...place,
    orientation: 'h',
    ypad: 0,
    thickness: 12,
    outlinewidth: 1,
    outlinecolor: theme.quiet,
    title: { text: title, side: 'top', font: { size: 12, color: theme.ink } },
    tickfont: { size: 12, color: theme.quiet },
    ticks: 'outside',
    ticklen: 4,
    tickcolor: theme.quiet,
    nticks: 6,
  };
}

/** Pixels that the key takes, down from the map's upper edge. */
export function keyHeight(lines: readonly MapLine[]): number {
  return lines.reduce((sum, line) => sum + entryHeight(line), keyTop);
}

export function mapKey(lines: readonly MapLine[], { theme }: FigureStyle): Drawing {
  let top = keyTop;
  const drawings = lines.map((line) => {
    const drawing = entry(line, top, theme.ink);
    top += entryHeight(line);
    return drawing;
  });
  return {
    shapes: drawings.flatMap(({ shapes }) => shapes),
    annotations: drawings.flatMap(({ annotations }) => annotations),
  };
}

function entryHeight({ labels }: MapLine): number {
  return labels.length * lineHeight + entryGap;
}

function entry(line: MapLine, top: number, ink: string): Drawing {
  const { labels, ground, casing, colour, dash, width, plainName } = line;
  const middle = -(top + sampleHeight / 2);
  const corner = {
    xref: 'paper',
    yref: 'paper',
    xsizemode: 'pixel',
    ysizemode: 'pixel',
    xanchor: 1,
    yanchor: 1,
  } as const;
  const ends = { x0: indent, x1: indent + sampleWidth };
  const across = { ...corner, ...ends, type: 'line', y0: middle, y1: middle } as const;
  const shapes: Partial<Shape>[] = [
    {
      ...corner,
      ...ends,
      type: 'rect',
      name: `${plainName}, ground`,
      y0: -top,
      y1: -top - sampleHeight,
      ...(ground === undefined ? {} : { fillcolor: ground }),
      line: { width: 0 },
    },
    ...(casing === undefined ? [] : [{ ...across, line: { color: casing, width: width + 2.5 } }]),
    { ...across, name: plainName, line: { color: colour, width, dash } },
  ];
  return { shapes, annotations: [words(labels, top, ink)] };
}

function words(labels: readonly string[], top: number, ink: string): Partial<Annotation> {
  return {
    text: labels.join('<br>'),
    showarrow: false,
    align: 'left',
    font: { color: ink, size: 12 },
    x: 1,
    xref: 'paper',
    xanchor: 'left',
    xshift: indent + sampleWidth + 8,
    y: 1,
    yref: 'paper',
    yanchor: 'top',
    yshift: -(top - 3),
  };
}
