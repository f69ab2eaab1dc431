import { describe, expect, test } from 'vitest';
import { chartNodes, universalChart } from '../../../sim/studies/grid/universalChart.ts';
import type { Figure, FigureStyle } from '../../../viewer/figures/figure.ts';
import { placedColumns, plainWorldChart } from '../../../viewer/figures/plainWorldChart.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import { type Column, columnsOf } from '../../../viewer/words/columns.ts';
import { type PlainCase, plainRun, threeCases } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';
import { notFinite } from './orbitColumns.ts';

const wide: FigureStyle = { theme: lightTheme, narrow: false, view: null };
const styles: FigureStyle[] = [wide, { ...wide, narrow: true }, { ...wide, theme: darkTheme }];
const columns = (cases: readonly PlainCase[] = threeCases): Column[] => columnsOf(plainRun({ cases }));
const chartOf = (all: readonly Column[], style = wide): Figure =>
  plainWorldChart(all, universalChart(chartNodes(placedColumns(all).map(({ place }) => place))), style);
const trace = ({ data }: Figure, name: string) =>
  data.find((one) => one.name === name) as unknown as { x: number[]; y: number[] };
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');
const placed = (column: Column, storeNumber: number, eccentricity = 0.62): Column => ({
  ...column,
  plain: { place: { storeNumber, eccentricity, heatCapacityPerNumber: 1e7 }, reason: null },
});

describe('cases among all plain worlds', () => {
  test('each stands at its eccentricity and heat-store number', () => {
    const all = columns();
    const figure = chartOf(all);
    for (const { caseName, plain: own } of all) {
      expect(trace(figure, caseName).x).toEqual([own.place!.storeNumber]);
      expect(trace(figure, caseName).y).toEqual([0.62]);
    }
  });

  test('the finding tells place, damping and lag of each', () => {
    const [rock] = columns();
    const damping = rock!.state.findings.find(({ name }) => name === 'damping')!.value!;
    expect(plain(chartOf(columns()).textAlternative)).toContain(
      `bare rock: eccentricity 0.62, heat-store number ${rock!.plain.place!.storeNumber.toPrecision(3)}; keeps ${(100 * damping).toFixed(1)} % of the steady swing.`,
    );
  });

  test('who has no place is named with the reason, once for all who share it', () => {
    const reason = 'heat comes from inside';
    const [rock, sea, air] = columns();
    const heated = [sea!, air!].map((column): Column => ({ ...column, plain: { place: null, reason } }));
    const figure = chartOf([rock!, ...heated]);
    expect(figure.caption).toContain(`Not placed: “shallow sea” and “thick air” (${reason}).`);
    expect(trace(figure, 'shallow sea')).toBeUndefined();
    expect(chartOf(columns()).caption).not.toContain('Not placed');
  });

  test('the chart is not stretched to worlds beyond it', () => {
    const [rock, sea, air] = columns();
    const all = [rock!, placed(sea!, 1e-7), placed(air!, 1, 0.998)];
    expect(placedColumns(all).map(({ name }) => name)).toEqual(['bare rock']);
    const { caption } = chartOf(all);
    expect(plain(caption)).toContain('“shallow sea” (its heat-store number, 1.0 × 10⁻⁷, lies beyond the left edge)');
    expect(caption).toContain('“thick air” (its orbit is longer than the chart reaches)');
  });

  test('a case with several states is placed once; models with latitude have no place', () => {
    expect(placedColumns(columns([{ name: 'two', heatCapacity: 8e7, coldState: true }]))).toHaveLength(1);
    expect(placedColumns(columnsOf(zonalRun()))).toEqual([]);
  });

  test('nothing in it is not a number, in any style; hostile names are no markup', () => {
    const name = '<img src=x onerror=alert(1)> & <b>bold</b>\u202e';
    const all = columns([{ name, heatCapacity: 2e6, eccentricity: 0 }, ...threeCases]);
    for (const style of styles) {
      const figure = chartOf(all, style);
      expect(notFinite(figure)).toEqual([]);
      expect(JSON.stringify([figure.data, figure.layout])).not.toMatch(/<img|<b>bold|\u202e/);
    }
  });
});
