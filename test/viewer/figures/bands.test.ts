import { describe, expect, test } from 'vitest';
import { areaTimeShare, bandMeans, bandRanges, bandsOf, fieldOf } from '../../../viewer/figures/bands.ts';
import { zonalDataset } from '../zonalFixture.ts';

const dataset = zonalDataset({ name: 'a' }, 10, 120);

describe('what figures read of bands', () => {
  test('equal areas from pole to pole', () => {
    const { edges, areas, middlesDeg, middles } = bandsOf(dataset);
    expect([edges[0], edges.at(-1)]).toEqual([-1, 1]);
    for (const area of areas) expect(area).toBeCloseTo(0.1, 12);
    expect(middlesDeg[9]).toBeCloseTo((Math.asin(0.9) * 180) / Math.PI, 12);
    expect(middles[0]).toBeCloseTo(-0.9, 12);
  });

  test('a field is read by row and band', () => {
    const field = fieldOf(dataset, 'bandTemperature');
    expect(field.at(7, 3)).toBe(dataset.variables.bandTemperature!.data[73]);
  });

  test('a field that does not fill its shape is refused', () => {
    const { variables } = dataset;
    const short = { ...variables.bandTemperature!, data: new Float64Array(7) };
    expect(() => fieldOf({ variables: { ...variables, bandTemperature: short } }, 'bandTemperature')).toThrow(
      'bandTemperature does not fill its shape',
    );
  });

  test('means are over time, not over rows', () => {
    const flux = bandMeans(dataset, fieldOf(dataset, 'bandInsolation')).reduce((sum, value) => sum + value / 10, 0);
    // The mean over globe and orbit is a quarter of S/√(1 − e²); ten bands are sampled at their middles: 1 %.
    expect(Math.abs(flux / (1300 / 4 / Math.sqrt(1 - 0.04)) - 1)).toBeLessThan(0.01);
  });

  test('ranges hold every row and are met', () => {
    const field = fieldOf(dataset, 'bandTemperature');
    const { low, high } = bandRanges(field);
    const column = Array.from({ length: field.rows }, (_, row) => field.at(row, 9));
    expect([low[9], high[9]]).toEqual([Math.min(...column), Math.max(...column)]);
  });

  test('shares of area and time: all, none, and a half', () => {
    const sine = { rows: 120, bands: 10, at: (_: number, band: number) => (band < 5 ? -1 : 1) };
    expect(areaTimeShare(dataset, sine, () => true)).toBe(1);
    expect(areaTimeShare(dataset, sine, () => false)).toBe(0);
    expect(areaTimeShare(dataset, sine, (value) => value > 0)).toBeCloseTo(0.5, 9);
  });
});
