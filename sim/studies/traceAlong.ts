/** One case of a scenario traced along an input, as it is reported. A log range is followed in the logarithm of the input. */
import { inUnit } from '../quantity/index.ts';
import type { Along } from '../scenario/along.ts';
import type { CaseAlong } from '../scenario/caseAlong.ts';
import { type TraceOptions, traceClimates } from './trace.ts';
import type { TraceReport, TraceReportCase } from './traceReport.ts';

/** The range with its ends in the user's unit. */
export function reportedAlong({ key, label, unit, from, to, log }: Along): TraceReport['along'] {
  return { key, label, unit, from: asTyped(from, unit), to: asTyped(to, unit), log };
}

/** An end of the range without the rounding of its way to SI and back: 1.6, not 1.5999999999999999. */
function asTyped(end: number, unit: string): number {
  return Number(inUnit(end, unit).toPrecision(15));
}

/** `progress` is told the input in the user's unit. Errors: SimError where the scenario is not sound at a value inside the range. */
export function traceAlong(one: CaseAlong, along: Along, progress?: TraceOptions['progress']): TraceReportCase {
  const { name, model, tolerance, warnings } = one;
  const { from, to, unit, log } = along;
  const range = log ? { from: Math.log(from), to: Math.log(to) } : { from, to };
  const valueAt = (place: number) => {
    if (place <= range.from) return from; // exactly: exp undoes log but for a rounding
    if (place >= range.to) return to;
    return log ? Math.exp(place) : place;
  };
  const shown = (place: number) => {
    const value = valueAt(place);
    return value === from || value === to ? asTyped(value, unit) : inUnit(value, unit);
  };
  const told: TraceOptions['progress'] = (step) => progress?.({ ...step, value: shown(step.value) });
  const options = { ...range, tolerance, progress: told };
  const result = traceClimates(model, (place) => one.worldAt(valueAt(place)), options);
  return {
    name,
    model,
    branches: result.branches.map(({ ended, points }) => {
      return { ended, points: points.map((point) => ({ ...point, value: shown(point.value) })) };
    }),
    folds: result.folds.map(shown),
    warnings: [...warnings, ...result.warnings],
  };
}
