import { expect, test } from 'vitest';
import { series } from '../../../sim/dataset/dataset.ts';
import { everyRow, rowStride } from '../../../sim/dataset/thin.ts';

const rows = 7;
const bands = 3;
const dataset = {
  variables: {
    time: series(
      'time',
      Float64Array.from({ length: rows }, (_, i) => 10 * i),
      's',
      'Time',
    ),
    weight: series('time', new Float64Array(rows).fill(1 / rows), '1', 'Weight'),
    latitude: series('latitude', Float64Array.of(-1, 0, 1), 'rad', 'Latitude'),
    field: {
      data: Float64Array.from({ length: rows * bands }, (_, i) => i),
      dims: ['time', 'latitude'],
      shape: [rows, bands],
      unit: 'K',
      longName: 'Field',
    },
  },
};

test('the stride is the least that brings every field below the limit', () => {
  expect(rowStride(dataset, 21)).toBe(1);
  expect(rowStride(dataset, 20)).toBe(2);
  expect(rowStride(dataset, 7)).toBe(3);
  expect(rowStride({ variables: { time: dataset.variables.time } }, 2)).toBe(1); // lines are not thinned
});

test('every third row of every variable in time; weights still sum to 1', () => {
  const { time, weight, latitude, field } = everyRow(dataset, 3).variables;
  expect([...time.data]).toEqual([0, 30, 60]);
  expect([...field.data]).toEqual([0, 1, 2, 9, 10, 11, 18, 19, 20]);
  expect(field.shape).toEqual([3, bands]);
  expect(weight.shape).toEqual([3]);
  expect(weight.data[0]).toBeCloseTo(3 / rows, 15);
  expect(weight.data[2]).toBeCloseTo(1 / rows, 15);
  expect(latitude).toBe(dataset.variables.latitude);
});
