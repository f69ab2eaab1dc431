import { describe, expect, test } from 'vitest';
import { lagReader } from '../../../sim/studies/grid/readBack.ts';
import { failures, gridAnswer } from '../../../viewer/words/gridAnswer.ts';
import { gridCautions, gridSteps } from '../../../viewer/words/gridMethod.ts';
import { extremeRows } from '../../../viewer/words/gridTable.ts';
import { extremesOf, offeredFindings, shownFinding } from '../../../viewer/words/shownFinding.ts';
import { readingText } from '../../../viewer/words/storeReading.ts';
import {
  curveGrid,
  eccentricityAxis,
  gridCase,
  gridOf,
  heatCapacityAxis,
  mapGrid,
  perNumber,
  unplaced,
} from '../gridFixture.ts';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');
const oneCase = () => {
  const axes = [eccentricityAxis()];
  return gridOf(axes, [gridCase(axes)]);
};

describe('shownFinding', () => {
  test('the chief findings come first, in their order; every finding is offered once', () => {
    const { chief, others } = offeredFindings(mapGrid());
    expect(chief.slice(0, 4).map(({ name }) => name)).toEqual([
      'temperatureMean',
      'temperatureMax',
      'temperatureMin',
      'lagOfMaxOrbits',
    ]);
    expect(chief.at(-1)!.label).toBe('Time in “mild”');
    expect(chief.length + others.length).toBe(mapGrid().cases[0]!.findings.length);
  });

  test('units of the trade: days, percent of an orbit, kelvin a day', () => {
    const report = curveGrid();
    const lag = shownFinding(report, 'lagOfMaxOrbits');
    // atan(2.1e7 / 9.1e6) / 2π · 0.97^0.8 = 18.05 %, by hand; the first node has no lag.
    expect(lag.cases[0]![0]).toBeNull();
    expect(lag.cases[0]![1]).toBeCloseTo(18.05, 1);
    expect(plain(lag.text(lag.cases[0]![1]!))).toBe('18.0 % of an orbit');
    expect(plain(shownFinding(report, 'lagOfMax').text(21.66))).toBe('21.7 d');
    expect(shownFinding(report, 'fastestWarming').symbol).toBe('K\u00a0d⁻¹');
  });

  test('decades go by the logarithm, a range with zero or below does not', () => {
    expect(shownFinding(mapGrid(), 'radiativeTimeConstant').log).toBe(true);
    expect(shownFinding(mapGrid(), 'fractionInWindow.mild').log).toBe(false);
    expect(shownFinding(mapGrid(), 'temperatureMean').log).toBe(false);
  });

  test('times on both sides of periapsis are neighbours: one cut for all cases', () => {
    const { cases, range } = shownFinding(curveGrid(), 'timeOfFastestWarming');
    // −0.03 + 0.06 log10(n) orbits of 120 d: n = 2.3, 0.066, 44, by hand.
    expect(cases.map((values) => values[5]!.toFixed(1))).toEqual(['-1.0', '-12.1', '8.2']);
    expect(range![1] - range![0]).toBeLessThan(60);
  });

  test('a finding that no case has is empty', () => {
    expect(shownFinding(mapGrid(), 'unheardOf')).toMatchObject({ range: null, cases: [[], [], []] });
  });
});

describe('gridAnswer', () => {
  test('tells of what was asked for, where the chief findings were not', () => {
    const report = oneCase();
    const kept = report.cases.map((one) => ({
      ...one,
      findings: one.findings.filter(({ name }) => name === 'temperatureMax'),
    }));
    const { lead } = gridAnswer({ ...report, cases: kept });
    expect(plain(lead)).toMatch(/, the maximum temperature runs from \d+ to \d+ K\./);
    expect(lead).not.toContain('no value');
  });

  // (1−0.9²)^−⅛ · 290 K and atan(2.308)/2π · (1−e)^0.8 at e = 0.9 and 0.03, by hand.
  test('one case: over which range, from where to where, and where it is warmest', () => {
    const { lead, details } = gridAnswer(oneCase());
    expect(plain(lead)).toBe(
      'Over eccentricity 0 to 0.9, the mean temperature runs from 290.0 to 356.9 K, and the lag runs from 2.93 to 18.05 % of an orbit. The planet is warmest on average at eccentricity 0.9, coldest at eccentricity 0.',
    );
    expect(details).toEqual([]);
  });

  test('several cases: all together, each for itself, and what could not be computed', () => {
    const { lead, details } = gridAnswer(mapGrid());
    expect(plain(lead)).toMatch(
      /^Over eccentricity 0 to 0\.9 and heat capacity 10⁴ to 10⁹ J m⁻² K⁻¹, the mean temperature/,
    );
    expect(details.map(({ name }) => name)).toEqual(['shallow sea', 'thin air', 'deep sea']);
    expect(details[1]!.text).toMatch(/^The mean temperature .* 5 of 1271 worlds could not be computed\.$/);
    expect(failures(mapGrid())).toEqual([
      { name: 'thin air', text: expect.stringMatching(/^at eccentricity 0\.9, .* and 4 more: the periapsis lies/) },
    ]);
  });

  test('a case in which nothing could be computed', () => {
    const axes = [eccentricityAxis(3)];
    const report = gridOf(axes, [gridCase(axes, { failed: [0, 1, 2] })]);
    expect(gridAnswer(report).lead).toMatch(
      /the mean temperature has no value, and the lag has no value\. 3 of 3 worlds/,
    );
  });
});

test('extremeRows: lowest and highest with their places, what stays the same, what has no value', () => {
  const rows = extremeRows(mapGrid());
  const row = (label: string) => rows.find((one) => one.label === label)!;
  expect(row('Mean temperature').cells[0]).toEqual({
    text: '290.0 to 356.9\u00a0K',
    details: ['lowest at 0, 10⁴', 'highest at 0.9, 10⁴'],
  });
  expect(row('Orbital period').cells[0]!.details).toEqual(['throughout']);
  const axes = [eccentricityAxis(3)];
  const failed = extremeRows(gridOf(axes, [gridCase(axes, { failed: [0, 1, 2] })]));
  expect(failed.every(({ cells }) => cells[0]!.text === '—')).toBe(true);
  expect(extremesOf([null, 3, 1, null, 2])).toEqual({ low: { value: 1, node: 2 }, high: { value: 3, node: 1 } });
});

describe('method and cautions of a grid', () => {
  test('say the grid, what was held, and the chart where a case is on it', () => {
    const words = (report: Parameters<typeof gridSteps>[0]) =>
      gridSteps(report)
        .map((step) => step.words)
        .join(' ');
    const report = mapGrid();
    expect(words(report)).toContain('31 × 41 worlds for every case');
    expect(words(report)).toContain('in equal steps and equal ratios');
    expect(words(report)).not.toContain('first account');
    expect(words(report)).toContain('heat-store number');
    const held = {
      ...report,
      hold: 'orbitMeanInstellation',
      cases: unplaced(report.cases),
    };
    expect(words(held)).toContain('is held at the scenario’s value');
    expect(words(held)).not.toContain('heat-store number');
    expect(gridCautions(held).length).toBeLessThan(gridCautions(report).length);
    expect(gridCautions(held).at(-1)).toMatch(/no basis for qualifying hardware/);
  });
});

describe('readingText', () => {
  const place = { eccentricity: 0.4, storeNumber: 2, heatCapacityPerNumber: perNumber };

  test('number, heat capacity and sea, each with its range', () => {
    const text = plain(readingText({ storeNumber: 2, low: 1.5, high: 2.8 }, place));
    // 2 × 9.1e6 = 1.82e7 J/m²/K; over 1025 × 3990 J/m³/K that is 4.45 m.
    expect(text).toBe(
      'Heat-store number 2.00 (1.50 to 2.80). Heat capacity 1.82 × 10⁷ J m⁻² K⁻¹ (1.37 × 10⁷ to 2.55 × 10⁷) — as much as 4.45 m of stirred sea.',
    );
  });

  test('open sides and refusals are said', () => {
    expect(readingText({ storeNumber: 2, low: null, high: 3 }, place)).toContain('(below 3.00)');
    expect(readingText({ storeNumber: 2, low: 1, high: null }, place)).toContain('(above 1.00)');
    const tooLate = lagReader()({ eccentricity: 0.3, lag: 0.24, plusMinus: 0 });
    expect(readingText(tooLate, place)).toMatch(/^No heat store can be read: at this eccentricity no heat store/);
    const nearly = { storeNumber: null, reason: 'it is late', low: 2, high: null };
    expect(plain(readingText(nearly, place))).toBe(
      'No heat store can be read: it is late. Its uncertainty takes in heat-store numbers above 2.00: heat capacities above 1.82 × 10⁷ J m⁻² K⁻¹.',
    );
  });
});

test('a single axis of decades reads in powers of ten', () => {
  const axes = [heatCapacityAxis()];
  const { lead } = gridAnswer(gridOf(axes, [gridCase(axes)]));
  expect(plain(lead)).toMatch(/^Over heat capacity 10⁴ to 10⁹ J m⁻² K⁻¹, the mean temperature stays at/);
});
