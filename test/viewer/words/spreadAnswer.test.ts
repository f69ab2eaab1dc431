import { describe, expect, test } from 'vitest';
import type { Percentiles } from '../../../sim/studies/spread/percentiles.ts';
import type { SobolIndex } from '../../../sim/studies/spread/sobolIndices.ts';
import type { SpreadCase, SpreadReport } from '../../../sim/studies/spread/spreadReport.ts';
import { importanceText } from '../../../viewer/words/importance.ts';
import { failureText, spreadAnswer } from '../../../viewer/words/spreadAnswer.ts';
import { spreadCase, spreadOf, withFinding } from '../spreadFixture.ts';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');
const lead = (report: SpreadReport): string => plain(spreadAnswer(report).lead);
const days = 86_400;

function levels(...values: readonly [number, number, number, number, number]): Percentiles {
  const [p2, p16, p50, p84, p97] = values;
  return { '2.5': p2, '16': p16, '50': p50, '84': p84, '97.5': p97 };
}

function index(value: number, low: number, high: number): SobolIndex {
  return { value, percentiles: { '2.5': low, '16': (low + value) / 2, '84': (high + value) / 2, '97.5': high } };
}

/** The peak of a case, told by hand. */
function peaking(percentiles: Percentiles, defined = 1, base = spreadCase()): SpreadCase {
  return withFinding(base, 'temperatureMax', {
    summary: { mean: percentiles['50'], percentiles, defined },
    importance: {
      first: [index(0.61, 0.55, 0.67), index(0.2, 0.15, 0.25), index(0.04, 0, 0.08), index(0, -0.02, 0.02)],
      total: [index(0.63, 0.58, 0.68), index(0.22, 0.18, 0.26), index(0.05, 0.03, 0.07), index(0, 0, 0)],
      ranks: null,
      leftOut: 0,
    },
  });
}

const timed = (one: SpreadCase, ...at: Parameters<typeof levels>): SpreadCase =>
  withFinding(one, 'timeOfMax', { summary: { mean: at[2], percentiles: levels(...at), defined: 1 } });

describe('spreadAnswer', () => {
  const usual = levels(430, 471, 512, 560, 610);

  test('how hot, when, what matters most and where the textbook stands', () => {
    const text = lead(spreadOf([timed(peaking(usual), 9 * days, 10 * days, 12 * days, 14 * days, 15 * days)]));
    expect(text).toBe(
      'The temperature peaks at 512 K, between 471 and 560 K at 68 % and between 430 and 610 K at 95 %. ' +
        'It is hottest 12.0 d after periapsis, at 68 % between 10.0 d and 14.0 d after it. ' +
        'The Bond albedo matters most: to know it alone would remove 61 % of the variance of the peak (95 %: 55 to 67 %); next comes the eccentricity, 20 %. ' +
        'About 15 % comes from inputs acting together. ' +
        'The textbook equilibrium temperature, 312 K with every input at its centre, lies below more than 97 % of these peaks.',
    );
  });

  test('a number that some draws lack comes with their share', () => {
    expect(lead(spreadOf([peaking(usual, 0.872)]))).toMatch(/at 95 %\. \(87\.2 % of the draws have this number\.\)/);
  });

  test('a time on both sides of periapsis, and one at the end of the orbit', () => {
    const both = spreadOf([timed(peaking(usual), -3 * days, -2 * days, 1 * days, 4 * days, 5 * days)]);
    expect(lead(both)).toMatch(/hottest 1\.0 d after periapsis, at 68 % from 2\.0 d before to 4\.0 d after it/);
    const late = spreadOf([timed(peaking(usual), -9 * days, -6 * days, -4 * days, -2 * days, 0)]);
    expect(lead(late)).toMatch(/hottest 4\.0 d before periapsis, at 68 % between 2\.0 d and 6\.0 d before it/);
  });

  test('draws all around the orbit have no middle', () => {
    const around = withFinding(peaking(usual), 'timeOfMax', {
      summary: { mean: null, percentiles: null, defined: 1, reason: 'the draws lie all around the circle' },
    });
    expect(lead(spreadOf([around]))).toMatch(/has no middle: the draws lie all around the circle/);
  });

  test('several cases: the lowest and the highest, and whether the spreads part them', () => {
    const sea = peaking(levels(380, 390, 402, 415, 425));
    const rock = { ...peaking(usual), name: 'bare rock' };
    expect(lead(spreadOf([sea, rock]))).toBe(
      'The median peak temperature lies between 402 K (“shallow sea”, 390 to 415 K at 68 %) and 512 K (“bare rock”, 471 to 560 K at 68 %). ' +
        'The inputs do not blur the difference: the 95 % intervals of the two cases do not meet.',
    );
    const near = peaking(levels(380, 400, 440, 480, 500));
    expect(lead(spreadOf([near, rock]))).toMatch(
      /overlap; where both share an uncertain input, their difference is surer/,
    );
    expect(spreadAnswer(spreadOf([sea, rock])).details.map(({ name }) => name)).toEqual(['shallow sea', 'bare rock']);
  });

  test('latitudes: the peak is that of the area mean', () => {
    const base = spreadCase();
    const hottest = { ...base.findings[3]!, name: 'hottestTemperature', label: 'Hottest local temperature' };
    const zonal = { ...base, findings: [...base.findings, hottest] };
    expect(lead(spreadOf([zonal]))).toMatch(/^The area-mean temperature peaks at/);
  });

  test('no peak: what there is, and why not', () => {
    const none = withFinding(spreadCase(), 'temperatureMax', {
      summary: { mean: null, percentiles: null, defined: 0, reason: 'no draw has a value' },
    });
    expect(lead(spreadOf([none]))).toMatch(/^Maximum temperature: none; no draw has a value\./);
  });
});

describe('what matters most, in words', () => {
  const one = peaking(levels(430, 471, 512, 560, 610));
  const peak = one.findings.find(({ name }) => name === 'temperatureMax')!;
  const text = (changes: Partial<typeof peak.importance>): string =>
    plain(importanceText(one, { ...peak, importance: { ...peak.importance, ...changes } }, 'the peak'));

  test('a lead within the intervals is not called one', () => {
    const total = [index(0.45, 0.35, 0.55), index(0.42, 0.32, 0.52), index(0.05, 0, 0.1), index(0, 0, 0)];
    expect(text({ total })).toMatch(
      /^The Bond albedo and the eccentricity matter most, and these draws do not tell which more/,
    );
  });

  test('ranks: against chance', () => {
    const ranks = [0.42, 0.1, 0.01, -0.01].map((value) => ({ value, chanceLevel: 0.03 }));
    expect(text({ first: null, total: null, ranks })).toBe(
      'The Bond albedo tells most about the peak: D = 0.42, where chance alone stays below 0.030; next comes the eccentricity, 0.10.',
    );
    const nothing = ranks.map(({ chanceLevel }) => ({ value: 0.01, chanceLevel }));
    expect(text({ first: null, total: null, ranks: nothing })).toBe(
      'No input tells more about the peak than chance alone would.',
    );
    const reason = 'the input is the same in every draw';
    const unknown = ranks.map((one, at) => (at === 1 ? ({ value: null, chanceLevel: null, reason } as const) : one));
    expect(text({ first: null, total: null, ranks: unknown })).toBe(
      'The Bond albedo tells most about the peak: D = 0.42, where chance alone stays below 0.030. Of the eccentricity it cannot be told: the input is the same in every draw.',
    );
  });

  test('no indices: the reason', () => {
    expect(text({ first: null, total: null, reason: 'indices were not asked for' })).toBe(
      'What matters most to the peak is not known: indices were not asked for.',
    );
  });
});

test('failed draws: how many, and when they are too many', () => {
  expect(failureText(spreadOf([spreadCase()]))).toBeNull();
  expect(plain(failureText(spreadOf([spreadCase()], { failed: 3 }))!)).toMatch(/^3 of 512 draws \(0\.6 %\)/);
  expect(plain(failureText(spreadOf([spreadCase()], { failed: 30 }))!)).toMatch(/more than 1 %/);
  expect(plain(failureText(spreadOf([spreadCase()], { failed: 3 }))!)).not.toMatch(/more than 1 %/);
});
