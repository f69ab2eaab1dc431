/** What is said of uncertain inputs: that a run uses their centres, and which centre that is where nobody typed it. */
import { expect, test } from 'vitest';
import { readScenario } from '../../../sim/scenario/read.ts';
import { centreText, spreadNotes } from '../../../sim/scenario/spreads.ts';
import { edited, onlyCase, sound } from './sound.ts';

const head =
  'Spreads of inputs are not propagated by run: every input is used at its centre; perilag spread samples them.';
const notes = (text: string) => spreadNotes(readScenario(text, 'p.yaml'));

test('exact inputs: nothing is said', () => {
  expect(notes(sound)).toEqual([]);
});

test('a centre that stands in the text needs no more words', () => {
  expect(notes(edited(['0.62', '0.62 ± 0.03'], ['0.48 au', '0.48 +0.02 -0.01 au']))).toEqual([head]);
});

test('a limit has its median, a range its midpoint, a log range its geometric one, each in the unit that was typed', () => {
  const text = edited(
    ['0.85 Msun', '0.8 to 0.9 Msun'],
    ['bondAlbedo: 0.3', 'bondAlbedo: < 0.4 (95%)'],
    ['{ mixedLayer: 20 m }', '{ heatCapacity: 1e5 to 1e9 J/m2/K log }'],
  );
  // Half-normal whose 95 % quantile is 0.4: the median is 0.4 × 0.674490/1.959964 = 0.13765 (quantiles of the normal law).
  expect(notes(text)).toEqual([
    head,
    'star.mass 0.8 to 0.9 Msun is used at 0.85 Msun, its midpoint.',
    'planet.bondAlbedo < 0.4 (95%) is used at 0.1377, its median.',
    'planet.heatStore.heatCapacity 1e5 to 1e9 J/m2/K log is used at 1e7 J/m2/K, its geometric midpoint.',
  ]);
});

test('an input that no model uses is not counted; a date is', () => {
  expect(notes(edited(['0.62', '0.62\n  inclination: isotropic']))).toEqual([]);
  const dated = edited(['0.62', '0.62\n  periapsisTime: 2026-03-04T00:00Z to 2026-03-06T00:00Z']);
  expect(notes(dated)[1]).toMatch(/ is used at 2026-03-05T00:00:00Z, its midpoint\.$/);
});

test('what only some cases have names them', () => {
  const text = `${sound}cases:
  dim: { planet: { bondAlbedo: 0.1 to 0.5 } }
  plain: {}
  bright: { planet: { bondAlbedo: 0.1 to 0.5 } }
`;
  expect(notes(text)).toEqual([head, 'planet.bondAlbedo 0.1 to 0.5 is used at 0.3, its midpoint (cases dim, bright).']);
});

test('centres read back in the unit that was typed', () => {
  const { inputs } = onlyCase(
    edited(['0.62', '0.62\n  argumentOfPeriapsis: 100 to 110 deg'], ['0.85 Msun', '0.85 ± 0.1 Msun']),
  );
  const centre = (key: string) => centreText(inputs.find((one) => one.key === key)!);
  expect([centre('orbit.argumentOfPeriapsis'), centre('star.mass')]).toEqual(['105 deg', '0.85 Msun']);
});
