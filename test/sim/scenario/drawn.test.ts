/** What is drawn, what is not and why; and Worlds at drawn values, equal to the last bit to those that are read from a file. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { formatNumber, fromUnit } from '../../../sim/quantity/index.ts';
import { type CaseDrawn, casesDrawn, type UncertainInput } from '../../../sim/scenario/drawn.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { expectSameWorld } from './compare.ts';

const lumped = `
star: { luminosity: 0.52 ± 0.02 Lsun, radius: 0.924 ± 0.01 Rsun, mass: 0.85 ± 0.02 Msun }
orbit: { period: 130 ± 0.1 d, eccentricity: 0.62 ± 0.03, argumentOfPeriapsis: 105 ± 4 deg, periapsisTime: 2461103.71 ± 0.2 d TDB }
planet:
  bondAlbedo: 0.1 to 0.5
  absorbingFraction: 0.25
  obliquity: isotropic
  heatStore: [{ heatCapacity: 1e5 to 1e9 J/m2/K log }, { atmosphere: { surfacePressure: 5 +1 -2 bar, specificHeat: 1004 J/kg/K, gravity: 11 m/s2 } }]
windows: { temperate: { habitable: [runawayGreenhouse, maximumGreenhouse] } }
`;
const zonal = `
model: zonal
star: { temperature: 5600 ± 50 K, radius: 0.97 ± 0.02 Rsun, density: 1.5 ± 0.05 g/cm3 }
orbit: { scaledSemiMajorAxis: 210 ± 5, sqrtECosOmega: 0.3 ± 0.05, sqrtESinOmega: -0.2 ± 0.05 }
planet:
  mass: < 4 Mearth (95%)
  albedo: { warm: 0.3 ± 0.02, ice: 0.62 ± 0.02, from: 258 ± 1 K, to: 2 ± 1 degC, p2: 0.05 ± 0.01 }
  emission: { linear: { a: 203.3 ± 2 W/m2, b: 2.09 ± 0.1 W/m2/K } }
  heatStore: { mixedLayer: 20 ± 5 m }
  frozenHeatStore: { mixedLayer: 1 to 3 m }
  rotationPeriod: 26 ± 1 h
  obliquity: 23 ± 3 deg
  solarLongitudeOfPeriapsis: 250 ± 30 deg
  insolation: { legendre: [1, 0, -0.482] }
  heatTransport: 0.2 to 2 W/m2/K log
  landFraction: 0.3 ± 0.05
  landHeatStore: { ground: { thermalInertia: 2200 ± 100 J/m2/K/s^0.5, cycle: 130 ± 10 d } }
  landSeaExchange: 0.5 to 2 W/m2/K
windows: { temperate: { habitable: [runawayGreenhouse, maximumGreenhouse] } }
`;
const one = (text: string): CaseDrawn => casesDrawn(text, 'x.yaml')[0]!;
const keysOf = (text: string) => one(text).inputs.map(({ key }) => key);

describe('which inputs are drawn', () => {
  test('those that change a result, with their bounds; of the others, why not', () => {
    const { inputs, idle, notes, windowsVary } = one(lumped);
    expect(inputs.map(({ key, bounds }) => [key, bounds])).toEqual([
      ['star.luminosity', { low: 0, high: Number.POSITIVE_INFINITY }],
      ['star.radius', { low: 0, high: Number.POSITIVE_INFINITY }],
      ['star.mass', { low: 0, high: Number.POSITIVE_INFINITY }],
      ['orbit.period', { low: 0, high: Number.POSITIVE_INFINITY }],
      ['orbit.eccentricity', { low: 0, high: 0.9999 }],
      ['planet.bondAlbedo', { low: 0, high: 1 }],
      ['planet.heatStore.0.heatCapacity', { low: 0, high: Number.POSITIVE_INFINITY }],
      ['planet.heatStore.1.atmosphere.surfacePressure', { low: 0, high: Number.POSITIVE_INFINITY }],
    ]);
    expect(idle).toEqual([
      { key: 'orbit.periapsisTime', label: 'Time of periapsis', reason: 'no finding depends on a date' },
      {
        key: 'orbit.argumentOfPeriapsis',
        label: 'Argument of periapsis',
        reason: 'model lumped does not use it here',
      },
      { key: 'planet.obliquity', label: 'Obliquity', reason: 'model lumped does not use it here' },
    ]);
    expect(notes).toEqual([]);
    expect(windowsVary).toBe(true);
  });

  test('the radius of the star moves habitable limits through its temperature, and without them nothing', () => {
    const text = lumped.replace(/windows.*\n/, '');
    expect(one(text).windowsVary).toBe(false);
    expect(one(text).idle).toContainEqual(
      expect.objectContaining({ key: 'star.radius', reason: 'model lumped does not use it here' }),
    );
  });

  test('angles come round or end; components have a sign; an albedo term too', () => {
    const byKey = new Map(one(zonal).inputs.map((input) => [input.key, input]));
    expect(byKey.get('planet.solarLongitudeOfPeriapsis')).toMatchObject({
      bounds: null,
      period: 2 * Math.PI,
      unit: 'deg',
    });
    expect(byKey.get('planet.obliquity')).toMatchObject({ bounds: { low: 0, high: Math.PI }, period: null });
    expect(byKey.get('orbit.sqrtESinOmega')).toMatchObject({ bounds: { low: -1, high: 1 }, period: null });
    expect(byKey.get('planet.albedo.p2')?.bounds).toEqual({ low: -1, high: 1 });
    expect(byKey.get('planet.albedo.to')).toMatchObject({ bounds: { low: 0 }, unit: 'degC' });
    expect(byKey.get('planet.landHeatStore.ground.cycle')).toMatchObject({ bounds: { low: 0 }, unit: 'd' });
    expect(one(zonal).idle.map(({ key, reason }) => [key, reason])).toEqual([
      ['planet.rotationPeriod', 'no finding changes with it'],
    ]);
  });

  test('what matters only away from the centre is drawn', () => {
    const text = zonal.replace('landFraction: 0.3 ± 0.05', 'landFraction: 0 ± 0.05');
    expect(keysOf(text)).toContain('planet.landSeaExchange');
  });

  test('an exact scenario draws nothing', () => {
    const text = lumped
      .replace(/ ± [\d.]+(?= d TDB) d| ± [\d.]+| to 0.5| to 1e9| log|\+1 -2 /g, '')
      .replace('isotropic', '23 deg');
    expect(one(text).inputs).toEqual([]);
    expectSameWorld(one(text).worldAt([]), readScenario(text, 'x.yaml').cases[0]!.world);
  });

  test('cases that are asked for, in the order of the file', () => {
    const text = `${lumped}cases: { a: {}, b: { planet: { bondAlbedo: 0.3 } }, c: {} }\n`;
    expect(casesDrawn(text, 'x.yaml', ['c', 'b']).map(({ name }) => name)).toEqual(['b', 'c']);
    expect(casesDrawn(text, 'x.yaml')[1]!.inputs.map(({ key }) => key)).not.toContain('planet.bondAlbedo');
  });

  test('a circle with a spread, of a planet whose season at periapsis nobody gave', () => {
    const text = zonal
      .replace('sqrtECosOmega: 0.3 ± 0.05, sqrtESinOmega: -0.2 ± 0.05', 'eccentricity: 0 ± 0.1')
      .replace(/ *solarLongitudeOfPeriapsis.*\n/, '');
    expect(() => one(text)).toThrow(
      /orbit.eccentricity: case `base` is sound only where it is 0: planet: no solarLongitudeOfPeriapsis is given/,
    );
  });
});

describe('three that must agree', () => {
  const triple = lumped.replace('period: 130 ± 0.1 d', 'period: 130 ± 2 d, semiMajorAxis: 0.476 ± 0.02 au');

  test('axis, period and mass: the axis follows', () => {
    const drawn = one(triple);
    expect(drawn.inputs.map(({ key }) => key)).not.toContain('orbit.semiMajorAxis');
    expect(drawn.notes).toEqual(['orbit.semiMajorAxis is left out: it follows from orbit.period and star.mass.']);
    const values = drawn.inputs.map(({ key, centre }) => (key === 'star.mass' ? 1.5 * centre : centre));
    const heavier = drawn.worldAt(values).orbit.semiMajorAxis;
    // Kepler's third law.
    expect(heavier / drawn.worldAt(drawn.inputs.map(({ centre }) => centre)).orbit.semiMajorAxis).toBeCloseTo(
      1.5 ** (1 / 3),
      14,
    );
  });

  test('axis and period without a mass are both drawn', () => {
    const text = triple.replace(', mass: 0.85 ± 0.02 Msun', '');
    expect(keysOf(text)).toEqual(expect.arrayContaining(['orbit.period', 'orbit.semiMajorAxis']));
    expect(one(text).notes).toEqual([]);
  });

  test('luminosity, temperature and radius: the temperature follows', () => {
    const drawn = one(lumped.replace('luminosity:', 'temperature: 5100 ± 80 K, luminosity:'));
    expect(drawn.notes).toEqual(['star.temperature is left out: it follows from star.luminosity and star.radius.']);
    const values = drawn.inputs.map(({ key, centre }) => (key === 'star.luminosity' ? 1.3 * centre : centre));
    expect(drawn.worldAt(values).star.temperature).toBeGreaterThan(5200);
  });

  test('nothing is said, nothing left out of the World, where none of them varies', () => {
    const text = triple
      .replace('130 ± 2 d', '130 d')
      .replace('0.476 ± 0.02 au', '0.4757 au')
      .replace('0.85 ± 0.02', '0.85');
    const drawn = one(text);
    expect(drawn.notes).toEqual([]);
    expectSameWorld(
      drawn.worldAt(drawn.inputs.map(({ centre }) => centre)),
      readScenario(text, 'x.yaml').cases[0]!.world,
    );
  });
});

describe('a failed draw', () => {
  const drawn = one(lumped);
  const at = (changed: Record<string, number>) =>
    drawn.worldAt(drawn.inputs.map(({ key, centre }) => changed[key] ?? centre));

  test.each([
    [
      { 'orbit.eccentricity': 0.999 },
      'orbit.eccentricity: periapsis lies inside the star, at 0.111 of its radii from the centre. Lower the eccentricity or widen the orbit.',
    ],
    [{ 'orbit.eccentricity': -0.01 }, 'orbit.eccentricity: `-0.01` is out of bounds. Keep it at least 0 and below 1.'],
    [{ 'star.mass': 0 }, 'star.mass: `0 Msun` is out of bounds. Keep it above 0 Msun.'],
    [{ 'planet.bondAlbedo': Number.NaN }, 'planet.bondAlbedo: NaN is no finite number. Give numbers of a planet.'],
    [{ 'star.luminosity': 1e300, 'orbit.period': 1e-300 }, /^orbit\.instellation: the inputs together give Infinity/],
  ])('%j', (changed, message) => {
    let found: unknown = null;
    try {
      at(changed as Record<string, number>);
    } catch (error) {
      found = error;
    }
    expect(found).toBeInstanceOf(SimError);
    if (typeof message === 'string') expect((found as SimError).message).toBe(message);
    else expect((found as SimError).message).toMatch(message);
  });

  test('leaves no trace in the next', () => {
    const before = at({});
    expect(() => at({ 'star.mass': -1 })).toThrow(SimError);
    expectSameWorld(at({}), before);
  });
});

function outcome<T>(make: () => T): T | SimError {
  try {
    return make();
  } catch (error) {
    if (error instanceof SimError) return error;
    throw error;
  }
}

/** A number of the unit that was typed, so that its text means it exactly. */
function typed({ unit, centre, bounds }: UncertainInput, share: number): { text: string; value: number } {
  const si = unit === 'degC' ? centre + share : centre * (1 + 0.1 * share);
  const inside = bounds ? Math.min(Math.max(si, bounds.low), bounds.high) : si;
  const scale = fromUnit(1, unit) - fromUnit(0, unit);
  const text = formatNumber((inside - fromUnit(0, unit)) / scale, 17);
  return { text: unit === '1' ? text : `${text} ${unit}`, value: fromUnit(Number(text), unit) };
}

describe.each([
  ['lumped', lumped],
  ['zonal', zonal],
])('a World at drawn values is the one that is read from a file, to the last bit: %s', (_, text) => {
  const drawn = one(text);
  const read = readScenario(text, 'x.yaml').cases[0]!;

  test('any values', () => {
    let sound = 0;
    const share = fc.double({ min: -0.3, max: 0.3, noNaN: true });
    const shares = fc.array(share, { minLength: drawn.inputs.length, maxLength: drawn.inputs.length });
    fc.assert(
      fc.property(shares, (list) => {
        const chosen = drawn.inputs.map((input, i) => typed(input, list[i]!));
        const file = drawn.inputs.reduce((rest, input, i) => rest.replace(input.text, chosen[i]!.text), text);
        const again = outcome(() => readScenario(file, 'x.yaml').cases[0]!);
        const built = outcome(() => drawn.builtAt(chosen.map(({ value }) => value)));
        if (again instanceof SimError || built instanceof SimError) {
          expect([(built as SimError).what, (built as SimError).mend]).toEqual([
            (again as SimError).what,
            (again as SimError).mend,
          ]);
          return;
        }
        sound++;
        expectSameWorld(built.world, again.world);
        expect(built.windows).toStrictEqual(again.windows);
        expect(built.options).toStrictEqual(again.options);
      }),
      { numRuns: 60, seed: 20260304 },
    );
    expect(sound).toBeGreaterThan(20); // the others are refused in the same words
  });

  test('the centre', () => {
    expectSameWorld(drawn.worldAt(drawn.inputs.map(({ centre }) => centre)), read.world);
  });
});
