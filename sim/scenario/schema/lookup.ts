/** Asks the schema about a key: does it exist, what is it called, which keys stand beside it. */
import * as z from 'zod';
import type { About } from './leaf.ts';
import { caseSchema, headSchema } from './scenario.ts';

const fileSchema = caseSchema.extend(headSchema.shape);

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
  const found = path.length ? schemaAt(path) : fileSchema;
  return found ? objectsIn(found).flatMap((object) => Object.keys(object.shape)) : [];
}

/** The section in which a key belongs that stands in the wrong one. */
export function sectionOf(key: string): string | null {
  return sections.find((section) => keysIn([section]).includes(key)) ?? null;
}

type Schema = z.core.$ZodType;

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
