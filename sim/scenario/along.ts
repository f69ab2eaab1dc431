/** `--along KEY=RANGE`: one input of a scenario that takes all values of a range. */
import { SimError } from '../error.ts';
import { formatQuantity, parseQuantity, type Quantity } from '../quantity/index.ts';
import { numberKeyFault } from './numberKey.ts';
import { mendedRange } from './rangeForms.ts';
import { aboutKey, labelOf, quantityAt } from './schema/lookup.ts';
import { shorten } from './syntax.ts';

export interface Along {
  /** Dotted key, `star.luminosity`. */
  readonly key: string;
  /** A few words for axes. */
  readonly label: string;
  /** As typed, `Lsun`; `1` for a pure number. */
  readonly unit: string;
  /** SI. */
  readonly from: number;
  readonly to: number;
  /** Whether the axis is logarithmic. */
  readonly log: boolean;
}

const where = '--along';
/** Of what a user may copy from a message. */
const most = 100;
const sample = 'star.luminosity=0.8 to 1.3 Lsun';
const refusal = 'is a setting, a word, a date or a table, not a number that can run over a range';

/**
 * `star.luminosity=0.8 to 1.3 Lsun`, or with ` log` behind it.
 * Units:  the range's own, to SI; bounds are those of the key.
 * Errors: SimError at `--along`: no `=`, an unknown key or one that is no number, no range, no unit, out of bounds.
 */
export function readAlong(text: string): Along {
  const equals = text.indexOf('=');
  const key = (equals < 0 ? text : text.slice(0, equals)).trim();
  if (key === '') throw new SimError(where, 'no key is given', `Write e.g. \`${sample}\``);
  const [word = '', ...more] = key.split(/\s+/);
  if (more.length > 0) {
    const what = `\`${shorten(text.trim())}\` has no \`=\` behind its key`;
    throw new SimError(where, what, `Write \`${shorten(`${word}=${text.trim().slice(word.length).trim()}`, most)}\``);
  }
  const path = key.split('.');
  const fault = numberKeyFault(path, { isNumber: (at) => quantityAt(at) !== null, refusal, sample });
  if (fault) throw new SimError(where, fault.what, fault.mend);
  const spec = quantityAt(path)!;
  const example = exampleFor(path);
  const written = equals < 0 ? '' : text.slice(equals + 1).trim();
  if (written === '') {
    const what = equals < 0 ? `\`${key}\` has no range behind it` : `the range of ${key} is empty`;
    throw new SimError(where, what, example);
  }
  const mended = mendedRange(written);
  if (mended !== null) {
    throw new SimError(
      where,
      `\`${shorten(written)}\` is not a range`,
      `Write \`${shorten(`${key}=${mended}`, most)}\``,
    );
  }
  const { distribution, unit } = atAlong(key, () => parseQuantity(written, { ...spec, spread: true }));
  if (distribution.form !== 'uniform' && distribution.form !== 'logUniform') {
    throw new SimError(where, `\`${shorten(written)}\` is not a range`, example);
  }
  const { low: from, high: to } = distribution;
  return { key, label: labelOf(path), unit, from, to, log: distribution.form === 'logUniform' };
}

/** With the key's own unit, from its example. */
function exampleFor(path: readonly string[]): string {
  const key = path.join('.');
  if (key === 'star.luminosity') return `Write e.g. \`${sample}\``;
  const [number = '', ...unit] = String(aboutKey(path)?.examples[0] ?? '').split(' ');
  const low = Number(number);
  if (!Number.isFinite(low) || low <= 0) return `Write e.g. \`${sample}\``;
  const high = Number((1.25 * low).toPrecision(3));
  return `Write e.g. \`${[`${key}=${low} to ${high}`, ...unit].join(' ')}\``;
}

function atAlong(key: string, read: () => Quantity): Quantity {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    throw new SimError(where, `${key}: ${error.what}`, error.mend, error);
  }
}

/** A value of the input as a scenario would give it; 17 digits bring back the same number to a rounding or two. */
export function alongText({ unit }: Pick<Along, 'unit'>, value: number, digits = 6): string {
  return formatQuantity(value, unit, digits);
}
