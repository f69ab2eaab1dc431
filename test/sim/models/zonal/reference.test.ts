import { expect, test } from 'vitest';
import { zonalModel } from '../../../../sim/models/zonal/index.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import frozen from '../../../published/zonalReference.json' with { type: 'json' };
import { degrees, zonalWorld } from './worlds.ts';

// scipy's LSODA at rtol 1e-9 with its own insolation, bands and transport: zonalReference.py beside the data made it.
// 2e-5 K: the reference's quadrature of the insolation over a band with polar night is good to 1e-5 of it, its integration to 1e-6 K.
test.each(frozen.cases)('frozen reference: e = $eccentricity, obliquity $obliquityDeg°', (reference) => {
  const world = zonalWorld({
    q: reference.q,
    e: reference.eccentricity,
    heatCapacity: reference.heatCapacity,
    emission: greyBody(1),
    globe: {
      bands: frozen.bands,
      obliquity: reference.obliquityDeg * degrees,
      solarLongitudeOfPeriapsis: reference.solarLongitudeDeg * degrees,
      heatTransport: reference.heatTransport,
    },
  });
  const options = { tolerance: 1e-9, start: 'periodic', samples: frozen.times, spacing: 'time' } as const;
  const { data } = zonalModel().solve(world, options, []).states[0].dataset.variables.bandTemperature;
  const error = data.reduce((largest, value, k) => {
    const expected = reference.temperature[Math.floor(k / frozen.bands)][k % frozen.bands];
    return Math.max(largest, Math.abs(value - expected));
  }, 0);
  expect(error).toBeLessThan(2e-5);
});
