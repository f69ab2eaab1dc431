import { expect, test } from 'vitest';
import { temperatureAfterStart } from '../../../viewer/figures/temperatureAfterStart.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { plainRun } from '../fixture.ts';

const run = plainRun({ cases: [{ name: 'heated', heatCapacity: 8e7, forward: true }] });
const figure = temperatureAfterStart(columnsOf(run), { theme: lightTheme, narrow: false, view: null });

test('shows the whole run as it stands, from the start on', () => {
  const { x, y } = figure.data.find(({ name }) => name === 'heated') as unknown as { x: number[]; y: number[] };
  const { time, temperature } = run.cases[0]!.states[0]!.dataset.variables;
  expect(y).toEqual([...temperature!.data]);
  expect(x).toEqual([...time!.data].map((t) => t / 86_400));
  expect(figure.layout.xaxis?.title?.text).toBe('Time after the start (d)');
});

test('marks every periapsis of the run, and names the first', () => {
  const marks = figure.layout.shapes!.filter(({ type, xref }) => type === 'line' && xref === 'x');
  expect(marks.map(({ x0 }) => Math.round(Number(x0)))).toEqual([0, 120, 240]);
  expect(figure.layout.annotations!.filter(({ text }) => text === '<b>periapsis</b>')).toHaveLength(1);
});

test('runs that start at different points of the orbit share no marks', () => {
  const [one] = columnsOf(run);
  const { meanAnomaly } = one!.dataset.variables;
  const moved = { ...meanAnomaly!, data: meanAnomaly!.data.map((M) => (M + Math.PI) % (2 * Math.PI)) };
  const other = { ...one!, dataset: { variables: { ...one!.dataset.variables, meanAnomaly: moved } } };
  const apart = temperatureAfterStart([one!, other], { theme: lightTheme, narrow: false, view: null });
  expect(apart.layout.shapes!.filter(({ type, xref }) => type === 'line' && xref === 'x')).toEqual([]);
});
