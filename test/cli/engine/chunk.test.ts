import { expect, test } from 'vitest';
import { computeChunk } from '../../../cli/engine/chunk.ts';

const names = ['planet.bondAlbedo', 'temperatureMax', 'temperatureMin'];

test('a row with an infinite number is a failed one, and none of its numbers stays to be counted', () => {
  const calculate = () => ({
    columns: [
      Float64Array.of(0.1, 0.2, 0.3, 0.4),
      Float64Array.of(300, Infinity, Number.NaN, 303),
      Float64Array.of(200, -Infinity, 202, 203),
    ],
    failures: [{ draw: 12, message: 'no planet' }],
  });
  const { columns, failures } = computeChunk(calculate, { from: 10, to: 14 }, names);
  expect(columns.map((column) => [...column])).toEqual([
    [0.1, NaN, 0.3, 0.4],
    [300, NaN, NaN, 303],
    [200, NaN, 202, 203],
  ]);
  expect(failures).toEqual([
    { draw: 11, message: 'temperatureMax is not finite' },
    { draw: 12, message: 'no planet' },
  ]);
});

test('columns of another shape than the table are our own fault', () => {
  const short = () => ({ columns: [new Float64Array(3)], failures: [] });
  expect(() => computeChunk(short, { from: 0, to: 3 }, names)).toThrow('another shape');
});
