/** Which of the states that two starts end in are climates, and what is to be said of the others. */
import { SimError } from '../../error.ts';
import type { Kelvin } from '../../si.ts';
import { areaMeanOf } from './areaMeans.ts';
import type { ZonalState } from './states.ts';

export interface Climate {
  /** The start it was reached from; `only` where both ended in it, or just one was tried. */
  readonly label: 'warm' | 'cold' | 'only';
  readonly state: ZonalState;
}

export interface Climates {
  /** Warm first, at least one: where none is a climate, what the warm start was left with. */
  readonly found: readonly Climate[];
  /** Of each other start, in words. */
  readonly failures: readonly string[];
}

/**
 * Beyond a fold a start may be left where a climate has ended: an iterate that is no state of any year.
 * Errors: SimError where the warm start ended in no temperatures at all.
 */
export function climatesOf([warm, cold]: readonly ZonalState[], tolerance: number): Climates {
  if (!isPhysical(warm)) {
    throw new SimError(
      'planet.heatStore',
      'the year of this planet cannot be computed: somewhere it heats or cools faster than its shortest time step',
      'Give a larger heat store, a wider albedo ramp (from, to) or more heatTransport',
    );
  }
  if (cold === undefined) return { found: [{ label: 'only', state: warm }], failures: [] };
  const both: readonly Climate[] = [
    { label: 'warm', state: warm },
    { label: 'cold', state: cold },
  ];
  const climates = both.filter(({ state }) => isClimate(state, tolerance));
  const found = climates.length > 0 ? climates : both.slice(0, 1);
  return { found, failures: both.filter((one) => !found.includes(one)).map(failureOf) };
}

/** Where even the finest steps lose a fast band, what is left is no temperature, and no result. */
export function isPhysical({ history, errorEstimate, logMultiplier, frozenLogMultiplier }: ZonalState): boolean {
  const isTemperature = history.value.every((value) => value > 0 && Number.isFinite(value));
  return isTemperature && [errorEstimate, logMultiplier, frozenLogMultiplier].every(Number.isFinite);
}

/** Stable, and a state: one whose year closes is there, if its steps were too few for the tolerance. */
function isClimate(state: ZonalState, tolerance: number): boolean {
  if (!isPhysical(state) || state.logMultiplier >= 0) return false;
  return state.converged || stillToGo(state) < tolerance * yearMean(state);
}

/** How far a stable state is from where it goes: what the year changes, over 1 − μ for all the years to come. */
function stillToGo({ history: { value }, system: { size }, logMultiplier }: ZonalState): Kelvin {
  const end = value.length - size;
  let change = 0;
  for (let i = 0; i < size; i++) change = Math.max(change, Math.abs(value[end + i] - value[i]));
  return change / -Math.expm1(logMultiplier);
}

function failureOf({ label, state }: Climate): string {
  if (!isPhysical(state)) {
    return 'What becomes of a cold start could not be computed: somewhere it heats or cools faster than the shortest time step, or falls below absolute zero. Whether this orbit allows a cold climate beside the warm one is not known.';
  }
  const stopped = `From the ${label} start no climate was reached: it stopped at ${yearMean(state).toFixed(1)} K mean, `;
  if (state.converged) return `${stopped}in a state that is not stable.`;
  return `${stopped}known to ${state.errorEstimate.toExponential(1)} only; near the end of a climate this happens: perilag trace shows where climates end.`;
}

/** Of the area mean. */
export function yearMean({ history, system }: ZonalState): Kelvin {
  const { size, mesh } = system;
  let sum = 0;
  for (let step = 0; step < mesh.steps; step++) {
    const rows = [step, step + 1].map((row) => history.value.subarray(row * size, (row + 1) * size));
    for (const row of rows) sum += (mesh.width[step] / 2) * areaMeanOf(system.physics, row);
  }
  return sum / mesh.time[mesh.steps];
}
