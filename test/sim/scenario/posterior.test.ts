/** `posterior` in a scenario: what it may say, what is refused and where, and which cases its columns rule. */
import { describe, expect, test } from 'vitest';
import { casesDrawn } from '../../../sim/scenario/drawn.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { spreadNotes } from '../../../sim/scenario/spreads.ts';

const text = `star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { period: 130 d, eccentricity: 0.62 ± 0.03 }
planet: { bondAlbedo: 0.1 to 0.5, heatStore: [{ mixedLayer: 20 m }, { heatCapacity: 1e5 J/m2/K }] }
posterior:
  file: chain.csv
  columns: { ecc: orbit.eccentricity, P: { key: orbit.period, unit: d }, depth: { key: planet.heatStore.0.mixedLayer, unit: m } }
  weights: w
`;
const withoutPosterior = text.slice(0, text.indexOf('posterior:'));
const messageOf = (scenario: string): string => {
  try {
    readScenario(scenario, 'p.yaml');
  } catch (error) {
    return (error as Error).message;
  }
  return 'nothing was refused';
};

test('what it says, in the order of the file', () => {
  const { posterior } = readScenario(text, 'p.yaml');
  expect(posterior).toEqual({
    file: 'chain.csv',
    columns: [
      { column: 'ecc', key: 'orbit.eccentricity', unit: '1' },
      { column: 'P', key: 'orbit.period', unit: 'd' },
      { column: 'depth', key: 'planet.heatStore.0.mixedLayer', unit: 'm' },
    ],
    weights: 'w',
  });
  expect(readScenario(text.replace('  weights: w\n', ''), 'p.yaml').posterior?.weights).toBeNull();
  expect(readScenario(withoutPosterior, 'p.yaml').posterior).toBeNull();
});

test('run uses the values of the scenario, and says so', () => {
  expect(spreadNotes(readScenario(text, 'p.yaml'))).toContain(
    'Samples of chain.csv are not used by run: the values that stand in the scenario are; perilag spread draws from them.',
  );
});

test('the scenario as understood reads again, and from elsewhere finds the same file', () => {
  const { posterior, asUnderstood, understoodWith } = readScenario(text, 'p.yaml');
  expect(readScenario(asUnderstood, 'q.yaml').posterior).toEqual(posterior);
  const moved = readScenario(understoodWith('../../my data/chain.csv'), 'q.yaml').posterior;
  expect(moved).toEqual({ ...posterior, file: '../../my data/chain.csv' });
  const plain = readScenario(withoutPosterior, 'p.yaml');
  expect(plain.understoodWith('x.csv')).toBe(plain.asUnderstood);
});

describe('what is drawn', () => {
  test('columns beside spreads; where both stand, the posterior rules', () => {
    const [one] = casesDrawn(text, 'p.yaml');
    expect(one!.inputs.map(({ key, column }) => [key, column])).toEqual([
      ['orbit.period', 'P'],
      ['orbit.eccentricity', 'ecc'],
      ['planet.bondAlbedo', null],
      ['planet.heatStore.0.mixedLayer', 'depth'],
    ]);
    expect(one!.notes).toEqual(['orbit.eccentricity is drawn from column ecc of the posterior, not from 0.62 ± 0.03.']);
    const values = one!.inputs.map(({ centre }) => centre);
    values[1] = 0.25;
    expect(one!.worldAt(values).orbit.eccentricity).toBe(0.25);
  });

  test('a case that gives a key itself, or another way to say it, keeps its own', () => {
    const cases = `${text}cases: { as measured: {}, circle: { orbit: { eccentricity: 0 } }, by axis: { orbit: { semiMajorAxis: 0.5 au } } }\n`;
    const drawn = casesDrawn(cases, 'p.yaml');
    const columns = drawn.map(({ inputs }) => inputs.flatMap(({ column }) => column ?? []));
    expect(columns).toEqual([
      ['P', 'ecc', 'depth'],
      ['P', 'depth'],
      ['ecc', 'depth'],
    ]);
    expect(drawn[1]!.notes).toEqual(['Column ecc is not used here: the case gives orbit.eccentricity in its own way.']);
    expect(drawn[2]!.notes[0]).toBe('Column P is not used here: the case gives orbit.period in its own way.');
    expect(drawn[1]!.worldAt(drawn[1]!.inputs.map(({ centre }) => centre)).orbit.eccentricity).toBe(0);
  });

  test('a column that changes nothing is told', () => {
    const tilted = text
      .replace('bondAlbedo:', 'obliquity: 10 deg, bondAlbedo:')
      .replace('ecc: orbit.eccentricity', 'tilt: { key: planet.obliquity, unit: deg }');
    expect(casesDrawn(tilted, 'p.yaml')[0]!.idle).toEqual([
      { key: 'planet.obliquity', label: 'Obliquity', reason: 'model lumped does not use it here' },
    ]);
  });
});

describe('refused', () => {
  const columns = (line: string) => text.replace(/columns: .*/, `columns: ${line}`);
  test.each([
    [
      '{ ecc: orbit.ecentricity }',
      'p.yaml:6:19: posterior.columns.ecc: `ecentricity` is not a key of orbit. Did you mean `orbit.eccentricity`?',
    ],
    [
      '{ ecc: eccentricity }',
      'p.yaml:6:19: posterior.columns.ecc: there is no key `eccentricity`. Did you mean `orbit.eccentricity`?',
    ],
    [
      '{ ecc: { key: orbit } }',
      'p.yaml:6:26: posterior.columns.ecc.key: `orbit` is a section. Name one of its keys, e.g. `orbit.semiMajorAxis`.',
    ],
    [
      '{ t: orbit.transitTime }',
      'p.yaml:6:17: posterior.columns.t: `orbit.transitTime` is a setting, a word, a date or a table, and no finding depends on samples of it. Name a number of the star, the orbit or the planet, e.g. `orbit.eccentricity`.',
    ],
    [
      '{ P: orbit.period }',
      'p.yaml:6:17: posterior.columns.P: orbit.period is a time, and nothing says in which unit the column stands. Write P: { key: orbit.period, unit: d }.',
    ],
    [
      '{ P: { key: orbit.period } }',
      'p.yaml:6:17: posterior.columns.P: orbit.period is a time, and nothing says in which unit the column stands. Write P: { key: orbit.period, unit: d }.',
    ],
    [
      '{ P: { key: orbit.period, unit: m } }',
      'p.yaml:6:44: posterior.columns.P.unit: `m` is no unit of a time. Write e.g. d.',
    ],
    [
      '{ ecc: { key: orbit.eccentricity, unit: d } }',
      'p.yaml:6:52: posterior.columns.ecc.unit: `d` is no unit of a pure number. Leave the unit out.',
    ],
    [
      '{ a: orbit.eccentricity, b: orbit.eccentricity }',
      'p.yaml:6:40: posterior.columns.b: orbit.eccentricity is column `a` already. Keep one of them.',
    ],
    ['{ a: orbit.eccentricity, a: orbit.period }', /p.yaml:6:\d+: syntax: .*twice/],
    [
      '{ a: { key: orbit.semiMajorAxis, unit: au } }',
      'p.yaml:6:24: posterior.columns.a.key: the scenario gives no orbit.semiMajorAxis of its own. Write one beside the samples, such as their median, e.g. 0.48 au: run uses it.',
    ],
    [
      '{ w: orbit.eccentricity }',
      'p.yaml:7:12: posterior.weights: `w` stands among the columns, too. Keep one of the two.',
    ],
    ['{}', 'p.yaml:6:3: posterior.columns: no column is named. Write e.g. { ecc: orbit.eccentricity }.'],
    ['{ ecc: { kee: orbit.eccentricity } }', /p.yaml:6:\d+: posterior.columns.ecc.kee: .*Did you mean `key`/],
    ['{ ecc: [orbit.eccentricity] }', /p.yaml:6:\d+: posterior.columns.ecc/],
  ])('columns: %s', (line, message) => {
    if (typeof message === 'string') expect(messageOf(columns(line))).toBe(message);
    else expect(messageOf(columns(line))).toMatch(message);
  });

  test('keys of the section, no file, and a posterior inside a case', () => {
    expect(messageOf(text.replace('weights: w', 'weight: w'))).toBe(
      'p.yaml:7:3: posterior.weight: `weight` is not a key of posterior. Did you mean `weights`?',
    );
    expect(messageOf(text.replace('  file: chain.csv\n', ''))).toBe(
      'p.yaml:4:1: posterior.file: nothing is given. Write e.g. chain.csv.',
    );
    expect(messageOf(`${text}cases: { a: { posterior: { file: b.csv } } }\n`)).toMatch(
      /`posterior` cannot change from case to case/,
    );
  });
});
