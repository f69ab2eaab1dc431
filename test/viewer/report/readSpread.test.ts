import { describe, expect, test } from 'vitest';
import { toPortable } from '../../../sim/dataset/portable.ts';
import { readPage } from '../../../viewer/report/readPage.ts';
import { spreadCase, spreadOf } from '../spreadFixture.ts';

const spread = spreadOf([spreadCase({ zonal: true })]);
const portable = JSON.stringify(toPortable({ spread }));

/** The block with one thing in it, found by its path, gone or another. */
function broken(path: string, value?: unknown): string {
  const data: unknown = JSON.parse(portable);
  const keys = path.split('.');
  const last = keys.pop()!;
  const holder = keys.reduce((at, key) => at[key] as Holder, (data as { spread: Holder }).spread);
  if (Array.isArray(holder) && value === undefined) holder.splice(Number(last), 1);
  else if (value === undefined) delete holder[last];
  else holder[last] = value;
  return JSON.stringify(data);
}

type Holder = Record<string, unknown>;

describe('a page that carries a spread', () => {
  test('reads it back as it was written', () => {
    expect(readPage(portable)).toEqual({ spread });
  });

  test.each<[string, string, unknown]>([
    ['no cases', 'cases', []],
    ['no file', 'scenario.file', undefined],
    ['no scenario', 'scenario', undefined],
    ['no draws', 'draws', 0],
    ['another sampling', 'sampling', 'dice'],
    ['a case without findings', 'cases.0.findings', undefined],
    ['a case without a sample', 'cases.0.sample', undefined],
    ['a case that is nothing', 'cases.0', null],
    ['an input without a label', 'cases.0.inputs.0.label', undefined],
  ])('%s: no spread', (_, path, value) => {
    expect(() => readPage(broken(path, value))).toThrow('the data are not a spread');
  });

  test.each<[string, string, unknown]>([
    ['a percentile is gone', 'cases.0.findings.0.summary.percentiles.16', undefined],
    ['a mean without percentiles', 'cases.0.findings.0.summary.percentiles', null],
    ['a share is gone', 'cases.0.inputs.0.summary.defined', undefined],
    ['an index too few', 'cases.0.findings.3.importance.first.0', undefined],
    ['no importance', 'cases.0.findings.3.importance', undefined],
    ['an empty histogram', 'cases.0.findings.3.histogram.counts', []],
    ['a band with a level too few', 'cases.0.bands.0.levels.0', undefined],
    ['a band without a centre', 'cases.0.bands.0.atCentre', undefined],
    ['a column of the sample is short', 'cases.0.sample.findings.2.0', undefined],
    ['a column of the sample is gone', 'cases.0.sample.inputs.0', undefined],
  ])('%s: numbers are missing', (_, path, value) => {
    expect(() => readPage(broken(path, value))).toThrow('numbers of “shallow sea” are missing');
  });

  test('nothing in the block: how to get something', () => {
    expect(() => readPage('')).toThrow('holds no run yet');
    expect(() => readPage('{"spread": nul')).toThrow('cannot be read');
    expect(() => readPage('{"spread": null}')).toThrow('not a spread');
  });
});
