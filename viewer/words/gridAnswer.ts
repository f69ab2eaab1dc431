/** The sentences that answer a grid: what the range of the inputs does to the chief findings. Plain text; pure. */
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { labelInText } from './along.ts';
import { nodeText, rangesText } from './gridAxes.ts';
import { lookOf } from './gridMembers.ts';
import { list } from './number.ts';
import { extremesOf, type ShownFinding, shownFinding, spanText } from './shownFinding.ts';

export interface GridAnswer {
  readonly lead: string;
  /** One entry a case; empty where the lead says it all. */
  readonly details: readonly { readonly caseIndex: number; readonly name: string; readonly text: string }[];
}

export function gridAnswer(report: GridReport): GridAnswer {
  const told = chosen(report);
  const over = `Over ${rangesText(report)}`;
  if (report.cases.length === 1) {
    return { lead: `${over}, ${caseText(report, 0, told, true)}${failedText(report, 0)}`, details: [] };
  }
  const all = told.map(({ what, shown }, i) =>
    runs(i === 0 ? `${what} of the cases` : what, shown, shown.cases.flat()),
  );
  return {
    lead: `${over}, ${all.join(', and ')}.`,
    details: report.cases.map((one, at) => {
      const text = caseText(report, at, told, false);
      return {
        caseIndex: lookOf(one),
        name: one.name,
        text: `${text[0]!.toUpperCase()}${text.slice(1)}${failedText(report, at)}`,
      };
    }),
  };
}

interface Told {
  readonly name: string;
  readonly what: string;
  readonly shown: ShownFinding;
}

const chief: Readonly<Record<string, string>> = { temperatureMean: 'the mean temperature', lagOfMaxOrbits: 'the lag' };
const most = 2;

/** The chief findings; where they were not asked for, the first of those that were. */
function chosen(report: GridReport): Told[] {
  const asked = report.cases.flatMap(({ findings }) => findings.map(({ name }) => name));
  const names = [...Object.keys(chief).filter((name) => asked.includes(name)), ...asked];
  return [...new Set(names)].slice(0, most).map((name) => {
    const shown = shownFinding(report, name);
    return { name, what: chief[name] ?? `the ${labelInText(shown)}`, shown };
  });
}

function caseText(report: GridReport, at: number, told: readonly Told[], isWhole: boolean): string {
  const text = told.map(({ what, shown }) => runs(what, shown, shown.cases[at] ?? [])).join(', and ');
  const found = extremesOf(told.find(({ name }) => name === 'temperatureMean')?.shown.cases[at] ?? []);
  if (!isWhole || found === null || found.high.value === found.low.value) return `${text}.`;
  const warmest = `The planet is warmest on average at ${nodeText(report.axes, found.high.node)}`;
  return `${text}. ${warmest}, coldest at ${nodeText(report.axes, found.low.node)}.`;
}

/** `the lag runs from 0.10 to 12.00 % of an orbit`. */
function runs(what: string, shown: ShownFinding, values: readonly (number | null)[]): string {
  const found = extremesOf(values);
  if (found === null) return `${what} has no value`;
  const span = spanText(shown, found.low.value, found.high.value);
  return span === null ? `${what} stays at ${shown.text(found.high.value)}` : `${what} runs from ${span}`;
}

/** ` 3 of 1600 worlds could not be computed.`; nothing where all could. */
export function failedText({ axes, cases }: GridReport, at: number): string {
  const failed = cases[at]!.failed.length;
  if (failed === 0) return '';
  const nodes = axes.reduce((count, axis) => count * axis.nodes.length, 1);
  return ` ${failed} of ${nodes} worlds could not be computed.`;
}

/** A failure that several nodes share is said once. */
export function failures({ axes, cases }: GridReport): { name: string; text: string }[] {
  return cases.flatMap(({ name, failed }) => {
    const messages = [...new Set(failed.map(({ message }) => message))];
    return messages.slice(0, 3).map((message) => {
      const nodes = failed.filter((one) => one.message === message).map(({ node }) => nodeText(axes, node));
      const more = nodes.length > 1 ? [`${nodes.length - 1} more`] : [];
      return { name, text: `at ${list([nodes[0]!, ...more])}: ${message}` };
    });
  });
}
