import { expect, test } from 'vitest';
import { degreesOf, edgeText, hasLatitude, latitudeText, wholeLatitudeText } from '../../../viewer/words/latitude.ts';
import { plainRun } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

test('latitudes have a side of the equator, and the equator none', () => {
  expect([34.24, -87.96, 0, -0.04].map(latitudeText).map(plain)).toEqual(['34.2° N', '88.0° S', '0.0°', '0.0°']);
  expect([30, -60, 0].map(wholeLatitudeText).map(plain)).toEqual(['30° N', '60° S', '0°']);
});

test('an ice edge: the end nearer to the equator first', () => {
  expect(plain(edgeText(51.2, 68.7))).toBe('51.2° to 68.7° N');
  expect(plain(edgeText(-79.4, -51.6))).toBe('51.6° to 79.4° S');
  expect(plain(edgeText(60, 60.02))).toBe('60.0° N');
  expect(edgeText(0, 0)).toBe('the equator');
});

test('degreesOf: degrees whatever the finding is kept in', () => {
  const finding = { name: 'a', label: 'a', unit: 'deg', value: 45 };
  expect(degreesOf(finding)).toBe(45);
  expect(degreesOf({ ...finding, unit: 'rad', value: Math.PI / 2 })).toBeCloseTo(90, 12);
  expect(degreesOf({ ...finding, value: null, reason: 'no ice' })).toBeNull();
  expect(degreesOf(undefined)).toBeNull();
});

test('hasLatitude asks the Dataset, not the model', () => {
  const states = (run: ReturnType<typeof plainRun>) => run.cases[0]!.states[0]!;
  expect(hasLatitude(states(zonalRun()))).toBe(true);
  expect(hasLatitude(states(plainRun()))).toBe(false);
});
