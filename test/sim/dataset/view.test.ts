import { expect, test } from 'vitest';
import { view } from '../../../sim/dataset/view.ts';

test('view: rows and columns of a field, on the same memory', () => {
  const data = Float64Array.of(1, 2, 3, 4, 5, 6);
  const field = view({ data, dims: ['latitude', 'time'], shape: [2, 3], unit: 'K', longName: 'Temperature' });
  expect(field.shape).toEqual([2, 3]);
  expect(field.get(1, 0)).toBe(4);
  const lastTime = field.pick(null, 2);
  expect([lastTime.get(0), lastTime.get(1)]).toEqual([3, 6]);
  field.set(0, 0, 9);
  expect(data[0]).toBe(9);
});
