/** Ranges over a scenario: their nodes, the Worlds at them, and what is held. */
import { describe, expect, test } from 'vitest';
import { solarLuminosity } from '../../../sim/constants.ts';
import { instellation } from '../../../sim/instellation/instellation.ts';
import { readAlong } from '../../../sim/scenario/along.ts';
import { readHold } from '../../../sim/scenario/hold.ts';
import { nodesOf } from '../../../sim/scenario/nodes.ts';
import { casesOver, type OverOptions } from '../../../sim/scenario/over.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import type { World } from '../../../sim/world.ts';
import { expectSameWorld } from './compare.ts';

const text = `
star: { luminosity: 0.52 Lsun, radius: 0.924 Rsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.62 }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m } }
cases:
  sea: {}
  rock: { planet: { heatStore: { ground: { thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit } } } }
windows: { cool: 250 K to 280 K }
`;
const over = (alongs: readonly string[], options: OverOptions = {}, scenario = text) =>
  casesOver(scenario, 'x.yaml', alongs.map(readAlong), options);
const messageOf = (work: () => unknown): string => {
  try {
    work();
  } catch (error) {
    return (error as Error).message;
  }
  return 'nothing was refused';
};
const meanFlux = ({ star, orbit }: World) =>
  instellation(star.luminosity, orbit.semiMajorAxis) / Math.sqrt(1 - orbit.eccentricity ** 2);

describe('nodesOf', () => {
  test('steps as one would type them, ends as they were typed', () => {
    const texts = (range: string, steps: number) => nodesOf(readAlong(range), steps).map((node) => node.text);
    expect(texts('orbit.eccentricity=0 to 0.9', 4)).toEqual(['0', '0.3', '0.6', '0.9']);
    expect(texts('star.luminosity=0.8 to 1.3 Lsun', 3)).toEqual(['0.8 Lsun', '1.05 Lsun', '1.3 Lsun']);
    expect(texts('planet.heatStore.heatCapacity=1e4 to 1e9 J/m2/K log', 6)).toEqual([
      '10000 J/m2/K',
      '100000 J/m2/K',
      '1e6 J/m2/K',
      '1e7 J/m2/K',
      '1e8 J/m2/K',
      '1e9 J/m2/K',
    ]);
    expect(texts('planet.albedo.from=-20 degC to 10 degC', 4)).toEqual(['-20 degC', '-10 degC', '0 degC', '10 degC']);
    expect(texts('orbit.eccentricity=0 to 1e-13', 2)).toEqual(['0', '1e-13']);
  });

  test('the value of a node is what its text means', () => {
    const along = readAlong('orbit.semiMajorAxis=0.1 to 3 au log');
    for (const { text: written, value } of nodesOf(along, 17)) {
      const file = `star: { luminosity: 1 Lsun, mass: 1 Msun }\norbit: { semiMajorAxis: ${written}, eccentricity: 0 }\nplanet: { bondAlbedo: 0, heatStore: { mixedLayer: 1 m } }\n`;
      expect(readScenario(file, 'x.yaml').cases[0]!.world.orbit.semiMajorAxis).toBe(value);
    }
  });
});

describe('a node', () => {
  test('is the scenario that says it, to the last bit', () => {
    const alongs = ['orbit.eccentricity=0 to 0.9', 'orbit.period=20 to 300 d log'].map(readAlong);
    const [sea, rock] = casesOver(text, 'x.yaml', alongs);
    const [es, periods] = alongs.map((along) => nodesOf(along, 7));
    for (const e of es!) {
      for (const period of periods!) {
        const file = text.replace('0.62', e.text).replace('semiMajorAxis: 0.48 au', `period: ${period.text}`);
        const single = readScenario(file, 'x.yaml').cases;
        expectSameWorld(sea!.worldAt([e.value, period.value]), single[0]!.world);
        expectSameWorld(rock!.worldAt([e.value, period.value]), single[1]!.world);
      }
    }
  });

  test('an alternative gives way whole, and the case’s own point is known through what follows from it', () => {
    const [sea] = over(['orbit.period=20 to 300 d', 'planet.heatStore.heatCapacity=1e6 to 1e8 J/m2/K log']);
    const { orbit, surface } = readScenario(text, 'x.yaml').cases[0]!.world;
    expect(sea!.own).toEqual([orbit.period, surface.heatCapacity]);
    expect(sea!.worldAt([1e7, 5e6]).surface.heatCapacity).toBe(5e6);
    expect(over(['planet.internalHeat=0 to 5 W/m2'])[0]!.own).toEqual([0]);
    expect(
      over(
        ['planet.albedo.ice=0.4 to 0.7'],
        {},
        text.replace('bondAlbedo: 0.3', 'albedo: { warm: 0.3, ice: 0.6, from: 258 K, to: 273 K }'),
      )[0]!.own,
    ).toEqual([0.6]);
  });

  test('where it is not sound says why, and the others are not touched', () => {
    const [sea] = over(['orbit.eccentricity=0 to 0.999']);
    expect(messageOf(() => sea!.worldAt([0.999]))).toMatch(/^orbit.eccentricity: periapsis lies inside the star/);
    expect(sea!.worldAt([0.5]).orbit.eccentricity).toBe(0.5);
  });

  test('a circle at one end is no circle elsewhere: the season at periapsis must be given', () => {
    const zonal = `
model: zonal
star: { luminosity: 1 Lsun, mass: 1 Msun }
orbit: { semiMajorAxis: 1 au, eccentricity: 0 }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m }, obliquity: 23 deg, rotationPeriod: 24 h, heatTransport: 0.6 W/m2/K }
`;
    const [one] = over(['orbit.eccentricity=0 to 0.5'], {}, zonal);
    expect(one!.worldAt([0]).globe?.solarLongitudeOfPeriapsis).toBe(0);
    expect(messageOf(() => one!.worldAt([0.25]))).toMatch(/no solarLongitudeOfPeriapsis is given/);
  });

  test('axis, period and mass: what follows is told', () => {
    const triple = text.replace('semiMajorAxis: 0.48 au', 'semiMajorAxis: 0.48 au, period: 131.72 d');
    const [one] = over(['star.mass=0.5 to 1.5 Msun'], {}, triple);
    expect(one!.notes).toEqual(['orbit.semiMajorAxis is left out: it follows from orbit.period and star.mass.']);
  });
});

describe('casesOver refuses', () => {
  test.each([
    [
      ['orbit.eccentricity=0 to 0.5', 'orbit.eccentricity=0.1 to 0.2'],
      '--along: orbit.eccentricity is given twice. Name two different keys, or one range.',
    ],
    [
      ['planet.obliquity=0 to 90 deg'],
      '--along: nothing that is computed for case `sea` depends on planet.obliquity. Name another key, or leave the case out with --only.',
    ],
    [
      ['orbit.period=20 to 30 d', 'orbit.semiMajorAxis=0.4 to 0.5 au'],
      '--along: orbit.semiMajorAxis of case `sea` follows from orbit.period and star.mass. Follow one of those.',
    ],
    [
      ['planet.heatStore.mixedLayer=1 to 2 m', 'planet.heatStore.heatCapacity=1e6 to 1e7 J/m2/K'],
      /mixedLayer stand in one heat store/,
    ],
    [
      ['planet.bondAlbedo=0 to 0.5', 'planet.albedo.warm=0 to 0.5'],
      /^--along: case `sea`: planet.albedo.ice: nothing is given/,
    ],
    [
      ['orbit.semiMajorAxis=1e-5 to 2e-5 au'],
      /^--along: case `sea` is not sound at the ends and in the middle of orbit.semiMajorAxis: .*periapsis lies inside the star/,
    ],
  ] as const)('%j', (alongs, message) => {
    const found = messageOf(() => over(alongs));
    if (typeof message === 'string') expect(found).toBe(message);
    else expect(found).toMatch(message);
  });
});

describe('--hold orbitMeanInstellation', () => {
  const alongs = ['orbit.eccentricity=0 to 0.9', 'star.luminosity=0.4 to 0.6 Lsun'];
  const sizes = [
    ['semiMajorAxis: 0.48 au', 'orbit.semiMajorAxis'],
    ['period: 131 d', 'orbit.period'],
    ['scaledSemiMajorAxis: 110', 'orbit.scaledSemiMajorAxis'],
    ['instellation: 1.3 S0', 'orbit.instellation'],
  ] as const;

  test.each(sizes)('%s', (size, key) => {
    const file = text.replace('semiMajorAxis: 0.48 au', size);
    const [sea] = over(alongs, { hold: 'orbitMeanInstellation' }, file);
    const own = readScenario(file, 'x.yaml').cases[0]!.world;
    const L = own.star.luminosity;
    for (const e of [0, 0.3, 0.62, 0.85]) {
      const world = sea!.worldAt([e, L]);
      expect(meanFlux(world) / meanFlux(own)).toBeCloseTo(1, 13);
      // Kepler: a³/P² is the star's.
      const third = ({ orbit }: World) => orbit.semiMajorAxis ** 3 / orbit.period ** 2;
      expect(third(world) / third(own)).toBeCloseTo(1, 13);
      const held = sea!.heldAt([e, L]);
      expect([...held.keys()]).toEqual([key]);
      const said = file
        .replace(size, `${key.slice('orbit.'.length)}: ${held.get(key)}`)
        .replace('0.62,', `${e},`)
        .replace('eccentricity: 0.62', `eccentricity: ${e}`);
      expectSameWorld(world, readScenario(said, 'x.yaml').cases[0]!.world);
    }
    expectSameWorld(sea!.worldAt([0.62, L]), own);
    expect(sea!.notes[0]).toMatch(new RegExp(`^Held: orbitMeanInstellation. ${key} follows the eccentricity`));
    expect(sea!.worldAt([0.3, 2 * L]).star.luminosity).toBe(2 * L);
  });

  test('axis and period without a mass: both follow, the star stays', () => {
    const file = text.replace(', mass: 0.85 Msun', '').replace('0.48 au', '0.48 au, period: 131 d');
    const [sea] = over(alongs, { hold: 'orbitMeanInstellation' }, file);
    const [a, b] = [0.1, 0.8].map((e) => sea!.worldAt([e, 0.5 * solarLuminosity]));
    expect(a!.star.mass! / b!.star.mass!).toBeCloseTo(1, 13);
    expect(meanFlux(a!) / meanFlux(b!)).toBeCloseTo(1, 13);
  });

  test.each([
    ['light', alongs, '--hold: `light` cannot be held. Write --hold orbitMeanInstellation.'],
    [
      'orbitMeanInstelation',
      alongs,
      '--hold: `orbitMeanInstelation` cannot be held. Did you mean `orbitMeanInstellation`?',
    ],
    [
      'orbitMeanInstellation',
      ['star.luminosity=0.4 to 0.6 Lsun'],
      "--hold: orbitMeanInstellation is held while the eccentricity varies, and no --along varies it. Add --along 'orbit.eccentricity=0 to 0.9', or leave --hold out.",
    ],
    [
      'orbitMeanInstellation',
      ['orbit.eccentricity=0 to 0.9', 'orbit.period=20 to 30 d'],
      '--hold: orbitMeanInstellation sets orbit.period, along which the grid runs. Leave out --hold, or the range.',
    ],
  ])('refuses %s along %j', (word, ranges, message) => {
    expect(messageOf(() => readHold(word, ranges.map(readAlong)))).toBe(message);
  });
});
