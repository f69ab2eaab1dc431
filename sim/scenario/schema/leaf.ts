/** Values of scenario keys: each declaration validates, converts to SI, types, labels and describes itself for editors. */
import * as z from 'zod';
import { SimError } from '../../error.ts';
import { type Instant, parseInstant, parseQuantity, type Quantity, type QuantitySpec } from '../../quantity/index.ts';

/** What a key says of itself, to readers and to editors. */
export interface About {
  /** A few words for tables and axes. */
  readonly title: string;
  readonly description: string;
  readonly examples: readonly (string | number)[];
  /** What the key takes where that is a quantity; `text` where a bare number is never understood. */
  readonly takes?: QuantitySpec | 'text';
  /** What its numbers are, where it takes words, too. */
  readonly numbers?: QuantitySpec;
  /** The range over which a reader may move it, written as a range of a scenario; where there is none, what the bounds leave. */
  readonly usual?: string;
  /** Closer ends of a spread than the bounds of the key, SI. */
  readonly cut?: { readonly low?: number; readonly high?: number };
}

/** Writes down what a schema says of itself. (`.meta()` would copy it: half of the time it takes to start.) */
export function described<Schema extends z.ZodType>(schema: Schema, about: About): Schema {
  z.globalRegistry.add(schema, { ...about, examples: [...about.examples] });
  return schema;
}

const anything = z.custom();
const textOrNumber = z.union([z.string(), z.number()]);

/** A leaf that turns text or a bare number into `T`; a SimError of the reader becomes an issue with its advice. */
export function leaf<T>(read: (input: string | number) => T, show: (value: T) => string | number, about: About) {
  const codec = z.codec(textOrNumber, anything as z.ZodCustom<T, T>, {
    decode: (input, context) => {
      try {
        return read(input);
      } catch (error) {
        if (!(error instanceof SimError)) throw error;
        context.issues.push({ code: 'custom', input, message: error.what, params: { mend: error.mend } });
        return z.NEVER;
      }
    },
    encode: show,
  });
  return described(codec, about);
}

/** A number with a unit, possibly uncertain → SI. */
export function quantity(spec: QuantitySpec, about: About) {
  const read = (input: string | number) => {
    try {
      return parseQuantity(input, spec);
    } catch (error) {
      throw error instanceof SimError ? withOwnExample(error, input, about) : error;
    }
  };
  return leaf<Quantity>(read, ({ text }) => text, { ...about, takes: spec });
}

/** The reader offers units by dimension; a key knows better which is usual: an ocean is deep in m, not in au. */
function withOwnExample(error: SimError, input: string | number, { examples }: About): SimError {
  const { where, what, mend } = error;
  if (!/^Write e\.g\. `[^`±]*`/.test(mend) || / to | log`/.test(mend)) return error;
  const example = String(examples[0]);
  const unit = /^[\d.e+-]+ (.*)$/.exec(example)?.[1];
  const shown = /has no unit$/.test(what) && unit ? `${input} ${unit}` : example;
  return new SimError(where, what, `Write e.g. \`${shown}\``, error);
}

/** A moment → TDB seconds since J2000. */
export function instant(about: About) {
  return leaf<Instant>(
    (input) => parseInstant(String(input)),
    ({ text }) => text,
    { ...about, takes: 'text' },
  );
}

/** A whole number from `min` to `max`. */
export function wholeNumber({ min, max }: { min: number; max: number }, about: About) {
  const read = (input: string | number): number => {
    const text = String(input).trim();
    const value = /^\d+(?:\.\d*)?(?:e\d+)?$/i.test(text) ? Number(text) : Number.NaN;
    if (Number.isInteger(value) && value >= min && value <= max) return value;
    const found = `\`${input}\` is not a whole number from ${min} to ${max}`;
    throw new SimError('number', found, `Write e.g. ${about.examples[0]}`);
  };
  return leaf<number>(read, (value) => value, about);
}

/** One of some words. */
export function word<const Words extends readonly [string, ...string[]]>(words: Words, about: About) {
  return described(z.enum(words), about);
}

/** Free text. */
export function freeText(about: About) {
  return described(z.string(), about);
}
