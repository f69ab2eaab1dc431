/** `summary.json`: the numbers that people quote, with their units, the inputs they follow from and the two accounts. */
import type { Finding } from '../../sim/findings/finding.ts';
import type { State } from '../../sim/models/model.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';
import type { CaseInput } from '../../sim/scenario/types.ts';
import { jsonText } from './json.ts';

/** The file as text. Errors: SimError when a number in it is not finite. */
export function summaryText(result: RunResult): string {
  return `${jsonText(summaryOf(result))}\n`;
}

/** The summary as plain data, in the order of the contract. */
export function summaryOf(result: RunResult) {
  const { title, file, sha256 } = result.scenario;
  return { program: result.program, scenario: { title, file, sha256 }, cases: result.cases.map(caseSummary) };
}

function caseSummary(result: CaseResult) {
  return {
    name: result.name,
    model: result.model,
    inputs: byKey(result.inputs, inputSummary),
    derived: byKey(result.derived, ({ value, unit, label }) => ({ value, unit, label })),
    findings: findingsSummary(result.findings),
    states: result.states.map(stateSummary),
    checks: { ...result.checks, tolerance: result.tolerance, limit: result.accountLimit, passed: result.passed },
    steadyByFraction: result.steadyByFraction,
    warnings: result.warnings,
  };
}

/** A word has no value: its text stands for it. */
function inputSummary({ value, unit, text, isDefault, used, distribution }: CaseInput) {
  return {
    value,
    unit,
    text,
    ...(isDefault ? { isDefault } : {}),
    ...(used ? {} : { used }),
    ...(distribution.form === 'exact' ? {} : { distribution }),
  };
}

function stateSummary(state: State) {
  const { label, stable, multiplier, stabilityMargin, errorEstimate, converged, findings, energyBalance } = state;
  const { absorbed, internalHeat, emitted, stored, relativeDifference } = energyBalance;
  return {
    label,
    stable,
    multiplier,
    stabilityMargin,
    errorEstimate,
    converged,
    findings: findingsSummary(findings),
    energyBalance: { unit: 'W/m2', absorbed, internalHeat, emitted, stored, relativeDifference },
  };
}

function findingsSummary(findings: readonly Finding[]) {
  return Object.fromEntries(findings.map(({ name, ...rest }) => [name, rest]));
}

function byKey<T extends { readonly key: string }, U>(items: readonly T[], summarise: (item: T) => U) {
  return Object.fromEntries(items.map((item) => [item.key, summarise(item)]));
}
