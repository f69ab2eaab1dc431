import { describe, expect, test } from 'vitest';
import type { TraceReport } from '../../../sim/studies/traceReport.ts';
import { foldTable } from '../../../viewer/words/foldTable.ts';
import { traceAnswer } from '../../../viewer/words/traceAnswer.ts';
import { loopCase, plainCase, traceOf } from '../traceFixture.ts';

const lead = (trace: TraceReport): string => traceAnswer(trace).lead.replaceAll('\u00a0', ' ');

describe('traceAnswer', () => {
  test('a loop: which climates exist where, where each ends, and that the past decides', () => {
    expect(lead(traceOf([loopCase()]))).toBe(
      'Between 0.930 and 1.210 Lsun this orbit allows a warm and a cold climate; the warm one ends at 0.930 Lsun, the cold one at 1.210 Lsun. Which one a planet is in depends on its past.',
    );
  });

  test('one climate, and nothing of a past', () => {
    expect(lead(traceOf([plainCase()]))).toBe('Between 0.8 and 1.35 Lsun this orbit allows one climate only.');
  });

  test('a range that ends within the loop does not invent an end', () => {
    expect(lead(traceOf([loopCase()], { to: 1.15 }))).toBe(
      'Between 0.930 and 1.15 Lsun this orbit allows a warm and a cold climate; the warm one ends at 0.930 Lsun; no end of the cold one lies in the range. Which one a planet is in depends on its past.',
    );
  });

  test('a climate that was followed twice is one climate', () => {
    const once = plainCase();
    const { points } = once.branches[0]!;
    const twice = {
      ...once,
      branches: [...once.branches, { ended: 'stuck' as const, points: points.slice(0, 12).toReversed() }],
    };
    expect(lead(traceOf([twice]))).toBe(lead(traceOf([once])));
  });

  test('where nothing was found, that is said', () => {
    const cut = plainCase();
    const short = { ...cut, branches: [{ ended: 'stuck' as const, points: cut.branches[0]!.points.slice(0, 11) }] };
    expect(lead(traceOf([short]))).toBe(
      'Between 0.8 and 1.000 Lsun this orbit allows one climate only. Between 1.000 and 1.35 Lsun no stable climate was found.',
    );
  });

  test('a pure number goes by its name', () => {
    const along = { unit: '1', label: 'Eccentricity' };
    expect(lead(traceOf([plainCase()], along))).toBe(
      'Between eccentricity 0.8 and 1.35 this orbit allows one climate only.',
    );
  });

  test('several cases: how many have a choice, and each for itself', () => {
    const trace = traceOf([loopCase(), plainCase()]);
    expect(lead(trace)).toMatch(/^1 of 2 cases allows more than one climate somewhere between 0\.8 and 1\.35 Lsun\./);
    expect(traceAnswer(trace).details.map(({ name }) => name)).toEqual(['ice world', 'bare rock']);
  });
});

test('traceAnswer: every case with a choice; an instellation is in S₀', () => {
  const trace = traceOf([loopCase(), loopCase({ name: 'other', middle: 1.1 })], { unit: 'S0' });
  expect(lead(trace)).toMatch(/^Both cases allow more than one climate somewhere between 0\.8 and 1\.35 S₀\./);
});

test('foldTable: a row for each end of a climate', () => {
  const { labels, rows, unstable } = foldTable(traceOf([loopCase(), plainCase()]));
  expect(rows.map(({ words }) => words)).toEqual(['warm climate ends', 'cold climate ends']);
  expect(rows.every(({ cells }) => cells.length === labels.length)).toBe(true);
  expect(unstable).toEqual([]);
  // s = 1/√3 of the cubic: 255 + 32/√3 = 273.475 K.
  expect(rows[0]!.cells[1]).toBe('273.48\u00a0K');
});
