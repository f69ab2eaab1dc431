/** Albedo and emission: the keys of a planet that set what is kept and what is sent back. */
import * as z from 'zod';
import { quantity } from './leaf.ts';

const albedo = (title: string, description: string, example: number) =>
  quantity({ dimension: 'number', min: 0, below: 1 }, { title, description, examples: [example], usual: '0 to 0.95' });

const meltTemperature = (title: string, description: string, example: string) =>
  quantity(
    { dimension: 'temperature', positive: true },
    { title, description, examples: [example], usual: '200 to 300 K' },
  );

/** One emission law. */
export const emissionSchema = z
  .strictObject({
    opticalDepth: quantity(
      { dimension: 'number', min: 0 },
      {
        title: 'Infrared optical depth',
        description: 'Grey atmosphere over the surface (Eddington): σT⁴/(1 + ¾τ)',
        examples: [0.83],
        usual: '0 to 10',
      },
    ).optional(),
    linear: z
      .strictObject({
        a: quantity(
          { dimension: 'flux', positive: true },
          {
            title: 'Emitted at 0 °C',
            description: 'A of A + B T, T in °C',
            examples: ['203.3 W/m2'],
            usual: '150 to 300 W/m2',
          },
        ),
        b: quantity(
          { dimension: 'heatTransferCoefficient', positive: true },
          {
            title: 'Slope of emission',
            description: 'B of A + B T',
            examples: ['2.09 W/m2/K'],
            usual: '1 to 4 W/m2/K',
          },
        ),
      })
      .meta({
        title: 'Linear emission',
        description: 'A + B T with T in °C, as it is published; meant for −60 to +50 °C',
        examples: ['{ a: 203.3 W/m2, b: 2.09 W/m2/K }'],
      })
      .optional(),
  })
  .meta({
    title: 'Emission law',
    description: 'What the planet sends to space: one of opticalDepth and linear',
    examples: ['{ opticalDepth: 0.83 }', '{ linear: { a: 203.3 W/m2, b: 2.09 W/m2/K } }'],
  });

export const surfaceShape = {
  bondAlbedo: albedo(
    'Bond albedo',
    'Share of the star’s energy that is sent back; the same at every temperature',
    0.3,
  ).optional(),
  albedo: z
    .strictObject({
      warm: albedo('Warm albedo', 'Bond albedo at `to` and above', 0.3),
      ice: albedo('Ice albedo', 'Bond albedo at `from` and below', 0.62),
      from: meltTemperature('Ice ramp from', 'All ice at this temperature and below', '258 K'),
      to: meltTemperature('Ice ramp to', 'No ice at this temperature and above; equal to `from` for a step', '273 K'),
      p2: quantity(
        { dimension: 'number', min: -1, max: 1 },
        {
          title: 'Latitude term of albedo',
          description: 'Adds p2 P₂(sin latitude) to the warm albedo, in models with latitude',
          examples: [0.08],
        },
      ).optional(),
    })
    .meta({
      title: 'Ice–albedo ramp',
      description: 'Albedo that rises as the surface freezes (cubic smoothstep)',
      examples: ['{ warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }'],
    })
    .optional(),
  emissivity: quantity(
    { dimension: 'number', above: 0, max: 1 },
    { title: 'Emissivity', description: 'Of a grey surface that sees space: ε σ T⁴', examples: [1], usual: '0.5 to 1' },
  ).optional(),
  emission: emissionSchema.optional(),
};
