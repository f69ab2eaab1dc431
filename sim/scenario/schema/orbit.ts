import * as z from 'zod';
import { instant, quantity } from './leaf.ts';

/** The solver keeps its promise of accuracy up to here. */
export const mostEccentric = 0.9999;

const component = (title: string, description: string) =>
  quantity({ dimension: 'number', min: -1, max: 1 }, { title, description, examples: [0.1] }).optional();

export const orbitSchema = z
  .strictObject({
    semiMajorAxis: quantity(
      { dimension: 'length', positive: true },
      {
        title: 'Semi-major axis',
        description: 'Half the line from periapsis to apoapsis',
        examples: ['0.48 au'],
        usual: '0.01 to 30 au log',
      },
    ).optional(),
    period: quantity(
      { dimension: 'time', positive: true },
      {
        title: 'Orbital period',
        description: 'Time from periapsis to periapsis',
        examples: ['130 d'],
        usual: '0.5 to 50000 d log',
      },
    ).optional(),
    scaledSemiMajorAxis: quantity(
      { dimension: 'number', above: 1 },
      {
        title: 'Scaled semi-major axis',
        description: 'Semi-major axis over the radius of the star, a/R*; needs star.radius',
        examples: [112],
        usual: '2 to 5000 log',
      },
    ).optional(),
    instellation: quantity(
      { dimension: 'flux', positive: true },
      {
        title: 'Instellation at distance a',
        description: 'Flux from the star at a distance of one semi-major axis; the luminosity then gives a',
        examples: ['1.3 S0'],
        usual: '0.05 to 5000 S0 log',
      },
    ).optional(),
    eccentricity: quantity(
      { dimension: 'number', min: 0, below: 1 },
      {
        title: 'Eccentricity',
        description: `0 is a circle; solved up to ${mostEccentric}`,
        examples: [0.62, '0.62 ± 0.03'],
        usual: '0 to 0.97',
        cut: { high: mostEccentric },
      },
    ).optional(),
    argumentOfPeriapsis: quantity(
      { dimension: 'angle' },
      {
        title: 'Argument of periapsis',
        description: "Radial-velocity convention (the star's orbit): transit at true anomaly 90° − ω",
        examples: ['105 deg'],
      },
    ).optional(),
    eCosOmega: component('e cos ω', 'With eSinOmega, instead of eccentricity and argumentOfPeriapsis'),
    eSinOmega: component('e sin ω', 'With eCosOmega, instead of eccentricity and argumentOfPeriapsis'),
    sqrtECosOmega: component('√e cos ω', 'With sqrtESinOmega, instead of eccentricity and argumentOfPeriapsis'),
    sqrtESinOmega: component('√e sin ω', 'With sqrtECosOmega, instead of eccentricity and argumentOfPeriapsis'),
    inclination: quantity(
      { dimension: 'angle', min: 0, max: Math.PI, isotropic: true },
      {
        title: 'Inclination',
        description: 'Of the orbit to the plane of the sky; 90° is edge-on',
        examples: ['89.2 deg'],
      },
    ).optional(),
    periapsisTime: instant({
      title: 'Time of periapsis',
      description: 'A moment of periapsis: ISO 8601, or a Julian date with its scale',
      examples: ['2026-03-04T05:00Z', '2461103.71 TDB'],
    }).optional(),
    transitTime: instant({
      title: 'Time of transit',
      description: 'A moment of inferior conjunction; needs argumentOfPeriapsis',
      examples: ['2461103.71 TDB'],
    }).optional(),
    epoch: instant({
      title: 'Epoch of the mean anomaly',
      description: 'The moment at which meanAnomaly holds',
      examples: ['2461103.71 TDB'],
    }).optional(),
    meanAnomaly: quantity(
      { dimension: 'angle' },
      { title: 'Mean anomaly at epoch', description: 'Mean anomaly at epoch; 0 at periapsis', examples: ['212 deg'] },
    ).optional(),
  })
  .meta({ title: 'Orbit', description: 'Where the planet is' });
