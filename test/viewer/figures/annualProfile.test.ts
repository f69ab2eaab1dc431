import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { annualProfile } from '../../../viewer/figures/annualProfile.ts';
import type { Figure } from '../../../viewer/figures/figure.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { type ZonalChoices, zonalRun } from '../zonalFixture.ts';

const wide = { theme: lightTheme, narrow: false, view: null };
const figureOf = (choices: ZonalChoices = {}): Figure => annualProfile(columnsOf(zonalRun(choices)), wide);
type Line = Partial<ScatterData> & { x: number[]; y: number[] };
const trace = ({ data }: Figure, name: string): Line => data.find((one) => one.name === name) as Line;

describe('annual mean by latitude', () => {
  test('a mean and a band a state; insolation once where it is the same', () => {
    const { data } = figureOf();
    expect(data.map(({ name }) => name)).toEqual([
      'tilted sea, warm state, lowest',
      'tilted sea, warm state, highest',
      'tilted sea, cold state, lowest',
      'tilted sea, cold state, highest',
      'upright sea, lowest',
      'upright sea, highest',
      'insolation: upright sea',
      'insolation: tilted sea',
      'upright sea',
      'tilted sea, cold state',
      'tilted sea, warm state',
      'latitude',
    ]);
  });

  test('the band holds the mean, from the lowest to the highest temperature of the rows', () => {
    const run = zonalRun({ cases: [{ name: 'a' }], bands: 20 });
    const figure = annualProfile(columnsOf(run), wide);
    const [low, mean, high] = ['a, lowest', 'a', 'a, highest'].map((name) => trace(figure, name));
    const { bandTemperature } = run.cases[0]!.states[0]!.dataset.variables;
    mean!.y.forEach((value, band) => {
      const column = bandTemperature!.data.filter((_, at) => at % 20 === band);
      expect([low!.y[band], high!.y[band]]).toEqual([Math.min(...column), Math.max(...column)]);
      expect(value).toBeGreaterThan(low!.y[band]!);
      expect(value).toBeLessThan(high!.y[band]!);
    });
    expect(high).toMatchObject({ fill: 'tonexty' });
  });

  // The fixture's temperature is equator − 45 x² plus a season: at e = 0 its mean over an orbit vanishes exactly.
  test('the mean is over time', () => {
    const { x, y } = trace(figureOf({ cases: [{ name: 'a', eccentricity: 0 }] }), 'a');
    for (const [at, value] of y.entries()) expect(value).toBeCloseTo(303 - 45 * x[at]! ** 2, 9);
  });

  test('insolation lies below, on the same latitudes', () => {
    const figure = figureOf({ cases: [{ name: 'a' }] });
    expect(trace(figure, 'insolation')).toMatchObject({ yaxis: 'y2' });
    const [low, high] = [figure.layout.yaxis2!.domain!, figure.layout.yaxis!.domain!] as [number[], number[]];
    expect(low[1]).toBeLessThan(high[0]!);
    expect(trace(figure, 'insolation').x).toEqual(trace(figure, 'a').x);
  });

  test('the pointer reads latitude in degrees, the mean and its range', () => {
    const figure = figureOf({ cases: [{ name: 'a' }] });
    const latitudes = (figure.data.at(-1) as { customdata: string[] }).customdata;
    expect(latitudes.at(-1)!.replaceAll('\u00a0', ' ')).toBe('75.2° N');
    expect(trace(figure, 'a').customdata).toHaveLength(30);
  });

  test('windows are bands, freezing a line', () => {
    const names = figureOf().layout.shapes!.map(({ name }) => name);
    expect(names).toEqual(['liquid water at 1 bar', 'freezing']);
  });

  test('the text alternative states the finding of every state', () => {
    const text = figureOf({ cases: [{ name: 'a' }, { name: 'b', swing: 10 }] }).textAlternative.replaceAll(
      '\u00a0',
      ' ',
    );
    expect(text).toMatch(
      /^a: the annual mean goes from \d+\.\d K at 75\.2° [NS] to \d+\.\d K at \d\.\d° [NS]; the seasonal range is largest at 75\.2° [NS], 73\.\d K\. b: the annual mean/,
    );
  });

  test('a steady planet has no range, and no number is missing', () => {
    const figure = figureOf({ cases: [{ name: 'a', swing: 0 }] });
    expect(trace(figure, 'a, lowest').y).toEqual(trace(figure, 'a, highest').y);
    expect(JSON.stringify([figure.data, figure.layout])).not.toMatch(/null|NaN/);
  });
});
