/** `--along`: what it takes, what it refuses in plain words, and the worlds that it gives. */
import { describe, expect, test } from 'vitest';
import { solarLuminosity } from '../../../sim/constants.ts';
import { alongText, readAlong } from '../../../sim/scenario/along.ts';
import { casesAlong } from '../../../sim/scenario/caseAlong.ts';
import { mendedRange } from '../../../sim/scenario/rangeForms.ts';

const text = `title: two stores
star: { luminosity: 0.6 Lsun, mass: 0.9 Msun }
orbit: { semiMajorAxis: 0.8 au, eccentricity: 0.1 }
planet:
  albedo: { warm: 0.3, ice: 0.6, from: 258 K, to: 273 K }
  heatStore: { mixedLayer: 20 m }
cases:
  sea: {}
  stack: { planet: { heatStore: [{ mixedLayer: 5 m }, { heatCapacity: 1e6 J/m2/K }] } }
windows: { temperate: { habitable: [runawayGreenhouse, maximumGreenhouse] } }
`;
const sound = text.replace(/windows.*\n/, '');

function messageOf(work: () => unknown): string {
  try {
    work();
  } catch (error) {
    return (error as Error).message;
  }
  return 'nothing was refused';
}

describe('ranges as they are written elsewhere', () => {
  test.each([
    ['0-0.9', '0 to 0.9'],
    ['0..0.9', '0 to 0.9'],
    ['0:0.9', '0 to 0.9'],
    ['0, 0.9', '0 to 0.9'],
    ['[0.8, 1.3] Lsun', '0.8 to 1.3 Lsun'],
    ['-20 – 10 degC', '-20 to 10 degC'],
    ['1e4-1e9 J/m2/K log', '1e4 to 1e9 J/m2/K log'],
    ['1e-4:1e-2 au, log', '1e-4 to 1e-2 au log'],
    ['1e4 to 1e9 J/m2/K logarithmic', '1e4 to 1e9 J/m2/K log'],
    ['1e4 to 1e9 J/m2/K (log)', '1e4 to 1e9 J/m2/K log'],
    ['log 1e4 to 1e9 J/m2/K', '1e4 to 1e9 J/m2/K log'],
  ])('%s', (written, mended) => {
    expect(mendedRange(written)).toBe(mended);
    expect(mendedRange(mended)).toBeNull();
    expect(messageOf(() => readAlong(`orbit.eccentricity=${written}`))).toBe(
      `--along: \`${written}\` is not a range. Write \`orbit.eccentricity=${mended}\`.`,
    );
  });

  test.each(['0 to 0.9', '1e4 to 1e9 J/m2/K log', '-20 degC to 10 degC', '0.3 ± 0.1', '1e-4', '5 J/m2/K/s^0.5'])(
    '%s is left to the reader of quantities',
    (written) => {
      expect(mendedRange(written)).toBeNull();
    },
  );
});

describe('readAlong', () => {
  test('a range in the user’s unit, its ends in SI', () => {
    const along = readAlong(' star.luminosity = 0.8 to 1.3 Lsun');
    expect(along).toMatchObject({ key: 'star.luminosity', label: 'Luminosity', unit: 'Lsun', log: false });
    expect(along.from / solarLuminosity).toBeCloseTo(0.8, 14);
    expect(along.to / solarLuminosity).toBeCloseTo(1.3, 14);
    expect(alongText(along, along.to)).toBe('1.3 Lsun');
  });

  test('log, pure numbers, and a number that may also be a table', () => {
    expect(readAlong('planet.heatStore.heatCapacity=1e4 to 1e9 J/m2/K log')).toMatchObject({
      from: 1e4,
      to: 1e9,
      log: true,
    });
    expect(readAlong('orbit.eccentricity=0 to 0.9')).toMatchObject({ from: 0, to: 0.9, unit: '1' });
    expect(readAlong('planet.landFraction=0.1 to 0.9')).toMatchObject({ from: 0.1, to: 0.9 });
    expect(readAlong('planet.albedo.ice=0.4 to 0.7')).toMatchObject({ from: 0.4, to: 0.7 });
  });

  test.each([
    ['', '--along: no key is given. Write e.g. `star.luminosity=0.8 to 1.3 Lsun`.'],
    ['=0.8 to 1.3 Lsun', '--along: no key is given. Write e.g. `star.luminosity=0.8 to 1.3 Lsun`.'],
    [
      'star.luminosity',
      '--along: `star.luminosity` has no range behind it. Write e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'star.luminosity=',
      '--along: the range of star.luminosity is empty. Write e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'orbit.eccentricity 0 to 0.9',
      '--along: `orbit.eccentricity 0 to 0.9` has no `=` behind its key. Write `orbit.eccentricity=0 to 0.9`.',
    ],
    ['orbit.e=0 to 0.9', '--along: `e` is not a key of orbit. Did you mean `orbit.eccentricity`?'],
    ['star.luminosty=0.8 to 1.3 Lsun', '--along: `luminosty` is not a key of star. Did you mean `star.luminosity`?'],
    [
      'stars.luminosity=0.8 to 1.3 Lsun',
      '--along: there is no key `stars.luminosity`. Did you mean `star.luminosity`?',
    ],
    ['luminosity=0.8 to 1.3 Lsun', '--along: there is no key `luminosity`. Did you mean `star.luminosity`?'],
    [
      'planet.zzzzzzzz=1 to 2',
      '--along: `zzzzzzzz` is not a key of planet. Keys here are `radius`, `mass`, `bondAlbedo`, `albedo`, `emissivity`, `emission`, `absorbingFraction`, `internalHeat`, `heatStore`, `rotationPeriod`, `obliquity`, `solarLongitudeOfPeriapsis`, `bands`, `insolation`, `heatTransport`, `frozenHeatStore`, `landFraction`, `landHeatStore`, `landSeaExchange`.',
    ],
    ['star.luminosity.x=1 to 2', '--along: `x` is not a key of star.luminosity. End it at `star.luminosity`.'],
    [
      'planet.heatStore=1 to 2 m',
      '--along: `planet.heatStore` is a section. Name one of its keys, e.g. `planet.heatStore.heatCapacity`.',
    ],
    [
      'planet.heatStore.0.mixedLayer=1 to 2 m',
      '--along: `0` is not a key of planet.heatStore. Keys here are `heatCapacity`, `mixedLayer`, `atmosphere`, `ground`.',
    ],
    [
      'planet.bands=18 to 90',
      '--along: `planet.bands` is a setting, a word, a date or a table, not a number that can run over a range. Name a number of the star, the orbit or the planet, e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'planet.insolation=1 to 2',
      '--along: `planet.insolation` is a setting, a word, a date or a table, not a number that can run over a range. Name a number of the star, the orbit or the planet, e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'planet.rotationPeriod=10 h to 20 h',
      '--along: `planet.rotationPeriod` is a setting, a word, a date or a table, not a number that can run over a range. Name a number of the star, the orbit or the planet, e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'orbit.periapsisTime=2461103.71 TDB to 2461104.2 TDB',
      '--along: `orbit.periapsisTime` is a setting, a word, a date or a table, not a number that can run over a range. Name a number of the star, the orbit or the planet, e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'solve.tolerance=1e-6 to 1e-3',
      '--along: `solve.tolerance` is a setting, a word, a date or a table, not a number that can run over a range. Name a number of the star, the orbit or the planet, e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'model=lumped to zonal',
      '--along: `model` is a setting, a word, a date or a table, not a number that can run over a range. Name a number of the star, the orbit or the planet, e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    [
      'cases.sea=1 to 2',
      '--along: `cases.sea` is a setting, a word, a date or a table, not a number that can run over a range. Name a number of the star, the orbit or the planet, e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    ['star.luminosity=1.3 Lsun', '--along: `1.3 Lsun` is not a range. Write e.g. `star.luminosity=0.8 to 1.3 Lsun`.'],
    [
      'star.luminosity=1.3 ± 0.1 Lsun',
      '--along: `1.3 ± 0.1 Lsun` is not a range. Write e.g. `star.luminosity=0.8 to 1.3 Lsun`.',
    ],
    ['star.luminosity=0.8 to 1.3', '--along: star.luminosity: `0.8` has no unit. Write e.g. `0.8 Lsun` or `0.8 W`.'],
    [
      'star.luminosity=0.8 to 1.3 K',
      '--along: star.luminosity: `0.8 K` is a temperature, not a power. Write e.g. `0.8 Lsun`.',
    ],
    [
      'star.luminosity=1.3 to 0.8 Lsun',
      '--along: star.luminosity: `1.3 to 0.8 Lsun` does not rise. Write the smaller number first.',
    ],
    ['star.luminosity=0 to 1 Lsun', '--along: star.luminosity: `0 Lsun` is out of bounds. Keep it above 0 Lsun.'],
    [
      'orbit.eccentricity=0.5 to 1.2',
      '--along: orbit.eccentricity: `1.2` is out of bounds. Keep it at least 0 and below 1.',
    ],
    [
      'planet.obliquity=isotropic',
      '--along: `isotropic` is not a range. Write e.g. `planet.obliquity=23 to 28.8 deg`.',
    ],
    [
      'planet.internalHeat=0 to 5 W/m2 log',
      '--along: planet.internalHeat: `0 to 5 W/m2 log` does not start above zero. Start a log range above zero.',
    ],
  ])('refuses `%s`', (along, message) => {
    expect(messageOf(() => readAlong(along))).toBe(message);
  });
});

describe('casesAlong', () => {
  const [sea] = casesAlong(sound, 'x.yaml', readAlong('star.luminosity=0.3 to 1.3 Lsun'), ['sea']);

  test('the world at a value, and the same one when asked again', () => {
    const world = sea!.worldAt(0.5 * solarLuminosity);
    expect(world.star.luminosity / solarLuminosity).toBeCloseTo(0.5, 14);
    expect(sea!.worldAt(0.5 * solarLuminosity)).toBe(world);
    expect(sea!.warnings).toEqual([]);
  });

  test('all cases in the order of the file', () => {
    const along = readAlong('star.luminosity=0.3 to 1.3 Lsun');
    expect(casesAlong(sound, 'x.yaml', along).map(({ name }) => name)).toEqual(['sea', 'stack']);
  });

  test('cases that differ in nothing but the input are one, with both names and a word about it', () => {
    const twins = sound.replace(/cases:\n/, 'cases:\n  puddle: { planet: { heatStore: { mixedLayer: 1 m } } }\n');
    const depth = readAlong('planet.heatStore.mixedLayer=1 to 90 m');
    const [merged, ...others] = casesAlong(twins, 'x.yaml', depth, ['puddle', 'sea']);
    expect([merged!.name, others]).toEqual(['puddle = sea', []]);
    expect(merged!.warnings.join()).toContain('“puddle”, “sea” are the same along this input');
    const light = casesAlong(twins, 'x.yaml', readAlong('star.luminosity=0.3 to 1.3 Lsun'), ['puddle', 'sea']);
    expect(light.map(({ name, warnings }) => [name, warnings])).toEqual([
      ['puddle', []],
      ['sea', []],
    ]);
  });

  test('an alternative gives way whole; windows ask for nothing', () => {
    const [one] = casesAlong(text, 'x.yaml', readAlong('planet.heatStore.heatCapacity=1e6 to 1e8 J/m2/K'), ['sea']);
    expect(one!.worldAt(1e7).surface.heatCapacity).toBeCloseTo(1e7, 5);
    const [bond] = casesAlong(sound, 'x.yaml', readAlong('planet.bondAlbedo=0 to 0.9'), ['sea']);
    expect(bond!.worldAt(0.5).surface.albedo).toMatchObject({ warm: 0.5, ramp: null });
  });

  test('a star that brightens at a given flux moves the planet: warned', () => {
    const given = sound.replace('semiMajorAxis: 0.8 au', 'instellation: 1 S0');
    const [one] = casesAlong(given, 'x.yaml', readAlong('star.luminosity=0.3 to 1.3 Lsun'), ['sea']);
    expect(one!.warnings).toEqual([
      'orbit.instellation is given: star.luminosity then moves the planet and leaves its light as it is. Follow orbit.instellation.',
    ]);
  });

  test.each([
    [
      'planet.heatStore.mixedLayer=1 to 2 m',
      '--along: planet.heatStore of case `stack` is a list, and planet.heatStore.mixedLayer would replace all of it. Write a single form in the scenario, or name another key.',
    ],
    [
      'planet.obliquity=0 to 90 deg',
      '--along: nothing that is computed for case `sea` depends on planet.obliquity. Name another key, or leave the case out with --only.',
    ],
    [
      'orbit.eccentricity=0.5 to 0.99995',
      '--along: case `sea` is not sound at orbit.eccentricity = 0.99995: orbit.eccentricity: the eccentricity is 0.99995; the solver is accurate up to 0.9999. Keep it at or below 0.9999.',
    ],
    [
      'planet.albedo.from=250 K to 280 K',
      '--along: case `sea` is not sound at planet.albedo.from = 280 K: planet.albedo.from: `from` 280 K is above `to` 273 K. All ice at `from` and below, none at `to` and above: swap them.',
    ],
  ])('refuses `%s` in this scenario', (along, message) => {
    expect(messageOf(() => casesAlong(sound, 'x.yaml', readAlong(along)))).toBe(message);
  });
});
