/** Moments of an orbit worth a sign on it, and what to say of them. Pure. */

import { trueFromMean } from '../../sim/orbit/anomaly.ts';
import type { Radians } from '../../sim/si.ts';
import { type Column, findingValue, periodOf } from '../words/columns.ts';
import { kelvin } from '../words/number.ts';
import { conjunctions, type OrbitShape } from './orbitShape.ts';

export type MarkKind = 'periapsis' | 'apoapsis' | 'hottest' | 'coldest' | 'transit' | 'eclipse';

export interface OrbitMark {
  readonly kind: MarkKind;
  readonly trueAnomaly: Radians;
  /** Beside the sign, short on a phone. */
  readonly label: string;
}

/** Apsides where the orbit is no circle, extremes where they have a moment, conjunctions where the observer's bearing is known. */
export function orbitMarks(
  column: Column,
  shape: OrbitShape,
  lengthText: (trueAnomaly: Radians) => string,
  narrow: boolean,
): OrbitMark[] {
  const seen = conjunctions(column);
  const apsis = (kind: 'periapsis' | 'apoapsis', trueAnomaly: Radians): OrbitMark => ({
    kind,
    trueAnomaly,
    label: narrow ? kind : `${kind}<br>${lengthText(trueAnomaly)}`,
  });
  return [
    ...(shape.eccentricity > 0 ? [apsis('periapsis', 0), apsis('apoapsis', Math.PI)] : []),
    ...extremeMark(column, shape, 'hottest', narrow),
    ...extremeMark(column, shape, 'coldest', narrow),
    ...(seen === null
      ? []
      : [
          {
            kind: 'transit' as const,
            trueAnomaly: seen.transit,
            label: 'transit',
          },
          { kind: 'eclipse' as const, trueAnomaly: seen.eclipse, label: 'eclipse' },
        ]),
  ];
}

function extremeMark(column: Column, shape: OrbitShape, kind: 'hottest' | 'coldest', narrow: boolean): OrbitMark[] {
  const trueAnomaly = extremeAnomaly(column, shape, kind);
  const temperature = findingValue(column, kind === 'hottest' ? 'temperatureMax' : 'temperatureMin');
  if (trueAnomaly === null || temperature === null) return [];
  return [{ kind, trueAnomaly, label: narrow ? kelvin(temperature) : `${kind}<br>${kelvin(temperature)}` }];
}

/** Null where the temperature has no moment at which it is the greatest, or the least. */
export function extremeAnomaly(
  column: Column,
  { eccentricity }: OrbitShape,
  kind: 'hottest' | 'coldest',
): Radians | null {
  const time = findingValue(column, kind === 'hottest' ? 'timeOfMax' : 'timeOfMin');
  return time === null ? null : trueFromMean((2 * Math.PI * time) / periodOf(column), eccentricity);
}
