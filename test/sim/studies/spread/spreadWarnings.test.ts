import { describe, expect, test } from 'vitest';
import { drawnClimates } from '../../../../sim/studies/spread/climates.ts';
import type { SpreadFinding } from '../../../../sim/studies/spread/spreadReport.ts';
import {
  circleNote,
  climateWarnings,
  cutWarnings,
  fewSamplesWarnings,
  groupWarnings,
  leftOutWarnings,
  periodNote,
  warmestNote,
} from '../../../../sim/studies/spread/spreadWarnings.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { zonalWorld } from '../../models/zonal/worlds.ts';

const none = Number.NaN;

describe('climates', () => {
  test('shares: of the second climate where that is known, of ice where there is a climate', () => {
    const found = drawnClimates(Float64Array.of(1, 2, none, 2, none), Float64Array.of(0.004, 0.3, 0.4, 0.998, none));
    expect(found).toEqual({ second: 2 / 3, known: 3 / 5, iceFree: 0.25, partlyFrozen: 0.5, frozenOver: 0.25 });
    expect(climateWarnings(found)).toEqual([
      '67 % of the draws allow a second, colder climate that lasts as well. Every number here is of the warm one; which of them a planet is in depends on its past.',
      'The draws are of several climates: 25 % free of ice, 50 % partly under ice and 25 % frozen over (area and time under ice below 1 %, between, above 99 %).',
    ]);
  });

  test('a share near nothing or all is neither, and stands within its sentence', () => {
    const most = { second: 0.0003, known: 1, iceFree: 0.9997, partlyFrozen: 0.0003, frozenOver: 0 };
    expect(climateWarnings(most)).toEqual([
      expect.stringMatching(/^Less than 0\.1 % of the draws allow a second/),
      expect.stringContaining(
        'several climates: more than 99.9 % free of ice and less than 0.1 % partly under ice (area',
      ),
    ]);
  });

  test('nothing is said where there is one, or none', () => {
    expect(climateWarnings(drawnClimates(Float64Array.of(1, 1), Float64Array.of(0, 0.009)))).toEqual([]);
    expect(drawnClimates(Float64Array.of(none), Float64Array.of(none))).toBeNull();
    expect(drawnClimates(Float64Array.of(none), Float64Array.of(0.5))!.second).toBeNull();
    expect(climateWarnings(null)).toEqual([]);
  });
});

function finding(name: string, label: string, unit: string, mean: number, [to, from] = [220, 270]): SpreadFinding {
  return {
    name,
    label,
    unit,
    atCentre: null,
    circular: false,
    missingBecause: null,
    histogram: null,
    importance: { first: null, total: null, ranks: null, leftOut: 0, reason: 'none' },
    summary: { mean, percentiles: null, defined: 1 },
    groups: [
      { share: 0.0975, from: 200, to },
      { share: 0.9025, from, to: 300 },
    ],
  };
}

describe('two groups in words', () => {
  test('the chief finding with its numbers, the others by number; a mean between the groups is that of no draw', () => {
    const mean = finding('temperatureMean', 'Mean temperature', 'K', 250);
    const [said] = groupWarnings([finding('damping', 'Damping', '1', 250), mean]);
    expect(said).toBe(
      'Mean temperature: the draws fall into two groups, 9.8 % of them from 200 to 220 K and 90.3 % of them from 270 to 300 K, none between: the mean, 250 K, is that of no draw. So do those of Damping. Histograms show both groups; a mean or an interval over both may tell of neither.',
    );
    expect(groupWarnings([{ ...mean, summary: { ...mean.summary, mean: 275 } }])[0]).not.toContain('of no draw');
    const many = ['a', 'b', 'c', 'd'].map((name) => finding(name, name, '1', 250));
    expect(groupWarnings([mean, ...many])[0]).toContain('So do those of 4 other findings.');
  });

  test('on the circle a mean beyond both groups is that of no draw either', () => {
    const round = { ...finding('timeOfMax', 'Time of maximum', 's', 8 * 86400), circular: true };
    const groups = [
      { share: 0.5, from: 3 * 86400, to: 4 * 86400 },
      { share: 0.5, from: 6 * 86400, to: 7 * 86400 },
    ] as const;
    const [said] = groupWarnings([{ ...round, groups }]);
    expect(said).toContain('two groups on the orbit, 50 % of them from 3 to 4 d and 50 % of them from 6 to 7 d');
    expect(said).toContain('the mean, 8 d, is that of no draw');
    expect(said).toContain('stands at both');
    const within = { ...round, groups, summary: { ...round.summary, mean: 6.5 * 86400 } };
    expect(groupWarnings([within])[0]).not.toContain('of no draw');
  });

  test('times are told in days; nothing is said where none falls apart', () => {
    expect(groupWarnings([finding('lagOfMax', 'Lag', 's', 5 * 86400, [4 * 86400, 6 * 86400])])[0]).toContain('to 4 d');
    expect(groupWarnings([{ ...finding('damping', 'Damping', '1', 1), groups: null }])).toEqual([]);
  });
});

test('more than 5 % cut away is warned of, with the share and what was written', () => {
  const input = (key: string, truncatedShare: number) => ({ key, text: '0.1 ± 0.3', truncatedShare });
  expect(cutWarnings([input('planet.bondAlbedo', 0.072), input('orbit.eccentricity', 0.05)])).toEqual([
    '7.2 % of planet.bondAlbedo 0.1 ± 0.3 lies beyond what is physical and was cut away: what is drawn is no longer the spread as published. A spread that keeps within bounds would describe it better.',
  ]);
});

describe('rows that indices leave out', () => {
  const of = (name: string, leftOut: number) => ({
    ...finding(name, name, 's', 1),
    importance: { first: [], total: [], ranks: null, leftOut },
  });

  test('above 5 % they are told, of all findings in one sentence', () => {
    expect(leftOutWarnings([of('lag', 0.05)])).toEqual([]);
    expect(leftOutWarnings([of('lag', 0.38), of('mean', 0)])).toEqual([
      'Which input matters: the indices of lag leave out 38 % of the rows of runs, in which one failed or lacks the finding. They tell of the other rows alone.',
    ]);
    expect(leftOutWarnings([of('lag', 0.1), of('damping', 0.38)])[0]).toContain(
      'of damping and lag leave out up to 38 % of',
    );
    expect(leftOutWarnings(['a', 'b', 'c', 'd'].map((name) => of(name, 0.1)))[0]).toContain('of 4 findings leave out');
  });

  test('where there are no indices, their reason stands there', () => {
    const none = { first: null, total: null, ranks: null, leftOut: 0.9, reason: 'fewer than 64 rows' };
    expect(leftOutWarnings([{ ...of('lag', 0.9), importance: none }])).toEqual([]);
  });
});

test('on a circle, where times have nothing but a season to count from, that is said', () => {
  expect(circleNote(zonalWorld({ e: 0, globe: { solarLongitudeOfPeriapsis: Math.PI / 2 } }), false)).toBe(
    'The orbit is a circle: “periapsis” is only the point that times are counted from, at solar longitude 90 deg.',
  );
  expect(circleNote(zonalWorld({ e: 0.1 }), false)).toBeNull();
  expect(circleNote(zonalWorld({ e: 0 }), true)).toBeNull(); // drawn: a circle at its centre only
});

test('where climates are not counted draw by draw, ice brings a word on which is shown', () => {
  const ramp = rampAlbedo({ warm: 0.3, ice: 0.6, from: 258, to: 272 });
  expect(warmestNote(zonalWorld({ albedo: ramp }), 'periodic')).toContain('every number here is of the warmest');
  expect(warmestNote(zonalWorld({ albedo: ramp }), { temperature: 250, orbits: 2, at: 0 })).toBeNull();
  expect(warmestNote(zonalWorld(), 'periodic')).toBeNull();
});

describe('a posterior of few samples', () => {
  test('is warned of, by the number that its weights leave', () => {
    expect(fewSamplesWarnings({ count: 400, weights: null })).toEqual([]);
    expect(fewSamplesWarnings({ count: 1, weights: null })[0]).toMatch(/^The posterior has 1 sample: /);
    // Half of the weight on one sample: (1 + 1)² / (1 + 1/399) for the sums over one and over 399 others.
    const weights = Float64Array.from({ length: 400 }, (_, i) => (i === 0 ? 399 : 1));
    expect(fewSamplesWarnings({ count: 400, weights })[0]).toMatch(
      /has 400 samples, which by their weights count as 4: /,
    );
  });
});

describe('the period', () => {
  test('is told of where it is drawn', () => {
    expect(periodNote(Float64Array.of(8.6e6, none, 8.6e6))).toBeNull();
    expect(periodNote(Float64Array.of(8.6e6, none, 8.7e6))).toMatch(/^The period is drawn: /);
    expect(periodNote(Float64Array.of(none))).toBeNull();
  });
});
