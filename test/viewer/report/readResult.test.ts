import { describe, expect, test } from 'vitest';
import { toPortable } from '../../../sim/dataset/portable.ts';
import { PageError, readResult } from '../../../viewer/report/readResult.ts';
import { plainRun } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';

const written = (result: unknown): string => JSON.stringify(toPortable({ result }));

describe('the data that a page carries', () => {
  test('come back number for number', () => {
    expect(readResult(written(plainRun()))).toEqual(plainRun());
  });

  test.each([
    ['', 'This page holds no run yet. `perilag run` writes a copy of it with the results inside.'],
    ['{', 'the data cannot be read'],
    ['null', 'the data are not a run'],
    ['{"result":7}', 'the data are not a run'],
    ['{"result":{"program":{},"scenario":{},"cases":[]}}', 'the data are not a run'],
    ['{"result":{"program":{},"scenario":{},"cases":[{"name":"a","states":[{}]}]}}', 'numbers of “a” are missing'],
    ['{"result":{"f8":"AAAA"}}', 'the data cannot be read'],
  ])('%j is answered in words', (text, words) => {
    expect(() => readResult(text)).toThrow(PageError);
    expect(() => readResult(text)).toThrow(words);
  });

  test('arrays of unequal length are damage', () => {
    const run = plainRun();
    const { variables } = run.cases[0]!.states[0]!.dataset;
    const short = { ...variables, temperature: { ...variables.temperature!, data: new Float64Array(3) } };
    const states = [{ ...run.cases[0]!.states[0]!, dataset: { variables: short } }];
    const damaged = { ...run, cases: [{ ...run.cases[0]!, states }] };
    expect(() => readResult(written(damaged))).toThrow('numbers of “bare rock” are missing');
  });

  test('fields come back number for number, and a field without its rows is damage', () => {
    const run = zonalRun({ bands: 6, samples: 30 });
    expect(readResult(written(run))).toEqual(run);
    const { variables } = run.cases[0]!.states[0]!.dataset;
    const short = { ...variables, bandIceFraction: { ...variables.bandIceFraction!, data: new Float64Array(30) } };
    const states = [{ ...run.cases[0]!.states[0]!, dataset: { variables: short } }];
    const damaged = { ...run, cases: [{ ...run.cases[0]!, states }] };
    expect(() => readResult(written(damaged))).toThrow('numbers of “tilted sea” are missing');
  });

  test('letters that are no base64 are damage too', () => {
    const broken = written(plainRun()).replace(/("temperature":\{"data":\{"f8":")..../, '$1!!!!');
    expect(() => readResult(broken)).toThrow('numbers of “bare rock” are missing');
  });
});
