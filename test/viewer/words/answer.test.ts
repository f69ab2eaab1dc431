import { describe, expect, test } from 'vitest';
import { answer, answerFor } from '../../../viewer/words/answer.ts';
import { columnsOf, commonTimeUnit } from '../../../viewer/words/columns.ts';
import { type PlainCase, plainRun, withFindings } from '../fixture.ts';

const day = 86_400;
const sea: PlainCase = { name: 'shallow sea', heatCapacity: 8e7 };

/** No-break spaces as plain ones, to be read by people. */
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

const numbers = {
  equilibriumTemperature: 279.1,
  temperatureMin: 261.49,
  temperatureMax: 339.7,
  temperatureMean: 291.54,
  steadyTemperatureMin: 220.65,
  steadyTemperatureMax: 441.3,
  timeOfMax: 14.48 * day,
  lagOfMax: 14.48 * day,
  damping: 0.354,
};

const leadFor = (changed: Readonly<Record<string, number | null>>): string =>
  plain(answer(withFindings(plainRun({ cases: [sea] }), { ...numbers, ...changed })).lead);

describe('the answering sentence', () => {
  test('one case: how hot, when, how late, how damped, and the textbook', () => {
    expect(leadFor({})).toBe(
      'The temperature goes from 261.5 K to 339.7 K through the orbit, with a mean of 291.5 K. ' +
        'It is hottest 14.5 d after periapsis and the peak of the steady value. It keeps 35.4 % of the steady swing. ' +
        'Without a heat store the temperature would swing from 220.7 K to 441.3 K. ' +
        'The textbook equilibrium temperature, 279.1 K, misses the extremes by up to 60.6 K.',
    );
  });

  test('a lag that is not the time after periapsis is told apart', () => {
    expect(leadFor({ lagOfMax: 11 * day })).toContain(
      'hottest 14.5 d after periapsis, 11.0 d behind the peak of the steady value.',
    );
    expect(leadFor({ lagOfMax: -3 * day })).toContain(
      'hottest 14.5 d after periapsis, 3.0 d before the peak of the steady value.',
    );
  });

  test('a lag that is not defined says why', () => {
    expect(leadFor({ lagOfMax: null })).toContain('14.5 d after periapsis; the lag is not defined (there is none).');
  });

  test('towards the end of the orbit a time counts back from the next periapsis', () => {
    expect(leadFor({ timeOfMax: 119.5 * day, lagOfMax: null })).toContain('hottest 0.5 d before periapsis');
  });

  test('a circular orbit neither swings nor peaks', () => {
    const lead = plain(answer(plainRun({ cases: [{ ...sea, eccentricity: 0 }] })).lead);
    expect(lead).toMatch(/^The temperature stays at 312\.0 K through the orbit\./);
    expect(lead).toContain('would stay at 312.0 K');
    expect(lead).not.toMatch(/null|NaN|undefined/);
  });

  test('several cases: from the coolest peak to the hottest, each with its time; then one line a case', () => {
    const { lead, details } = answer(plainRun());
    expect(plain(lead)).toMatch(
      /^The peak temperature lies between \d+\.\d K \(“thick air”, \d+\.\d d after periapsis\) and \d+\.\d K \(“bare rock”, \d\.\d d after periapsis\)\./,
    );
    expect(details.map(({ column }) => column.caseName)).toEqual(['bare rock', 'shallow sea', 'thick air']);
  });

  test('the numbers are those of the findings', () => {
    const run = plainRun();
    const hottest = Math.max(
      ...run.cases.map(({ findings }) => findings.find((f) => f.name === 'temperatureMax')!.value!),
    );
    expect(plain(answer(run).lead)).toContain(`${hottest.toFixed(1)} K (“bare rock”`);
  });

  test('cases with different textbook numbers name them all', () => {
    const run = plainRun({ cases: [sea, { ...sea, name: 'dark', albedo: 0.1 }] });
    expect(plain(answer(run).lead)).toMatch(/The textbook equilibrium temperatures, \d+\.\d K and \d+\.\d K, miss/);
  });

  test('an unstable state does not set the range of peaks', () => {
    const run = plainRun({ cases: [{ ...sea, coldState: true }] });
    const [only] = run.cases;
    const unstable = { ...run, cases: [{ ...only!, states: only!.states.map((s, i) => ({ ...s, stable: i === 0 })) }] };
    expect(plain(answer(run).lead)).toContain('cold state');
    expect(plain(answer(unstable).lead)).not.toContain('cold state');
  });

  test('a run from a start speaks of its start, and not of damping', () => {
    const [column] = columnsOf(plainRun({ cases: [{ ...sea, forward: true }] }));
    const text = plain(answerFor(column!, commonTimeUnit([column!])));
    expect(text).toContain('over the run from its start');
    expect(text).toContain('It is hottest at the start.');
    expect(text).not.toContain('swing');
  });
});
