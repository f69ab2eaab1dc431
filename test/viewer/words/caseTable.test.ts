import { describe, expect, test } from 'vitest';
import { caseTable, steadyIsShared } from '../../../viewer/words/caseTable.ts';
import type { Cell } from '../../../viewer/words/cells.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { plainRun, withFindings } from '../fixture.ts';

const rowsOf = (run: ReturnType<typeof plainRun>) => caseTable(columnsOf(run));
const cellOf = (run: ReturnType<typeof plainRun>, label: string): Cell =>
  rowsOf(run).find((row) => row.label.startsWith(label))!.cells[0]!;
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('table of cases', () => {
  test('has the rows that people quote, a cell for every case', () => {
    const rows = rowsOf(plainRun());
    expect(rows.map(({ label }) => label)).toEqual([
      'Textbook equilibrium temperature',
      'Mean temperature',
      'Maximum temperature',
      'Minimum temperature',
      'Maximum comes, after periapsis',
      'Lag of the maximum behind the steady maximum',
      'Damping: swing over steady swing',
      'Radiative time constant, in orbits',
      'Share of time in “liquid water at 1 bar”',
      'Share of time in “like ours” (instantaneous)',
    ]);
    expect(rows.every(({ cells }) => cells.length === 3)).toBe(true);
  });

  test('a case with ground shows the half-space beside the one store; the others a dash', () => {
    const run = plainRun();
    const ground = (name: string, value: number, unit: string) => ({
      key: `planet.heatStore.0.ground.${name}`,
      value,
      unit,
      label: name,
    });
    const derived = [
      ground('halfSpaceDamping', 0.848, '1'),
      ground('lumpedDamping', 0.986, '1'),
      ground('halfSpaceLag', 4.18 * 86_400, 's'),
      ground('lumpedLag', 4.87 * 86_400, 's'),
    ];
    const rows = rowsOf({
      ...run,
      cases: run.cases.map((one, index) => (index === 1 ? { ...one, derived: [...one.derived, ...derived] } : one)),
    }).filter(({ label }) => label.includes('small swing'));
    expect(rows.map(({ label, cells }) => [label, ...cells.map(({ text }) => plain(text))])).toEqual([
      ['Damping of a small swing, half-space ground', '—', '0.848', '—'],
      ['Damping of a small swing, this one lumped store', '—', '0.986', '—'],
      ['Lag of a small swing, half-space ground', '—', '4.18 d', '—'],
      ['Lag of a small swing, this one lumped store', '—', '4.87 d', '—'],
    ]);
  });

  test('temperatures stand beside their steady value', () => {
    const run = withFindings(plainRun(), { temperatureMax: 339.701, steadyTemperatureMax: 441.296 });
    expect(cellOf(run, 'Maximum temperature')).toMatchObject({ text: '339.70\u00a0K', steady: '441.30\u00a0K' });
  });

  test('an error that reaches the last digit is shown, rounded up, and takes digits away', () => {
    const run = plainRun();
    const [only] = run.cases;
    const withError = (plusMinus: number) => {
      const states = only!.states.map((state) => ({
        ...state,
        findings: state.findings.map((f) => (f.name === 'temperatureMax' ? { ...f, value: 339.701, plusMinus } : f)),
      }));
      return plain(cellOf({ ...run, cases: [{ ...only!, states }] }, 'Maximum temperature').text);
    };
    expect(withError(0.004)).toBe('339.70 K');
    expect(withError(0.0311)).toBe('339.70 ± 0.04 K');
    expect(withError(0.31)).toBe('339.70 ± 0.31 K');
    expect(withError(2.2)).toBe('339.7 ± 2.2 K');
    expect(withError(41)).toBe('340 ± 41 K');
  });

  test('what is not defined is a dash with its reason', () => {
    const run = withFindings(plainRun(), { lagOfMax: null, damping: null });
    expect(cellOf(run, 'Lag')).toEqual({ text: '—', reason: 'there is none' });
    expect(cellOf(run, 'Damping')).toEqual({ text: '—', reason: 'there is none' });
  });

  test('a window without its limits says why', () => {
    const unavailable = 'the star has 9000 K';
    const window = { name: 'temperate', of: 'instellation', from: 0, to: 0, unavailable } as const;
    expect(cellOf(plainRun({ windows: [window] }), 'Share of time')).toEqual({ text: '—', reason: unavailable });
  });

  test('several states bring a column each, and the distance to tipping', () => {
    const run = plainRun({
      cases: [
        { name: 'ice', heatCapacity: 8e7, coldState: true },
        { name: 'bare', heatCapacity: 2e6 },
      ],
    });
    const margins = rowsOf(run).find(({ label }) => label.startsWith('Stability'))!;
    expect(margins.cells.map(({ text }) => text)).toEqual(['0.800', '0.500', '—']);
  });

  test('a run from a start has a row of its own for the time of its maximum', () => {
    const run = plainRun({
      cases: [
        { name: 'a', heatCapacity: 8e7 },
        { name: 'b', heatCapacity: 8e7, forward: true },
      ],
    });
    const rows = rowsOf(run).filter(({ label }) => label.startsWith('Maximum comes'));
    expect(rows.map(({ label, cells }) => [label, cells.map(({ text }) => text === '—')])).toEqual([
      ['Maximum comes, after periapsis', [false, true]],
      ['Maximum comes, after the start', [true, false]],
    ]);
  });

  test('steadyIsShared: only while every case has the same steady values', () => {
    expect(steadyIsShared(rowsOf(plainRun()))).toBe(true);
    const dark = { name: 'dark', heatCapacity: 2e6, albedo: 0.1 };
    expect(steadyIsShared(rowsOf(plainRun({ cases: [dark, { ...dark, name: 'bright', albedo: 0.5 }] })))).toBe(false);
  });
});
