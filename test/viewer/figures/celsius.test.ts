import { describe, expect, test } from 'vitest';
import { annualProfile } from '../../../viewer/figures/annualProfile.ts';
import { inCelsius } from '../../../viewer/figures/celsius.ts';
import type { Figure } from '../../../viewer/figures/figure.ts';
import { insolationGroups, insolationMap } from '../../../viewer/figures/insolationMap.ts';
import { lagLoop } from '../../../viewer/figures/lagLoop.ts';
import { orbitFromAbove } from '../../../viewer/figures/orbitFromAbove.ts';
import { temperatureDifference } from '../../../viewer/figures/temperatureDifference.ts';
import { temperatureMap } from '../../../viewer/figures/temperatureMap.ts';
import { temperatureThroughOrbit } from '../../../viewer/figures/temperatureThroughOrbit.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { plainRun } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';

const style = { theme: lightTheme, narrow: false, view: null };
const plain = columnsOf(plainRun());
const zonal = columnsOf(zonalRun());
const figures: readonly (readonly [name: string, figure: Figure])[] = [
  ['through the orbit', temperatureThroughOrbit(plain, style)],
  ['by latitude and season', temperatureMap(zonal, 0, style)],
  ['by latitude', annualProfile(zonal, style)],
  ['from above', orbitFromAbove(plain, 0, style)],
  ['against instellation', lagLoop(plain, style)],
];

/** Every text of the JSON. */
function texts(value: unknown): string[] {
  if (typeof value === 'string') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(texts) : [];
}

describe.each(figures)('temperature %s', (_, figure) => {
  test('has no number of kelvin left', () => {
    const changed = inCelsius(figure);
    const said = texts({ ...changed, lines: [] }).filter((text) => /(?:\d|\}|\() ?\u00a0?K\b/.test(text));
    expect(said).toEqual([]);
    expect(texts(figure).some((text) => /\bK\b/.test(text))).toBe(true);
  });

  test('has moved its temperatures by 273.15, and nothing else', () => {
    const changed = inCelsius(figure);
    for (const [i, trace] of figure.data.entries()) {
      const [before, after] = [trace, changed.data[i]!] as unknown as Record<string, unknown>[];
      expect(after!.x).toEqual(before!.x);
      const numbers = (value: unknown): number[] => (Array.isArray(value) ? value.flat().filter(Number.isFinite) : []);
      const key = before!.z === undefined ? 'y' : 'z';
      const axis = (before!.yaxis ?? 'y') as string;
      const isTemperature =
        (key === 'z' && !/edge of the ice/.test(String(before!.name))) ||
        /Temperature/.test(JSON.stringify((figure.layout as Record<string, unknown>)[axis.replace('y', 'yaxis')]));
      const offset = isTemperature ? 273.15 : 0;
      for (const [at, value] of numbers(after![key]).entries())
        expect(value).toBeCloseTo(numbers(before![key])[at]! - offset, 9);
    }
  });
});

test('fluxes and differences stay as they are', () => {
  const map = insolationMap(insolationGroups(zonal), 0, style);
  expect(inCelsius(map).data).toEqual(map.data);
  const difference = temperatureDifference(plain, plain[0]!, style);
  expect(inCelsius(difference).data).toEqual(difference.data);
  expect(inCelsius(difference).textAlternative).toBe(difference.textAlternative);
});
