/** `summary.json`: the numbers that people quote, with their units, the inputs they follow from and the two accounts. */
import type { Finding } from '../../sim/findings/finding.ts';
import type { State } from '../../sim/models/model.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';
import type { CaseInput } from '../../sim/scenario/types.ts';
import { jsonText } from './json.ts';

/** The file as text. Errors: throws when a number in it is not finite. */
export function summaryText(result: RunResult): string {
  return `${jsonText(summaryOf(result))}\n`;
}

/** The summary as plain data, in the order of the contract. */
export function summaryOf(result: RunResult) {
  const { title, file, sha256 } = result.scenario;
  const { program, cases, notes } = result;
  return { program, scenario: { title, file, sha256 }, cases: cases.map(caseSummary), notes };
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

/** A word has no value: its text stands for it. A date has the seconds since the moment that `since` names. */
function inputSummary({ value, unit, since, text, isDefault, used, distribution }: CaseInput) {
  return {
    value,
    unit,
    ...(since === undefined ? {} : { since }),
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

/** The bound is called by what it bounds: a reader would take ± for how well the planet is known. */
function findingsSummary(findings: readonly Finding[]) {
  return Object.fromEntries(
    findings.map(({ name, plusMinus, ...rest }) => {
      return [name, { ...rest, ...(plusMinus === undefined ? {} : { numericalError: plusMinus }) }];
    }),
  );
}

function byKey<T extends { readonly key: string }, U>(items: readonly T[], summarise: (item: T) => U) {
  return Object.fromEntries(items.map((item) => [item.key, summarise(item)]));
}
