import { expect, test } from 'vitest';
import { originOf } from '../../../../sim/origin.ts';
import { readScenario } from '../../../../sim/scenario/read.ts';
import { planGrid } from '../../../../sim/studies/grid/plan.ts';
import { summariseGrid } from '../../../../sim/studies/grid/summariseGrid.ts';

const text = `star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.62 }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m } }
cases: { sea: {}, 'sea: deep': {}, rock: {} }
`;

test('a failed node goes to the cases that it names, with all that is said of each', () => {
  const plan = planGrid({
    text,
    file: 'one.yaml',
    only: null,
    alongs: ['planet.bondAlbedo=0.1 to 0.5'],
    hold: null,
    steps: 3,
    of: ['temperatureMax'],
  });
  const scenario = readScenario(text, 'one.yaml');
  const { cases } = summariseGrid(plan, scenario.cases, originOf(scenario, { sha256: '', version: '1' }), {
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
