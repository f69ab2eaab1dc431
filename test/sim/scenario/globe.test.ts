/** What a scenario of a model with latitude becomes: its globe, its defaults, what is used, and the cautions. */
import { describe, expect, test } from 'vitest';
import { radiansPerDegree, secondsPerDay } from '../../../sim/constants.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import type { ScenarioCase } from '../../../sim/scenario/types.ts';
import { globe, soundGlobe } from './globes.ts';
import { onlyCase, sound } from './sound.ts';

const built = (text: string) => onlyCase(text).world;
const usedKeys = ({ inputs }: ScenarioCase) => inputs.filter(({ used }) => used).map(({ key }) => key);
const derivedOf = ({ derived }: ScenarioCase, key: string) => derived.find((one) => one.key === key)?.value;

describe('the globe', () => {
  test('in SI, with its defaults', () => {
    const { globe: found, surface } = built(soundGlobe);
    expect(found).toEqual({
      bands: 90,
      obliquity: 23 * radiansPerDegree,
      solarLongitudeOfPeriapsis: 250 * radiansPerDegree,
      insolation: 'daily',
      heatTransport: 0.65,
      albedoP2: 0,
      frozenHeatCapacity: null,
      land: null,
      solarDay: expect.any(Number),
    });
    expect(surface.absorbingFraction).toBe(0.25);
  });

  test('every key that may be given', () => {
    const text = globe(
      { '273 K }': '273 K, p2: -0.1 }' },
      '  bands: 180',
      '  insolation: { legendre: [1, 0, -0.482] }',
      '  frozenHeatStore: { heatCapacity: 1e7 J/m2/K }',
      '  landFraction: { latitudes: [-90 deg, 0 deg, 30 deg, 90 deg], values: [0.2, 0.4, 60 %, 0] }',
      '  landHeatStore: [{ heatCapacity: 2e6 J/m2/K }, { heatCapacity: 1e6 J/m2/K }]',
      '  landSeaExchange: 1.5 W/m2/K',
    );
    const found = onlyCase(text);
    const { land, ...rest } = found.world.globe!;
    expect(rest).toMatchObject({
      bands: 180,
      insolation: { legendre: [1, 0, -0.482] },
      albedoP2: -0.1,
      frozenHeatCapacity: 1e7,
    });
    expect(land).toMatchObject({ heatCapacity: 3e6, exchange: 1.5, fraction: { value: [0.2, 0.4, 0.6, 0] } });
    for (const [i, sine] of [-1, 0, 0.5, 1].entries()) expect(land!.fraction.sineLatitude[i]).toBeCloseTo(sine, 15);
    // By hand, trapezoids over the sine: (0.3 · 1 + 0.5 · ½ + 0.3 · ½)/2.
    expect(derivedOf(found, 'planet.meanLandFraction')).toBeCloseTo(0.35, 12);
    expect(derivedOf(found, 'planet.landHeatCapacity')).toBe(3e6);
    expect(found.inputs.filter(({ used }) => !used)).toEqual([]);
  });

  const land = ['  landHeatStore: { heatCapacity: 3e6 J/m2/K }', '  landSeaExchange: 1 W/m2/K'];

  test('one land fraction holds at every latitude', () => {
    const { land: found } = built(globe({}, '  landFraction: 0.3', ...land)).globe!;
    expect(found!.fraction).toEqual({ sineLatitude: [-1, 1], value: [0.3, 0.3] });
  });

  test('without land, its keys are left unused; without sea, those of the sea', () => {
    const dry = onlyCase(globe({}, '  landFraction: 1', '  frozenHeatStore: { mixedLayer: 2 m }', ...land));
    expect(dry.world.globe).toMatchObject({ land: null, frozenHeatCapacity: null });
    expect(dry.world.surface.heatCapacity).toBe(3e6);
    const idle = (one: ScenarioCase) => one.inputs.filter(({ used }) => !used).map(({ key }) => key);
    expect(idle(dry)).toEqual([
      'planet.heatStore.mixedLayer',
      'planet.frozenHeatStore.mixedLayer',
      'planet.landSeaExchange',
    ]);
    const wet = onlyCase(globe({}, '  landFraction: 0', ...land));
    expect(wet.world.globe!.land).toBeNull();
    expect(idle(wet)).toEqual(['planet.landHeatStore.heatCapacity', 'planet.landSeaExchange']);
    expect(wet.warnings).toEqual([]); // a share that is written, if none
  });

  test('what is said of land without a share of it is warned about', () => {
    expect(onlyCase(globe({}, ...land)).warnings).toEqual([
      'planet.landHeatStore is not used: planet.landFraction is not given.',
      'planet.landSeaExchange is not used: planet.landFraction is not given.',
    ]);
    expect(onlyCase(globe({}, '  landFraction: 0.3', ...land)).warnings).toEqual([]);
  });
});

describe('defaults', () => {
  const keysShown = (text: string) => readScenario(text, 'p.yaml').asUnderstood;

  test('each model has those that it asks for', () => {
    expect(keysShown(soundGlobe)).toMatch(/bands: 90 # default\n {2}insolation: daily # default/);
    expect(keysShown(soundGlobe)).not.toContain('absorbingFraction');
    expect(keysShown(sound)).not.toMatch(/bands|insolation/);
    const both = keysShown(globe({}, 'cases: { one: { model: lumped }, many: {} }'));
    expect(both).toMatch(/absorbingFraction: 0.25 # default\n(.*\n)*? {2}bands: 90 # default/);
  });

  test.each([
    ['eccentricity: 0.2', 'eccentricity: 0', true],
    ['eccentricity: 0.2', 'eccentricity: 0.0', true],
    ['eccentricity: 0.2', 'eCosOmega: 0, eSinOmega: 0', true],
  ])('a circle begins its year at the spring equinox: %s → %s', (old, replacement) => {
    const text = globe({ [old]: replacement, '  solarLongitudeOfPeriapsis: 250 deg\n': '' });
    expect(built(text).globe!.solarLongitudeOfPeriapsis).toBe(0);
    expect(keysShown(text)).toContain('solarLongitudeOfPeriapsis: 0 deg # default');
  });

  test('read again, a mixed scenario gives the same worlds', () => {
    const text = globe(
      {},
      '  landFraction: { latitudes: [-90 deg, 90 deg], values: [0.2, 0.4] }',
      '  landHeatStore: { mixedLayer: 1 m }',
      '  landSeaExchange: 1 W/m2/K',
      'cases: { one: { model: lumped }, many: { planet: { insolation: { legendre: [1, 0, -0.4] } } } }',
    );
    const first = readScenario(text, 'p.yaml');
    const again = readScenario(first.asUnderstood, 'p.yaml');
    const worlds = (scenario: typeof first) =>
      scenario.cases.map(({ model, world }) => JSON.stringify({ model, world }));
    expect(worlds(again)).toEqual(worlds(first));
    expect(again.asUnderstood.replaceAll(' # default', '')).toBe(first.asUnderstood.replaceAll(' # default', ''));
  });
});

test('each case uses what its own model asks for', () => {
  const text = globe({}, '  absorbingFraction: 0.5', 'cases: { one: { model: lumped }, many: {} }');
  const [one, many] = readScenario(text, 'p.yaml').cases;
  expect(one!.world.surface.absorbingFraction).toBe(0.5);
  expect(one!.world.globe ?? null).toBeNull();
  expect(many!.world.surface.absorbingFraction).toBe(0.25);
  const own = ['planet.absorbingFraction', 'planet.heatTransport', 'planet.obliquity', 'planet.rotationPeriod'];
  const chosen = (found: ScenarioCase) => own.filter((key) => usedKeys(found).includes(key));
  expect(chosen(one!)).toEqual(['planet.absorbingFraction']);
  expect(chosen(many!)).toEqual(own.slice(1));
});

describe('the solar day', () => {
  // Rotations a year less (prograde) or more (retrograde) one: Meeus (1998) Astronomical Algorithms gives the Earth's sidereal
  // day as 23h 56m 4.09s of mean solar time (from memory); Venus turns backward once in 243.02 d and has a day of 116.75 d (NSSDC
  // fact sheet, from memory). Tolerances: half of the last digit.
  const day = (rotation: string, obliquity: string, period: string) => {
    const edits = { 'semiMajorAxis: 0.7 au': `period: ${period}`, '23 deg': obliquity, '26 h': rotation };
    return onlyCase(globe(edits)).world.globe!.solarDay;
  };

  test('of a planet that turns forward, and of one that turns backward', () => {
    expect(day('86164.09 s', '23.44 deg', '365.2564 d')! / secondsPerDay).toBeCloseTo(1, 6);
    expect(Math.abs(day('243.02 d', '177.4 deg', '224.701 d')! / secondsPerDay - 116.75)).toBeLessThan(0.005);
  });

  test('of a resonance: two years for 3:2', () => {
    expect(day("'3:2'", '0 deg', '88 d')! / secondsPerDay).toBeCloseTo(176, 9);
  });

  test('is none where the star stands still', () => {
    expect(day('synchronous', '0 deg', '88 d')).toBeNull();
    expect(day('88 d', '0 deg', '88 d')).toBeNull();
  });
});

describe('cautions', () => {
  const warnings = (edits: Record<string, string>, ...lines: string[]) => onlyCase(globe(edits, ...lines)).warnings;

  test('none for a planet with days', () => {
    expect(warnings({})).toEqual([]);
  });

  test('days that the orbit rules need a model with longitude', () => {
    const needs = 'the mean over a day is not justified; it would need a model with longitude.';
    expect(warnings({ '26 h': 'synchronous' })).toEqual([
      `rotationPeriod synchronous: the star stands still in the sky, so that ${needs}`,
    ]);
    expect(warnings({ '26 h': "'3:2'" })).toEqual([
      `rotationPeriod 3:2 ties the days to the orbit: each longitude has a climate of its own, and ${needs}`,
    ]);
    expect(warnings({ '26 h': 'synchronous' }, '  insolation: annualMean')).toEqual([]);
  });

  test('a frozen sea that is deeper than the open one', () => {
    expect(warnings({}, '  frozenHeatStore: { mixedLayer: 40 m }')).toEqual([
      'The frozen sea stores 1.64e8 J/m2/K, more than the open sea, 8.18e7 J/m2/K: usually it is less.',
    ]);
  });
});
