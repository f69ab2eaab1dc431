/** Figure: a curve with its spread, as nested bands around the median, a panel for each case. Pure. */
import type { Annotation, Data, Layout, ScatterData } from 'plotly.js-dist-min';
import { percentileLevels } from '../../sim/studies/spread/percentiles.ts';
import type { SpreadBand, SpreadCase, SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { ledBy } from '../words/importance.ts';
import { keptPercents, list, unitText } from '../words/number.ts';
import { bandSentence } from '../words/spreadBand.ts';
import { periodsText } from '../words/spreadNumber.ts';
import { apsides, apsisNames } from './apsides.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { type LegendLine, lastInView } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { latitudePlace, poleToPole } from './latitudeAxis.ts';
import { latitudeAxisLayout } from './latitudeChart.ts';
import { lineLabels } from './lineLabels.ts';
import { quarterBefore } from './orbitSpan.ts';
import { type Panel, type PanelGrid, panelAxes, panelGrid, panelName } from './panels.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour } from './theme.ts';
import { translucent } from './translucent.ts';
import type { View } from './view.ts';

/** The same curve in the cases that have it. */
export interface BandGroup {
  readonly label: string;
  readonly along: SpreadBand['along'];
  readonly unit: string;
  readonly members: readonly { readonly oneCase: SpreadCase; readonly caseIndex: number; readonly band: SpreadBand }[];
}

/** A band as it is drawn: x along the axis, the five levels, the run at the centre. */
interface Drawn {
  readonly member: BandGroup['members'][number];
  readonly panel: Panel;
  readonly colour: string;
  readonly x: readonly number[];
  readonly levels: readonly (readonly number[])[];
  readonly atCentre: readonly number[];
}

const panelHeights = { alone: 400, beside: 320, narrow: 240 };
export const bandOpacity = { wide: 0.16, near: 0.26 } as const;

/** In the order in which the cases give them: the temperature through the orbit first. */
export function bandGroups({ cases }: SpreadReport): BandGroup[] {
  const all = cases.flatMap((oneCase, caseIndex) => oneCase.bands.map((band) => ({ oneCase, caseIndex, band })));
  const id = ({ label, along, unit }: SpreadBand): string => JSON.stringify([label, along, unit]);
  return [...new Set(all.map(({ band }) => id(band)))].map((wanted) => {
    const members = all.filter(({ band }) => id(band) === wanted);
    const { label, along, unit } = members[0]!.band;
    return { label, along, unit, members };
  });
}

export function spreadBands(group: BandGroup, report: SpreadReport, style: FigureStyle): Figure {
  const { members, along, label } = group;
  const height = style.narrow ? panelHeights.narrow : members.length > 1 ? panelHeights.beside : panelHeights.alone;
  const grid = panelGrid(members.length, members.length === 4 ? 2 : 3, height, style);
  const drawn = members.map((member, at) => drawnBand(member, grid.panels[at]!, style));
  const view = style.view ?? { x: along === 'orbit' ? orbitView : poleToPole, y: frameOf(drawn) };
  const where = along === 'orbit' ? 'through the orbit' : 'by latitude';
  const what = label.endsWith(where) ? label : `${label} ${where}`;
  return {
    name: fileName(what),
    title: `${what}, with its spread`,
    textAlternative: members
      .map(({ oneCase, band }) => ledBy(oneCase.name, bandSentence(band), report.cases))
      .join(' '),
    caption: captionOf(group, report),
    lines: legend(drawn[0]!, style),
    data: drawn.flatMap((one) => tracesOf(one, group, style)),
    layout: layoutOf(drawn, group, grid, view, report.cases.length > 1, style),
    table: () => tableOf(group),
  };
}

/** The curve where it was computed, each place once. */
function tableOf({ members, along, label, unit }: BandGroup): FigureTable {
  const value = (what: string) => ({ name: `${label} ${what}`, unit });
  return {
    columns: [
      words('case'),
      along === 'orbit' ? words('share of the orbit since periapsis') : { name: 'Latitude', unit: 'deg' },
      ...percentileLevels.map((level) => value(`percentile ${level}`)),
      value('with every input at its centre'),
    ],
    rows: members.flatMap(({ oneCase, band: { positions, levels, atCentre } }) =>
      Array.from(positions, (position, at) => [
        oneCase.name,
        position,
        ...levels.map((level) => level[at]),
        atCentre[at],
      ]),
    ),
  };
}

const orbitView = [-quarterBefore, 1 - quarterBefore] as const;

function fileName(words: string): string {
  return `spread-${words
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-')
    .replaceAll(/^-|-$/g, '')}`;
}

function drawnBand(member: BandGroup['members'][number], panel: Panel, { theme }: FigureStyle): Drawn {
  const { band, caseIndex } = member;
  const places = band.along === 'orbit' ? orbitPlaces(band.positions) : latitudePlaces(band.positions);
  const pick = (values: Float64Array): number[] => places.map(({ from }) => values[from]!);
  return {
    member,
    panel,
    colour: caseColour(theme, caseIndex),
    x: places.map(({ at }) => at),
    levels: band.levels.map(pick),
    atCentre: pick(band.atCentre),
  };
}

interface Place {
  readonly at: number;
  readonly from: number;
}

/** One orbit from a quarter before periapsis, with a point beyond each end so that the lines reach the edges. */
function orbitPlaces(positions: Float64Array): Place[] {
  const once = Array.from(positions, (at, from) => ({ at, from })).filter(({ at }) => at < 1);
  const turns = [-1, 0, 1].flatMap((turn) => once.map(({ at, from }) => ({ at: at + turn, from })));
  const [left, right] = orbitView;
  const first = turns.findLastIndex(({ at }) => at <= left);
  const last = turns.findIndex(({ at }) => at >= right);
  return turns.slice(Math.max(0, first), last < 0 ? turns.length : last + 1);
}

function latitudePlaces(positions: Float64Array): Place[] {
  return Array.from(positions, (degrees, from) => ({ at: latitudePlace(degrees), from }));
}

function frameOf(drawn: readonly Drawn[]): [number, number] {
  const all = drawn.flatMap(({ levels, atCentre }) => [...levels[0]!, ...levels.at(-1)!, ...atCentre]);
  const [low, high] = [all.reduce((a, b) => Math.min(a, b)), all.reduce((a, b) => Math.max(a, b))];
  const air = Math.max(1e-9 * Math.abs(high), 0.06 * (high - low));
  return [low - air, high + air];
}

function tracesOf(
  { member, panel, colour, x, levels, atCentre }: Drawn,
  { unit }: BandGroup,
  style: FigureStyle,
): Data[] {
  const common: Partial<ScatterData> = { type: 'scatter', mode: 'lines', x: [...x], xaxis: panel.x, yaxis: panel.y };
  const name = plainLabel(member.oneCase.name, 60);
  const edge = (level: number, fill: number | null): Data => ({
    ...common,
    name: `${name}, percentile ${['2.5', '16', '50', '84', '97.5'][level]}`,
    y: [...levels[level]!],
    line: { color: colour, width: 0 },
    hoverinfo: 'skip',
    ...(fill === null ? {} : { fill: 'tonexty', fillcolor: translucent(colour, fill) }),
  });
  const symbol = unitText(unit);
  return [
    edge(0, null),
    edge(4, bandOpacity.wide),
    edge(1, null),
    edge(3, bandOpacity.near),
    {
      ...common,
      name: `${name}, at the centre`,
      y: [...atCentre],
      line: { color: style.theme.ink, width: 1.5, dash: 'dash' },
      hovertemplate: `%{y:.4~g} ${symbol}, every input at its centre<extra></extra>`,
    },
    {
      ...common,
      name: `${name}, median`,
      y: [...levels[2]!],
      line: { color: colour, width: 2.75 },
      customdata: x.map((_, at) => [levels[0]![at]!, levels[1]![at]!, levels[3]![at]!, levels[4]![at]!]),
      hovertemplate: `<b>%{y:.4~g} ${symbol}</b> median<br>68 %: %{customdata[1]:.4~g} to %{customdata[2]:.4~g}<br>95 %: %{customdata[0]:.4~g} to %{customdata[3]:.4~g}<extra></extra>`,
    },
  ];
}

function legend({ colour }: Drawn, { theme }: FigureStyle): LegendLine[] {
  const plain = { dash: 'solid', marker: null } as const;
  return [
    { ...plain, plainName: 'median', colour },
    { ...plain, plainName: 'every input at its centre', colour: theme.ink, dash: 'dash' },
    {
      ...plain,
      plainName: '68 % of the draws',
      colour: 'transparent',
      ground: translucent(colour, bandOpacity.wide + bandOpacity.near),
    },
    { ...plain, plainName: '95 % of the draws', colour: 'transparent', ground: translucent(colour, bandOpacity.wide) },
  ];
}

function layoutOf(
  drawn: readonly Drawn[],
  { along, label, unit }: BandGroup,
  grid: PanelGrid,
  view: View,
  isNamed: boolean,
  style: FigureStyle,
): Partial<Layout> {
  const { theme, narrow } = style;
  const margin = narrow ? { l: 56, r: 14, t: 30, b: 48 } : { l: 64, r: 190, t: 30, b: 52 };
  const symbol = unitText(unit);
  const short = narrow
    ? symbol || 'share'
    : symbol === ''
      ? label.split(' through')[0]!
      : `${label.split(/ through| by/)[0]} (${symbol})`;
  const along1 = along === 'orbit' ? orbitAxis(view, grid, style) : latitudeAxis(view, grid, style);
  return {
    ...plainLayout(style),
    height: grid.height + margin.t + margin.b,
    margin,
    hovermode: 'x unified',
    ...panelAxes(grid, (panel) => ({
      x: {
        ...along1,
        range: [...view.x],
        ...(panel.x === 'x' ? {} : { matches: 'x' as const }),
        ...(panel.isBottom ? {} : { title: { text: '' } }),
      },
      y: {
        ...axisStyle(style),
        ...(panel.y === 'y' ? {} : { matches: 'y' as const }),
        gridcolor: theme.hairline,
        range: [...view.y],
        nticks: narrow ? 5 : 8,
        title: { text: panel.isLeft ? plainLabel(short, 40) : '', standoff: 10 },
      },
    })),
    shapes: along === 'orbit' ? drawn.flatMap(({ panel }) => apsides(panel, style)) : [],
    annotations: [
      ...(isNamed
        ? drawn.map(({ panel, member }) => panelName(panel, member.oneCase.name, member.caseIndex, style))
        : []),
      ...(along === 'orbit' ? drawn.flatMap(({ panel }) => apsisNames(panel, style)) : []),
      ...(narrow ? [] : edgeNames(drawn, view, grid, style)),
    ],
  };
}

function orbitAxis({ x }: View, { columns }: PanelGrid, style: FigureStyle): Partial<Layout['xaxis']> {
  const isWhole = x[1] - x[0] > 0.9;
  return {
    ...axisStyle(style),
    title: { text: columns > 2 ? 'Share of the orbit' : 'Share of the orbit since periapsis', standoff: 8 },
    ...(isWhole ? { tickvals: [-0.25, 0, 0.25, 0.5, 0.75], ticktext: ['−¼', '0', '¼', '½', '¾'] } : { nticks: 5 }),
    showgrid: false,
    unifiedhovertitle: { text: '%{x:.3~f} of the orbit' },
  };
}

function latitudeAxis(view: View, { columns }: PanelGrid, style: FigureStyle): Partial<Layout['xaxis']> {
  return latitudeAxisLayout(view.x, columns > 1 ? { ...style, narrow: true } : style);
}

/** Beside the last panel of the first row: what the bands and lines are. */
function edgeNames(drawn: readonly Drawn[], view: View, grid: PanelGrid, style: FigureStyle): Partial<Annotation>[] {
  const one = drawn[Math.min(grid.columns, drawn.length) - 1]!;
  const { levels, atCentre, x, colour } = one;
  const { theme } = style;
  const lines: readonly (readonly [string, readonly number[], string])[] = [
    ['97.5 %', levels[4]!, colour],
    ['84 %', levels[3]!, colour],
    ['<b>median</b>', levels[2]!, colour],
    ['<i>inputs at centre</i>', atCentre, theme.ink],
    ['16 %', levels[1]!, colour],
    ['2.5 %', levels[0]!, colour],
  ];
  const labels = lines.flatMap(([text, y, ink]) => {
    const value = lastInView({ x, y }, view);
    return value === null ? [] : [{ text, value, colour: ink }];
  });
  const [low, high] = view.y;
  const named = lineLabels(labels, { low, high, height: grid.panelHeight }, style);
  return named.map((label) => ({ ...label, x: one.panel.xDomain[1], yref: one.panel.y }));
}

function captionOf({ along, members }: BandGroup, { draws }: SpreadReport): string {
  const counts = [...new Set(members.map(({ oneCase }) => oneCase.bandDraws))];
  const from =
    counts.length === 1 && counts[0] === draws ? `all ${draws} draws` : `the first ${list(counts.map(String))} draws`;
  const where =
    along === 'orbit'
      ? 'One whole orbit, from a quarter before periapsis; each draw is read at shares of its own period.'
      : 'Equal lengths along the axis are equal areas.';
  const period = along === 'orbit' ? periodsText(members.map(({ oneCase }) => oneCase)) : null;
  const long = period === null ? '' : ` The median orbit takes ${period}.`;
  return keptPercents(
    `Line: the median. Darker and lighter band: 68 % and 95 % of the draws, at each point by itself. Dashed: the run with every input at its centre. From ${from}. ${where}${long}`,
  );
}
