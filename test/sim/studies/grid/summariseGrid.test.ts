import { describe, expect, test } from 'vitest';
import { originOf } from '../../../../sim/origin.ts';
import { readScenario } from '../../../../sim/scenario/read.ts';
import { planGrid } from '../../../../sim/studies/grid/plan.ts';
import { summariseGrid } from '../../../../sim/studies/grid/summariseGrid.ts';

const text = `star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.62 }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m } }
cases: { sea: {}, 'sea: deep': { planet: { heatStore: { mixedLayer: 60 m } } }, rock: { planet: { heatStore: { heatCapacity: 1e6 J/m2/K } } } }
`;

const planOf = (alongs: readonly string[], yaml = text, of: readonly string[] | null = ['temperatureMax']) =>
  planGrid({ text: yaml, file: 'one.yaml', only: null, alongs, hold: null, steps: 3, of });
const reportOf = (plan: ReturnType<typeof planGrid>, yaml = text) => {
  const scenario = readScenario(yaml, 'one.yaml');
  const findings = plan.cases.flatMap((one) => one.findings.map(() => new Float64Array(plan.count)));
  return summariseGrid(plan, scenario, originOf(scenario, { sha256: '', version: '1' }), { findings, failures: [] });
};

test('a failed node goes to the cases that it names, with all that is said of each', () => {
  const plan = planOf(['planet.bondAlbedo=0.1 to 0.5']);
  const scenario = readScenario(text, 'one.yaml');
  const { cases } = summariseGrid(plan, scenario, originOf(scenario, { sha256: '', version: '1' }), {
    findings: plan.cases.map(() => new Float64Array(3)),
    failures: [
      { node: 0, message: 'sea: orbit: too near; too hot; rock: orbit: too near' },
      { node: 2, message: 'sea: deep: orbit: too near' },
    ],
  });
  expect(cases.map(({ name, failed }) => [name, failed])).toEqual([
    ['sea', [{ node: 0, message: 'orbit: too near; too hot' }]],
    ['sea: deep', [{ node: 2, message: 'orbit: too near' }]],
    ['rock', [{ node: 0, message: 'orbit: too near' }]],
  ]);
});

describe('cases that the ranges make alike', () => {
  const store = 'planet.heatStore.heatCapacity=1e5 to 1e8 J/m2/K log';

  test('are one, under all their names, each at its own point; what gives way is said once', () => {
    const { cases } = reportOf(planOf([store, 'orbit.eccentricity=0 to 0.9']));
    expect(cases.map(({ name }) => name)).toEqual(['sea = sea: deep = rock']);
    // Water of 1025 kg/m3 and 3990 J/kg/K, 20 m deep; 60 m hold more than the range.
    expect(cases[0]!.members.map(({ name, index, own }) => [name, index, own])).toEqual([
      ['sea', 0, [expect.closeTo(20 * 1025 * 3990, 3), 0.62]],
      ['sea: deep', 1, [null, 0.62]],
      ['rock', 2, [1e6, 0.62]],
    ]);
    expect(cases[0]!.notes).toEqual([
      'planet.heatStore.mixedLayer is left out: planet.heatStore.heatCapacity takes its place.',
      'The cases “sea”, “sea: deep”, “rock” are the same over these inputs, which replace what sets them apart: they were computed once.',
    ]);
  });

  test('where nothing sets them apart to begin with, nothing is said to replace it', () => {
    const twins = text.replace(/cases:.*/, 'cases: { one: {}, two: { orbit: { argumentOfPeriapsis: 90 deg } } }');
    const { cases } = reportOf(planOf(['planet.bondAlbedo=0.1 to 0.5'], twins), twins);
    expect(cases.map(({ name, notes }) => [name, notes])).toEqual([
      ['one = two', ['The cases “one”, “two” are the same in all that a climate depends on: they were computed once.']],
    ]);
  });

  test('are kept apart by what only a finding, the solver or a failure tells', () => {
    const apart = (change: string) => {
      const two = text.replace(/cases:.*/, `cases: { one: {}, two: { ${change} } }`);
      return planOf(['planet.bondAlbedo=0.1 to 0.5'], two).cases.length;
    };
    expect(apart('windows: { mild: 280 K to 300 K }')).toBe(2);
    expect(apart('solve: { tolerance: 1e-8 }')).toBe(2);
    expect(apart('star: { radius: 1.2 Rsun }')).toBe(2);
    expect(apart('planet: { radius: 2 Rearth }')).toBe(1);
  });
});

describe('what gives way to a range is said', () => {
  test.each([
    ['planet.bondAlbedo=0.1 to 0.5', 'planet.albedo is left out: planet.bondAlbedo takes its place.'],
    [
      'star.luminosity=0.4 to 0.6 Lsun',
      'star.temperature and star.radius are left out: star.luminosity takes their place.',
    ],
    [
      'orbit.eccentricity=0 to 0.5',
      'orbit.eCosOmega and orbit.eSinOmega are left out: orbit.eccentricity takes their place.',
    ],
  ])('%s', (along, note) => {
    const other = `star: { temperature: 5100 K, radius: 0.9 Rsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eCosOmega: 0.1, eSinOmega: 0.3 }
planet: { albedo: { warm: 0.3, ice: 0.6, from: 258 K, to: 273 K }, heatStore: { mixedLayer: 20 m } }
`;
    expect(planOf([along], other).cases[0]!.notes).toEqual([note]);
  });
});

test('spreads are said to stay at their centres, but for what a range varies or replaces', () => {
  const unsure = text
    .replace('0.62', '0.62 ± 0.1')
    .replace('bondAlbedo: 0.3', 'bondAlbedo: 0.1 to 0.5')
    .replace('mixedLayer: 20 m', 'mixedLayer: 10 m to 30 m');
  const notesFor = (...alongs: string[]) => reportOf(planOf(alongs, unsure), unsure).notes;
  const centres =
    'Spreads of inputs are not propagated by grid: every input that no range varies is used at its centre; perilag spread samples them.';
  expect(notesFor('orbit.eccentricity=0 to 0.9')).toEqual([
    centres,
    'planet.bondAlbedo 0.1 to 0.5 is used at 0.3, its midpoint.',
    'planet.heatStore.mixedLayer 10 m to 30 m is used at 20 m, its midpoint (case sea).',
  ]);
  expect(notesFor('planet.heatStore.heatCapacity=1e5 to 1e8 J/m2/K log', 'planet.bondAlbedo=0 to 0.5')).toEqual([
    centres,
  ]);
  expect(reportOf(planOf(['orbit.eccentricity=0 to 0.9'])).notes).toEqual([]);
});

describe('--of', () => {
  const message = (of: readonly string[], yaml = text) => {
    try {
      planOf(['orbit.eccentricity=0 to 0.9'], yaml, of);
      return 'nothing was refused';
    } catch (error) {
      return (error as Error).message;
    }
  };

  test.each([
    [['temperatureMx'], '--of: there is no finding `temperatureMx`. Did you mean `temperatureMax`?'],
    [['temperature_max'], '--of: there is no finding `temperature_max`. Did you mean `temperatureMax`?'],
    [['temperatureMax damping'], '--of: there is no finding `temperatureMax damping`. Put commas between the names.'],
    [['warmth'], /^--of: there is no finding `warmth`. Choose from period, orbitMeanInstellation, /],
    [[], /^--of: no finding is named. Choose from period, /],
  ])('%j', (of, expected) => {
    if (typeof expected === 'string') expect(message(of)).toBe(expected);
    else expect(message(of)).toMatch(expected);
  });

  test('a finding that one model has and another has not is given where it is', () => {
    const mixed = text.replace(
      /cases:.*/,
      `cases:
  one: {}
  by latitude: { model: zonal, planet: { obliquity: 23 deg, rotationPeriod: 24 h, heatTransport: 0.6 W/m2/K, solarLongitudeOfPeriapsis: 90 deg, bands: 18 } }
`,
    );
    expect(
      planOf(['orbit.eccentricity=0 to 0.2'], mixed, ['contrast', 'damping']).cases.map(({ findings }) =>
        findings.map(({ name }) => name),
      ),
    ).toEqual([['damping'], ['contrast', 'damping']]);
    expect(message(['contrast'], mixed)).toBe(
      '--of: case `one` has none of contrast. Ask for one that it has, or leave the case out with --only.',
    );
  });
});
