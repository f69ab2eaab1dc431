/** Caps and their edges, on ice that is drawn by hand. */
import { expect, test } from 'vitest';
import { type Dataset, series } from '../../../../sim/dataset/dataset.ts';
import { iceFindings } from '../../../../sim/models/zonal/iceFindings.ts';
import type { ZonalYear } from '../../../../sim/models/zonal/year.ts';

const period = 100;

/** Ice of a globe of four bands at equal times, south to north. */
function found(ice: readonly (readonly number[])[]) {
  const rows = ice.length;
  const bands = ice[0].length;
  const time = Float64Array.from({ length: rows }, (_, row) => (period * row) / rows);
  const dataset: Dataset = {
    variables: {
      time: series('time', time, 's', ''),
      weight: series('time', new Float64Array(rows).fill(1 / rows), '1', ''),
      bandIceFraction: {
        data: Float64Array.from(ice.flat()),
        dims: ['time', 'latitude'],
        shape: [rows, bands],
        unit: '1',
        longName: '',
      },
    },
  };
  const edges = Float64Array.from({ length: bands + 1 }, (_, i) => -1 + (2 * i) / bands);
  const year = { physics: { bands: { edges } }, world: { orbit: { period } } } as unknown as ZonalYear;
  const findings = iceFindings(year, dataset);
  return (name: string) => findings.find((one) => one.name === name)!;
}

test('the share of the year with a cap is cut where half of the band at the pole freezes', () => {
  // north: 0 → 1 at row 1, 1 → 0.25 after row 2: from 12.5 to 50 + 25 · ⅔; south: never less than half
  const of = found([
    [0.5, 0, 0, 0],
    [1, 0, 0, 1],
    [1, 0, 0, 1],
    [0.7, 0, 0, 0.25],
  ]);
  expect(of('iceCapNorthFraction').value).toBeCloseTo((50 + 50 / 3 - 12.5) / 100, 12);
  expect(of('iceCapSouthFraction').value).toBe(1);
  expect(of('iceEdgeNorthMin').value).toBeCloseTo(30, 10); // sin 30° = ½: one band of four
  expect(of('iceFractionMean').value).toBeCloseTo((0.5 + 2 + 2 + 0.95) / 16, 12);
});

test.each([
  [0.3149, 'the northernmost band is never half frozen (31 % at most)'],
  [0.4999, 'the northernmost band is never half frozen (49 % at most)'],
  [0.0004, 'the northernmost band is never half frozen (less than 1 %)'],
  [0, 'no ice at the northern pole in any part of the year'],
])('without a cap, and with %s of the band frozen, the reason is true', (most, reason) => {
  const of = found([
    [0, 0, 0, most],
    [0, 0, 0, 0],
  ]);
  expect(of('iceEdgeNorthMin')).toMatchObject({ value: null, reason });
  expect(of('iceEdgeNorthMax')).toMatchObject({ value: null, reason });
  expect(of('iceEdgeSouthMax').reason).toBe('no ice at the southern pole in any part of the year');
  expect(of('iceCapNorthFraction').value).toBe(0);
});
