/** Samples of uncertain inputs from a fit elsewhere: which column of which file is which key. */
import * as z from 'zod';
import { described, freeText } from './leaf.ts';

const key = {
  title: 'Key',
  description: 'The key of the scenario whose values stand in the column',
  examples: ['orbit.eccentricity'],
};

const column = described(
  z.union([
    freeText(key),
    z.strictObject({
      key: freeText(key),
      unit: freeText({
        title: 'Unit',
        description: 'In which the column stands; left out for a pure number',
        examples: ['d'],
      }).optional(),
    }),
  ]),
  {
    title: 'Column',
    description: 'A key that takes pure numbers, or a key with the unit in which the column stands',
    examples: ['orbit.eccentricity', '{ key: orbit.period, unit: d }'],
  },
);

export const posteriorSchema = z
  .strictObject({
    file: freeText({
      title: 'File of samples',
      description: 'CSV with a header, or Parquet; its path counts from the folder of the scenario',
      examples: ['chain.csv'],
    }),
    columns: described(z.record(z.string(), column), {
      title: 'Columns',
      description: 'Column of the file: key of the scenario',
      examples: ['{ ecc: orbit.eccentricity, P: { key: orbit.period, unit: d } }'],
    }),
    weights: freeText({
      title: 'Column of weights',
      description: 'How much each sample counts; left out where all count the same',
      examples: ['weight'],
    }).optional(),
  })
  .meta({
    title: 'Posterior samples',
    description: 'Samples of uncertain inputs from a fit elsewhere, correlations kept; drawn by spread',
    examples: ['{ file: chain.csv, columns: { ecc: orbit.eccentricity } }'],
  });

export type PosteriorKeys = z.output<typeof posteriorSchema>;
