/** Small multiples: where each of several equal panels stands, and its axes. Pure. */
import type { Annotation, Layout } from 'plotly.js-dist-min';
import { glyph } from './chartLine.ts';
import type { FigureStyle } from './figure.ts';
import { plainLabel } from './plainLabel.ts';
import { type CaseMarker, caseColour, caseMarker } from './theme.ts';

export interface Panel {
  /** As traces and annotations name them: `x`, `x2`, … */
  readonly x: 'x';
  readonly y: 'y';
  /** Their keys in a layout: `xaxis`, `xaxis2`, … */
  readonly xKey: 'xaxis';
  readonly yKey: 'yaxis';
  readonly xDomain: readonly [number, number];
  readonly yDomain: readonly [number, number];
  readonly isLeft: boolean;
  readonly isRight: boolean;
  /** No panel stands below it. */
  readonly isBottom: boolean;
}

export interface PanelGrid {
  readonly panels: readonly Panel[];
  readonly columns: number;
  /** Of one panel and of all, in pixels. */
  readonly panelHeight: number;
  readonly height: number;
}

/** Room between rows: the name of a panel stands in it. */
const rowGap = 42;
/** Of the width: the last tick of one panel and the first of the next keep clear of each other. */
const columnGap = 0.055;

/** At most `across` beside each other where there is width, one below another where there is not. */
export function panelGrid(count: number, across: number, panelHeight: number, { narrow }: FigureStyle): PanelGrid {
  const columns = narrow ? 1 : Math.min(across, count);
  const rows = Math.ceil(count / columns);
  const height = rows * panelHeight + (rows - 1) * rowGap;
  const width = (1 - (columns - 1) * columnGap) / columns;
  const panels = Array.from({ length: count }, (_, at): Panel => {
    const [row, column] = [Math.floor(at / columns), at % columns];
    const left = column * (width + columnGap);
    const top = 1 - (row * (panelHeight + rowGap)) / height;
    const suffix = at === 0 ? '' : String(at + 1);
    return {
      // Plotly's types know a fixed list of axes; any number works.
      x: `x${suffix}` as 'x',
      y: `y${suffix}` as 'y',
      xKey: `xaxis${suffix}` as 'xaxis',
      yKey: `yaxis${suffix}` as 'yaxis',
      xDomain: [left, Math.min(1, left + width)],
      yDomain: [Math.max(0, top - panelHeight / height), top],
      isLeft: column === 0,
      isRight: column === columns - 1 || at === count - 1,
      isBottom: at + columns >= count,
    };
  });
  return { panels, columns, panelHeight, height };
}

/** The axes of every panel; panels after the first zoom with it. */
export function panelAxes(
  { panels }: PanelGrid,
  axes: (panel: Panel) => { readonly x: Partial<Layout['xaxis']>; readonly y: Partial<Layout['yaxis']> },
): Partial<Layout> {
  const made = panels.flatMap((panel) => {
    const { x, y } = axes(panel);
    return [
      [panel.xKey, { domain: [...panel.xDomain], anchor: panel.y, showticklabels: panel.isBottom, ...x }],
      [panel.yKey, { domain: [...panel.yDomain], anchor: panel.x, showticklabels: panel.isLeft, ...y }],
    ];
  });
  return Object.fromEntries(made) as Partial<Layout>;
}

/** The name of a case above its panel, with its sign. */
export function panelName(
  panel: Panel,
  caseName: string,
  caseIndex: number,
  { theme, narrow }: FigureStyle,
): Partial<Annotation> {
  const sign = caseSign(caseMarker(caseIndex), caseColour(theme, caseIndex));
  return {
    text: `${sign} <b>${plainLabel(caseName, narrow ? 34 : 30)}</b>`,
    showarrow: false,
    x: panel.xDomain[0],
    xref: 'paper',
    xanchor: 'left',
    y: panel.yDomain[1],
    yref: 'paper',
    yanchor: 'bottom',
    yshift: 4,
    font: { color: theme.ink, size: 13 },
  };
}

export function caseSign(shape: CaseMarker, colour: string): string {
  return `<span style="color:${colour}">${glyph({ shape, open: false })}</span>`;
}
