import * as z from 'zod';
import { quantity } from './leaf.ts';

export const starSchema = z
  .strictObject({
    luminosity: quantity(
      { dimension: 'power', positive: true },
      {
        title: 'Luminosity',
        description: 'Bolometric luminosity; or give temperature and radius',
        examples: ['0.52 Lsun'],
      },
    ).optional(),
    temperature: quantity(
      { dimension: 'temperature', positive: true },
      {
        title: 'Effective temperature',
        description: 'Effective temperature; with radius it gives the luminosity, and it places the habitable limits',
        examples: ['5100 K'],
      },
    ).optional(),
    radius: quantity(
      { dimension: 'length', positive: true },
      { title: 'Star radius', description: 'Radius of the star', examples: ['0.924 Rsun'] },
    ).optional(),
    mass: quantity(
      { dimension: 'mass', positive: true },
      {
        title: 'Star mass',
        description: 'Mass of the star: period from axis, or axis from period',
        examples: ['0.85 Msun'],
      },
    ).optional(),
    density: quantity(
      { dimension: 'density', positive: true },
      { title: 'Star density', description: 'Mean density instead of mass; needs radius', examples: ['1.6 g/cm3'] },
    ).optional(),
  })
  .meta({ title: 'Star', description: 'What shines' });
