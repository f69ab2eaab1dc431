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
        usual: '1e-4 to 100 Lsun log',
      },
    ).optional(),
    temperature: quantity(
      { dimension: 'temperature', positive: true },
      {
        title: 'Effective temperature',
        description: 'Effective temperature; with radius it gives the luminosity, and it places the habitable limits',
        examples: ['5100 K'],
        usual: '2300 to 10000 K',
      },
    ).optional(),
    radius: quantity(
      { dimension: 'length', positive: true },
      {
        title: 'Star radius',
        description: 'Radius of the star',
        examples: ['0.924 Rsun'],
        usual: '0.08 to 10 Rsun log',
      },
    ).optional(),
    mass: quantity(
      { dimension: 'mass', positive: true },
      {
        title: 'Star mass',
        description: 'Mass of the star: period from axis, or axis from period',
        examples: ['0.85 Msun'],
        usual: '0.08 to 10 Msun log',
      },
    ).optional(),
    density: quantity(
      { dimension: 'density', positive: true },
      {
        title: 'Star density',
        description: 'Mean density instead of mass; needs radius',
        examples: ['1.6 g/cm3'],
        usual: '0.01 to 100 g/cm3 log',
      },
    ).optional(),
  })
  .meta({ title: 'Star', description: 'What shines' });
