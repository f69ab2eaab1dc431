import { fileURLToPath } from 'node:url';
import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { readScenarioFiles } from '../../../cli/scenarioFile.ts';
import { runScenario } from '../../../sim/run.ts';
import type { Figure } from '../../../viewer/figures/figure.ts';
import { localLag } from '../../../viewer/figures/localLag.ts';
import { localLags } from '../../../viewer/figures/localLags.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { type ZonalCase, zonalDataset, zonalPeriod, zonalRun } from '../zonalFixture.ts';

const wide = { theme: lightTheme, narrow: false, view: null };
const day = 86_400;
const round: ZonalCase = { name: 'round', eccentricity: 0, obliquityDeg: 30, lagDeg: 40 };
const figureOf = (cases: readonly ZonalCase[]): Figure => localLag(columnsOf(zonalRun({ cases })), wide);
const lineOf = ({ data }: Figure, name: string) =>
  data.find((one) => one.name === name) as Partial<ScatterData> & { x: number[]; y: (number | null)[] };

describe('local lags', () => {
  // On a circle the insolation beyond 30° peaks at the solstice, and the fixture's temperature follows it by 40 of 360°.
  test('a temperature that follows its insolation by a known time has that lag', () => {
    const dataset = zonalDataset(round, 40, 720);
    const lags = localLags(dataset, zonalPeriod);
    const known = (40 / 360) * zonalPeriod;
    dataset.variables.latitude!.data.forEach((latitude, band) => {
      if (Math.abs(latitude) < Math.PI / 6) return;
      // Parabolas through 720 rows are good to a hundredth of a row; polar days have a flatter top, a tenth.
      expect(Math.abs(lags[band]!.lag - known)).toBeLessThan(0.1 * (zonalPeriod / 720));
    });
  });

  test('where the insolation hardly varies there is none', () => {
    const dataset = zonalDataset({ ...round, obliquityDeg: 0 }, 12, 240);
    expect(localLags(dataset, zonalPeriod)).toEqual(Array(12).fill(null));
  });

  test('a temperature that does not move has none either', () => {
    expect(localLags(zonalDataset({ ...round, swing: 0 }, 12, 240), zonalPeriod)).toEqual(Array(12).fill(null));
  });

  // The model finds its lags from curves and 720 even times, this figure from the rows of the Dataset: two codes, one number.
  test('agree with the findings of a real run, within their ±', () => {
    const [file] = readScenarioFiles(['configs/tipped-over.yaml'], fileURLToPath(new URL('../../..', import.meta.url)));
    const scenario = { ...file!.scenario, cases: file!.scenario.cases.slice(0, 1) };
    const { states } = runScenario(scenario, { sha256: '', version: '' }).cases[0]!;
    const { findings, dataset } = states[0];
    const lags = localLags(dataset, findings.find(({ name }) => name === 'period')!.value!);
    const latitude = dataset.variables.latitude!.data;
    for (const [name, degrees] of [
      ['lagAt45North', 45],
      ['lagAt45South', -45],
      ['lagAtNorthPole', 90],
      ['lagAtSouthPole', -90],
    ] as const) {
      const found = findings.find((one) => one.name === name)!;
      const wanted = (degrees * Math.PI) / 180;
      const band = latitude.reduce(
        (best, phi, at) => (Math.abs(phi - wanted) < Math.abs(latitude[best]! - wanted) ? at : best),
        0,
      );
      expect(Math.abs(lags[band]!.lag - found.value!)).toBeLessThan(found.plusMinus!);
    }
  });
});

describe('local lag by latitude', () => {
  test('a line a state, in days', () => {
    const figure = figureOf([round, { ...round, name: 'slow', lagDeg: 70 }]);
    const polar = ['round', 'slow'].map((name) => lineOf(figure, name).y.at(-1)!);
    expect(polar[0]).toBeCloseTo((40 / 360) * 120, 1);
    expect(polar[1]).toBeCloseTo((70 / 360) * 120, 1);
    expect(figure.layout.yaxis?.title?.text).toBe('Lag (d)');
    expect(Math.max(...figure.lines.map(({ plainName }) => plainName.length))).toBeGreaterThan(0);
  });

  test('the line breaks where the lag counts from another maximum', () => {
    const { y } = lineOf(figureOf([round]), 'round');
    const gaps = y.filter((value) => value === null).length;
    expect(gaps).toBeGreaterThan(0);
    let last: number | null = null;
    for (const value of y) {
      if (value !== null && last !== null) expect(Math.abs(value - last)).toBeLessThan(0.1 * 120);
      last = value;
    }
  });

  test('a temperature that turns before its insolation is explained, not shown as late without a word', () => {
    expect(figureOf([round]).caption).not.toContain('whole orbit');
    expect(figureOf([{ ...round, lagDeg: -20 }]).caption).toContain('A lag of nearly a whole orbit');
  });

  test('without any lag the figure says so and still draws', () => {
    const figure = figureOf([{ ...round, obliquityDeg: 0 }]);
    expect(figure.textAlternative).toBe('round: no lag, the insolation hardly varies at any latitude.');
    expect(figure.layout.yaxis?.range).toEqual([0, 1]);
    expect(figure.caption).toContain('No lag is given');
    expect(JSON.stringify(figure.layout)).not.toMatch(/null|NaN|Infinity/);
  });

  test('the text alternative gives the shortest and the longest, with their latitudes', () => {
    expect(figureOf([round]).textAlternative.replaceAll('\u00a0', ' ')).toMatch(
      /^round: the local maximum comes between [\d.]+ d at \d+\.\d° [NS] \([\d.]+ % of the orbit\) and [\d.]+ d at \d+\.\d° [NS] \([\d.]+ % of the orbit\) behind that of the insolation\.$/,
    );
    expect(Math.max(...lineOf(figureOf([round]), 'round').y.map((lag) => lag ?? 0)) * day).toBeLessThanOrEqual(
      zonalPeriod,
    );
  });
});
