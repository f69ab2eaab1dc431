import * as z from 'zod';
import { SimError } from '../../error.ts';
import { nearest, parseQuantity, type Quantity, type QuantitySpec } from '../../quantity/index.ts';
import { type About, described, leaf, quantity } from './leaf.ts';

/** Over which period ground is warmed: the orbit's, the rotation's, or one that is given. */
export type GroundCycle = 'orbit' | 'rotation' | Quantity;

const cycleTime: QuantitySpec = { dimension: 'time', positive: true };

const cycle = leaf<GroundCycle>(readCycle, (value) => (typeof value === 'string' ? value : value.text), {
  title: 'Cycle that warms the ground',
  description: 'orbit, rotation (needs planet.rotationPeriod), or a time',
  examples: ['orbit', 'rotation', '26 h'],
  takes: 'text',
  numbers: cycleTime,
});

function readCycle(input: string | number): GroundCycle {
  if (input === 'orbit' || input === 'rotation') return input;
  const text = String(input);
  const meant = /^[A-Za-z]+$/.test(text) ? nearest(text, ['orbit', 'rotation']) : null;
  if (meant) throw new SimError('cycle', `\`${text}\` is not known here`, `Did you mean \`${meant}\``);
  if (/^(?:solar |sidereal )?(?:day|diurnal|daily)$/i.test(text)) {
    const mend = "Write rotation for the planet's own day (it needs planet.rotationPeriod), or a time, e.g. 26 h";
    throw new SimError('cycle', `\`${text}\` does not say whose day`, mend);
  }
  if (/^(?:year|yearly|annual)$/i.test(text)) {
    throw new SimError(
      'cycle',
      `\`${text}\` is not known here`,
      "Write orbit for the planet's own year, or a time, e.g. 130 d",
    );
  }
  if (/^[A-Za-z]+$/.test(text)) {
    throw new SimError('cycle', `\`${text}\` is not known here`, 'Write orbit, rotation, or a time, e.g. 26 h');
  }
  return parseQuantity(input, cycleTime);
}

/** One form of heat store. */
export const oneStore = z
  .strictObject({
    heatCapacity: quantity(
      { dimension: 'arealHeatCapacity', positive: true },
      {
        title: 'Heat capacity',
        description: 'Per area of surface',
        examples: ['4e7 J/m2/K', '1e5 to 1e9 J/m2/K log'],
        usual: '1e3 to 1e10 J/m2/K log',
      },
    ).optional(),
    mixedLayer: quantity(
      { dimension: 'length', positive: true },
      {
        title: 'Mixed layer depth',
        description: 'Depth of sea water that is stirred',
        examples: ['20 m'],
        usual: '0.1 to 1000 m log',
      },
    ).optional(),
    atmosphere: z
      .strictObject({
        surfacePressure: quantity(
          { dimension: 'pressure', positive: true },
          {
            title: 'Surface pressure',
            description: 'Weight of the air',
            examples: ['5 bar'],
            usual: '0.001 to 1000 bar log',
          },
        ),
        specificHeat: quantity(
          { dimension: 'specificHeat', positive: true },
          {
            title: 'Specific heat of air',
            description: 'At constant pressure',
            examples: ['1004 J/kg/K'],
            usual: '500 to 15000 J/kg/K log',
          },
        ),
        gravity: quantity(
          { dimension: 'acceleration', positive: true },
          {
            title: 'Surface gravity',
            description: 'May be left out where planet.mass and planet.radius are given',
            examples: ['11 m/s2'],
            usual: '0.1 to 100 m/s2 log',
          },
        ).optional(),
      })
      .meta({
        title: 'Air that warms as a whole',
        description: 'C = p c / g',
        examples: ['{ surfacePressure: 5 bar, specificHeat: 1004 J/kg/K, gravity: 11 m/s2 }'],
      })
      .optional(),
    ground: z
      .strictObject({
        thermalInertia: quantity(
          { dimension: 'thermalInertia', positive: true },
          {
            title: 'Thermal inertia',
            description: '√(k ρ c) of the ground',
            examples: ['2200 J/m2/K/s^0.5', '250 tiu'],
            usual: '5 to 5000 J/m2/K/s^0.5 log',
          },
        ),
        cycle,
      })
      .meta({
        title: 'Ground that conducts heat',
        description: 'As a lumped store C = Γ √(P/4π); a lumped store cannot be a half-space',
        examples: ['{ thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit }'],
      })
      .optional(),
  })
  .meta({
    title: 'Heat store',
    description: 'One of heatCapacity, mixedLayer, atmosphere, ground',
    examples: ['{ mixedLayer: 20 m }', '{ heatCapacity: 4e7 J/m2/K }'],
  });

export type HeatStoreKeys = z.output<typeof oneStore>;

/** A key that takes one form, or a list of forms that add up. */
export function heatStore(about: About) {
  return described(z.union([oneStore, z.array(oneStore).min(1)]), about);
}

export const heatStoreSchema = heatStore({
  title: 'Heat store',
  description: 'What stores heat under the surface or above it: one form, or a list of forms that add up',
  examples: ['{ mixedLayer: 20 m }', '{ heatCapacity: 4e7 J/m2/K }'],
});
