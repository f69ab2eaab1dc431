/** When periapsis falls: TDB seconds, or null where the scenario names no date. */
import { periapsisFromMeanAnomaly, periapsisFromTransit } from '../../orbit/epoch.ts';
import type { Seconds, TdbSeconds } from '../../si.ts';
import type { Given } from './given.ts';
import type { Shape } from './shape.ts';

export function buildPeriapsisTime(given: Given, shape: Shape, period: Seconds): TdbSeconds | null {
  const orbit = given.keys.orbit;
  given.use('orbit.periapsisTime', 'orbit.transitTime', 'orbit.epoch', 'orbit.meanAnomaly');
  const time = orbit?.periapsisTime?.tdbSeconds ?? fromTransit(given, shape, period) ?? fromEpoch(given, period);
  if (time !== null) given.derive('orbit.periapsisTime', time, 's', 'Periapsis, TDB seconds after J2000');
  return time;
}

function fromTransit(given: Given, shape: Shape, period: Seconds): TdbSeconds | null {
  const transit = given.keys.orbit?.transitTime;
  if (!transit) return null;
  given.use('orbit.argumentOfPeriapsis');
  const { eccentricity } = shape;
  const known = shape.argumentOfPeriapsis ?? (eccentricity === 0 ? Math.PI / 2 : null);
  if (known !== null) {
    return periapsisFromTransit(transit.tdbSeconds, { period, eccentricity, argumentOfPeriapsis: known });
  }
  if (given.has('orbit.argumentOfPeriapsis')) return null;
  const what = 'a transit tells when periapsis is only with argumentOfPeriapsis';
  return given.wrong('orbit.transitTime', what, 'Add argumentOfPeriapsis, e.g. 105 deg, or write periapsisTime');
}

function fromEpoch(given: Given, period: Seconds): TdbSeconds | null {
  const { epoch, meanAnomaly } = given.keys.orbit ?? {};
  if (epoch && meanAnomaly) return periapsisFromMeanAnomaly(epoch.tdbSeconds, meanAnomaly.value, period);
  if (epoch && !given.has('orbit.meanAnomaly')) {
    return given.wrong('orbit.epoch', 'an epoch alone places no planet', 'Add meanAnomaly, e.g. 212 deg');
  }
  if (meanAnomaly && !given.has('orbit.epoch')) {
    return given.wrong('orbit.meanAnomaly', 'a mean anomaly alone has no date', 'Add epoch, e.g. 2461103.71 TDB');
  }
  return null;
}
