/** What every figure builder returns: plain JSON for Plotly and the words that stand with it. */
import type { Data, Layout } from 'plotly.js-dist-min';
import type { LegendLine } from './chartLine.ts';
import type { FigureTable } from './figureTable.ts';
import type { Moments } from './moments.ts';
import type { Reading } from './reading.ts';
import type { Theme } from './theme.ts';
import type { View } from './view.ts';

export interface Figure {
  /** File name of a download, without extension. */
  readonly name: string;
  readonly title: string;
  /** What a reader who cannot see the figure needs: its main finding in a sentence or two. */
  readonly textAlternative: string;
  /** How to read it. */
  readonly caption: string;
  /** For a legend where there is no room beside the lines. */
  readonly lines: readonly LegendLine[];
  readonly data: Data[];
  readonly layout: Partial<Layout>;
  /** Where it shows a moment of the orbit; left out where it shows none. */
  readonly moments?: Moments;
  /** The data for a file, where the traces do not tell it all, or tell it for the eye; made only when asked for. */
  readonly table?: () => FigureTable;
}

/** How a figure is to be set. */
export interface FigureStyle {
  readonly theme: Theme;
  /** A phone's width: fewer ticks, no labels beside the lines. */
  readonly narrow: boolean;
  /** The part that the reader has zoomed to, so that names and dates stand where they belong; null for the whole. */
  readonly view: View | null;
  /** `plainReading` where it is left out. */
  readonly reading?: Reading;
}
