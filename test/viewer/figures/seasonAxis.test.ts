import { describe, expect, test } from 'vitest';
import { meanFromTrue } from '../../../sim/orbit/anomaly.ts';
import { orbitSpan } from '../../../viewer/figures/orbitSpan.ts';
import { seasonAt, seasonsOf, seasonTicks } from '../../../viewer/figures/seasonAxis.ts';
import { longitudeOfPeriapsisDeg, zonalDataset, zonalPeriod } from '../zonalFixture.ts';

const days = { symbol: 'd', seconds: 86_400 } as const;
const period = zonalPeriod / days.seconds;

function seasons(eccentricity: number, samples = 720) {
  const dataset = zonalDataset({ name: 'a', eccentricity }, 4, samples);
  return seasonsOf(dataset, orbitSpan(dataset, zonalPeriod), days);
}

/** Days after periapsis at which the planet reaches a solar longitude, by Kepler's equation. */
function timeOf(longitudeDeg: number, eccentricity: number): number {
  const turn = 2 * Math.PI;
  const trueAnomaly = (((longitudeDeg - longitudeOfPeriapsisDeg) * Math.PI) / 180 + 2 * turn) % turn;
  const time = (meanFromTrue(trueAnomaly, eccentricity) / turn) * period;
  return time > 0.75 * period ? time - period : time;
}

describe('season axis', () => {
  test('solar longitude increases through the map, over exactly one turn in an orbit', () => {
    const { time, longitudeDeg } = seasons(0.2);
    expect(longitudeDeg.every((value, at) => at === 0 || value > longitudeDeg[at - 1]!)).toBe(true);
    const at = (t: number): number => {
      const after = time.findIndex((one) => one >= t);
      const share = (t - time[after - 1]!) / (time[after]! - time[after - 1]!);
      return longitudeDeg[after - 1]! + share * (longitudeDeg[after]! - longitudeDeg[after - 1]!);
    };
    expect(at(0.75 * period) - at(-0.25 * period)).toBeCloseTo(360, 2); // straight lines between 720 rows
  });

  // The straight line between rows of s misses ν(t) by ν″h²/8: below 1e-3 of a day here.
  test.each([0, 0.2, 0.6])('equinoxes and solstices stand when Kepler says, e = %s', (eccentricity) => {
    const { places, labels } = seasonTicks(seasons(eccentricity), [-0.25 * period, 0.75 * period], 0.01);
    for (const longitude of [0, 90, 180, 270]) {
      const place = places[labels.indexOf(`${longitude}°`)]!;
      expect(Math.abs(place - timeOf(longitude, eccentricity))).toBeLessThan(2e-3);
    }
  });

  test('on an eccentric orbit ticks keep apart, and some are left away', () => {
    const range = [-0.25 * period, 0.75 * period] as const;
    const { places } = seasonTicks(seasons(0.8), range, 0.1);
    expect(places.length).toBeGreaterThan(2);
    for (const [at, place] of places.entries()) {
      if (at > 0) expect(place - places[at - 1]!).toBeGreaterThanOrEqual(0.1 * period - 1e-9);
    }
  });

  test('a part of the orbit gets finer ticks', () => {
    const { labels } = seasonTicks(seasons(0), [0, 10], 0.055); // 30° of the circle
    expect(labels.length).toBeGreaterThan(4);
    expect(labels).toContain('270°');
  });

  test('seasonAt: periapsis has the longitude of periapsis, before the first equinox it runs below 360', () => {
    expect(seasonAt(seasons(0.2), 0)).toBeCloseTo(longitudeOfPeriapsisDeg, 6);
    expect(seasonAt(seasons(0), period / 2)).toBeCloseTo(longitudeOfPeriapsisDeg - 180, 6);
    expect(seasonAt(seasons(0), -0.25 * period)).toBeCloseTo(longitudeOfPeriapsisDeg - 90, 6);
  });
});
