import { describe, expect, test } from 'vitest';
import { toPortable } from '../../../sim/dataset/portable.ts';
import { readPage } from '../../../viewer/report/readPage.ts';
import { plainRun } from '../fixture.ts';
import { plainCase, traceOf } from '../traceFixture.ts';

const written = (data: object): string => JSON.stringify(toPortable(data));

describe('what a page carries', () => {
  test('a trace comes back as it was written, a run as a run', () => {
    const trace = traceOf([plainCase()]);
    expect(readPage(written({ trace }))).toEqual({ trace });
    expect(Object.keys(readPage(written({ result: plainRun() })))).toEqual(['result', 'tree']);
  });

  test('a damaged trace is answered in words', () => {
    const trace = traceOf([plainCase()]);
    expect(() => readPage(written({ trace: { ...trace, cases: [] } }))).toThrow('the data are not a trace');
    expect(() => readPage(written({ trace: traceOf([plainCase()], { from: 0, log: true }) }))).toThrow('not a trace');
    const short = JSON.parse(written({ trace }));
    delete short.trace.cases[0].branches[0].points[3].iceFraction;
    expect(() => readPage(JSON.stringify(short))).toThrow('numbers of “bare rock” are missing');
  });
});
