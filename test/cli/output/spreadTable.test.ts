import { expect, test } from 'vitest';
import { spreadLines } from '../../../cli/output/spreadTable.ts';
import { terminalOf } from '../../../cli/output/terminal.ts';
import { cutWarnings } from '../../../sim/studies/spread/spreadWarnings.ts';
import { spreadCase, spreadOf, withFinding } from '../../viewer/spreadFixture.ts';

const terminal = terminalOf({ columns: 200, env: {}, isTTY: false });
const words = (...changes: Parameters<typeof withFinding>[2][]) => {
  const one = changes.reduce((made, change) => withFinding(made, 'lagOfMax', change), spreadCase({}));
  return spreadLines(spreadOf([one]), terminal).join('\n');
};

test('a finding that draws lack: in how many it is, and why one lacks it', () => {
  const summary = { mean: 1, percentiles: null, defined: 0.91553 };
  expect(words({ summary, missingBecause: 'the extreme is too flat' })).toContain(
    ': defined in 91.6 % of the draws; one lacks it because the extreme is too flat\n',
  );
  expect(words({ summary: { ...summary, defined: 1 - 1 / 4096 / 2 } })).toContain(': defined in more than 99.9 % of');
  const none = { mean: null, percentiles: null, defined: 0, reason: 'no draw has a value' };
  expect(words({ summary: none, missingBecause: 'the temperature does not vary' })).toContain(
    ': none: the temperature does not vary\n',
  );
});

test('a warning of the case is told once', () => {
  const one = spreadCase({});
  const inputs = one.inputs.map((input, i) => (i === 0 ? { ...input, truncatedShare: 0.072 } : input));
  const cut = { ...one, inputs, warnings: [...one.warnings, ...cutWarnings(inputs)] };
  const lines = spreadLines(spreadOf([cut]), terminal).join('\n');
  expect(lines.match(/lies beyond what is physical/g)).toHaveLength(1);
});

test('what matters: an estimate below nothing is shown as nothing, and what cannot be told is left out', () => {
  const one = spreadCase({ sampling: 'posterior' });
  const unknown = { value: null, chanceLevel: null, reason: 'the input is the same in every draw' } as const;
  const ranks = one.inputs.map((_, i) => (i === 0 ? unknown : { value: i === 1 ? 0.4 : -0.01, chanceLevel: 0.03 }));
  const told = withFinding(one, 'temperatureMax', { importance: { first: null, total: null, ranks, leftOut: 0 } });
  const lines = spreadLines(spreadOf([told], { sampling: 'posterior' }), terminal).join('\n');
  expect(lines).toContain(
    'Maximum temperature, goes along with: orbit.eccentricity 0.40, star.luminosity 0.00, planet.heatStore.heatCapacity 0.00',
  );
});
