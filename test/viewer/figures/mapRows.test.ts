import { describe, expect, test } from 'vitest';
import { balancedFromMean } from '../../../sim/orbit/balanced.ts';
import { mapRows } from '../../../viewer/figures/mapRows.ts';
import { zonalDataset } from '../zonalFixture.ts';

const turn = 2 * Math.PI;

describe('rows of a map', () => {
  test('a short Dataset keeps all its rows', () => {
    expect(mapRows(zonalDataset({ name: 'a' }, 4, 180))).toHaveLength(180);
  });

  test('a long one is thinned to 200 at most, evenly', () => {
    const rows = mapRows(zonalDataset({ name: 'a' }, 4, 720));
    expect(rows).toEqual(Array.from({ length: 180 }, (_, column) => 4 * column));
  });

  test('rows spaced in time are chosen evenly in the balanced anomaly: periapsis keeps its share', () => {
    const eccentricity = 0.7;
    const dataset = inTime(eccentricity, 7200);
    const rows = mapRows(dataset);
    expect(rows.length).toBeLessThanOrEqual(200);
    const anomalies = rows.map((row) => balancedFromMean((turn * row) / 7200, eccentricity));
    const steps = anomalies.slice(1).map((s, at) => s - anomalies[at]!);
    expect(Math.max(...steps)).toBeLessThan(1.5 * (turn / 200)); // the nearest row of time is within half a step
    expect(rows.every((row, at) => at === 0 || row > rows[at - 1]!)).toBe(true);
  });
});

/** As `spacing: time` gives it, with only the variables that thinning needs. */
function inTime(eccentricity: number, samples: number) {
  const { variables } = zonalDataset({ name: 'a', eccentricity }, 4, samples);
  const means = Array.from({ length: samples }, (_, row) => (turn * row) / samples);
  const eccentric = means.map((M) => {
    let E = M;
    for (let newton = 0; newton < 60; newton++)
      E -= (E - eccentricity * Math.sin(E) - M) / (1 - eccentricity * Math.cos(E));
    return E;
  });
  const trueAnomaly = Float64Array.from(eccentric, (E) => {
    const half = Math.atan2(
      Math.sqrt(1 + eccentricity) * Math.sin(E / 2),
      Math.sqrt(1 - eccentricity) * Math.cos(E / 2),
    );
    return (2 * half + turn) % turn;
  });
  const distance = Float64Array.from(eccentric, (E) => 1 - eccentricity * Math.cos(E));
  return {
    variables: {
      ...variables,
      trueAnomaly: { ...variables.trueAnomaly!, data: trueAnomaly },
      distance: { ...variables.distance!, data: distance },
    },
  };
}
