/** Cases: laid over the scenario key by key, lists replaced, alternatives whole, null removing. */
import { describe, expect, test } from 'vitest';
import { readDocument } from '../../../sim/scenario/document.ts';
import { alternatives, merge, patchOf } from '../../../sim/scenario/merge.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { plain } from '../../../sim/scenario/tree.ts';
import { edited, sound } from './sound.ts';

const tree = (text: string) => readDocument(text, 'p.yaml').root!;
const merged = (base: string, patch: string) => JSON.parse(JSON.stringify(plain(merge(tree(base), tree(patch)))));

describe('merge', () => {
  test('goes key by key, down to the value', () => {
    const base = 'planet: { albedo: { warm: 0.3, ice: 0.6, from: 258 K, to: 273 K }, internalHeat: 1 W/m2 }';
    expect(merged(base, 'planet: { albedo: { ice: 0.5 } }')).toEqual({
      planet: { albedo: { warm: '0.3', ice: '0.5', from: '258 K', to: '273 K' }, internalHeat: '1 W/m2' },
    });
  });

  test('replaces lists whole', () => {
    const base = 'planet: { heatStore: [{ mixedLayer: 20 m }, { heatCapacity: 1e6 J/m2/K }] }';
    expect(merged(base, 'planet: { heatStore: [{ mixedLayer: 5 m }] }')).toEqual({
      planet: { heatStore: [{ mixedLayer: '5 m' }] },
    });
  });

  test('a null removes a key, at any depth, and is never kept', () => {
    expect(merged('planet: { mass: 4 Mearth, radius: 2 Rearth }', 'planet: { mass: null }')).toEqual({
      planet: { radius: '2 Rearth' },
    });
    expect(merged('title: x', 'planet: { mass: null, radius: 2 Rearth }')).toEqual({
      title: 'x',
      planet: { radius: '2 Rearth' },
    });
  });

  // One line a rule of the contract: base, change, what is there afterwards.
  test.each([
    [
      'star: { luminosity: 1 Lsun }',
      'star: { temperature: 5100 K, radius: 1 Rsun }',
      { temperature: '5100 K', radius: '1 Rsun' },
    ],
    ['star: { temperature: 5100 K, radius: 1 Rsun }', 'star: { luminosity: 1 Lsun }', { luminosity: '1 Lsun' }],
    // A temperature alone gives no luminosity: it places habitable limits, and stays.
    [
      'star: { luminosity: 1 Lsun, temperature: 5100 K }',
      'star: { luminosity: 2 Lsun }',
      { luminosity: '2 Lsun', temperature: '5100 K' },
    ],
    ['star: { luminosity: 1 Lsun }', 'star: { temperature: 5100 K }', { luminosity: '1 Lsun', temperature: '5100 K' }],
    // With the radius of the base, the temperature of the case is complete, and replaces the luminosity.
    [
      'star: { luminosity: 1 Lsun, radius: 1 Rsun }',
      'star: { temperature: 5100 K }',
      { radius: '1 Rsun', temperature: '5100 K' },
    ],
    ['star: { mass: 1 Msun }', 'star: { density: 1 g/cm3 }', { density: '1 g/cm3' }],
    ['orbit: { semiMajorAxis: 1 au }', 'orbit: { period: 9 d }', { period: '9 d' }],
    ['orbit: { semiMajorAxis: 1 au, period: 365 d }', 'orbit: { instellation: 1 S0 }', { instellation: '1 S0' }],
    [
      'orbit: { scaledSemiMajorAxis: 9 }',
      'orbit: { semiMajorAxis: 1 au, period: 9 d }',
      { semiMajorAxis: '1 au', period: '9 d' },
    ],
    [
      'orbit: { eccentricity: 0.3, argumentOfPeriapsis: 9 deg }',
      'orbit: { eCosOmega: 0.1, eSinOmega: 0.2 }',
      { eCosOmega: '0.1', eSinOmega: '0.2' },
    ],
    ['orbit: { sqrtECosOmega: 0.1, sqrtESinOmega: 0.2 }', 'orbit: { eccentricity: 0.4 }', { eccentricity: '0.4' }],
    [
      'orbit: { eccentricity: 0.3, argumentOfPeriapsis: 9 deg }',
      'orbit: { eccentricity: 0.1 }',
      { eccentricity: '0.1', argumentOfPeriapsis: '9 deg' },
    ],
    ['orbit: { periapsisTime: 2026-03-04 }', 'orbit: { transitTime: 2026-05-06 }', { transitTime: '2026-05-06' }],
    [
      'orbit: { transitTime: 2026-03-04 }',
      'orbit: { epoch: 2026-05-06, meanAnomaly: 3 deg }',
      { epoch: '2026-05-06', meanAnomaly: '3 deg' },
    ],
    [
      'orbit: { epoch: 2026-05-06, meanAnomaly: 3 deg }',
      'orbit: { periapsisTime: 2026-03-04 }',
      { periapsisTime: '2026-03-04' },
    ],
    ['planet: { bondAlbedo: 0.3 }', 'planet: { albedo: { warm: 0.2 } }', { albedo: { warm: '0.2' } }],
    ['planet: { albedo: { warm: 0.2, ice: 0.6 } }', 'planet: { bondAlbedo: 0.3 }', { bondAlbedo: '0.3' }],
    ['planet: { emissivity: 0.9 }', 'planet: { emission: { opticalDepth: 1 } }', { emission: { opticalDepth: '1' } }],
    ['planet: { emission: { opticalDepth: 1 } }', 'planet: { emissivity: 0.9 }', { emissivity: '0.9' }],
    [
      'planet: { emission: { opticalDepth: 1 } }',
      'planet: { emission: { linear: { a: 200 W/m2, b: 2 W/m2/K } } }',
      { emission: { linear: { a: '200 W/m2', b: '2 W/m2/K' } } },
    ],
    [
      'planet: { heatStore: { mixedLayer: 9 m } }',
      'planet: { heatStore: { heatCapacity: 1e6 J/m2/K } }',
      { heatStore: { heatCapacity: '1e6 J/m2/K' } },
    ],
    [
      'planet: { heatStore: [{ mixedLayer: 9 m }] }',
      'planet: { heatStore: { mixedLayer: 5 m } }',
      { heatStore: { mixedLayer: '5 m' } },
    ],
    [
      'planet: { heatStore: { ground: { thermalInertia: 200 tiu, cycle: orbit } } }',
      'planet: { heatStore: { ground: { cycle: 26 h } } }',
      { heatStore: { ground: { thermalInertia: '200 tiu', cycle: '26 h' } } },
    ],
    ['planet: { rotationPeriod: 26 h }', 'planet: { rotationPeriod: synchronous }', { rotationPeriod: 'synchronous' }],
    ['solve: { start: periodic }', 'solve: { start: { temperature: 250 K } }', { start: { temperature: '250 K' } }],
  ])('%s with %s', (base, patch, expected) => {
    expect(Object.values(merged(base, patch))).toEqual([expected]);
  });

  test('every pair of ways of every group replaces the other, both ways round', () => {
    for (const { section, ways, mayAgree } of alternatives) {
      for (const way of ways) {
        for (const other of ways) {
          if (way === other) continue;
          const text = (keys: readonly string[]) =>
            section
              .split('.')
              .reduceRight(
                (inner, step) => `{ ${step}: ${inner} }`,
                `{ ${keys.map((key) => `${key}: 1`).join(', ')} }`,
              );
          const left = section.split('.').reduce((found, step) => found[step], merged(text(way), text(other)));
          expect(Object.keys(left).toSorted(), `${section}: ${way} with ${other} (${mayAgree})`).toEqual(
            other.toSorted(),
          );
        }
      }
    }
  });

  test('patchOf sets one dotted key, as --along writes it, and replaces alternatives too', () => {
    const base = tree('planet: { heatStore: { mixedLayer: 9 m }, bondAlbedo: 0.3 }');
    expect(
      JSON.parse(JSON.stringify(plain(merge(base, patchOf('planet.heatStore.heatCapacity', '1e6 J/m2/K'))))),
    ).toEqual({
      planet: { heatStore: { heatCapacity: '1e6 J/m2/K' }, bondAlbedo: '0.3' },
    });
    expect(JSON.parse(JSON.stringify(plain(merge(base, patchOf('orbit.eccentricity', 0.25)))))).toMatchObject({
      orbit: { eccentricity: '0.25' },
    });
  });
});

describe('cases of a scenario', () => {
  test('without cases there is one, base', () => {
    expect(readScenario(sound, 'p.yaml').cases.map(({ name }) => name)).toEqual(['base']);
  });

  test('exactly those named run, in their order, {} as the scenario stands', () => {
    const text = `${sound}cases:\n  wet: { planet: { heatStore: { mixedLayer: 90 m } } }\n  as it is: {}\n  2: { orbit: { eccentricity: 0 } }\n`;
    const { cases } = readScenario(text, 'p.yaml');
    expect(cases.map(({ name }) => name)).toEqual(['wet', 'as it is', '2']);
    const plainCase = readScenario(sound, 'p.yaml').cases[0]!;
    expect(JSON.stringify(cases[1]!.world)).toBe(JSON.stringify(plainCase.world));
    expect(cases[0]!.world.surface.heatCapacity).toBeCloseTo(4.5 * plainCase.world.surface.heatCapacity, 3);
    expect(cases[2]!.world.orbit.eccentricity).toBe(0);
  });

  test('a case may supply what the scenario lacks, and change windows and the way to solve', () => {
    const text = `${edited(['  heatStore: { mixedLayer: 20 m }\n', ''])}windows: { mild: 280 K to 300 K }
cases:
  a: { planet: { heatStore: { heatCapacity: 1e7 J/m2/K } }, windows: { mild: null, hot: 300 K to 400 K } }
  b: { planet: { heatStore: { mixedLayer: 1 m } }, solve: { tolerance: 1e-9 } }
`;
    const [a, b] = readScenario(text, 'p.yaml').cases;
    expect(a!.world.surface.heatCapacity).toBe(1e7);
    expect(a!.windows.map(({ name }) => name)).toEqual(['hot']);
    expect(b!.windows.map(({ name }) => name)).toEqual(['mild']);
    expect([a!.options.tolerance, b!.options.tolerance]).toEqual([1e-6, 1e-9]);
  });

  test('names may hold anything that can be printed', () => {
    const long = 'n'.repeat(10_000);
    const names = ['</script><b>', "it's: {a}, [b] # c", '雪 ❄ zoë', 'true', '1', 'constructor', long];
    const text = JSON.stringify({
      ...JSON.parse(jsonSound),
      cases: Object.fromEntries(names.map((name) => [name, {}])),
    });
    const { cases, asUnderstood } = readScenario(text, 'p.json');
    // JSON.stringify puts keys that are whole numbers first.
    expect(cases.map(({ name }) => name).toSorted()).toEqual(names.toSorted());
    expect(readScenario(asUnderstood, 'p.yaml').cases.map(({ name }) => name)).toEqual(cases.map(({ name }) => name));
  });
});

const jsonSound = JSON.stringify(plain(tree(sound)));

test('JSON and YAML give the same worlds', () => {
  const [fromJson, fromYaml] = [jsonSound, sound].map((text) => readScenario(text, 'p').cases[0]!);
  expect(JSON.stringify(fromJson!.world)).toBe(JSON.stringify(fromYaml!.world));
  const indented = JSON.stringify(JSON.parse(jsonSound), null, '\t');
  expect(JSON.stringify(readScenario(indented, 'p').cases[0]!.world)).toBe(JSON.stringify(fromYaml!.world));
});
