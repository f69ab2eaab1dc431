import type * as z from 'zod';
import { models } from '../../models/index.ts';

/** Adds the keys that one model alone brings to a section. They are read by their name, so the type stays that of the common keys. */
export function withModelKeys<Schema extends z.ZodObject>(common: Schema, section: 'planet' | 'solve' | 'top'): Schema {
  const brought = Object.values(models)
    .map(({ keys }) => keys[section])
    .filter((shape) => shape !== undefined);
  return brought.length ? (common.extend(Object.assign({}, ...brought)) as unknown as Schema) : common;
}
