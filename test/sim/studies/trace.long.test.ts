/** A trace that takes some ten seconds alone. */
import { expect, test } from 'vitest';
import { readAlong } from '../../../sim/scenario/along.ts';
import { casesAlong } from '../../../sim/scenario/caseAlong.ts';
import { climateEnds } from '../../../sim/studies/climateRanges.ts';
import { traceAlong } from '../../../sim/studies/traceAlong.ts';

// Ground as thin as a metre of water melts within days: on steps as long as a deep sea allows, the linearised year points
// elsewhere than the march goes, and the branch was lost behind its first fold.
test('land and sea with ice on thin ground are followed round both folds', () => {
  const along = readAlong('orbit.instellation=0.8 to 1.1 S0');
  const [one] = casesAlong(
    `model: zonal
star: { luminosity: 0.85 Lsun, mass: 0.94 Msun }
orbit: { instellation: 1 S0, eccentricity: 0.25 }
planet:
  albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 60 m }
  landFraction: { latitudes: [-90 deg, -10 deg, 10 deg, 90 deg], values: [0.05, 0.05, 0.9, 0.9] }
  landHeatStore: { mixedLayer: 1 m }
  landSeaExchange: 1 W/m2/K
  heatTransport: 0.6 W/m2/K
  obliquity: 23 deg
  rotationPeriod: 26 h
  solarLongitudeOfPeriapsis: 90 deg
  bands: 18
`,
    'x.yaml',
    along,
  );
  const found = traceAlong(one!, along);
  expect(found.branches.map(({ ended }) => ended)).toEqual(['left']);
  expect(climateEnds(found).map(({ climate, missing }) => [climate, missing])).toEqual([
    ['warm', 'below'],
    ['cold', 'above'],
  ]);
  expect(found.branches[0]!.points.length).toBeLessThan(150); // it took hundreds of ever shorter steps
});
