import * as z from 'zod';
import { quantity, wholeNumber, word } from './leaf.ts';
import { withModelKeys } from './modelKeys.ts';

const start = z
  .strictObject({
    temperature: quantity(
      { dimension: 'temperature', positive: true, spread: false },
      { title: 'Start temperature', description: 'Of the whole planet', examples: ['250 K'] },
    ),
    orbits: quantity(
      { dimension: 'number', above: 0, max: 10_000, spread: false },
      { title: 'Orbits to run', description: 'How long to run forward', examples: [20] },
    ),
    at: quantity(
      { dimension: 'angle', spread: false },
      { title: 'True anomaly of the start', description: 'Where on the orbit; 0 is periapsis', examples: ['0 deg'] },
    ).optional(),
  })
  .meta({
    title: 'Start',
    description: 'Run forward from a temperature instead of finding the periodic state',
    examples: ['{ temperature: 250 K, orbits: 20 }'],
  });

const commonKeys = z.strictObject({
  tolerance: quantity(
    { dimension: 'number', min: 1e-11, max: 1e-2, spread: false },
    { title: 'Tolerance', description: 'Relative error of temperature, as a promise', examples: [1e-6] },
  ).optional(),
  start: z
    .union([z.literal('periodic'), start])
    .meta({
      title: 'Start',
      description: 'periodic, or a temperature to run forward from',
      examples: ['periodic', '{ temperature: 250 K, orbits: 20, at: 0 deg }'],
    })
    .optional(),
  samples: wholeNumber(
    { min: 16, max: 100_000 },
    { title: 'Samples', description: 'Output rows an orbit', examples: [720] },
  ).optional(),
  spacing: word(['balancedAnomaly', 'time'], {
    title: 'Spacing of samples',
    description: 'Equal steps of the balanced anomaly (dense at periapsis) or of time',
    examples: ['balancedAnomaly', 'time'],
  }).optional(),
  seed: wholeNumber(
    { min: 0, max: 2 ** 32 - 1 },
    { title: 'Seed', description: 'Of the random draws of a spread', examples: [1] },
  ).optional(),
});

export const solveSchema = withModelKeys(commonKeys, 'solve').meta({
  title: 'Solve',
  description: 'How it is computed',
});
