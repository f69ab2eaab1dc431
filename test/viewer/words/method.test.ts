import { describe, expect, test } from 'vitest';
import type { RunResult } from '../../../sim/run.ts';
import { cautions, methodSteps } from '../../../viewer/words/method.ts';
import { plainRun } from '../fixture.ts';

/** A run that also has these inputs. */
function having(...keys: readonly string[]): RunResult {
  const run = plainRun();
  const [first, ...others] = run.cases;
  const extra = keys.map((key) => ({ ...first!.inputs[0]!, key }));
  return { ...run, cases: [{ ...first!, inputs: [...first!.inputs, ...extra] }, ...others] };
}

const equations = (run: RunResult): string =>
  methodSteps(run)
    .map(({ equation }) => equation ?? '')
    .join('\n');
const sources = (run: RunResult): string =>
  methodSteps(run)
    .map(({ source }) => source ?? '')
    .join('\n');

describe('how it was computed', () => {
  test('a plain run names its own laws and no others', () => {
    const text = equations(plainRun());
    expect(text).toContain('E(T) = ε σ T⁴');
    expect(text).toContain('⟨S⟩ = L / (4πa² √(1 − e²))');
    expect(text).not.toMatch(/τ|A_\{ice\}|a \+ b T|Γ/);
  });

  test.each([
    ['planet.emission.opticalDepth', 'E(T) = σ T⁴ / (1 + ¾ τ)'],
    ['planet.emission.linear.a', 'E(T) = a + b T'],
    ['planet.albedo.ice', 'A(T) = A_{ice}'],
    ['planet.heatStore.ground.thermalInertia', 'C = Γ √(P / 4π)'],
    ['planet.heatStore.1.mixedLayer', 'C = ρ c d'],
    ['planet.heatStore.0.atmosphere.surfacePressure', 'C = p c_{p} / g'],
  ])('%s brings %s', (key, equation) => {
    expect(equations(plainRun())).not.toContain(equation);
    expect(equations(having(key))).toContain(equation);
  });

  test('a grey body is named only where no other law replaces it', () => {
    expect(equations(having('planet.emission.opticalDepth'))).not.toContain('ε σ T⁴');
  });

  test('habitable limits are cited where a window uses them', () => {
    expect(sources(plainRun())).not.toContain('Kopparapu');
    expect(sources(having('windows.liquid water'))).not.toContain('Kopparapu');
    expect(sources(having('windows.temperate.habitable'))).toContain('Kopparapu');
  });

  test('the cautions name what the numbers must not be used for', () => {
    expect(cautions(plainRun()).join(' ')).toMatch(/clouds.*chemistry.*qualifying hardware.*safety.*observatory/s);
  });
});
