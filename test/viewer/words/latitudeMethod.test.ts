import { describe, expect, test } from 'vitest';
import type { RunResult } from '../../../sim/run.ts';
import { cautions, methodSteps } from '../../../viewer/words/method.ts';
import { plainRun } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';

const all = (run: RunResult): string =>
  methodSteps(run)
    .map(({ words, equation, source }) => [words, equation, source].join('\n'))
    .join('\n');

/** A run that also says `text` for `key`. */
function saying(key: string, text = ''): RunResult {
  const run = zonalRun();
  const [first, ...others] = run.cases;
  const input = { ...first!.inputs[0]!, key, text };
  return { ...run, cases: [{ ...first!, inputs: [...first!.inputs, input] }, ...others] };
}

describe('how temperatures by latitude were computed', () => {
  test('diffusive transport, daily insolation, the year’s steps and its repetition, each with its source', () => {
    const text = all(zonalRun());
    expect(text).toContain('∂/∂x [ D (1 − x²) ∂T/∂x ]');
    expect(text).toContain('North, Cahalan & Coakley (1981)');
    expect(text).toContain('cos h = −tan φ tan δ');
    expect(text).toContain('Berger (1978)');
    expect(text).toContain('Hairer & Wanner (1996)');
    expect(text).toMatch(/Saad & Schultz \(1986\).*Knoll & Keyes \(2004\)/);
    expect(text).toContain('Richardson (1911)');
  });

  test('the equation of one heat store stands only where some case has one', () => {
    const lumped = 'C dT/dt = f (1 − A) S(r) + q − E(T)';
    expect(all(zonalRun())).not.toContain(lumped);
    expect(all(plainRun())).toContain(lumped);
    expect(all(plainRun())).not.toMatch(/∂|Berger|Rosenbrock/);
    const both = { ...zonalRun(), cases: [...zonalRun().cases, ...plainRun().cases] };
    expect(all(both)).toContain(lumped);
    expect(all(both)).toContain('D (1 − x²)');
  });

  test.each([
    ['planet.insolation', 'annualMean', 'Ward (1974)'],
    ['planet.insolation.legendre.0', '1', 'Σ s_{n} P_{n}(x)'],
  ])('%s: %s replaces the daily mean', (key, text, wanted) => {
    expect(all(zonalRun())).not.toContain(wanted);
    expect(all(saying(key, text))).toContain(wanted);
    expect(all(saying(key, text))).not.toContain('Berger');
  });

  test('the daily mean may be asked for by name', () => {
    expect(all(saying('planet.insolation', 'daily'))).toContain('Berger (1978)');
  });

  test.each([
    ['planet.landFraction', 'North & Coakley (1979)'],
    ['planet.frozenHeatStore.mixedLayer', 'C_{frozen}'],
    ['planet.albedo.p2', '(3 sin² φ − 1) / 2'],
  ])('%s brings %s', (key, wanted) => {
    expect(all(zonalRun())).not.toContain(wanted);
    expect(all(saying(key))).toContain(wanted);
  });

  test('the cautions name what one temperature a latitude leaves out', () => {
    expect(cautions(zonalRun()).join(' ')).toMatch(/whole circle and the whole day.*no weather.*qualifying hardware/s);
    expect(cautions(zonalRun()).join(' ')).not.toContain('whole surface');
    expect(cautions(plainRun()).join(' ')).not.toContain('whole circle');
  });
});
