/** What every way to the findings has in common: thresholds, reasons, and how a number is entered. */
import { instellationShare, orbitMeanInside } from '../../findings/instellationWindow.ts';
import { enter, enterUndefined, type Sheet } from '../../findings/sheet.ts';
import { worldColumns, worldValuesInto } from '../../findings/world.ts';
import type { Kelvin, Radians, Seconds } from '../../si.ts';
import type { Window, World } from '../../world.ts';
import { at } from './columns.ts';

/** A time of an extreme counts as undefined when its own error is larger than this share of an orbit. */
export const largestTimeError = 0.02;
/** A swing below this share of the temperature is rounding. */
const smallestSwing = 1e-13;

export const still = 'the temperature does not vary';
export const tooFlat =
  'the maximum or minimum is too flat: its time is uncertain by more than 0.02 orbit; lower solve.tolerance';
export const circular = 'the instellation does not vary on a circular orbit';

/** Whether a swing is more than rounding. */
export function isMoving(swing: Kelvin, mean: Kelvin): boolean {
  return swing > smallestSwing * mean;
}

export function enterWorld(world: World, near: Kelvin, isStable: boolean, sheet: Sheet): void {
  worldValuesInto(world, near, isStable, sheet.value);
  for (let i = 0; i < worldColumns.length; i++) enter(sheet, i, sheet.value[i]);
}

export function enterLagOf(world: World, value: Seconds, plusMinus: Seconds, sheet: Sheet): void {
  const { period } = world.orbit;
  enter(sheet, at.lagOfMax, value, plusMinus);
  enter(sheet, at.lagOfMaxOrbits, value / period, plusMinus / period);
}

export function enterNoLag(sheet: Sheet, reason: string): void {
  enterUndefined(sheet, at.lagOfMax, reason);
  enterUndefined(sheet, at.lagOfMaxOrbits, reason);
}

export function enterDampingOf(
  swing: Kelvin,
  steadyHighest: Kelvin,
  steadyLowest: Kelvin,
  error: Kelvin,
  sheet: Sheet,
): void {
  const steadySwing = steadyHighest - steadyLowest;
  if (isMoving(steadySwing, steadyHighest)) enter(sheet, at.damping, swing / steadySwing, error / steadySwing);
  else enterUndefined(sheet, at.damping, circular);
}

export function enterNoChange(sheet: Sheet, reason: string): void {
  for (const column of [at.fastestWarming, at.fastestCooling]) {
    enter(sheet, column, 0);
    enterUndefined(sheet, column + 1, reason);
  }
}

/** Two columns: the share of the time, and whether the orbit mean is inside. */
export function enterInstellationWindow(
  world: World,
  window: Window,
  start: Radians,
  end: Radians,
  column: number,
  sheet: Sheet,
): void {
  if (window.unavailable !== undefined) {
    enterUndefined(sheet, column, window.unavailable);
    enterUndefined(sheet, column + 1, window.unavailable);
    return;
  }
  enter(sheet, column, instellationShare(world, window, start, end));
  enter(sheet, column + 1, orbitMeanInside(world, window));
}
