/** The sentences that answer a grid: what the range of the inputs does to the chief findings. Plain text; pure. */
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { nodeText, rangesText } from './gridAxes.ts';
import { list } from './number.ts';
import { extremesOf, type ShownFinding, shownFinding, spanText } from './shownFinding.ts';

export interface GridAnswer {
  readonly lead: string;
  /** One entry a case; empty where the lead says it all. */
  readonly details: readonly { readonly caseIndex: number; readonly name: string; readonly text: string }[];
}

export function gridAnswer(report: GridReport): GridAnswer {
  const [mean, lag] = ['temperatureMean', 'lagOfMaxOrbits'].map((name) => shownFinding(report, name));
  const over = `Over ${rangesText(report)}`;
  if (report.cases.length === 1) {
    return { lead: `${over}, ${caseText(report, 0, mean!, lag!, true)}${failedText(report, 0)}`, details: [] };
  }
  return {
    lead: `${over}, ${runs('the mean temperature of the cases', mean!, all(mean!))}, and ${runs('the lag', lag!, all(lag!))}.`,
    details: report.cases.map(({ name }, at) => {
      const text = caseText(report, at, mean!, lag!, false);
      return { caseIndex: at, name, text: `${text[0]!.toUpperCase()}${text.slice(1)}${failedText(report, at)}` };
    }),
  };
}

function all({ cases }: ShownFinding): (number | null)[] {
  return cases.flat();
}

function caseText(report: GridReport, at: number, mean: ShownFinding, lag: ShownFinding, isWhole: boolean): string {
  const values = mean.cases[at] ?? [];
  const found = extremesOf(values);
  const warmest = found && `It is warmest on average at ${nodeText(report.axes, found.high.node)}`;
  const coldest = found && `coldest at ${nodeText(report.axes, found.low.node)}`;
  const where = isWhole && found && found.high.value > found.low.value ? ` ${warmest}, ${coldest}.` : '';
  return `${runs('the mean temperature', mean, values)}, and ${runs('the lag', lag, lag.cases[at] ?? [])}.${where}`;
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
