import { describe, expect, test } from 'vitest';
import type { RunResult } from '../../../sim/run.ts';
import { caseTable } from '../../../viewer/words/caseTable.ts';
import type { Cell } from '../../../viewer/words/cells.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { plainRun, withFindings } from '../fixture.ts';
import { zonalPeriod, zonalRun } from '../zonalFixture.ts';

const day = 86_400;
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

/** A run whose albedo knows ice. */
function icy(run: RunResult = zonalRun({ cases: [{ name: 'a' }] })): RunResult {
  const ramp = { ...run.cases[0]!.inputs[0]!, key: 'planet.albedo.from', used: true };
  return { ...run, cases: run.cases.map((one) => ({ ...one, inputs: [...one.inputs, ramp] })) };
}

function cell(run: RunResult, label: string): Cell {
  const found = caseTable(columnsOf(run)).find((row) => row.label === label)!.cells[0]!;
  return { ...found, text: plain(found.text), ...(found.detail ? { detail: plain(found.detail) } : {}) };
}

describe('rows by latitude', () => {
  test('stand in the table where the findings are, and nowhere else', () => {
    const labels = (run: RunResult): string[] => caseTable(columnsOf(run)).map(({ label }) => label);
    expect(labels(icy())).toEqual(
      expect.arrayContaining([
        'Mean temperature, area mean',
        'Hottest at any latitude',
        'Coldest at any latitude',
        'Annual mean, equator less poles',
        'Largest seasonal range',
        'Northern ice edge',
        'Southern ice edge',
        'Area and time under ice',
        'Local lag at the equator',
        'Local lag at 45° N',
        'Local lag at 45° S',
        'Local lag at the north pole',
        'Local lag at the south pole',
        'Area and time in “liquid water at 1 bar”',
        'Area in “liquid water at 1 bar” all year',
        'Longest season in “liquid water at 1 bar”',
        'Stability margin (0: tips over, below 0: unstable)',
      ]),
    );
    expect(labels(plainRun()).join()).not.toMatch(/latitude|lag at|Area|season|Mean temperature, /);
  });

  test('say where and when in small print', () => {
    const run = withFindings(icy(), {
      hottestTemperature: 331.204,
      hottestLatitude: 34.24,
      hottestTime: 12.14 * day,
      coldestTemperature: 201.31,
      coldestLatitude: -87.9,
      coldestTime: 115 * day,
      seasonalRangeMax: 54.321,
      seasonalRangeLatitude: 61.2,
    });
    expect(cell(run, 'Hottest at any latitude')).toEqual({
      text: '331.20 K',
      detail: '34.2° N, 12.1 d after periapsis',
    });
    expect(cell(run, 'Coldest at any latitude')).toEqual({
      text: '201.31 K',
      detail: '87.9° S, 5.0 d before periapsis',
    });
    expect(cell(run, 'Largest seasonal range')).toEqual({ text: '54.32 K', detail: 'at 61.2° N' });
  });

  test('ice edges: from where to where, or why not', () => {
    expect(cell(icy(), 'Northern ice edge')).toEqual({ text: '51.2° to 68.7° N', detail: '62.5 % of the year' });
    expect(cell(icy(), 'Southern ice edge')).toEqual({
      text: '—',
      reason: 'no ice at this pole in any part of the year',
    });
    expect(cell(icy(), 'Area and time under ice').text).toBe('21.0 %');
  });

  test('an albedo that knows no ice has no rows of ice; beside one that does it has a dash', () => {
    const bare = zonalRun({ cases: [{ name: 'a' }] });
    expect(caseTable(columnsOf(bare)).some(({ label }) => label.includes('ice edge'))).toBe(false);
    const both = zonalRun({ cases: [{ name: 'a' }, { name: 'b' }] });
    const mixed = { ...both, cases: [icy(both).cases[0]!, both.cases[1]!] };
    const row = caseTable(columnsOf(mixed)).find(({ label }) => label === 'Area and time under ice')!;
    expect(row.cells.map(({ text, reason }) => [plain(text), reason])).toEqual([
      ['21.0 %', undefined],
      ['—', 'its albedo knows no ice'],
    ]);
  });

  test('a season that never ends has no one latitude', () => {
    const label = 'Longest season in “liquid water at 1 bar”';
    const name = 'longestSeason.liquid water at 1 bar';
    expect(cell(icy(), label)).toEqual({ text: 'all year' });
    expect(cell(withFindings(icy(), { [name]: 0.5 * zonalPeriod }), label)).toEqual({
      text: '60.0 d',
      detail: 'at 1.9° S',
    });
    expect(cell(withFindings(icy(), { [name]: null }), label)).toEqual({ text: '—', reason: 'there is none' });
  });

  test('a case with one temperature beside one with latitudes has dashes', () => {
    const run = icy();
    const mixed = { ...run, cases: [...run.cases, plainRun().cases[0]!] };
    const row = caseTable(columnsOf(mixed)).find(({ label }) => label === 'Hottest at any latitude')!;
    expect(row.cells[1]).toEqual({ text: '—', reason: 'not computed' });
  });
});
