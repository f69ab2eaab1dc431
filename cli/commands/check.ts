/** `perilag check`: what a scenario says, what follows from it, and what a run would do. Computes nothing. */

import { formatNumber, formatQuantity } from '../../sim/quantity/index.ts';
import { centreText, spreadNotes } from '../../sim/scenario/spreads.ts';
import type { Scenario, ScenarioCase } from '../../sim/scenario/types.ts';
import { exitCode } from '../exit.ts';
import type { Io } from '../io.ts';
import { type Terminal, terminalOf } from '../output/terminal.ts';
import { hanging, padEnd, textWidth, wrap } from '../output/text.ts';
import { readScenarioFiles } from '../scenarioFile.ts';
import { derivedLabel, derivedText } from './derived.ts';

/** Reads all files, then explains each. Gives the exit code. Errors: SimError and ScenarioError for the input's faults. */
export async function check(files: readonly string[], io: Io): Promise<number> {
  const read = await readScenarioFiles(files, io.cwd);
  const terminal = terminalOf(io);
  io.stdout.write(`${read.map(({ scenario }) => describeScenario(scenario, terminal)).join('\n\n')}\n`);
  return exitCode.done;
}

/** Texts up to this width have their remarks in one column. */
const widestText = 34;
/** With less room beside the names, texts go below them. */
const narrowestText = 22;

type Page = Pick<Terminal, 'width' | 'say' | 'paint'>;

/** One line of a section: a name, what it is, a remark. */
interface Row {
  readonly name: string;
  readonly text: string;
  readonly remark: string;
}

/** The explanation of one scenario, as lines no wider than the page. */
export function describeScenario(scenario: Scenario, page: Page): string {
  const { cases } = scenario;
  const parts = [
    headLines(scenario, page),
    section('What run would do', planLines(cases, page), page),
    rowSections('Inputs', cases, inputRows, page),
    rowSections('What follows from them', cases, derivedRows, page),
    section('Unused', unusedLines(cases, page), page),
    section(
      'Remarks',
      toldLines(cases, ({ remarks }) => remarks, page),
      page,
    ),
    section(
      'Warnings',
      toldLines(cases, ({ warnings }) => warnings, page),
      page,
    ),
    section(
      'Notes',
      spreadNotes(scenario).flatMap((note) => hanging('  ', page.say(note), page.width)),
      page,
    ),
  ];
  return parts
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n');
}

function headLines({ title, file, cases }: Scenario, page: Page): string[] {
  const names = cases.map(({ name }) => name).join(', ');
  const count = cases.length === 1 ? '1 case' : `${cases.length} cases`;
  const head = title === null ? [] : wrap(page.say(title), page.width).map((line) => page.paint('bold', line));
  return [...head, ...hanging(page.say(`${file}: ${count}: `), page.say(names), page.width)];
}

function planLines(cases: readonly ScenarioCase[], page: Page): string[] {
  const plans = grouped(cases, ({ model, options }) => {
    const { start, tolerance, samples, spacing } = options;
    const task =
      start === 'periodic'
        ? 'find the periodic states'
        : `run ${start.orbits} orbits forward from ${formatQuantity(start.temperature, 'K')}`;
    const steps = spacing === 'time' ? 'time' : 'the balanced anomaly';
    return `model ${model}: ${task} to a relative tolerance of ${formatNumber(tolerance)}, ${samples} rows an orbit in equal steps of ${steps}`;
  });
  const windows = grouped(cases, windowText).filter(({ text }) => text !== '');
  return [...plans, ...windows].flatMap(({ names, text }) => {
    const whose = names.length === cases.length ? '' : `${names.join(', ')}: `;
    return hanging('  ', page.say(whose + text), page.width);
  });
}

function windowText({ windows }: ScenarioCase): string {
  if (windows.length === 0) return '';
  const listed = windows.map(({ name, unavailable }) =>
    unavailable ? `${name} (not available: ${unavailable})` : name,
  );
  return `share of time in ${listed.join('; ')}`;
}

function inputRows({ inputs }: ScenarioCase): Row[] {
  return inputs.map((input) => {
    const isUncertain = input.distribution.form !== 'exact';
    const remark = input.isDefault ? 'default' : isUncertain ? `run uses ${centreText(input)}` : '';
    return { name: input.key, text: input.text, remark };
  });
}

function derivedRows({ derived }: ScenarioCase): Row[] {
  return derived.map((one) => ({ name: derivedLabel(one), text: derivedText(one), remark: '' }));
}

function unusedLines(cases: readonly ScenarioCase[], page: Page): string[] {
  const unused = grouped(cases, ({ inputs }) =>
    inputs
      .filter(({ used, isDefault }) => !used && !isDefault)
      .map(({ key }) => key)
      .join(', '),
  );
  return unused
    .filter(({ text }) => text !== '')
    .flatMap(({ names, text }) => {
      const whose = names.length === cases.length ? '' : `${names.join(', ')}: `;
      return hanging('  ', page.say(whose + text), page.width);
    });
}

/** What is told of several cases stands once, with their names. */
function toldLines(
  cases: readonly ScenarioCase[],
  told: (one: ScenarioCase) => readonly string[],
  page: Page,
): string[] {
  const whose = new Map<string, string[]>();
  for (const one of cases) {
    for (const text of told(one)) whose.set(text, [...(whose.get(text) ?? []), one.name]);
  }
  return [...whose].flatMap(([text, names]) => {
    const head = names.length === cases.length ? '' : `${names.join(', ')}: `;
    return hanging('  ', page.say(head + text), page.width);
  });
}

/** Rows that all cases share stand once; the rest follow under the name of each case. */
function rowSections(
  title: string,
  cases: readonly ScenarioCase[],
  rowsOf: (one: ScenarioCase) => Row[],
  page: Page,
): string[] {
  const all = cases.map((one) => ({ name: one.name, rows: rowsOf(one) }));
  const isShared = (row: Row) => all.every(({ rows }) => rows.some((other) => identity(other) === identity(row)));
  const shared = all[0]?.rows.filter(isShared) ?? [];
  const own = all.map(({ name, rows }) => ({ name, rows: rows.filter((row) => !isShared(row)) }));
  const nameWidth = Math.max(...all.flatMap(({ rows }) => rows.map(({ name }) => textWidth(page.say(name)))), 0);
  const remarked = all.flatMap(({ rows }) => rows.filter(({ remark }) => remark !== ''));
  const name = Math.min(nameWidth, 44);
  const room = Math.min(widestText, page.width - name - 'default'.length - 8);
  const textsInColumn = remarked.map(({ text }) => textWidth(page.say(text))).filter((width) => width <= room);
  const widths = { name, text: Math.max(...textsInColumn, 0) };
  const lines = [
    ...shared.flatMap((row) => rowLines(row, widths, page)),
    ...own.flatMap(({ name, rows }) =>
      rows.length ? [`  ${page.say(name)}`, ...rows.flatMap((row) => rowLines(row, widths, page, '    '))] : [],
    ),
  ];
  return section(title, lines, page);
}

function rowLines(row: Row, widths: { name: number; text: number }, page: Page, indent = '  '): string[] {
  const name = padEnd(page.say(row.name), widths.name + 4 - indent.length);
  const head = `${indent}${name}  `;
  const text = padEnd(page.say(row.text), widths.text);
  const line = `${head}${text}  ${page.say(row.remark)}`.trimEnd();
  if (textWidth(line) <= page.width) return [line];
  // Too wide for one line: text and remark below each other, in the column of the texts as long as there is room.
  const below = [row.text, row.remark].filter((part) => part !== '').map((part) => page.say(part));
  if (page.width - textWidth(head) >= narrowestText) {
    const blank = ' '.repeat(textWidth(head));
    return below.flatMap((part, index) => aligned(index === 0 ? head : blank, part, page.width));
  }
  return [
    ...aligned(indent, page.say(row.name), page.width),
    ...below.flatMap((part) => aligned(`${indent}  `, part, page.width)),
  ];
}

/** Wrapped, every line in the column where the head ends. */
function aligned(head: string, text: string, width: number): string[] {
  const indent = textWidth(head);
  return wrap(text, width - indent).map((line, index) => (index === 0 ? head : ' '.repeat(indent)) + line);
}

function section(title: string, lines: readonly string[], page: Page): string[] {
  return lines.length ? [page.paint('bold', title), ...lines] : [];
}

function identity(row: Row): string {
  return JSON.stringify(row);
}

/** Cases by what is said of them, in order of first mention. */
function grouped(
  cases: readonly ScenarioCase[],
  say: (one: ScenarioCase) => string,
): { names: string[]; text: string }[] {
  const groups = new Map<string, string[]>();
  for (const one of cases) {
    const text = say(one);
    groups.set(text, [...(groups.get(text) ?? []), one.name]);
  }
  return [...groups].map(([text, names]) => ({ names, text }));
}
