/** What `trace` shows of each case: where its climates end, where there are several, the plot, and the warnings. */
import { formatNumber } from '../../sim/quantity/index.ts';
import { type ClimateEnd, climateEnds, severalClimates } from '../../sim/studies/climateRanges.ts';
import type { TraceReport, TraceReportCase } from '../../sim/studies/traceReport.ts';
import { panels } from './grid.ts';
import type { Terminal } from './terminal.ts';
import { hanging, wrap } from './text.ts';
import { tracePlotLines } from './tracePlot.ts';

/** Lines that fit the terminal, from 40 columns up. */
export function traceLines({ scenario, along, cases }: TraceReport, terminal: Terminal): string[] {
  const title = wrap(terminal.say(scenario.title ?? scenario.file), terminal.width);
  return [
    ...title.map((line) => terminal.paint('bold', line)),
    ...wrap(`along ${along.key}, ${rangeText(along, along)}`, terminal.width).map((line) =>
      terminal.paint('dim', line),
    ),
    ...cases.flatMap((item) => ['', ...caseLines(item, along, terminal)]),
  ];
}

function caseLines(item: TraceReportCase, along: TraceReport['along'], terminal: Terminal): string[] {
  const ends = climateEnds(item);
  const name = wrap(terminal.say(`${item.name} (${item.model})`), terminal.width);
  return [
    ...name.map((line) => terminal.paint('bold', line)),
    ...(ends.length > 0 ? endLines(ends, along, terminal) : [noEnds(item)]),
    ...severalLines(item, along, terminal),
    '',
    ...tracePlotLines(item, along, terminal),
    ...item.warnings.flatMap((text) => hanging('warning   ', terminal.say(text), terminal.width)),
  ];
}

/** A branch that could not be followed to the end says nothing of what lies beyond. */
function noEnds({ branches }: TraceReportCase): string {
  const whole = branches.every(({ ended }) => ended === 'left');
  return whole ? 'no climate ends in this range' : 'no end found as far as the branches could be followed';
}

function endLines(ends: readonly ClimateEnd[], { key, unit }: TraceReport['along'], terminal: Terminal): string[] {
  const leaf = key.split('.').at(-1)!;
  const grid = {
    headings: [terminal.say(unit === '1' ? leaf : `${leaf}, ${unit}`), 'mean there, K'],
    rows: ends.map(({ climate, missing }) => {
      const text = `${climate} climate ends ${missing}`;
      return { section: text, label: '', alone: text };
    }),
    cells: ends.map(({ value, temperatureMean }) => [formatNumber(value), temperatureMean.toFixed(2)]),
  };
  return panels(grid, terminal).flat();
}

function severalLines(item: TraceReportCase, along: TraceReport['along'], terminal: Terminal): string[] {
  const ranges = severalClimates(item).map((range) => rangeText(range, along));
  return ranges.length === 0 ? [] : hanging('more than one climate: ', terminal.say(ranges.join('; ')), terminal.width);
}

function rangeText({ from, to }: { from: number; to: number }, { unit }: TraceReport['along']): string {
  const numbers = `${formatNumber(from)} to ${formatNumber(to)}`;
  return unit === '1' ? numbers : `${numbers} ${unit}`;
}
