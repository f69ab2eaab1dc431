/** Ground as a lumped store, with the half-space's own answer beside it. */
import type { ArealHeatCapacity, Seconds } from '../../si.ts';
import { groundHeatCapacity, groundLinearResponse } from '../../surface/heatStore/ground.ts';
import { lumpedLinearResponse } from '../../surface/heatStore/linearResponse.ts';
import type { HeatStoreKeys } from '../schema/heatStore.ts';
import type { Given } from './given.ts';
import { siderealPeriod, solarDay } from './rotation.ts';
import { shown, shownNumber } from './show.ts';

/** What a ground store needs to know of the rest of the world. */
export interface GroundSetting {
  readonly period: Seconds;
  readonly eccentricity: number;
  /** dE/dT at the flux-mean temperature, W m⁻² K⁻¹; null while not known. */
  readonly radiativeSlope: number | null;
}

/** Beyond this share the answers of lumped ground and of a half-space differ enough to warn. */
const tellingDifference = 0.2;

type Ground = NonNullable<HeatStoreKeys['ground']>;

/** Heat capacity of the ground under `key`; null when its cycle cannot be had. */
export function groundCapacity(
  given: Given,
  key: string,
  ground: Ground,
  setting: GroundSetting | null,
): ArealHeatCapacity | null {
  const cycle = groundCycle(given, key, ground.cycle, setting);
  if (cycle === null) return null;
  const thermalInertia = ground.thermalInertia.value;
  const heatCapacity = groundHeatCapacity({ thermalInertia, cycle });
  const radiativeSlope = setting?.radiativeSlope ?? null;
  if (radiativeSlope !== null)
    compareWithHalfSpace(given, key, { thermalInertia, cycle, heatCapacity, radiativeSlope });
  return heatCapacity;
}

function groundCycle(given: Given, key: string, cycle: Ground['cycle'], setting: GroundSetting | null): Seconds | null {
  if (typeof cycle !== 'string') return cycle.value;
  if (!setting) return null;
  if (cycle === 'orbit') return setting.period;
  given.use('planet.rotationPeriod');
  const rotation = given.keys.planet?.rotationPeriod;
  if (!rotation) {
    if (given.has('planet.rotationPeriod')) return null;
    return given.wrong(
      `${key}.ground.cycle`,
      'rotation needs planet.rotationPeriod',
      'Add it, e.g. 26 h, or write cycle: orbit or a time',
    );
  }
  const sidereal = siderealPeriod(rotation, setting);
  const day = solarDay(sidereal, setting.period);
  if (!(Math.abs(day / sidereal - 1) < 0.1)) {
    const found = Number.isFinite(day) ? `its solar day is ${shown(day, 'd', 4)}` : 'it has no solar day';
    given.warn(
      () =>
        `${key}.ground.cycle: rotation takes the rotation period ${shown(sidereal, 'd', 4)}, but the star warms the ground once a solar day, and ${found}; a time can stand for cycle.`,
    );
  }
  return sidereal;
}

interface LumpedGround {
  readonly thermalInertia: number;
  readonly cycle: Seconds;
  readonly heatCapacity: ArealHeatCapacity;
  readonly radiativeSlope: number;
}

function compareWithHalfSpace(given: Given, key: string, ground: LumpedGround): void {
  const halfSpace = groundLinearResponse(ground);
  const lumped = lumpedLinearResponse(ground);
  const seconds = ground.cycle / (2 * Math.PI);
  given.derive(`${key}.ground.halfSpaceDamping`, halfSpace.amplitude, '1', 'Linear damping of the half-space itself');
  given.derive(`${key}.ground.lumpedDamping`, lumped.amplitude, '1', 'Linear damping of the lumped ground');
  given.derive(`${key}.ground.halfSpaceLag`, halfSpace.lag * seconds, 's', 'Linear lag of the half-space itself');
  given.derive(`${key}.ground.lumpedLag`, lumped.lag * seconds, 's', 'Linear lag of the lumped ground');
  const isFar = (a: number, b: number) => Math.abs(a - b) > tellingDifference * Math.min(a, b);
  if (!isFar(halfSpace.amplitude, lumped.amplitude) && !isFar(halfSpace.lag, lumped.lag)) return;
  const percent = (amplitude: number) => `${shownNumber(100 * amplitude, 2)} %`;
  const days = (lag: number) => shown(lag * seconds, 'd', 2);
  given.warn(
    () =>
      `Ground as one lumped store: small swings come through at ${percent(lumped.amplitude)} and ${days(lumped.lag)} late, those of the half-space itself at ${percent(halfSpace.amplitude)} and ${days(halfSpace.lag)} late: more than 20 % apart.`,
  );
}
