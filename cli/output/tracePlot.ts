/** The small plot of `trace`: mean temperature against the input; stable climates solid, unstable ones dotted. */
import { stretchesOf } from '../../sim/studies/climateRanges.ts';
import type { TraceReport, TraceReportCase } from '../../sim/studies/traceReport.ts';
import { rowScale } from './axis.ts';
import type { Line } from './orbitCurves.ts';
import { bodyLines, centred, horizontalAxis, layoutOf } from './plot.ts';
import type { Terminal } from './terminal.ts';
import { wrap } from './text.ts';

const mostRows = 13;

/** Lines that fit the terminal; none where a case has no stretch to draw. */
export function tracePlotLines(item: TraceReportCase, along: TraceReport['along'], terminal: Terminal): string[] {
  const lines = linesOf(item, along, terminal);
  if (lines.length === 0) return [];
  const heights = lines.flatMap(({ y }) => Array.from(y));
  const scale = rowScale(Math.min(...heights), Math.max(...heights), mostRows);
  const layout = layoutOf(lines, scale, 0, terminal.unicode, terminal);
  const heading = terminal.unicode
    ? 'mean temperature, K: stable (solid), unstable (dotted)'
    : 'mean temperature, K: stable (o), unstable (dots)';
  return [
    ...wrap(heading, terminal.width).map((line) => terminal.paint('dim', line)),
    ...bodyLines(lines, layout, false, terminal),
    ...horizontalAxis(layout, terminal),
    terminal.paint('dim', centred(terminal.say(axisText(along)), layout)),
  ];
}

/** Unstable stretches first: what is stable stands before them. */
function linesOf({ branches }: TraceReportCase, { log }: TraceReport['along'], terminal: Terminal): Line[] {
  const stretches = branches.flatMap(stretchesOf).toSorted((a, b) => Number(a.stable) - Number(b.stable));
  return stretches.map(({ stable, points }) => ({
    x: points.map(({ value }) => (log ? Math.log10(value) : value)),
    y: points.map(({ temperatureMean }) => temperatureMean),
    dotted: !stable && terminal.unicode,
    mark: stable ? 'o' : '.',
    name: '',
    colour: stable ? 'cyan' : 'dim',
  }));
}

function axisText({ key, unit, log }: TraceReport['along']): string {
  const text = unit === '1' ? key : `${key}, ${unit}`;
  return log ? `log10 of ${text}` : text;
}
