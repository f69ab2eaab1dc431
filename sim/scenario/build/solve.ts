/** Solve keys → options of a run. */
import type { SolveOptions } from '../../world.ts';
import type { Given } from './given.ts';

/** Rows of output that a forward run may fill. */
const mostRows = 2_000_000;

/** Null when a key is broken. `mayStart`: the model runs forward, too. */
export function buildOptions(given: Given, mayStart: boolean): SolveOptions | null {
  given.use('solve.tolerance', 'solve.start', 'solve.samples', 'solve.spacing');
  const { tolerance, start, samples, spacing } = given.keys.solve ?? {};
  if (!tolerance || !start || samples === undefined || !spacing) return null;
  const common = { tolerance: tolerance.value, samples, spacing };
  if (start === 'periodic') return { ...common, start };
  if (!mayStart) {
    const what = `model ${given.keys.model} finds periodic states and runs from no start`;
    return given.wrong('solve.start', what, 'Write start: periodic, or model: lumped');
  }
  const rows = start.orbits.value * samples;
  if (rows > mostRows) {
    const what = `${start.orbits.text} orbits of ${samples} samples make ${Math.ceil(rows)} rows, more than ${mostRows}`;
    return given.wrong('solve.start.orbits', what, 'Run fewer orbits or lower samples');
  }
  return {
    ...common,
    start: { temperature: start.temperature.value, orbits: start.orbits.value, at: start.at?.value ?? 0 },
  };
}
