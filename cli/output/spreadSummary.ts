/** The part of `summary.json` that a spread adds. */
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';

/** Inputs in the unit in which they were typed, findings SI. */
export function spreadSummary({ draws, seed, sampling, failed, indexRows, cases }: SpreadReport) {
  return {
    draws,
    seed,
    sampling,
    failed,
    indexRows,
    cases: cases.map((one) => ({
      name: one.name,
      failed: one.failed,
      inputs: Object.fromEntries(
        one.inputs.map(({ key, unit, text, centre, summary, truncatedShare, column }) => {
          return [key, { unit, text, centre, ...summary, truncatedShare, ...(column === null ? {} : { column }) }];
        }),
      ),
      findings: Object.fromEntries(
        one.findings.map(({ name, label, unit, atCentre, summary, missingBecause, circular, groups }) => {
          const apart = groups === null ? {} : { groups };
          const missing = missingBecause === null ? {} : { missingBecause };
          return [name, { unit, label, ...summary, ...missing, atCentre, ...(circular ? { circular } : {}), ...apart }];
        }),
      ),
      importance: Object.fromEntries(
        one.findings.map(({ name, importance: { first, total, ranks, leftOut, reason } }) => [
          name,
          {
            ...(reason === undefined ? {} : { reason }),
            ...byInput(one.inputs, 'first', first),
            ...byInput(one.inputs, 'total', total),
            ...byInput(one.inputs, 'ranks', ranks),
            ...(first === null && total === null ? {} : { leftOut }),
          },
        ]),
      ),
      ...(one.climates === null ? {} : { climates: one.climates }),
      bandDraws: one.bandDraws,
      idle: one.idle,
      warnings: one.warnings,
      notes: one.notes,
    })),
  };
}

function byInput<T>(inputs: readonly { readonly key: string }[], name: string, values: readonly T[] | null) {
  return values === null ? {} : { [name]: Object.fromEntries(inputs.map(({ key }, i) => [key, values[i]!])) };
}
