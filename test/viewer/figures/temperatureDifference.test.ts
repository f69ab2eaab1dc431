import { describe, expect, test } from 'vitest';
import type { ChartLine } from '../../../viewer/figures/chartLine.ts';
import type { Figure } from '../../../viewer/figures/figure.ts';
import { temperatureDifference } from '../../../viewer/figures/temperatureDifference.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { type Column, columnsOf } from '../../../viewer/words/columns.ts';
import { plainRun } from '../fixture.ts';

const style = { theme: lightTheme, narrow: false, view: null };
const [sea] = columnsOf(plainRun({ cases: [{ name: 'sea', heatCapacity: 8e7 }] }));

const yOf = ([line]: Figure['lines']) => (line as ChartLine).y;

/** The column with other temperatures, or fewer rows. */
function like(column: Column, name: string, temperature: (value: number) => number, every = 1): Column {
  const variables = Object.fromEntries(
    Object.entries(column.dataset.variables).map(([key, variable]) => {
      const data = variable.data.filter((_, row) => row % every === 0);
      return [key, { ...variable, shape: [data.length], data: key === 'temperature' ? data.map(temperature) : data }];
    }),
  );
  return { ...column, caseName: name, caseIndex: 1, dataset: { variables } };
}

describe('temperatureDifference', () => {
  test('of a case that is five kelvin warmer everywhere is five', () => {
    const warmer = like(sea!, 'warmer', (value) => value + 5);
    const { lines, textAlternative } = temperatureDifference([sea!, warmer], sea!, style);
    expect(lines.map(({ plainName }) => plainName)).toEqual(['warmer']);
    for (const value of yOf(lines)) expect(value).toBeCloseTo(5, 9);
    expect(textAlternative).toContain('from +5.0');
  });

  test('of the same temperatures at other rows is only what straight lines leave', () => {
    const coarser = like(sea!, 'coarser', (value) => value, 2);
    const { lines } = temperatureDifference([sea!, coarser], sea!, style);
    for (const value of yOf(lines)) expect(Math.abs(value)).toBeLessThan(1e-9); // its rows are rows of the other
    const back = temperatureDifference([sea!, coarser], coarser, style);
    const swing =
      Math.max(...sea!.dataset.variables.temperature!.data) - Math.min(...sea!.dataset.variables.temperature!.data);
    for (const value of yOf(back.lines)) expect(Math.abs(value)).toBeLessThan(0.01 * swing);
  });
});
