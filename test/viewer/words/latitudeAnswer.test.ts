import { describe, expect, test } from 'vitest';
import { answer, answerFor } from '../../../viewer/words/answer.ts';
import { columnsOf, commonTimeUnit } from '../../../viewer/words/columns.ts';
import { plainRun, withFindings } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';

const day = 86_400;
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

const numbers = {
  temperatureMin: 279.3,
  temperatureMax: 282.1,
  temperatureMean: 280.6,
  equilibriumTemperature: 251.3,
  timeOfMax: 48.3 * day,
  lagOfMax: 41.7 * day,
  damping: 0.197,
  hottestTemperature: 294.1,
  hottestLatitude: 10.9,
  hottestTime: 42.4 * day,
  coldestTemperature: 247.8,
  coldestLatitude: 81.5,
  coldestTime: 115 * day,
  iceFractionMean: 0.128,
  iceEdgeSouthMin: -79.4,
  iceEdgeSouthMax: -51.6,
};

describe('the answer by latitude', () => {
  test('one case: area mean first, then where it is hottest and coldest, ice, and windows', () => {
    const run = withFindings(zonalRun({ cases: [{ name: 'a' }] }), numbers);
    expect(plain(answer(run).lead)).toBe(
      'The area-mean temperature goes from 279.3 K to 282.1 K through the orbit, with a mean of 280.6 K. ' +
        'It is hottest 48.3 d after periapsis, 41.7 d behind the peak of the steady value. It keeps 19.7 % of the steady swing. ' +
        'The hottest place has 294.1 K at 10.9° N, 42.4 d after periapsis; the coldest 247.8 K at 81.5° N, 5.0 d before periapsis. ' +
        'Ice covers 12.8 % of area and time, its northern edge at 51.2° to 68.7° N, its southern edge at 51.6° to 79.4° S. ' +
        'Within “liquid water at 1 bar” lies 73.0 % of area and time, and 51.0 % of the area all year. ' +
        'The textbook equilibrium temperature, 251.3 K, misses the extremes by up to 42.8 K.',
    );
  });

  test('ice: everywhere, nowhere, on one side', () => {
    const text = (changed: Readonly<Record<string, number | null>>): string => {
      const [column] = columnsOf(withFindings(zonalRun({ cases: [{ name: 'a' }] }), { ...numbers, ...changed }));
      return plain(answerFor(column!, commonTimeUnit([column!])));
    };
    expect(text({ iceFractionMean: 1 })).toContain('Ice covers every latitude all year.');
    expect(text({ iceFractionMean: 0 })).not.toMatch(/ice/i);
    expect(text({ iceEdgeSouthMin: null, iceEdgeSouthMax: null })).toContain(
      'Ice covers 12.8 % of area and time, its northern edge at 51.2° to 68.7° N.',
    );
  });

  test('several cases: the hottest and the coldest place of all, with the case and state that has it', () => {
    const lead = plain(answer(zonalRun()).lead);
    expect(lead).toMatch(/^The peak of the area-mean temperature lies between/);
    expect(lead).toMatch(
      /The hottest place of all has \d+\.\d K at \d+\.\d° [NS], .* \(“tilted sea, warm state”\), the coldest \d+\.\d K at 75\.2° [NS], .* \(“tilted sea, cold state”\)\./,
    );
    expect(lead).not.toContain('Without a heat store');
  });

  test('an unstable state is no place to be the coldest of all', () => {
    const run = zonalRun();
    const [first, ...others] = run.cases;
    const states = first!.states.map((state, index) => ({ ...state, stable: index === 0 }));
    const lead = answer({ ...run, cases: [{ ...first!, states }, ...others] }).lead;
    expect(lead).not.toContain('cold state');
  });

  test('a run without latitudes says nothing of places', () => {
    expect(answer(plainRun()).lead).not.toMatch(/place|area-mean/);
  });
});
