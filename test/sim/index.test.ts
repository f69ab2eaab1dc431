import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { readScenario, runScenario } from '../../sim/index.ts';

test('the public face reads and runs a scenario', () => {
  const file = 'configs/three-inertias.yaml';
  const result = runScenario(readScenario(readFileSync(file, 'utf8'), file), { sha256: '', version: '0' });
  expect(result.cases.map(({ name, passed }) => [name, passed])).toEqual([
    ['rock', true],
    ['thick air', true],
    ['ocean', true],
  ]);
});
