/** `--hold orbitMeanInstellation`: the orbit widens with its eccentricity, so that the same light falls on it over an orbit. */
import { SimError } from '../error.ts';
import { inUnit, nearest, type Quantity } from '../quantity/index.ts';
import type { Along } from './along.ts';
import { sayable } from './nodes.ts';
import type { KeysAndTree } from './redundant.ts';
import { shorten } from './syntax.ts';
import type { Following, Varying } from './varied.ts';

export type Hold = 'orbitMeanInstellation';

const where = '--hold';
const eccentricity = 'orbit.eccentricity';
/** How the keys that can set the size of an orbit go with its axis. */
const powers: Readonly<Record<string, number>> = {
  'orbit.semiMajorAxis': 1,
  'orbit.scaledSemiMajorAxis': 1,
  'orbit.period': 3 / 2,
  'orbit.instellation': -2,
};

/** Errors: SimError at `--hold`: another word, no eccentricity among the ranges, or a size of the orbit among them. */
export function readHold(text: string, alongs: readonly Along[]): Hold {
  const word: Hold = 'orbitMeanInstellation';
  if (text !== word) {
    const mend = nearest(text, [word]) ? `Did you mean \`${word}\`` : `Write ${where} ${word}`;
    throw new SimError(where, `\`${shorten(text)}\` cannot be held`, mend);
  }
  if (!alongs.some(({ key }) => key === eccentricity)) {
    const what = `${word} is held while the eccentricity varies, and no --along varies it`;
    throw new SimError(where, what, `Add --along '${eccentricity}=0 to 0.9', or leave ${where} out`);
  }
  const size = alongs.find(({ key }) => key in powers);
  if (size) {
    throw new SimError(
      where,
      `${word} sets ${size.key}, along which the grid runs`,
      `Leave out ${where}, or the range`,
    );
  }
  return word;
}

/**
 * What follows the eccentricity so that L/(4πa²√(1−e²)) stays what the case has with its own: a ∝ (1−e²)^−¼. The star stays as
 * it is: where axis and period are both given, and a mass is not, both follow.
 * Units:  SI; each value is one that a scenario file can say exactly.
 */
export function following(
  { keys }: KeysAndTree,
  axisKey: string,
  own: { readonly eccentricity: number },
  at: number,
): Following {
  const orbit = keys.orbit as Record<string, Quantity>;
  const followers = [...new Set([axisKey, 'orbit.period'])].flatMap((key) => {
    const quantity = orbit[key.slice('orbit.'.length)];
    return quantity ? [{ key, unit: quantity.unit, value: quantity.value, power: powers[key]! }] : [];
  });
  return {
    keys: followers.map(({ key, unit }): Varying => ({ key, unit })),
    from: (values) => {
      const scale = axisScale(own.eccentricity, values[at]!);
      return followers.map(({ value, unit, power }) => scaled(value, unit, scale ** power));
    },
  };
}

function axisScale(own: number, e: number): number {
  return (((1 - own) * (1 + own)) / ((1 - e) * (1 + e))) ** 0.25;
}

/** The value itself where nothing changes: it is already one that was typed. */
function scaled(value: number, unit: string, factor: number): number {
  return factor === 1 ? value : sayable(inUnit(value * factor, unit), unit).value;
}

export function holdNote({ keys }: Following): string {
  const changed = keys.map(({ key }) => key).join(' and ');
  const verb = keys.length > 1 ? 'follow' : 'follows';
  return `Held: orbitMeanInstellation. ${changed} ${verb} the eccentricity, so that L/(4πa²√(1−e²)) stays what the case has with its own; the star stays as it is.`;
}
