/** What a reader of the result must know before using it. */
import { zeroCelsius } from '../../constants.ts';
import { curveValue } from '../../solve/curve.ts';
import { extremes } from '../../solve/features.ts';
import type { World } from '../../world.ts';
import type { Trajectory } from './trajectory.ts';

export function lumpedWarnings(world: World, trajectories: readonly Trajectory[], unresolved: number): string[] {
  return [
    ...emissionWarnings(world, trajectories),
    ...stateWarnings(world, trajectories, unresolved),
    ...trajectories.flatMap(unsettledWarning),
  ];
}

function emissionWarnings(world: World, trajectories: readonly Trajectory[]): string[] {
  const { validity } = world.surface.emission;
  if (validity === null) return [];
  const found = trajectories.map(({ curve }) => extremes(curve));
  const lowest = Math.min(...found.map((extreme) => extreme.lowest.value));
  const highest = Math.max(...found.map((extreme) => extreme.highest.value));
  if (lowest >= validity.from && highest <= validity.to) return [];
  const celsius = (kelvin: number) => (kelvin - zeroCelsius).toFixed(0);
  return [
    `The temperature runs from ${celsius(lowest)} to ${celsius(highest)} °C, beyond the ${celsius(validity.from)} to ` +
      `${celsius(validity.to)} °C for which the emission law is published.`,
  ];
}

function stateWarnings(world: World, trajectories: readonly Trajectory[], unresolved: number): string[] {
  const warnings: string[] = [];
  if (trajectories.length > 1) {
    warnings.push(
      `This orbit allows ${trajectories.length} periodic states; the findings are those of the warm one. Which of them a planet is in depends on its past.`,
    );
  }
  const nearTipping = trajectories.some(({ logMultiplier, frozenLogMultiplier }) => {
    const margin = (logMultiplier ?? 1) / (frozenLogMultiplier ?? 1);
    return margin > 0 && margin < 0.05;
  });
  if (nearTipping)
    warnings.push(
      'A stable state is close to tipping (stability margin below 0.05): small changes of the inputs may end it.',
    );
  if (unresolved > 0) warnings.push(unresolvedWarning(world, unresolved));
  return warnings;
}

function unresolvedWarning(world: World, unresolved: number): string {
  const { ramp } = world.surface.albedo;
  const several = unresolved > 1 ? 's' : '';
  if (ramp !== null && ramp.from === ramp.to) {
    return `${unresolved} unstable periodic state${several} rest${several === '' ? 's' : ''} on the albedo step itself and cannot be followed there; a narrow ramp shows ${several === '' ? 'it' : 'them'}.`;
  }
  return `${unresolved} further periodic state${several} ${several === '' ? 'was' : 'were'} seen but could not be followed to the tolerance.`;
}

/** A run from a start that has not come to rest: the last orbit ends elsewhere than it began. */
function unsettledWarning({ curve, logMultiplier, errorEstimate }: Trajectory): string[] {
  const end = curve.position[curve.position.length - 1];
  const oneOrbitBefore = end - 2 * Math.PI;
  if (logMultiplier !== null) return [];
  if (oneOrbitBefore < curve.position[0])
    return ['The run is shorter than one orbit: its means are those of the part it covers.'];
  const last = curve.value[curve.value.length - 1];
  const change = last - curveValue(curve, oneOrbitBefore);
  if (Math.abs(change) < Math.max(0.01, 10 * errorEstimate * last)) return [];
  const direction = change > 0 ? 'warmer' : 'cooler';
  return [
    `The run has not settled: its last orbit ends ${Math.abs(change).toPrecision(3)} K ${direction} than it began. Means and extremes are those of the run, not of a settled climate.`,
  ];
}
