/** Asks the schema about a key: does it exist, what is it called, which keys stand beside it. */
import * as z from 'zod';
import type { QuantitySpec } from '../../quantity/index.ts';
import type { About } from './leaf.ts';
import { caseSchema, headSchema } from './scenario.ts';

const fileSchema = caseSchema.extend(headSchema.shape);

/** In the order of a file. `cases` holds whole scenarios in part, so that no schema declares it; `$schema` is for editors. */
const topKeys = topOrder([...Object.keys(headSchema.shape), ...Object.keys(caseSchema.shape), 'cases']);

function topOrder(keys: readonly string[]): readonly string[] {
  const order = ['title', 'notes', 'model', 'star', 'orbit', 'planet', 'posterior', 'cases', 'windows', 'solve'];
  return [...order, ...keys.filter((key) => !order.includes(key) && key !== '$schema')];
}

/** The sections whose keys are fixed. */
const sections = ['star', 'orbit', 'planet', 'solve'] as const;

/** Title, description and examples of a key of a case (or of the head of the file); null where none is declared. */
export function aboutKey(path: readonly string[]): About | null {
  const found = schemaAt(path);
  return found ? ((z.globalRegistry.get(found) as About | undefined) ?? null) : null;
}

/** A few words for a key, its own name where it has no title. */
export function labelOf(path: readonly string[]): string {
  return aboutKey(path)?.title ?? path.at(-1) ?? '';
}

export function isKnownKey(path: readonly string[]): boolean {
  return schemaAt(path) !== null;
}

/** Keys that may stand in a section, in the order in which they are declared. */
export function keysIn(path: readonly string[]): readonly string[] {
  if (!path.length) return topKeys;
  const found = schemaAt(path);
  return found ? objectsIn(found).flatMap((object) => Object.keys(object.shape)) : [];
}

/** How papers write a key: what a user most likely means who types the symbol. */
const symbols: Readonly<Record<string, Readonly<Record<string, string>>>> = {
  star: {
    L: 'luminosity',
    lum: 'luminosity',
    T: 'temperature',
    Teff: 'temperature',
    R: 'radius',
    M: 'mass',
    rho: 'density',
  },
  orbit: {
    a: 'semiMajorAxis',
    sma: 'semiMajorAxis',
    e: 'eccentricity',
    ecc: 'eccentricity',
    P: 'period',
    i: 'inclination',
    inc: 'inclination',
    w: 'argumentOfPeriapsis',
    omega: 'argumentOfPeriapsis',
    S: 'instellation',
    aR: 'scaledSemiMajorAxis',
    T0: 'transitTime',
    Tc: 'transitTime',
    Tp: 'periapsisTime',
    Tperi: 'periapsisTime',
  },
  planet: { A: 'bondAlbedo', R: 'radius', M: 'mass', f: 'absorbingFraction' },
};

/** The key of a section that a symbol stands for; null for a word that is no symbol. */
export function keyOfSymbol(path: readonly string[], symbol: string): string | null {
  const known = path.length === 1 ? symbols[path[0]!] : undefined;
  return known && Object.hasOwn(known, symbol) ? known[symbol]! : null;
}

/** The section in which a key belongs that stands in the wrong one. */
export function sectionOf(key: string): string | null {
  return sections.find((section) => keysIn([section]).includes(key)) ?? null;
}

/** What a key takes where it may be one number; null for words, counts, dates, tables and sections. */
export function quantityAt(path: readonly string[]): QuantitySpec | null {
  const found = schemaAt(path);
  return found && takenBy(found);
}

/** What the numbers of a key are, those of a key that takes words, too; null where it takes no quantity. */
export function numbersAt(path: readonly string[]): QuantitySpec | null {
  return quantityAt(path) ?? aboutKey(path)?.numbers ?? null;
}

/** Where a spread of a key ends, SI, infinite where it does not; null where it has no end at all. */
export function endsOfSpread(path: readonly string[]): { low: number; high: number } | null {
  const spec = numbersAt(path);
  if (!spec) return null;
  const { cut } = aboutKey(path) ?? {};
  const isKelvin = spec.dimension === 'temperature';
  const low = cut?.low ?? spec.min ?? spec.above ?? (spec.positive || isKelvin ? 0 : Number.NEGATIVE_INFINITY);
  const high = cut?.high ?? spec.max ?? spec.below ?? Number.POSITIVE_INFINITY;
  return Number.isFinite(low) || Number.isFinite(high) ? { low, high } : null;
}

/** 2π for an angle without bounds: it comes round, and a spread of it is never cut. */
export function turnOf(path: readonly string[]): number | null {
  const isAngle = numbersAt(path)?.dimension === 'angle';
  return isAngle && endsOfSpread(path) === null ? 2 * Math.PI : null;
}

type Schema = z.core.$ZodType;

function takenBy(schema: Schema): QuantitySpec | null {
  const bare = unwrap(schema);
  const takes = (z.globalRegistry.get(bare) as About | undefined)?.takes;
  if (takes !== undefined) return takes === 'text' ? null : takes;
  if (!(bare instanceof z.ZodUnion)) return null;
  return bare._zod.def.options.map(takenBy).find((spec) => spec !== null) ?? null;
}

function schemaAt(path: readonly string[]): Schema | null {
  let here: Schema | null = fileSchema;
  for (const step of path) here = here && child(here, step);
  return here;
}

function child(schema: Schema, step: string): Schema | null {
  const bare = unwrap(schema);
  if (bare instanceof z.ZodObject) return Object.hasOwn(bare.shape, step) ? unwrap(bare.shape[step]!) : null;
  if (bare instanceof z.ZodRecord) return unwrap(bare._zod.def.valueType);
  if (bare instanceof z.ZodArray) return unwrap(bare._zod.def.element);
  if (!(bare instanceof z.ZodUnion)) return null;
  for (const option of bare._zod.def.options) {
    const found = child(option, step);
    if (found) return found;
  }
  return null;
}

function objectsIn(schema: Schema): z.ZodObject[] {
  const bare = unwrap(schema);
  if (bare instanceof z.ZodObject) return [bare];
  return bare instanceof z.ZodUnion ? bare._zod.def.options.flatMap(objectsIn) : [];
}

function unwrap(schema: Schema): Schema {
  return schema instanceof z.ZodOptional ? unwrap(schema._zod.def.innerType) : schema;
}
