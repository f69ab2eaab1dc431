import { execFileSync } from 'node:child_process';
import { describe, expect, test } from 'vitest';
import { zonalModel } from '../../../../sim/models/zonal/index.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import frozen from '../../../published/zonalReference.json' with { type: 'json' };
import { requireTool, toolPath } from '../../../support/require.ts';
import { degrees, zonalWorld } from './worlds.ts';

// scipy's LSODA at rtol 1e-9 with its own insolation, bands and transport: zonalReference.py beside the data made it.
// 2e-5 K: the reference's quadrature of the insolation over a band with polar night is good to 1e-5 of it, its integration to 3e-6 K.
const agreement = 2e-5;

type Reference = (typeof frozen.cases)[number];

/** Ours less the reference, the largest over bands and times, K. */
function largestError(reference: Reference): number {
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
  return largestDifference(Array.from(data), reference.temperature.flat());
}

function largestDifference(a: readonly number[], b: readonly number[]): number {
  expect(a.length).toBe(b.length);
  return a.reduce((largest, value, k) => Math.max(largest, Math.abs(value - b[k])), 0);
}

test.each(frozen.cases)('frozen reference: e = $eccentricity, obliquity $obliquityDeg°', (reference) => {
  expect(largestError(reference)).toBeLessThan(agreement);
});

describe.skipIf(!requireTool('scipy'))('live reference', () => {
  test('the script gives the frozen values again, and ours agree with them', () => {
    const printed = execFileSync(toolPath('scipy')!, ['test/published/zonalReference.py'], {
      stdio: ['ignore', 'pipe', 'ignore'],
    });
    const live = JSON.parse(printed.toString()) as typeof frozen;
    expect(live.cases.length).toBe(frozen.cases.length);
    for (const [k, again] of live.cases.entries()) {
      expect(again.heatTransport).toBe(frozen.cases[k].heatTransport);
      // Another version of scipy may choose other steps: both are good to some 3e-6 K, seen between runs that stop a year apart.
      expect(largestDifference(again.temperature.flat(), frozen.cases[k].temperature.flat())).toBeLessThan(1e-5);
      expect(largestError(again)).toBeLessThan(agreement);
    }
  });
});
