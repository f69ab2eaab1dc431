/** The sections of a scenario, and the whole file as a JSON Schema for editors. */
import * as z from 'zod';
import { models } from '../../models/index.ts';
import { freeText, word } from './leaf.ts';
import { withModelKeys } from './modelKeys.ts';
import { orbitSchema } from './orbit.ts';
import { planetSchema } from './planet.ts';
import { posteriorSchema } from './posterior.ts';
import { solveSchema } from './solve.ts';
import { starSchema } from './star.ts';
import { windowSchema } from './windows.ts';

export const modelNames = Object.keys(models) as [string, ...string[]];

const commonKeys = z.strictObject({
  model: word(modelNames, {
    title: 'Model',
    description: 'Which physics: lumped is one temperature for the whole planet',
    examples: ['lumped'],
  }).optional(),
  star: starSchema.optional(),
  orbit: orbitSchema.optional(),
  planet: planetSchema.optional(),
  windows: z
    .record(z.string(), windowSchema)
    .meta({
      title: 'Windows',
      description: 'Named ranges whose share of the orbit is reported',
      examples: ['{ liquid water: 273.15 K to 373.15 K }'],
    })
    .optional(),
  solve: solveSchema.optional(),
});

/** What one case may say. */
export const caseSchema = withModelKeys(commonKeys, 'top');

export type CaseKeys = z.output<typeof caseSchema>;

/** What only the whole file says, beside `cases`. */
export const headSchema = z.strictObject({
  $schema: freeText({
    title: 'Schema',
    description: 'For editors of JSON files; not read',
    examples: ['./scenario.schema.json'],
  }).optional(),
  title: freeText({
    title: 'Title',
    description: 'One line for the head of the report',
    examples: ['Corvane b under three ground assumptions'],
  }).optional(),
  notes: freeText({ title: 'Notes', description: 'Free text', examples: ['Elements from the 2025 fit'] }).optional(),
  posterior: posteriorSchema.optional(),
});
