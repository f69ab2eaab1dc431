/** Names beside the right-hand ends of lines, each with a thin leader to its own line, spread so that none overlap. Pure. */
import type { Annotation } from 'plotly.js-dist-min';
import type { FigureStyle } from './figure.ts';
import { spreadLabels } from './spreadLabels.ts';

export interface LineLabel {
  /** Already safe as a Plotly label. */
  readonly text: string;
  /** Where the line ends, in data units. */
  readonly value: number;
  readonly colour: string;
}

export interface LabelFrame {
  readonly low: number;
  readonly high: number;
  /** Pixels that stand for low … high. */
  readonly height: number;
}

const labelGap = 21;
const leader = 22;

export function lineLabels(labels: readonly LineLabel[], frame: LabelFrame, style: FigureStyle): Partial<Annotation>[] {
  const pixel = (value: number): number => ((value - frame.low) / (frame.high - frame.low)) * frame.height;
  const places = spreadLabels(
    labels.map(({ value }) => pixel(value)),
    labelGap,
    0,
    frame.height,
  );
  return labels.map(({ text, value, colour }, index) => ({
    x: 1,
    xref: 'paper',
    y: value,
    yref: 'y',
    ax: leader,
    ay: pixel(value) - places[index]!,
    text,
    showarrow: true,
    arrowhead: 0,
    arrowwidth: 1,
    arrowcolor: colour,
    xanchor: 'left',
    yanchor: 'middle',
    align: 'left',
    standoff: 2,
    font: { color: style.theme.ink, size: 13 },
  }));
}
