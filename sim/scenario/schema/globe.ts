/** What models with latitude ask of a planet: bands, how the light falls on them, what moves heat between them, land and ice. */
import * as z from 'zod';
import { heatStore } from './heatStore.ts';
import { described, quantity, wholeNumber } from './leaf.ts';

const latitude = quantity(
  { dimension: 'angle', min: -Math.PI / 2, max: Math.PI / 2, spread: false },
  { title: 'Latitude', description: 'North is positive', examples: ['-90 deg'] },
);

const share = (spread: boolean) =>
  quantity(
    { dimension: 'number', min: 0, max: 1, spread },
    { title: 'Land fraction', description: 'Share of the area that is land, 0 to 1', examples: [0.3] },
  );

const landTable = z.strictObject({
  latitudes: described(z.array(latitude), {
    title: 'Latitudes of the table',
    description: 'From the south pole to the north pole',
    examples: ['[-90 deg, 0 deg, 90 deg]'],
  }),
  values: described(z.array(share(false)), {
    title: 'Land fraction at each latitude',
    description: 'As many as latitudes; between two of them it changes evenly with the area',
    examples: ['[0.1, 0.2, 0.6]'],
  }),
});

const coefficient = quantity(
  { dimension: 'number', spread: false },
  { title: 'Legendre coefficient', description: 'Of P0, P1, P2 …', examples: [1] },
);

const series = z.strictObject({
  legendre: described(z.array(coefficient), {
    title: 'Legendre coefficients',
    description: 'Of P0, P1, P2 … in the sine of latitude, over the global mean: the first is 1; at most 13',
    examples: ['[1, 0, -0.482]'],
  }),
});

export const globeShape = {
  bands: wholeNumber(
    { min: 18, max: 720 },
    { title: 'Bands', description: 'Of equal area, from pole to pole', examples: [90] },
  ).optional(),
  insolation: described(z.union([z.literal('daily'), z.literal('annualMean'), series]), {
    title: 'Insolation by latitude',
    description: 'Mean over each day, over the whole year, or a Legendre series that stands all year',
    examples: ['daily', 'annualMean', '{ legendre: [1, 0, -0.482] }'],
  }).optional(),
  heatTransport: quantity(
    { dimension: 'heatTransferCoefficient', min: 0 },
    {
      title: 'Heat transport',
      description: 'D of the diffusion of heat between latitudes',
      examples: ['0.65 W/m2/K', '0.2 to 2 W/m2/K log'],
      usual: '0 to 5 W/m2/K',
    },
  ).optional(),
  frozenHeatStore: heatStore({
    title: 'Heat store of frozen sea',
    description: 'What stands for heatStore where the sea is frozen, on the ramp of albedo; the forms of heatStore',
    examples: ['{ mixedLayer: 2 m }', '{ heatCapacity: 1e7 J/m2/K }'],
  }).optional(),
  landFraction: described(z.union([share(true), landTable]), {
    title: 'Land fraction',
    description: 'Share of the area that is land, with a heat store of its own: a number, or a table by latitude',
    examples: [0.3, '{ latitudes: [-90 deg, 0 deg, 90 deg], values: [0.1, 0.2, 0.6] }'],
  }).optional(),
  landHeatStore: heatStore({
    title: 'Heat store of land',
    description: 'The forms of heatStore, which is then the store of the sea',
    examples: ['{ heatCapacity: 1e7 J/m2/K }', '{ mixedLayer: 2 m }'],
  }).optional(),
  landSeaExchange: quantity(
    { dimension: 'heatTransferCoefficient', min: 0 },
    {
      title: 'Exchange between land and sea',
      description: 'Heat that passes from one to the other within a latitude, over the area of both',
      examples: ['1 W/m2/K'],
      usual: '0 to 30 W/m2/K',
    },
  ).optional(),
};
