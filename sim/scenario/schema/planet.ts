import * as z from 'zod';
import { SimError } from '../../error.ts';
import { nearest, parseQuantity, type Quantity, type QuantitySpec } from '../../quantity/index.ts';
import { globeShape } from './globe.ts';
import { heatStoreSchema } from './heatStore.ts';
import { leaf, quantity } from './leaf.ts';
import { withModelKeys } from './modelKeys.ts';
import { surfaceShape } from './surface.ts';

/** A sidereal period, a word for a tidal state, or a spin–orbit resonance: turns in so many orbits. */
export type RotationPeriod =
  | { readonly form: 'period'; readonly period: Quantity }
  | { readonly form: 'synchronous' | 'pseudoSynchronous' }
  | { readonly form: 'resonance'; readonly turns: number; readonly orbits: number; readonly text: string };

const turnTime: QuantitySpec = { dimension: 'time', positive: true };

const rotationPeriod = leaf<RotationPeriod>(readRotation, showRotation, {
  title: 'Rotation period',
  description: 'Sidereal; a time, synchronous, pseudoSynchronous, or a resonance such as 3:2 (turns : orbits)',
  examples: ['26 h', 'synchronous', 'pseudoSynchronous', '3:2'],
  takes: 'text',
  numbers: turnTime,
});

function readRotation(input: string | number): RotationPeriod {
  const text = String(input).trim();
  if (text === 'synchronous' || text === 'pseudoSynchronous') return { form: text };
  const resonance = /^(\d{1,3})\s*:\s*(\d{1,3})$/.exec(text);
  if (resonance) {
    const [turns, orbits] = [Number(resonance[1]), Number(resonance[2])];
    if (turns > 0 && orbits > 0) return { form: 'resonance', turns, orbits, text };
    throw new SimError('planet.rotationPeriod', `\`${text}\` is no resonance`, "Write turns : orbits, e.g. '3:2'");
  }
  const meant = /^[A-Za-z]+$/.test(text) ? nearest(text, ['synchronous', 'pseudoSynchronous']) : null;
  if (meant) throw new SimError('planet.rotationPeriod', `\`${text}\` is not known here`, `Did you mean \`${meant}\``);
  return { form: 'period', period: parseQuantity(input, turnTime) };
}

/** As it was typed. */
export function showRotation(rotation: RotationPeriod): string {
  if (rotation.form === 'period') return rotation.period.text;
  return rotation.form === 'resonance' ? rotation.text : rotation.form;
}

const commonKeys = z.strictObject({
  radius: quantity(
    { dimension: 'length', positive: true },
    {
      title: 'Planet radius',
      description: 'With mass it gives the gravity',
      examples: ['2.1 Rearth'],
      usual: '0.1 to 25 Rearth log',
    },
  ).optional(),
  mass: quantity(
    { dimension: 'mass', min: 0 },
    {
      title: 'Planet mass',
      description: "Counts in Kepler's third law; 0 unless given",
      examples: ['4 Mearth'],
      usual: '0.01 to 5000 Mearth log',
    },
  ).optional(),
  ...surfaceShape,
  absorbingFraction: quantity(
    { dimension: 'number', above: 0, max: 1 },
    {
      title: 'Absorbing fraction',
      description:
        'Share of the flux that a square metre receives on average: ¼ whole sphere, ½ day side, 1 facing the star',
      examples: [0.25],
    },
  ).optional(),
  internalHeat: quantity(
    { dimension: 'flux', min: 0 },
    {
      title: 'Internal heat',
      description: 'Heat from inside the planet',
      examples: ['0 W/m2'],
      usual: '0 to 100 W/m2',
    },
  ).optional(),
  heatStore: heatStoreSchema.optional(),
  rotationPeriod: rotationPeriod.optional(),
  obliquity: quantity(
    { dimension: 'angle', min: 0, max: Math.PI, isotropic: true },
    { title: 'Obliquity', description: 'Spin axis from the orbit normal; above 90° retrograde', examples: ['23 deg'] },
  ).optional(),
  solarLongitudeOfPeriapsis: quantity(
    { dimension: 'angle' },
    {
      title: 'Solar longitude of periapsis',
      description: 'Season at periapsis: 0 is the northern spring equinox',
      examples: ['250 deg'],
    },
  ).optional(),
  ...globeShape,
});

export const planetSchema = withModelKeys(commonKeys, 'planet').meta({
  title: 'Planet',
  description: 'What is kept and sent back',
});

export type PlanetKeys = z.output<typeof planetSchema>;
