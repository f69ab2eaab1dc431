/** Keys that a user names away from the scenario (`--along`, columns of a posterior), where a number of the World is wanted. */
import { nearest } from '../quantity/index.ts';
import { keyOfSymbol, keysIn, sectionOf } from './schema/lookup.ts';
import { shorten } from './syntax.ts';

export interface Wanted {
  isNumber(path: readonly string[]): boolean;
  /** What is wrong with a key that is something else: `is a word, which …`. */
  readonly refusal: string;
  /** Of what to write instead. */
  readonly sample: string;
}

export interface KeyFault {
  readonly what: string;
  readonly mend: string;
}

/** The sections that make a World. */
const followed = ['star', 'orbit', 'planet'];

/** Null for a number of the star, the orbit or the planet. */
export function numberKeyFault(path: readonly string[], wanted: Wanted): KeyFault | null {
  const unknown = unknownFault(path);
  if (unknown) return unknown;
  return followed.includes(path[0]!) && wanted.isNumber(path) ? null : otherFault(path, wanted);
}

function unknownFault(path: readonly string[]): KeyFault | null {
  const key = path.join('.');
  for (const [depth, step] of path.entries()) {
    const above = path.slice(0, depth);
    const known = keysIn(above);
    if (depth === 1 && !followed.includes(path[0]!)) break; // told as what is no number
    if (known.includes(step)) continue;
    const section = depth === 0 ? sectionOf(step) : null;
    const near = section === null ? (keyOfSymbol(above, step) ?? nearest(step, known)) : `${section}.${step}`;
    const meant = near && (section === null ? [...above, near, ...path.slice(depth + 1)].join('.') : near);
    const what =
      depth === 0 ? `there is no key \`${shorten(key)}\`` : `\`${shorten(step)}\` is not a key of ${above.join('.')}`;
    const listed = known.map((name) => `\`${name}\``).join(', ');
    const mend = meant
      ? `Did you mean \`${meant}\``
      : known.length
        ? `Keys here are ${listed}`
        : `End it at \`${above.join('.')}\``;
    return { what, mend };
  }
  return null;
}

function otherFault(path: readonly string[], { isNumber, refusal, sample }: Wanted): KeyFault {
  const key = path.join('.');
  const below = followed.includes(path[0]!) ? keysIn(path).find((name) => isNumber([...path, name])) : undefined;
  if (below) return { what: `\`${key}\` is a section`, mend: `Name one of its keys, e.g. \`${key}.${below}\`` };
  return {
    what: `\`${key}\` ${refusal}`,
    mend: `Name a number of the star, the orbit or the planet, e.g. \`${sample}\``,
  };
}
