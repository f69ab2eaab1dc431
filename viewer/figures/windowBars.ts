/** Figure: the share of the time that each case spends in each window, as bars, and when in the orbit that is. Pure. */
import type { Annotation, Data, Layout, Shape } from 'plotly.js-dist-min';
import { type Column, commonTimeUnit } from '../words/columns.ts';
import { hasLatitude } from '../words/latitude.ts';
import { duration, exact, nbsp, percent, type TimeUnit, withUnit } from '../words/number.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { glyph } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour, caseMarker } from './theme.ts';
import { type WindowBlock, type WindowRow, windowBlocks } from './windowShares.ts';
import { windowSentence } from './windowWords.ts';

/** A block and where its parts stand, in pixels from the top. */
interface PlacedBlock {
  readonly block: WindowBlock;
  readonly head: number;
  /** Middle of each bar. */
  readonly rows: readonly number[];
}

interface Plan {
  readonly blocks: readonly PlacedBlock[];
  readonly height: number;
  readonly unit: TimeUnit;
  readonly isForward: boolean;
  readonly style: FigureStyle;
}

/** Pixels. On a phone names stand above their bars. */
const sizes = {
  wide: { head: 34, row: 26, gap: 14, bar: 12, below: 13 },
  narrow: { head: 26, row: 42, gap: 16, bar: 10, below: 31 },
};
/** Shares of the plot's width: bars, and the orbit with the time inside. What lies between is for numbers. */
const bars = [0, 0.4] as const;
const strip = [0.64, 1] as const;

/** Columns all of periodic states, or all of runs from a start; at least one with a window. */
export function windowBars(columns: readonly Column[], style: FigureStyle): Figure {
  const plan = planOf(columns, style);
  return {
    name: `time-in-windows${plan.isForward ? '-after-the-start' : ''}`,
    title: `Time in windows${plan.isForward ? ' after the start' : ''}`,
    textAlternative: plan.blocks.map(({ block }) => windowSentence(block, plan.unit)).join(' '),
    caption: caption(columns, plan),
    lines: [],
    data: plan.blocks.flatMap((placed) => [
      ...shareTraces(placed, plan),
      ...(style.narrow ? [] : stretchTraces(placed, plan)),
    ]),
    layout: layoutOf(plan),
  };
}

export function hasWindows({ windows }: Column): boolean {
  return windows.length > 0;
}

function planOf(columns: readonly Column[], style: FigureStyle): Plan {
  const { head, row, gap, below } = style.narrow ? sizes.narrow : sizes.wide;
  let next = 0;
  const blocks = windowBlocks(columns).map((block): PlacedBlock => {
    const top = next;
    const rows = block.rows.map((_, at) => top + head + at * row + below);
    next = top + head + block.rows.length * row + gap;
    return { block, head: top + head - 14, rows };
  });
  return { blocks, height: next, unit: commonTimeUnit(columns), isForward: columns[0]!.isForwardRun, style };
}

function shareTraces({ block, rows }: PlacedBlock, { style, unit }: Plan): Data[] {
  const { theme, narrow } = style;
  const known = block.rows.flatMap((row, at) => (row.share === null ? [] : [{ row, share: row.share, y: rows[at]! }]));
  if (known.length === 0) return [];
  return [
    {
      type: 'bar',
      orientation: 'h',
      name: plainLabel(block.window.name, 60),
      x: known.map(({ share }) => share),
      y: known.map(({ y }) => y),
      width: (narrow ? sizes.narrow : sizes.wide).bar,
      marker: { color: known.map(({ row }) => colourOf(row, style)), line: { width: 0 } },
      customdata: known.map(
        ({ row, share }) =>
          `${signedName(row, style, 60)}: <b>${shareText(share, row, unit)}</b>${row.meanInside === null ? '' : `<br>${meanText(row)}`}`,
      ),
      hovertemplate: '%{customdata}<extra></extra>',
      hoverlabel: { bgcolor: theme.paper },
    } as Data,
  ];
}

/** When inside, beside each bar. */
function stretchTraces({ block, rows }: PlacedBlock, { style }: Plan): Data[] {
  const pieces = block.rows.flatMap((row, at) =>
    row.stretches.map((stretch) => ({ ...stretch, y: rows[at]!, colour: colourOf(row, style) })),
  );
  if (pieces.length === 0) return [];
  return [
    {
      type: 'bar',
      orientation: 'h',
      name: `${plainLabel(block.window.name, 60)}, when`,
      xaxis: 'x2',
      base: pieces.map(({ from }) => from),
      x: pieces.map(({ from, to }) => to - from),
      y: pieces.map(({ y }) => y),
      width: sizes.wide.bar,
      marker: { color: pieces.map(({ colour }) => colour), line: { width: 0 } },
      hoverinfo: 'skip',
    } as Data,
  ];
}

function colourOf({ column }: WindowRow, { theme }: FigureStyle): string {
  return column === null ? theme.quiet : caseColour(theme, column.caseIndex);
}

/** The case with its sign; safe as a Plotly label. */
function signedName({ column, name }: WindowRow, { theme }: FigureStyle, longest: number): string {
  if (column === null) return '<i>every case</i>';
  const sign = glyph({ shape: caseMarker(column.caseIndex), open: column.stateIndex > 0 });
  const colour = caseColour(theme, column.caseIndex);
  return `<span style="color:${colour}">${sign}</span> ${plainLabel(name, longest)}`;
}

function shareText(share: number, { whole }: WindowRow, unit: TimeUnit): string {
  if (share === 0) return 'never';
  if (share === 1) return 'all the time';
  return `${percent(share)} · ${duration(share * whole, unit)}`;
}

/** The orbit mean of the instellation is what a slow climate feels. */
function meanText({ meanInside }: WindowRow): string {
  return meanInside === null ? '' : `orbit mean ${meanInside ? 'inside' : 'outside'}`;
}

/** Of a whole block. */
function meansText({ rows }: WindowBlock): string {
  const inside = rows.filter(({ meanInside }) => meanInside === true).length;
  if (inside === 0 || inside === rows.length) return meanText(rows[0]!);
  return `orbit mean inside in ${inside} of ${rows.length}`;
}

function layoutOf(plan: Plan): Partial<Layout> {
  const { height, style, isForward } = plan;
  const { theme, narrow } = style;
  const margin = narrow ? { l: 14, r: 26, t: 4, b: 46 } : { l: 190, r: 24, t: 4, b: 50 };
  const axis = { ...axisStyle(style), fixedrange: true, showgrid: false } as const;
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    barmode: 'overlay',
    hovermode: 'closest',
    xaxis: {
      ...axis,
      range: [0, 1],
      domain: narrow ? [0, 1] : [...bars],
      tickvals: [0, 0.25, 0.5, 0.75, 1],
      ticktext: ['0', ...[25, 50, 75, 100].map((share) => `${share}${nbsp}%`)],
      title: { text: isForward ? 'Share of the run' : 'Share of the orbit’s time', standoff: 8 },
    },
    ...(narrow
      ? {}
      : {
          xaxis2: {
            ...axis,
            range: isForward ? [0, 1] : [-0.25, 0.75],
            domain: [...strip],
            tickvals: isForward ? [0, 0.5, 1] : [-0.25, 0, 0.25, 0.5, 0.75],
            ticktext: isForward ? ['start', '½', 'end'] : ['−¼', '0', '¼', '½', '¾'],
            title: { text: isForward ? 'Time' : 'Time after periapsis (orbits)', standoff: 8 },
          },
        }),
    yaxis: { visible: false, range: [height, 0], fixedrange: true },
    shapes: [...tracks(plan), ...(narrow || isForward ? [] : [periapsisLine(theme.ink)])],
    annotations: plan.blocks.flatMap((placed) => [heading(placed, plan), ...rowTexts(placed, plan)]),
  };
}

/** The whole that a share is of. */
function tracks({ blocks, style, isForward }: Plan): Partial<Shape>[] {
  const half = (style.narrow ? sizes.narrow : sizes.wide).bar / 2;
  const whole = isForward ? [0, 1] : [-0.25, 0.75];
  const track = (xref: 'x' | 'x2', [x0, x1]: readonly number[], y: number): Partial<Shape> => ({
    type: 'rect',
    name: 'track',
    xref,
    x0: x0!,
    x1: x1!,
    yref: 'y',
    y0: y - half,
    y1: y + half,
    fillcolor: style.theme.band,
    line: { width: 0 },
    layer: 'below',
  });
  return blocks.flatMap(({ block, rows }) =>
    rows.flatMap((y, at) => {
      if (block.rows[at]!.share === null) return [];
      return style.narrow ? [track('x', [0, 1], y)] : [track('x', [0, 1], y), track('x2', whole, y)];
    }),
  );
}

function periapsisLine(color: string): Partial<Shape> {
  return {
    type: 'line',
    name: 'periapsis',
    xref: 'x2',
    x0: 0,
    x1: 0,
    yref: 'paper',
    y0: 0,
    y1: 1,
    line: { color, width: 1 },
  };
}

/** The window's name and its limits. */
function heading({ block, head }: PlacedBlock, { style }: Plan): Partial<Annotation> {
  const { window, isSame, rows } = block;
  const name = `<b>${plainLabel(window.name, style.narrow ? 28 : 34)}</b>`;
  const unit = window.of === 'temperature' ? 'K' : 'W/m2';
  const limits = `${exact(Number(window.from.toPrecision(5)))} to ${withUnit(exact(Number(window.to.toPrecision(5))), unit)}`;
  const isUnknown = rows.every(({ share }) => share === null);
  const mean = style.narrow ? '' : meansText(block);
  const quiet = isUnknown
    ? ''
    : [isSame ? limits : 'limits differ by case', mean].filter((text) => text !== '').join(', ');
  return {
    text: `${name}${nbsp} <span style="color:${style.theme.quiet}">${quiet}</span>`,
    showarrow: false,
    x: 0,
    xref: 'paper',
    xanchor: 'left',
    xshift: style.narrow ? 0 : -176,
    y: head,
    yref: 'y',
    yanchor: 'middle',
    align: 'left',
    font: { color: style.theme.ink, size: 13 },
  };
}

/** Each row's name, and its number at the bar's end or, on a phone, above it. */
function rowTexts({ block, rows }: PlacedBlock, { style, unit }: Plan): Partial<Annotation>[] {
  const { theme, narrow } = style;
  const at = { showarrow: false, yref: 'y', font: { color: theme.ink, size: 12 } } as const;
  return block.rows.flatMap((row, index): Partial<Annotation>[] => {
    const y = narrow ? rows[index]! - 15 : rows[index]!;
    const name: Partial<Annotation> = {
      ...at,
      x: 0,
      xref: 'paper',
      xanchor: narrow ? 'left' : 'right',
      xshift: narrow ? 0 : -10,
      y,
      text: signedName(row, style, narrow ? 24 : 23),
    };
    const isUnknown = row.share === null;
    const text = isUnknown
      ? `<i>${plainLabel(row.reason ?? '', narrow ? 34 : 100)}</i>`
      : shareText(row.share, row, unit);
    const number: Partial<Annotation> = narrow
      ? { ...at, x: 1, xref: 'paper', xanchor: 'right', y: isUnknown ? rows[index]! : y, text }
      : { ...at, x: row.share ?? 0, xref: 'x', xanchor: 'left', xshift: 6, y, text };
    return [name, number];
  });
}

function caption(columns: readonly Column[], { blocks, isForward }: Plan): string {
  const kinds = new Set(blocks.map(({ block }) => block.window.of));
  return [
    `Bars: the share of the ${isForward ? 'run' : 'orbit’s time'} within each window.`,
    isForward
      ? 'Beside them, where the page is wide: when, from start to end.'
      : 'Beside them, where the page is wide: when in the orbit; the upright line is periapsis.',
    ...(kinds.has('temperature') && columns.some(hasLatitude)
      ? ['Temperature windows: time of the area mean, not of any one place.']
      : []),
    ...(kinds.has('instellation')
      ? [
          'Windows of instellation: starlight of the moment; a climate with a large heat store follows the orbit mean instead.',
        ]
      : []),
  ].join(' ');
}
