/** What is said of an orbit's drawing: its finding and how to read it. Pure. */
import { radiansPerDegree } from '../../sim/constants.ts';
import { meanFromTrue } from '../../sim/orbit/anomaly.ts';
import type { Radians } from '../../sim/si.ts';
import { commonTimeUnit, findingValue } from '../words/columns.ts';
import { moment } from '../words/moment.ts';
import { fixed, kelvin, list, significant } from '../words/number.ts';
import { extremeAnomaly } from './orbitMarks.ts';
import { lengthText, type Plan, type StarSize, starSize } from './orbitPlan.ts';
import { conjunctions, distanceAt } from './orbitShape.ts';
import { throughOrbit } from './throughOrbit.ts';

export function orbitFinding({ column, shape, unit }: Plan): string {
  const time = commonTimeUnit([column]);
  const temperature = throughOrbit(column.dataset, 'temperature');
  const where = (nu: Radians): string =>
    `true anomaly ${fixed(nu / radiansPerDegree, 1)}°, ${lengthText(distanceAt(shape, nu), unit)} from the star`;
  const extreme = (kind: 'hottest' | 'coldest'): string[] => {
    const nu = extremeAnomaly(column, shape, kind);
    const value = findingValue(column, kind === 'hottest' ? 'temperatureMax' : 'temperatureMin');
    const when = findingValue(column, kind === 'hottest' ? 'timeOfMax' : 'timeOfMin');
    return nu === null || value === null || when === null
      ? []
      : [`${kind} ${moment(when, column, time)}, ${kelvin(value)} (${where(nu)})`];
  };
  const found = [...extreme('hottest'), ...extreme('coldest')];
  const seen = conjunctions(column);
  const at = (nu: Radians): string => kelvin(temperature(meanFromTrue(nu, shape.eccentricity)));
  return [
    found.length > 0 ? sentence(list(found)) : 'There is no hottest moment: the temperature hardly changes.',
    ...(seen === null ? [] : [`In transit it has ${at(seen.transit)}, in eclipse ${at(seen.eclipse)}.`]),
  ].join(' ');
}

function sentence(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}

export function orbitCaption(plan: Plan, isOneOfMany: boolean): string {
  const { column, shape } = plan;
  return [
    'The plane of the orbit, to scale, from the side on which the planet goes round against the clock. Circles: equal distances from the star, and so equal starlight.',
    'Arrowheads: the way it goes, a tenth of the period apart.',
    ...(plan.marks.some(({ kind }) => kind === 'hottest')
      ? ['Triangles: the hottest moment (upwards) and the coldest.']
      : []),
    ...(conjunctions(column) === null
      ? ['Without an argument of periapsis transit and eclipse have no place.']
      : [
          'Dashed: the line of sight, its arrow to the observer. In transit the planet stands nearest to the observer, in eclipse behind the star; whether it crosses the disc depends on the tilt of the orbit.',
        ]),
    starWords(starSize(plan)),
    ...(shape.eccentricity > 0
      ? []
      : ['A circle has no periapsis: time and true anomaly count from the right-hand end.']),
    ...(isOneOfMany ? ['All cases share the colours.'] : []),
  ].join(' ');
}

function starWords({ enlarged }: StarSize): string {
  if (enlarged === null) return 'The star’s size is not given: its sign is not to scale.';
  if (enlarged === 1) return 'The star is to scale as well.';
  return `The star is drawn ${significant(enlarged, 2)} times too large, to be seen.`;
}
