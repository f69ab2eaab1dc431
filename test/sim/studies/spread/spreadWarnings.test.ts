import { describe, expect, test } from 'vitest';
import { drawnClimates } from '../../../../sim/studies/spread/climates.ts';
import type { SpreadFinding } from '../../../../sim/studies/spread/spreadReport.ts';
import {
  circleNote,
  climateWarnings,
  groupWarnings,
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
    importance: { first: null, total: null, ranks: null, reason: 'none' },
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
