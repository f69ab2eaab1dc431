/** Figure: which input matters most to one finding, as bars with their intervals, case by case. Pure. */
import type { Annotation, Data, Layout, Shape } from 'plotly.js-dist-min';
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import {
  chanceText,
  type Importances,
  importancesOf,
  importanceText,
  inText,
  ledBy,
  type Ranks,
  type Shares,
  wholePercent,
} from '../words/importance.ts';
import { fixed, keptPercents } from '../words/number.ts';
import type { SharedFinding } from '../words/spreadFindings.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import type { LegendLine } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { caseSign } from './panels.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour, caseMarker } from './theme.ts';
import { translucent } from './translucent.ts';

/** A case and the place of each of its rows, counted in rows from the top. */
interface Block {
  readonly name: string;
  readonly caseIndex: number;
  readonly colour: string;
  readonly head: number;
  readonly rows: readonly number[];
  readonly found: Importances;
}

/** Inputs shown of a case: the rest matters less than all of them. */
export const mostInputs = 8;
const rowHeight = { wide: 50, narrow: 62 };
const totalOpacity = 0.3;
/** How thick a bar is, in rows; how far the two of a row stand from its middle; how far down a name above them moves them. */
const bar = { thickness: 0.27, apart: 0.16, below: 0.14 };

export function importanceBars(shared: SharedFinding, report: SpreadReport, style: FigureStyle): Figure {
  const { name, label, inCases } = shared;
  const blocks = blocksOf(shared, report, style);
  const kinds = new Set(blocks.map(({ found }) => found.kind));
  const what = inText(label);
  return {
    name: `what-matters-most-${name}`,
    title: `What matters most: ${what}`,
    textAlternative: sentences(shared, report, what),
    caption: captionOf(
      kinds,
      inCases.some(({ oneCase }) => oneCase.inputs.length > mostInputs),
    ),
    lines: legend(kinds, style),
    data: blocks.flatMap((block) => tracesOf(block, style)),
    layout: layoutOf(blocks, kinds, style),
    table: () => tableOf(shared),
  };
}

/** Every input, also those that the figure has no room for; a case without numbers says why. */
function tableOf({ inCases }: SharedFinding): FigureTable {
  return {
    columns: [
      ...['case', 'input', 'key', 'first order', 'first order 2.5', 'first order 97.5'].map(words),
      ...['total', 'total 2.5', 'total 97.5', 'dependence by ranks', 'chance level', 'reason'].map(words),
    ],
    rows: inCases.flatMap(({ oneCase, finding }) => importanceRows(oneCase.name, importancesOf(oneCase, finding))),
  };
}

function importanceRows(caseName: string, found: Importances): FigureTable['rows'] {
  if (found.kind === 'none') return [[caseName, ...Array<null>(10).fill(null), found.reason]];
  if (found.kind === 'ranks') {
    return found.inputs.map(({ input: { label, key }, value, chanceLevel }) => {
      return [caseName, label, key, ...Array<null>(6).fill(null), value, chanceLevel, null];
    });
  }
  const index = ({ value, percentiles }: Shares['inputs'][number]['first']): number[] => {
    return [value, percentiles['2.5'], percentiles['97.5']];
  };
  return found.inputs.map(({ input: { label, key }, first, total }) => {
    return [caseName, label, key, ...index(first), ...index(total), null, null, null];
  });
}

/** Said once where it holds for every case. */
function sentences({ inCases }: SharedFinding, { cases }: SpreadReport, what: string): string {
  const texts = inCases.map(({ oneCase, finding }) => importanceText(oneCase, finding, what));
  if (texts.length > 1 && texts.every((text) => text === texts[0])) return `In every case: ${texts[0]}`;
  return texts.map((text, at) => ledBy(inCases[at]!.oneCase.name, text, cases)).join(' ');
}

function blocksOf({ inCases }: SharedFinding, { cases }: SpreadReport, { theme, narrow }: FigureStyle): Block[] {
  let next = 0;
  return inCases.map(({ oneCase, caseIndex, finding }) => {
    const found = cut(importancesOf(oneCase, finding));
    const head = next;
    const first = cases.length > 1 || found.kind === 'none' ? head + 0.85 : head;
    const count = found.kind === 'none' ? 0 : found.inputs.length;
    next = first + count + (cases.length > 1 ? 0.35 : 0);
    const rows = Array.from({ length: count }, (_, at) => first + at + 0.5 + (narrow ? bar.below : 0));
    return { name: oneCase.name, caseIndex, colour: caseColour(theme, caseIndex), head, rows, found };
  });
}

function cut(found: Importances): Importances {
  if (found.kind === 'none') return found;
  return { ...found, inputs: found.inputs.slice(0, mostInputs) } as Importances;
}

function tracesOf(block: Block, style: FigureStyle): Data[] {
  if (block.found.kind === 'none') return [];
  return block.found.kind === 'shares' ? shareTraces(block, block.found, style) : [rankTrace(block, block.found)];
}

/** First order above, total below, each with its 95 % interval. */
function shareTraces({ name, rows, colour }: Block, { inputs }: Shares, { theme }: FigureStyle): Data[] {
  return (['first', 'total'] as const).map((kind): Data => {
    const indices = inputs.map((one) => one[kind]);
    return {
      ...barsAt(rows.map((row) => row + (kind === 'first' ? -bar.apart : bar.apart))),
      name: `${plainLabel(name, 60)}, ${kind === 'first' ? 'alone' : 'in all'}`,
      x: indices.map(({ value }) => value),
      marker: {
        color: kind === 'first' ? colour : translucent(colour, totalOpacity),
        line: { color: colour, width: kind === 'first' ? 0 : 1 },
      },
      error_x: {
        type: 'data',
        symmetric: false,
        array: indices.map(({ value, percentiles }) => Math.max(0, percentiles['97.5'] - value)),
        arrayminus: indices.map(({ value, percentiles }) => Math.max(0, value - percentiles['2.5'])),
        color: theme.ink,
        thickness: 1.25,
        width: 3,
      },
      customdata: inputs.map(
        ({ input }, at) =>
          `${plainLabel(input.label, 60)}, ${kind === 'first' ? 'alone' : 'in all'}: <b>${wholePercent(indices[at]!.value)}</b><br>95 %: ${wholePercent(indices[at]!.percentiles['2.5'])} to ${wholePercent(indices[at]!.percentiles['97.5'])}`,
      ),
      hovertemplate: '%{customdata}<extra></extra>',
    } as Data;
  });
}

function rankTrace({ name, rows, colour }: Block, { inputs }: Ranks): Data {
  return {
    ...barsAt(rows),
    name: plainLabel(name, 60),
    x: inputs.map(({ value }) => value),
    marker: {
      color: inputs.map(({ value, chanceLevel }) => (value > chanceLevel ? colour : translucent(colour, totalOpacity))),
    },
    customdata: inputs.map(
      ({ input, value, chanceLevel }) =>
        `${plainLabel(input.label, 60)}: <b>D = ${fixed(value, 3)}</b><br>chance stays below ${chanceText(chanceLevel)}`,
    ),
    hovertemplate: '%{customdata}<extra></extra>',
  } as Data;
}

function barsAt(places: readonly number[]): Partial<Data> {
  return { type: 'bar', orientation: 'h', y: [...places], width: bar.thickness } as Partial<Data>;
}

function layoutOf(blocks: readonly Block[], kinds: ReadonlySet<string>, style: FigureStyle): Partial<Layout> {
  const { theme, narrow } = style;
  const last = blocks.at(-1);
  const end = Math.max(1.4, last === undefined ? 0 : (last.rows.at(-1) ?? last.head + 0.9) + 0.5);
  const margin = narrow ? { l: 14, r: 22, t: 10, b: 48 } : { l: 220, r: 190, t: 12, b: 52 };
  const isRanks = kinds.has('ranks');
  const isEmpty = !isRanks && !kinds.has('shares');
  return {
    ...plainLayout(style),
    height: end * (narrow ? rowHeight.narrow : rowHeight.wide) + margin.t + margin.b,
    margin,
    barmode: 'overlay',
    hovermode: 'closest',
    xaxis: {
      ...axisStyle(style),
      visible: !isEmpty,
      range: rangeOf(blocks),
      tickformat: isRanks ? '' : '.0%',
      nticks: 6,
      gridcolor: theme.hairline,
      zeroline: true,
      zerolinecolor: theme.quiet,
      title: { text: isRanks ? 'Dependence D, by ranks' : 'Share of the variance', standoff: 8 },
      fixedrange: true,
    },
    yaxis: { visible: false, range: [end, 0], fixedrange: true },
    shapes: blocks.flatMap((block) => chanceMarks(block, style)),
    annotations: [
      ...blocks.flatMap((block) => blockNames(block, blocks.length > 1, style)),
      ...(narrow || isRanks ? [] : barNames(blocks, style)),
    ],
  };
}

/** From nothing, or the lowest interval below it, to the whole; what is small is not blown up. */
function rangeOf(blocks: readonly Block[]): [number, number] {
  const ends = blocks.flatMap(({ found }) => {
    if (found.kind === 'shares')
      return found.inputs.flatMap(({ first, total }) =>
        [first, total].flatMap(({ percentiles }) => [percentiles['2.5'], percentiles['97.5']]),
      );
    return found.kind === 'ranks' ? found.inputs.flatMap(({ value, chanceLevel }) => [value, chanceLevel]) : [];
  });
  const [low, high] = [Math.min(0, ...ends), Math.max(0, ...ends)];
  return [low < 0 ? low - 0.01 : 0, high > 0.5 ? Math.max(1, high) * 1.02 : Math.min(1, 1.15 * high + 0.02)];
}

function chanceMarks({ found, rows, name }: Block, { theme }: FigureStyle): Partial<Shape>[] {
  if (found.kind !== 'ranks') return [];
  return found.inputs.map(({ chanceLevel }, at) => ({
    type: 'line',
    name: `${plainLabel(name, 60)}, chance`,
    xref: 'x',
    x0: chanceLevel,
    x1: chanceLevel,
    yref: 'y',
    y0: rows[at]! - 0.3,
    y1: rows[at]! + 0.3,
    line: { color: theme.ink, width: 1.5, dash: 'dot' },
    layer: 'above',
  }));
}

/** The case at the head; each input before its bars, above them on a phone. */
function blockNames(
  { name, caseIndex, colour, head, rows, found }: Block,
  several: boolean,
  { theme, narrow }: FigureStyle,
): Partial<Annotation>[] {
  const at = { showarrow: false, xref: 'paper', yref: 'y' } as const;
  const left = narrow
    ? ({ x: 0, xref: 'x', xanchor: 'left', xshift: 3 } as const)
    : ({ x: 0, xanchor: 'right', xshift: -10 } as const);
  const heading = `${caseSign(caseMarker(caseIndex), colour)} <b>${plainLabel(name, narrow ? 34 : 23)}</b>`;
  return [
    ...(several ? [{ ...at, ...left, y: head + 0.45, yanchor: 'middle' as const, text: heading }] : []),
    ...(found.kind === 'none'
      ? [
          {
            ...at,
            x: 0,
            xanchor: 'left' as const,
            xshift: narrow ? 0 : 4,
            y: head + (several && narrow ? 0.95 : 0.45),
            yanchor: 'middle' as const,
            text: `<i>${plainLabel(found.reason, narrow ? 52 : 110)}</i>`,
            font: { color: theme.quiet },
          },
        ]
      : found.inputs.map(({ input }, place) => ({
          ...at,
          ...left,
          y: rows[place]! - (narrow ? bar.apart + bar.below : 0),
          yanchor: narrow ? ('bottom' as const) : ('middle' as const),
          text: plainLabel(input.label, narrow ? 44 : 28),
          font: { color: theme.ink, size: 13 },
        }))),
  ];
}

/** Beside the first pair of bars: which is which. */
function barNames(blocks: readonly Block[], { theme }: FigureStyle): Partial<Annotation>[] {
  const block = blocks.find(({ found }) => found.kind === 'shares' && found.inputs.length > 0);
  if (block === undefined || block.found.kind !== 'shares') return [];
  const { first, total } = block.found.inputs[0]!;
  return [['alone (first order)', first, -bar.apart] as const, ['in all (total)', total, bar.apart] as const].map(
    ([text, index, shift]) => ({
      text,
      showarrow: false,
      x: Math.max(index.value, index.percentiles['97.5']),
      xref: 'x',
      xanchor: 'left',
      xshift: 8,
      y: block.rows[0]! + shift,
      yref: 'y',
      yanchor: 'middle',
      font: { color: theme.quiet, size: 12 },
    }),
  );
}

function legend(kinds: ReadonlySet<string>, { theme }: FigureStyle): LegendLine[] {
  const plain = { colour: 'transparent', dash: 'solid', marker: null } as const;
  const colour = caseColour(theme, 0);
  return [
    ...(kinds.has('shares')
      ? [
          { ...plain, plainName: 'alone (first order)', ground: colour },
          { ...plain, plainName: 'in all (total)', ground: translucent(colour, totalOpacity) },
        ]
      : []),
    ...(kinds.has('ranks')
      ? [{ ...plain, plainName: 'what chance alone gives', colour: theme.ink, dash: 'dot' as const }]
      : []),
  ];
}

function captionOf(kinds: ReadonlySet<string>, isCut: boolean): string {
  const sentences = [
    ...(kinds.has('shares')
      ? [
          'Full bar: the share of the variance that knowing this input alone would remove (first order). Pale bar: the share that would be left if all others were known (total); what it has beyond the full one comes from inputs acting together. Thin lines: 95 % intervals of the estimate, rather too wide than too narrow.',
        ]
      : []),
    ...(kinds.has('ranks')
      ? [
          'The inputs go together, so that shares of the variance would mislead. Bars: D by ranks, around 0 for independent (an estimate may come out slightly below), 1 where the input fixes the finding. Dotted: chance alone stays below it in 97.5 % of cases; bars below are pale. An input that merely goes along with another shares its value.',
        ]
      : []),
    ...(isCut ? [`The ${mostInputs} that matter most are shown.`] : []),
  ];
  return keptPercents(sentences.join(' '));
}
