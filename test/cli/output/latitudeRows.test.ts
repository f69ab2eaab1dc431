/** The table and the accounts of models with latitude, on a result of the model itself. */
import { stripVTControlCharacters } from 'node:util';
import { beforeAll, describe, expect, test } from 'vitest';
import { accountLines } from '../../../cli/output/accounts.ts';
import { tableLines } from '../../../cli/output/table.ts';
import { terminalOf } from '../../../cli/output/terminal.ts';
import { textWidth } from '../../../cli/output/text.ts';
import { type RunResult, runScenario } from '../../../sim/run.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { zonalText } from '../support.ts';

let result: RunResult;
beforeAll(() => {
  const mixed = `${zonalText}cases:\n  by latitude: {}\n  as one: { model: lumped }\n`;
  result = runScenario(readScenario(mixed, 'chione.yaml'), { sha256: '', version: '0' });
});

const lines = (columns = 120, env = {}) => tableLines(result, terminalOf({ columns, env, isTTY: false }), false);
/** The cells of the row with this label, the first column first. */
const cells = (label: string) => {
  const line = lines().find((text) => text.trimStart().startsWith(label));
  return line
    ?.trim()
    .slice(label.length)
    .trim()
    .split(/\s{2,}/);
};
const finding = (name: string, state = 0) =>
  result.cases[0]!.states[state]!.findings.find((one) => one.name === name)!.value!;

describe('the table', () => {
  test('says which numbers are those of the area mean', () => {
    const text = lines().join('\n');
    expect(text).toContain('temperature of the area mean, K');
    expect(text).toContain('share of time of the area mean in, %');
  });

  test('has a row for each local finding, with the numbers of the findings', () => {
    const side = (degrees: number) => `${Math.abs(degrees).toFixed(1)} ${degrees < 0 ? 'S' : 'N'}`;
    expect(cells('hottest at latitude')![0]).toBe(side(finding('hottestLatitude')));
    expect(cells('coldest at latitude')![0]).toBe(side(finding('coldestLatitude')));
    expect(Number(cells('hottest, K')![0]!.split(' ')[0])).toBeCloseTo(finding('hottestTemperature'), 0);
    expect(Number(cells('mean, equator less poles, K')![0]!.split(' ')[0])).toBeCloseTo(finding('contrast'), 1);
    expect(Number(cells('share of area and time, %')![0])).toBeCloseTo(100 * finding('iceFractionMean'), 1);
    const [near, far] = cells('northern edge at latitude')![0]!.split(' to ');
    expect(Number(near)).toBeCloseTo(finding('iceEdgeNorthMin'), 1);
    expect(Number(far!.split(' ')[0])).toBeCloseTo(finding('iceEdgeNorthMax'), 1);
    const lag = result.cases[0]!.states[0]!.findings.find(({ name }) => name === 'lagAtNorthPole')!;
    const [days, plusMinus] = cells('north pole')![0]!.split(' +/- ').map(Number);
    expect(Math.abs(days! - lag.value! / 86_400)).toBeLessThanOrEqual(lag.plusMinus! / 86_400);
    expect(plusMinus!).toBeGreaterThanOrEqual((lag.plusMinus! / 86_400) * (1 - 1e-9));
    expect(plusMinus!).toBeLessThan(lag.plusMinus! / 86_400 + 0.1);
    expect(cells('stability margin (0 is a fold)')).toBeDefined();
  });

  test('leaves out, in each panel, the rows that say nothing there', () => {
    const rows = lines(90);
    const second = rows.slice(rows.lastIndexOf('') + 1);
    expect(rows.join('\n')).toContain('hottest, K');
    expect(second.join('\n')).toContain('as one');
    expect(second.join('\n')).not.toContain('hottest');
  });
});

test('no line of table and accounts is wider than the terminal', () => {
  for (let columns = 40; columns <= 120; columns += 4) {
    for (const env of [{ LANG: 'C.UTF-8' }, { LANG: 'C' }, { LANG: 'C.UTF-8', FORCE_COLOR: '1' }]) {
      const terminal = terminalOf({ columns, env, isTTY: false });
      const all = [...tableLines(result, terminal, true), ...accountLines(result, terminal)];
      const widest = Math.max(...all.map((line) => textWidth(stripVTControlCharacters(line))));
      expect(widest, `${columns} columns`).toBeLessThanOrEqual(columns);
    }
  }
});

test('the accounts tell the error in time from that of the bands, and the notes how latitudes are meant', () => {
  const text = accountLines(result, terminalOf({ columns: 400, env: { LANG: 'C.UTF-8' }, isTTY: false })).join('\n');
  expect(text).toMatch(/by latitude: instellation \S+, energy \S+, error < \S+ in time, mean with bands ± \S+ K: pass/);
  expect(text).toMatch(/as one: instellation \S+, energy \S+, error < \S+: pass/);
  expect(text).toContain('By latitude: means over longitude and day; heat moves by diffusion');
});

test('an ice edge that is not there all year says for how much of it', () => {
  const share = finding('iceCapNorthFraction');
  expect(share).toBeGreaterThan(0);
  expect(share).toBeLessThanOrEqual(1);
  const withShare = (value: number): RunResult => {
    const [first, ...others] = result.cases;
    const states = first!.states.map((state) => ({
      ...state,
      findings: state.findings.map((one) => (one.name === 'iceCapNorthFraction' ? { ...one, value } : one)),
    }));
    return { ...result, cases: [{ ...first!, states }, ...others] };
  };
  const edge = (run: RunResult) =>
    tableLines(run, terminalOf({ columns: 120, env: {}, isTTY: false }), false).find((line) =>
      line.trimStart().startsWith('northern edge at latitude'),
    );
  expect(edge(withShare(0.062))).toMatch(/\d N, 6\.2 % of the year/);
  expect(edge(withShare(1))).not.toContain('of the year');
});
