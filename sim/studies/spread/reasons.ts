/** Why draws lack a finding: in the words of the model, of the first draw that was computed and lacks it. */
import { SimError } from '../../error.ts';
import { models } from '../../models/index.ts';
import type { SpreadPlan } from './plan.ts';

/** From a finding and its draws to a reason; null where no computed draw lacks it, or the model gives none. */
export type ReasonOf = (name: string, values: Float64Array) => string | null;

/** `periods` (draws,), s: NaN in draws that failed. Solves a world for each draw that is asked about, once. */
export function reasonsOf(plan: SpreadPlan, index: number, periods: Float64Array): ReasonOf {
  const known = new Map<number, ReadonlyMap<string, string>>();
  return (name, values) => {
    const draw = values.findIndex((value, i) => Number.isNaN(value) && !Number.isNaN(periods[i]));
    if (draw < 0) return null;
    const reasons = known.get(draw) ?? reasonsAt(plan, index, draw);
    known.set(draw, reasons);
    return reasons.get(name) ?? null;
  };
}

function reasonsAt({ cases, draws }: SpreadPlan, index: number, draw: number): ReadonlyMap<string, string> {
  const { drawn, inputs } = cases[index];
  const values = Float64Array.from(inputs, ({ dimension, at }) => at(draws.at(draw, dimension)));
  try {
    const { world, options, windows } = drawn.builtAt(values);
    const { findings } = models[drawn.model].solve(world, options, windows).states[0];
    return new Map(findings.flatMap(({ name, reason }) => (reason === undefined ? [] : [[name, reason]])));
  } catch (error) {
    if (error instanceof SimError) return new Map(); // the table says that it was computed; its reason is not worth a failure
    throw error;
  }
}
