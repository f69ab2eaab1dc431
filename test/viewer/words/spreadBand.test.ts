import { expect, test } from 'vitest';
import type { SpreadBand } from '../../../sim/studies/spread/spreadReport.ts';
import { bandSentence } from '../../../viewer/words/spreadBand.ts';

const positions = Float64Array.of(0, 0.25, 0.5, 0.75, 1);
const level = (shift: number, swing: number) => positions.map((x) => 300 + shift + swing * Math.sin(2 * Math.PI * x));
const band = (swing: number, along: SpreadBand['along'] = 'orbit'): SpreadBand => ({
  label: 'Temperature',
  along,
  positions,
  unit: 'K',
  levels: [-20, -10, 0, 10, 20].map((shift) => level(shift, swing)),
  atCentre: level(0, swing),
});
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

test('where the median is highest; on a circle it is highest nowhere', () => {
  expect(plain(bandSentence(band(30)))).toMatch(
    /^the median is highest 25 % of an orbit after periapsis, 330 K \(95 %: /,
  );
  expect(plain(bandSentence(band(0)))).toBe(
    'the median is 300 K (95 %: 280 to 320 K), the same all through the orbit.',
  );
  expect(plain(bandSentence(band(0, 'latitude')))).toContain('the same at every latitude.');
});
