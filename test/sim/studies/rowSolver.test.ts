import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import type { Batch } from '../../../sim/models/model.ts';
import { type Buildable, rowSolver } from '../../../sim/studies/rowSolver.ts';
import type { World } from '../../../sim/world.ts';

const columns = [
  { name: 'temperatureMax', unit: 'K', label: 'Maximum temperature' },
  { name: 'lagOfMax', unit: 's', label: 'Lag' },
];
const options = { tolerance: 1e-6, start: 'periodic', samples: 720, spacing: 'balancedAnomaly' } as const;

/** A batch that gives these numbers for any world. */
function solverOf(numbers: readonly number[], kept = true) {
  const batch: Batch = {
    columns,
    into(_, row) {
      row.set(numbers);
      return kept;
    },
  };
  const world = {} as World;
  const one: Buildable = {
    model: 'lumped',
    options,
    windowsVary: false,
    worldAt: () => world,
    builtAt: () => ({ world, options, windows: [] }),
  };
  return { one, batch };
}

function solved(numbers: readonly number[], kept?: boolean) {
  const { one, batch } = solverOf(numbers, kept);
  const table = columns.map(() => Float64Array.of(7, 7));
  const message = rowSolver(one, batch)([], table, 1);
  return { message, row: table.map((column) => column[1]) };
}

describe('a row that failed leaves no number behind', () => {
  test('where one of its numbers is infinite', () => {
    expect(solved([300, Infinity])).toEqual({ message: 'Lag is not finite', row: [7, 7] });
    expect(solved([-Infinity, 3])).toEqual({ message: 'Maximum temperature is not finite', row: [7, 7] });
  });

  test('where the tolerance is not kept, or there is no planet', () => {
    expect(solved([300, 3], false)).toEqual({
      message: 'the state is not known to the tolerance of 0.000001',
      row: [7, 7],
    });
    const { one, batch } = solverOf([300, 3]);
    const fault = () => {
      throw new SimError('orbit', 'periapsis is inside the star', 'Move it');
    };
    expect(rowSolver({ ...one, worldAt: fault }, batch)([], [], 0)).toBe('orbit: periapsis is inside the star');
  });

  test('a finding that is not defined is no failure', () => {
    expect(solved([300, Number.NaN])).toEqual({ message: null, row: [300, Number.NaN] });
  });
});
