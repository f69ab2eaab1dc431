/** Figure: how late each latitude is hottest, behind the maximum of its own insolation. Pure. */
import type { Data, Layout } from 'plotly.js-dist-min';
import type { Seconds } from '../../sim/si.ts';
import { type Column, columnName, commonTimeUnit, periodOf } from '../words/columns.ts';
import { latitudeText } from '../words/latitude.ts';
import { duration, fixed, percent, type TimeUnit, timeDecimals } from '../words/number.ts';
import { bandsOf } from './bands.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { type ChartLine, traceOf } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { poleToPole } from './latitudeAxis.ts';
import { latitudeAxisLayout, latitudeMargins, latitudeWords } from './latitudeChart.ts';
import { namesBesideLines } from './lineNames.ts';
import { type LocalLag, localLags } from './localLags.ts';
import { stateLook } from './temperatureLines.ts';
import type { View } from './view.ts';

const plotHeight = { wide: 280, narrow: 240 };
/** Share of the orbit. Where either maximum moves farther than this from one latitude to the next it is another one: no line joins them. */
const largestStep = 0.05;

/** Share of the orbit above which a lag reads better as a lead. */
const lead = 0.75;

interface LagLine {
  readonly column: Column;
  readonly period: Seconds;
  readonly lags: readonly (LocalLag | null)[];
  /** Latitudes that have a lag, in the unit of the axis. */
  readonly line: ChartLine;
}

/** Columns with latitude; at least one. */
export function localLag(columns: readonly Column[], style: FigureStyle): Figure {
  const unit = commonTimeUnit(columns);
  const lagLines = columns.map((column) => lagLine(column, unit, style));
  const lines = lagLines.map(({ line }) => line);
  const most = Math.max(...lines.flatMap(({ y }) => y), 0);
  const view: View = style.view ?? { x: poleToPole, y: [0, most > 0 ? 1.08 * most : 1] };
  return {
    name: 'local-lag-by-latitude',
    title: 'Local lag by latitude',
    textAlternative: lagLines.map((one) => finding(one, unit)).join(' '),
    caption: caption(lagLines),
    lines,
    data: [latitudeWords(bandsOf(columns[0]!.dataset), 0), ...lagLines.map((one) => brokenTrace(one, unit))],
    layout: lagLayout(lines, view, unit, style),
    table: () => tableOf(lagLines, unit),
  };
}

/** Every latitude, empty where no lag is defined. */
function tableOf(lagLines: readonly LagLine[], unit: TimeUnit): FigureTable {
  return {
    columns: [
      words('case'),
      words('state'),
      { name: 'Latitude', unit: 'deg' },
      { name: 'Lag', unit: unit.symbol },
      { name: 'Hottest after periapsis', unit: unit.symbol },
    ],
    rows: lagLines.flatMap(({ column, lags }) =>
      bandsOf(column.dataset).middlesDeg.map((latitudeDeg, band) => {
        const found = lags[band] ?? null;
        const times = found === null ? [null, null] : [found.lag / unit.seconds, found.hottest / unit.seconds];
        return [column.caseName, column.state.label, latitudeDeg, ...times];
      }),
    ),
  };
}

function lagLayout(lines: readonly ChartLine[], view: View, unit: TimeUnit, style: FigureStyle): Partial<Layout> {
  const margin = style.narrow ? latitudeMargins.narrow : latitudeMargins.wide;
  const height = style.narrow ? plotHeight.narrow : plotHeight.wide;
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'x unified',
    xaxis: { ...latitudeAxisLayout(view.x, style) },
    yaxis: {
      ...axisStyle(style),
      title: { text: `Lag (${unit.symbol})`, standoff: 10 },
      range: [...view.y],
      gridcolor: style.theme.hairline,
    },
    annotations: style.narrow ? [] : namesBesideLines(lines.filter(hasPoints), view, height, style),
  };
}

function hasPoints({ x }: ChartLine): boolean {
  return x.length > 1;
}

function lagLine(column: Column, unit: TimeUnit, style: FigureStyle): LagLine {
  const period = periodOf(column);
  const lags = localLags(column.dataset, period);
  const { middles } = bandsOf(column.dataset);
  const known = middles.flatMap((x, band) => {
    const found = lags[band];
    return found ? [{ x, y: found.lag / unit.seconds }] : [];
  });
  return {
    column,
    period,
    lags,
    line: { ...stateLook(column, style.theme), x: known.map(({ x }) => x), y: known.map(({ y }) => y) },
  };
}

/** The line with a gap where no lag is defined, and where it changes to another maximum. */
function brokenTrace({ column, line, lags, period }: LagLine, unit: TimeUnit): Data {
  const { middles } = bandsOf(column.dataset);
  const x: number[] = [];
  const y: (number | null)[] = [];
  middles.forEach((place, band) => {
    const [here, before] = [lags[band] ?? null, lags[band - 1] ?? null];
    if (here !== null && before !== null && isAnother(here, before, period)) {
      x.push((place + middles[band - 1]!) / 2);
      y.push(null);
    }
    x.push(place);
    y.push(here === null ? null : here.lag / unit.seconds);
  });
  const decimals = timeDecimals(period, unit, 1);
  return { ...traceOf(line, `%{y:.${decimals}f} ${unit.symbol}`), x, y } as Data;
}

function isAnother(a: LocalLag, b: LocalLag, period: Seconds): boolean {
  const apart = (one: Seconds, other: Seconds): number => {
    const turns = (one - other) / period;
    return Math.abs(turns - Math.round(turns));
  };
  return apart(a.hottest, b.hottest) > largestStep || apart(a.hottest - a.lag, b.hottest - b.lag) > largestStep;
}

function finding({ column, lags, period }: LagLine, unit: TimeUnit): string {
  const { middlesDeg } = bandsOf(column.dataset);
  const known = lags.flatMap((found, band) =>
    found === null ? [] : [{ lag: found.lag, where: latitudeText(middlesDeg[band]!) }],
  );
  if (known.length === 0) return `${columnName(column)}: no lag, the insolation hardly varies at any latitude.`;
  const inOrder = known.toSorted((a, b) => a.lag - b.lag);
  const words = ({ lag, where }: { lag: Seconds; where: string }): string =>
    `${duration(lag, unit)} at ${where} (${percent(lag / period)} of the orbit)`;
  return `${columnName(column)}: the local maximum comes between ${words(inOrder[0]!)} and ${words(inOrder.at(-1)!)} behind that of the insolation.`;
}

function caption(lines: readonly LagLine[]): string {
  const hasGaps = lines.some(({ lags }) => lags.includes(null));
  const hasLeads = lines.some(({ lags, period }) => lags.some((found) => found !== null && found.lag > lead * period));
  return [
    'From the nearest preceding maximum of the insolation at a latitude to the highest temperature there. Where there are several maxima in an orbit the lag can change from one to another between latitudes: there the line breaks.',
    ...(hasLeads ? ['A lag of nearly a whole orbit: the temperature turns a little before the insolation does.'] : []),
    ...(hasGaps ? [`No lag is given where the insolation varies by less than ${fixed(0.1, 1)} % of its maximum.`] : []),
  ].join(' ');
}
