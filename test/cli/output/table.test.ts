import { stripVTControlCharacters } from 'node:util';
import { describe, expect, test } from 'vitest';
import { accountLines } from '../../../cli/output/accounts.ts';
import { plotLines } from '../../../cli/output/plot.ts';
import { tableLines } from '../../../cli/output/table.ts';
import { terminalOf } from '../../../cli/output/terminal.ts';
import { textWidth } from '../../../cli/output/text.ts';
import type { RunResult } from '../../../sim/run.ts';
import { type CaseShape, fixtureResult, threeCases } from '../fixture.ts';

const utf8 = { LANG: 'C.UTF-8', TERM: 'xterm-256color' };
const longWarning = 'The emission law is published for −60 to +50 °C; this run goes to 131 °C.';
const worlds: Record<string, readonly CaseShape[]> = {
  one: [{ name: 'base', lagOrbits: null }],
  three: threeCases,
  states: [
    {
      name: 'ice world',
      plusMinus: 0.3,
      warnings: [longWarning],
      states: [
        { label: 'warm', stable: true, offset: 0 },
        { label: 'middle', stable: false, offset: -30 },
        { label: 'cold', stable: true, offset: -60 },
      ],
    },
  ],
  many: Array.from({ length: 11 }, (_, index) => ({
    name: `thermal inertia number ${index}`,
    damping: 0.08 * index + 0.1,
  })),
  periods: [
    { name: '超高温の惑星', periodDays: 3.2 },
    { name: 'naïve “quoted” case', periodDays: 4000, eccentricity: 0 },
  ],
  unbreakable: [{ name: 'a'.repeat(70) }, { name: `${'b'.repeat(30)}\u001b[31m red` }],
};

function everything(result: RunResult, columns: number, env: Record<string, string>, isTTY = false): string {
  const terminal = terminalOf({ columns, env, isTTY });
  return [tableLines(result, terminal, true), plotLines(result, terminal), accountLines(result, terminal)]
    .flat()
    .join('\n');
}

describe.each(Object.entries(worlds))('table, plot and accounts of %s', (_, shapes) => {
  const result = fixtureResult(shapes);

  test.each([utf8, { LANG: 'C' }, { ...utf8, FORCE_COLOR: '1' }])(
    'no line is wider than the terminal, 40 to 200 (%o)',
    (env) => {
      for (let columns = 40; columns <= 200; columns += columns < 100 ? 1 : 9) {
        const lines = stripVTControlCharacters(everything(result, columns, env)).split('\n');
        const widest = Math.max(...lines.map(textWidth));
        expect(widest, `${columns} columns`).toBeLessThanOrEqual(columns);
      }
    },
  );

  test('every number that is shown at 200 columns is shown whole at 40', () => {
    const numbers = (text: string) =>
      [...text.matchAll(/-?\d+\.\d{2,}(?: ± \d+\.\d+)?/g)].map(([number]) => number).sort();
    const table = (columns: number) =>
      tableLines(result, terminalOf({ columns, env: utf8, isTTY: false }), true).join('\n');
    expect(numbers(table(40))).toEqual(numbers(table(200)));
  });

  test('without a UTF-8 locale, and on the Linux console, only ASCII', () => {
    for (const env of [{ LANG: 'C' }, {}, { LANG: 'C.UTF-8', TERM: 'linux' }, { LC_ALL: 'POSIX', LANG: 'C.UTF-8' }]) {
      const strange = [...everything(result, 80, env)].filter(
        (letter) => letter !== '\n' && !(letter >= ' ' && letter <= '~'),
      );
      expect(strange).toEqual([]);
    }
  });

  test('no control character of the file reaches the terminal', () => {
    expect(everything(result, 80, utf8).replaceAll('\n', '')).not.toMatch(/\p{Cc}/u);
  });
});

describe('table', () => {
  const lines = (shapes: readonly CaseShape[], columns = 80) =>
    tableLines(fixtureResult(shapes), terminalOf({ columns, env: utf8, isTTY: false }), false);
  const lineWith = (text: string, from: readonly string[]) => from.find((line) => line.includes(text)) ?? '';

  test('shows each quantity of each case', () => {
    const table = lines(threeCases);
    expect(table.find((line) => /shallow sea +bare rock +thick air/.test(line))).toBeDefined();
    expect(lineWith('textbook equilibrium', table)).toMatch(/288\.14 +288\.14 +288\.14$/);
    expect(lineWith('damping', table)).toMatch(/0\.310 +0\.970 +0\.120$/);
    expect(lineWith('radiative time constant, orbits', table)).toMatch(/0\.123 +0\.123 +0\.123$/);
    expect(lineWith('liquid water at 1 bar', table)).toMatch(/34\.2 +34\.2 +34\.2$/);
    expect(lineWith('temperate (instantaneous)', table)).toMatch(/< 0\.1 +< 0\.1 +< 0\.1$/);
  });

  test('times are hours on short orbits, years on long ones, and what differs becomes a row', () => {
    expect(lines([{ name: 'a', periodDays: 3, lagOrbits: 0.25 }]).join('\n')).toMatch(
      /after the steady maximum, h +18\.000\n/,
    );
    expect(lines([{ name: 'a', periodDays: 36525, lagOrbits: 0.25 }]).join('\n')).toMatch(
      /after the steady maximum, yr +25\.00\n/,
    );
    const mixed = lines([
      { name: 'a', periodDays: 100 },
      { name: 'b', periodDays: 200 },
    ]);
    expect(lineWith('  period, d', mixed)).toMatch(/100\.00 +200\.00$/);
    expect(lineWith('eccentricity', mixed)).toBe('eccentricity 0.62, mean instellation 1021.7 W/m2');
  });

  test('a number that does not exist has a mark and its reason', () => {
    const table = lines([{ name: 'a', lagOrbits: null }]);
    expect(lineWith('after the steady maximum', table)).toMatch(/— \[1\]$/);
    expect(table.at(-1)).toBe('[1] the lag’s own error exceeds 0.02 orbit');
  });

  test('the numerical error stands beside a number where it reaches the last digit', () => {
    expect(lineWith('maximum', lines([{ name: 'a', plusMinus: 0.3 }]))).toMatch(/\d\.\d\d ± 0\.30$/);
    expect(lineWith('maximum', lines([{ name: 'a', plusMinus: 0.004 }]))).toMatch(/\d\.\d\d$/);
  });

  test('colour is for terminals, unless asked for or refused', () => {
    const coloured = (env: Record<string, string>, isTTY: boolean) =>
      everything(fixtureResult(), 80, { ...utf8, ...env }, isTTY).includes('\u001b[');
    expect(coloured({}, true)).toBe(true);
    expect(coloured({}, false)).toBe(false);
    expect(coloured({ NO_COLOR: '1' }, true)).toBe(false);
    expect(coloured({ FORCE_COLOR: '1' }, false)).toBe(true);
    expect(coloured({ FORCE_COLOR: '0' }, true)).toBe(false);
    expect(coloured({ FORCE_COLOR: '1', TERM: 'dumb' }, true)).toBe(false);
    expect(coloured({ TERM: 'dumb' }, true)).toBe(false);
    expect(coloured({ TERM: 'dumb' }, true)).toBe(false);
  });

  test('a missed account is a FAIL with its limit, a shared warning is said once', () => {
    const result = fixtureResult([
      { name: 'a', passed: false, warnings: ['The periapsis is near.'] },
      { name: 'b', warnings: ['The periapsis is near.', 'Only here.'] },
    ]);
    const text = accountLines(result, terminalOf({ columns: 100, env: utf8, isTTY: false })).join('\n');
    expect(text).toContain(
      'accounts  a: instellation 3e-14, energy 3e-3, error < 2e-7: FAIL (limits 1e-5, error 1e-6)',
    );
    expect(text).toContain('b: instellation 3e-14, energy 2e-11, error < 2e-7: pass');
    expect(text.match(/The periapsis is near\./g)).toHaveLength(1);
    expect(text).toContain('b: Only here.');
  });
});
