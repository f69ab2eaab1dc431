import * as z from 'zod';
import { SimError } from '../../error.ts';
import { parseQuantity, type Quantity } from '../../quantity/index.ts';
import { habitableLimits } from '../../star/habitable.ts';
import { leaf, word } from './leaf.ts';

export interface RangeWindow {
  readonly of: 'temperature' | 'instellation';
  readonly from: number;
  readonly to: number;
  readonly text: string;
}

const range = leaf<RangeWindow>(readRange, ({ text }) => text, {
  title: 'Range',
  description: 'Two temperatures or two fluxes',
  examples: ['273.15 K to 373.15 K', '0.32 to 1.1 S0'],
  takes: 'text',
});

const shape = 'Write two temperatures or two fluxes, e.g. 273.15 K to 373.15 K';

function readRange(input: string | number): RangeWindow {
  const text = String(input);
  if (!/\sto\s/.test(text)) throw new SimError('windows', `\`${text}\` is not a range`, shape);
  const { of, read } = readEither(text);
  if (read.distribution.form !== 'uniform') throw new SimError('windows', `\`${text}\` is not a plain range`, shape);
  return { of, from: read.distribution.low, to: read.distribution.high, text };
}

/** As a flux where it is one, else as a temperature. */
function readEither(text: string): { of: RangeWindow['of']; read: Quantity } {
  try {
    return { of: 'instellation', read: parseQuantity(text, { dimension: 'flux', min: 0 }) };
  } catch (error) {
    if (!(error instanceof SimError) || !isAboutUnits(error)) throw error;
    return { of: 'temperature', read: readTemperatures(text) };
  }
}

function readTemperatures(text: string): Quantity {
  try {
    return parseQuantity(text, { dimension: 'temperature', min: 0 });
  } catch (error) {
    if (!(error instanceof SimError) || !isAboutUnits(error)) throw error;
    throw new SimError('windows', error.what, /^Did you mean/.test(error.mend) ? error.mend : shape, error);
  }
}

function isAboutUnits({ what }: SimError): boolean {
  return /, not a|unit/.test(what);
}

const limit = word(
  habitableLimits as readonly [(typeof habitableLimits)[number], ...(typeof habitableLimits)[number][]],
  {
    title: 'Habitable limit',
    description: 'Published limit of the habitable zone (Kopparapu et al. 2014)',
    examples: ['runawayGreenhouse', 'maximumGreenhouse'],
  },
);

export const windowSchema = z
  .union([
    range,
    z.strictObject({
      habitable: z
        .array(limit)
        .length(2)
        .meta({
          title: 'Habitable limits',
          description: 'Inner and outer limit, for stars of 2600 to 7200 K',
          examples: ['[runawayGreenhouse, maximumGreenhouse]'],
        }),
    }),
  ])
  .meta({
    title: 'Window',
    description: 'A range of temperature or instellation whose share of the orbit is reported',
    examples: ['273.15 K to 373.15 K', '0.32 to 1.1 S0', '{ habitable: [runawayGreenhouse, maximumGreenhouse] }'],
  });

export type WindowKeys = z.output<typeof windowSchema>;
