/** `perilag trace` where a branch cannot be followed to the end: exit 3, with what was reached. */
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { workplace } from './support.ts';

/** A step of albedo and hardly any transport: the ice moves from band to band in steps. */
const staircase = `model: zonal
star: { luminosity: 0.48 Lsun, mass: 0.82 Msun }
orbit: { semiMajorAxis: 0.7 au, eccentricity: 0.05 }
planet:
  albedo: { warm: 0.3, ice: 0.6, from: 263 K, to: 263 K }
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 12 m }
  heatTransport: 0.05 W/m2/K
  obliquity: 24 deg
  rotationPeriod: 22 h
  solarLongitudeOfPeriapsis: 120 deg
  bands: 18
`;

test('a staircase of folds that is not climbed', { timeout: 120_000 }, async () => {
  const place = workplace();
  place.write('stairs.yaml', staircase);
  const words = ['trace', 'stairs.yaml', '--along', 'star.luminosity=0.47 to 0.6 Lsun'];
  const { code, stdout, stderr } = await place.perilag(...words);
  const { cases } = JSON.parse(readFileSync(place.path('out', 'stairs', 'trace', 'summary.json'), 'utf8'));
  const endings = cases[0].branches.map(({ ended }: { ended: string }) => ended);
  expect(endings).toContain('left');
  expect(endings.some((ended: string) => ended !== 'left')).toBe(true);
  expect(code).toBe(3);
  expect(stderr).toContain('not followed to the end: base\n');
  expect(stdout).toContain('A branch could not be followed');
  place.remove();
});
