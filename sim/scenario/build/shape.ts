/** Eccentricity and argument of periapsis, from whichever pair is given. */
import { SimError } from '../../error.ts';
import { shapeFromComponents, shapeFromRootComponents } from '../../orbit/shape.ts';
import type { Radians } from '../../si.ts';
import { alternatives } from '../merge.ts';
import { mostEccentric } from '../schema/orbit.ts';
import type { Given } from './given.ts';

export interface Shape {
  readonly eccentricity: number;
  readonly argumentOfPeriapsis: Radians | null;
}

const pairs = [
  { cosine: 'eCosOmega', sine: 'eSinOmega', read: shapeFromComponents },
  { cosine: 'sqrtECosOmega', sine: 'sqrtESinOmega', read: shapeFromRootComponents },
] as const;

export function buildShape(given: Given): Shape | null {
  const shape = readShape(given);
  if (!shape) return null;
  const { eccentricity } = shape;
  if (eccentricity > mostEccentric) {
    const key = given.has('orbit.eccentricity') ? 'orbit.eccentricity' : pairKey(given);
    return given.wrong(
      key,
      `the eccentricity is ${eccentricity}; the solver is accurate up to ${mostEccentric}`,
      `Keep it at or below ${mostEccentric}`,
    );
  }
  return shape;
}

function readShape(given: Given): Shape | null {
  const eccentricity = given.quantity('orbit.eccentricity');
  if (eccentricity) {
    const omega = given.keys.orbit?.argumentOfPeriapsis;
    return { eccentricity: eccentricity.value, argumentOfPeriapsis: omega?.value ?? null };
  }
  for (const { cosine, sine, read } of pairs) {
    if (!given.has(`orbit.${cosine}`) && !given.has(`orbit.${sine}`)) continue;
    return readPair(given, cosine, sine, read);
  }
  const names = alternatives.filter(({ section }) => section === 'orbit').flatMap(({ ways }) => ways.flat());
  const shapeNames = names.filter((name) => /eccentricity|Omega/.test(name));
  return given.missing(
    'orbit',
    shapeNames,
    'no eccentricity is given',
    'Write eccentricity: 0 for a circle, or e.g. 0.62',
  );
}

function readPair(
  given: Given,
  cosine: string,
  sine: string,
  read: (cosine: number, sine: number) => Shape,
): Shape | null {
  const x = given.quantity(`orbit.${cosine}`);
  const y = given.quantity(`orbit.${sine}`);
  if (x && y) {
    try {
      const shape = read(x.value, y.value);
      given.derive('orbit.eccentricity', shape.eccentricity, '1', 'Eccentricity');
      if (shape.argumentOfPeriapsis !== null && shape.eccentricity > 0) {
        given.derive('orbit.argumentOfPeriapsis', shape.argumentOfPeriapsis, 'rad', 'Argument of periapsis');
      }
      return shape;
    } catch (error) {
      if (!(error instanceof SimError)) throw error;
      const what = `${cosine} ${x.text} and ${sine} ${y.text} give an eccentricity of 1 or more`;
      return given.wrong(`orbit.${cosine}`, what, 'A bound orbit has an eccentricity below 1');
    }
  }
  if (!given.has(`orbit.${sine}`))
    given.wrong(`orbit.${cosine}`, `${cosine} alone gives no eccentricity`, `Add ${sine}`);
  if (!given.has(`orbit.${cosine}`))
    given.wrong(`orbit.${sine}`, `${sine} alone gives no eccentricity`, `Add ${cosine}`);
  return null;
}

function pairKey(given: Given): string {
  const pair = pairs.find(({ cosine }) => given.has(`orbit.${cosine}`));
  return `orbit.${pair?.cosine ?? 'eccentricity'}`;
}
