import { describe, expect, test } from 'vitest';
import { summaryOf } from '../../../cli/output/summary.ts';
import type { RunResult } from '../../../sim/run.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { absences, numbersCsv, numbersTable, numbersText, numberText } from '../../../viewer/words/numbersTable.ts';
import { plainRun, withFindings } from '../fixture.ts';
import { twoClimates, zonalRun } from '../zonalFixture.ts';

const run = plainRun();
const tableOf = (result: RunResult) => numbersTable(columnsOf(result));
const rowsOf = (result: RunResult) => tableOf(result).groups.flatMap(({ rows }) => rows);
const rowOf = (result: RunResult, name: string) => rowsOf(result).find((row) => row.name === name)!;
const shown = (result: RunResult, name: string) => rowOf(result, name).cells.map(numberText);

/** The run with a value and an error for one finding of every state. */
function withNumber(name: string, value: number, plusMinus?: number, unit?: string): RunResult {
  return {
    ...run,
    cases: run.cases.map((one) => ({
      ...one,
      states: one.states.map((state) => {
        const known = state.findings.find((found) => found.name === name);
        const changed = {
          ...(known ?? { name, label: name, unit: unit! }),
          value,
          ...(plusMinus === undefined ? {} : { plusMinus }),
        };
        return { ...state, findings: [...state.findings.filter((found) => found.name !== name), changed] };
      }),
    })),
  };
}

describe('numbersTable', () => {
  test.each([
    ['lumped', run],
    ['by latitude', zonalRun({ cases: twoClimates })],
  ])('%s: every finding of the summary once, of every case and state', (_, result) => {
    const rows = rowsOf(result);
    const states = summaryOf(result).cases.flatMap(({ states: all }) => all);
    expect(rows.map(({ name }) => name).toSorted()).toEqual(
      [...new Set(states.flatMap(({ findings }) => Object.keys(findings)))].toSorted(),
    );
    for (const { name, unit, cells } of rows) {
      const known = states.map(({ findings }) => findings[name]);
      expect(cells.map(({ value }) => value)).toEqual(known.map((found) => found?.value ?? null));
      expect(known.every((found) => found === undefined || found.unit === unit)).toBe(true);
    }
    expect(tableOf(result).groups.map(({ title }) => title)).not.toContain('Others');
  });

  test('an error stands beside where it reaches the last digit, rounded up, and takes digits away', () => {
    expect(shown(withNumber('temperatureMax', 438.6638, 8e-5), 'temperatureMax')[0]).toBe('438.66');
    expect(shown(withNumber('temperatureMax', 438.6638, 0.0211), 'temperatureMax')[0]).toBe('438.66 ± 0.03');
    expect(shown(withNumber('temperatureMax', 438.6638, 0.81), 'temperatureMax')[0]).toBe('438.66 ± 0.81');
    expect(shown(withNumber('temperatureMax', 438.6638, 3.21), 'temperatureMax')[0]).toBe('438.7 ± 3.3');
    expect(shown(withNumber('temperatureMax', 438.6638, 42.1), 'temperatureMax')[0]).toBe('439 ± 43');
  });

  test('units of the trade; what is small keeps its digits', () => {
    expect(rowOf(run, 'timeOfMax').symbol).toBe('d');
    expect(shown(withNumber('timeOfMax', 86_400), 'timeOfMax')[0]).toBe('1.00');
    expect(shown(withNumber('radiativeTimeConstant', 86.4), 'radiativeTimeConstant')[0]).toBe('0.00100');
    expect(shown(withNumber('damping', 1.23456e-7), 'damping')[0]).toBe('1.235\u00a0×\u00a010⁻⁷');
    expect(shown(withNumber('damping', 1.5e-7, 2e-9), 'damping')[0]).toBe('(1.500 ± 0.020)\u00a0×\u00a010⁻⁷');
    expect(shown(withNumber('damping', 0), 'damping')[0]).toBe('0.000');
    expect(shown(withNumber('fastestCooling', -8.9e-5, 0, 'K/s'), 'fastestCooling')[0]).toBe('−7.690');
    const window = 'fractionInWindow.liquid water at 1 bar';
    expect([rowOf(run, window).symbol, shown(withNumber(window, 0.230217), window)[0]]).toEqual(['%', '23.02']);
  });

  test('what is not there is a dash with its reason, told once for all cases that share it', () => {
    const without = withFindings(run, { lagOfMax: null });
    expect(shown(without, 'lagOfMax')).toEqual(['—', '—', '—']);
    const { label } = rowOf(run, 'lagOfMax');
    expect(absences(tableOf(without))).toContain(`${label} (bare rock, shallow sea, thick air): there is none.`);
  });

  test('a finding that only one case has', () => {
    const [first, ...others] = run.cases;
    const extra = { name: 'oddity', label: 'Oddity', unit: 'kg', value: 2 };
    const states = first!.states.map((state) => ({ ...state, findings: [...state.findings, extra] }));
    const odd = { ...run, cases: [{ ...first!, states }, ...others] };
    expect(shown(odd, 'oddity')).toEqual(['2.0000', '—', '—']);
    expect(tableOf(odd).groups.at(-1)!.title).toBe('Others');
  });
});

describe('numbersText', () => {
  test('columns end at the same place on every line', () => {
    const lines = numbersText(tableOf(withFindings(run, { damping: null }))).split('\n');
    expect(lines[0]).toMatch(/^ +bare rock +shallow sea +thick air$/);
    const ends = lines.filter((line) => line.startsWith('  ')).map((line) => [...line].length);
    expect(new Set(ends)).toEqual(new Set([[...lines[0]!].length]));
    expect(lines).toContain('Temperatures');
    expect(lines.join('\n')).toContain('there is none');
  });

  test('names cannot break a line or turn the writing', () => {
    const text = numbersText(tableOf(plainRun({ cases: [{ name: 'a\nb\u202ec', heatCapacity: 2e6 }] })));
    expect(text.split('\n')[0]!.trim()).toBe('a bc');
  });
});

describe('numbersCsv', () => {
  test('the very numbers of the summary, a row each', () => {
    const [header, ...lines] = numbersCsv(tableOf(run)).trimEnd().split('\n');
    expect(header).toBe('case,state,finding,value,unit,numerical_error,reason,label');
    const { states } = run.cases[1]!;
    for (const { name, value, unit, plusMinus } of states[0]!.findings) {
      const start = `shallow sea,${states[0]!.label},${name},${value},${unit},${plusMinus ?? ''},`;
      expect(lines.filter((line) => line.startsWith(start))).toHaveLength(1);
    }
    expect(lines).toHaveLength(rowsOf(run).length * 3);
  });
});
