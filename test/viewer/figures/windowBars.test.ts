import type { Annotation } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import type { Window } from '../../../sim/world.ts';
import type { Figure, FigureStyle } from '../../../viewer/figures/figure.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import { hasWindows, windowBars } from '../../../viewer/figures/windowBars.ts';
import { windowBlocks } from '../../../viewer/figures/windowShares.ts';
import { type Column, columnsOf } from '../../../viewer/words/columns.ts';
import { instellationWindow, plainRun, type RunChoices, temperateWindow, threeCases } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';
import { notFinite } from './orbitColumns.ts';

const wide: FigureStyle = { theme: lightTheme, narrow: false, view: null };
const styles: FigureStyle[] = [wide, { ...wide, narrow: true }, { ...wide, theme: darkTheme }];
const columns = (choices: RunChoices = {}): Column[] => columnsOf(plainRun(choices));
const figureOf = (choices: RunChoices = {}, style = wide): Figure => windowBars(columns(choices), style);
const share = (column: Column, { name }: Window): number =>
  column.state.findings.find((one) => one.name === `fractionInWindow.${name}`)!.value!;

interface Bars {
  readonly x: number[];
  readonly y: number[];
  readonly base: number[];
}
const trace = ({ data }: Figure, name: string) => data.find((one) => one.name === name) as unknown as Bars | undefined;
const plain = (text: string | undefined): string => (text ?? '').replaceAll('\u00a0', ' ').replaceAll(/<[^>]*>/g, '');
const words = ({ layout }: Figure): string[] => layout.annotations!.map(({ text }) => plain(text));
const never: Window = { name: 'molten', of: 'temperature', from: 1500, to: 2000 };

describe('time in windows', () => {
  test('bars are as long as the findings say', () => {
    const figure = figureOf();
    const found = columns();
    expect(trace(figure, temperateWindow.name)!.x).toEqual(found.map((column) => share(column, temperateWindow)));
    expect(trace(figure, instellationWindow.name)!.x).toEqual([share(found[0]!, instellationWindow)]);
    expect(figure.layout.xaxis!.range).toEqual([0, 1]);
  });

  test('the stretches beside them add up to the same share', () => {
    for (const { rows } of windowBlocks(columns())) {
      for (const row of rows) {
        const sum = row.stretches.reduce((total, { from, to }) => total + to - from, 0);
        // The fixture's finding counts whole rows of 240, up to 1.6 % of the orbit: one at each of two to four crossings.
        expect(Math.abs(sum - row.share!)).toBeLessThan(0.04);
        for (const { from, to } of row.stretches) {
          expect(from).toBeGreaterThanOrEqual(-0.25);
          expect(to).toBeLessThanOrEqual(0.75);
        }
      }
    }
  });

  test('stretches of a window of instellation are symmetric about periapsis, at the closed form’s ends', () => {
    // S = S_a/(1 − e cos E)² falls to a bound at cos E = (1 − √(S_a/bound))/e, and M = E − e sin E.
    const e = 0.62;
    const atAxis = (0.52 * 3.828e26) / (4 * Math.PI * (0.48 * 1.495978707e11) ** 2);
    const meanAt = (bound: number): number => {
      const E = Math.acos((1 - Math.sqrt(atAxis / bound)) / e);
      return (E - e * Math.sin(E)) / (2 * Math.PI);
    };
    const window: Window = { name: 'bright', of: 'instellation', from: 3000, to: 8000 };
    const [block] = windowBlocks(columns({ windows: [window] }));
    const [before, after] = block!.rows[0]!.stretches;
    // Straight lines between 240 rows: a share of a row's 0.4 % of the period.
    expect(after!.from).toBeCloseTo(meanAt(8000), 3);
    expect(after!.to).toBeCloseTo(meanAt(3000), 3);
    expect(before!.from).toBeCloseTo(-after!.to, 4);
    expect(before!.to).toBeCloseTo(-after!.from, 4);
  });

  test('the number stands at the bar’s end, in per cent and in time', () => {
    const figure = figureOf();
    const [rock] = columns();
    const inside = share(rock!, temperateWindow);
    const number = figure.layout.annotations!.find(({ x, xref }) => xref === 'x' && x === inside) as Annotation;
    const days = Number(/· ([\d.]+) d$/.exec(plain(number.text))![1]);
    expect(plain(number.text)).toContain(`${(100 * inside).toFixed(1)} %`);
    expect(Math.abs(days / (120 * inside) - 1)).toBeLessThan(0.006); // three digits
  });

  test('what holds for every case is one row: instellation on a shared orbit, and never', () => {
    const figure = figureOf({ windows: [instellationWindow, never] });
    expect(words(figure).filter((text) => text === 'every case')).toHaveLength(2);
    expect(words(figure)).toContain('never');
    expect(plain(figure.textAlternative)).toContain('Never within “molten”.');
    const apart = [0.5, 0.62].map((eccentricity) => ({ name: `e ${eccentricity}`, heatCapacity: 2e6, eccentricity }));
    expect(windowBlocks(columns({ cases: apart, windows: [instellationWindow] }))[0]!.rows).toHaveLength(2);
  });

  test('a window that cannot be told says why, without a bar', () => {
    const unknown: Window = {
      name: 'temperate',
      of: 'instellation',
      from: NaN,
      to: NaN,
      unavailable: 'the star is too hot',
    };
    for (const style of styles) {
      const figure = figureOf({ windows: [unknown] }, style);
      expect(words(figure)).toContain('the star is too hot');
      expect(trace(figure, 'temperate')).toBeUndefined();
      expect(figure.textAlternative).toContain('“temperate” cannot be told: the star is too hot.');
      expect(notFinite(figure)).toEqual([]);
      expect(JSON.stringify(figure)).not.toContain('NaN');
    }
  });

  test('the orbit mean is told of windows of instellation', () => {
    const meant = columns({ windows: [instellationWindow] }).map((column, at): Column => {
      const found = { name: `orbitMeanInWindow.${instellationWindow.name}`, value: at, unit: '1', label: 'mean' };
      return { ...column, state: { ...column.state, findings: [...column.state.findings, found] } };
    });
    const one = windowBars(meant.slice(0, 1), wide);
    expect(words(one).some((text) => text.endsWith('orbit mean outside'))).toBe(true);
    const two = windowBars(meant.slice(0, 2), wide);
    expect(words(two).some((text) => text.endsWith('orbit mean inside in 1 of 2'))).toBe(true);
    expect(two.textAlternative).toContain('lies inside for shallow sea only');
  });

  test('a run from a start counts shares of the run, from start to end', () => {
    const figure = figureOf({ cases: [{ name: 'rock', heatCapacity: 2e6, forward: true }] });
    expect(plain(figure.layout.xaxis!.title!.text)).toBe('Share of the run');
    expect(figure.title).toBe('Time in windows after the start');
    expect(figure.layout.xaxis2!.range).toEqual([0, 1]);
    expect(figure.layout.shapes!.some(({ name }) => name === 'periapsis')).toBe(false);
  });

  test('with latitudes it is said that the area mean is meant', () => {
    const zonal = windowBars(columnsOf(zonalRun({ windows: [temperateWindow] })), wide);
    expect(zonal.caption).toContain('time of the area mean');
  });

  test('on a phone names stand above the bars, and there is no strip', () => {
    const figure = figureOf({}, styles[1]);
    expect(figure.layout.xaxis2).toBeUndefined();
    expect(figure.layout.xaxis!.domain).toEqual([0, 1]);
    const name = figure.layout.annotations!.find(({ text }) => plain(text).endsWith('shallow sea'))!;
    expect(name.xanchor).toBe('left');
    expect(Number(name.y)).toBeLessThan(trace(figure, temperateWindow.name)!.y[1]!);
  });

  test('many windows and cases keep a row each, apart from each other', () => {
    const cases = Array.from({ length: 9 }, (_, at) => ({ name: `case ${at}`, heatCapacity: 10 ** (5 + at / 2) }));
    const windows = [200, 250, 300].map(
      (from): Window => ({ name: `from ${from}`, of: 'temperature', from, to: from + 60 }),
    );
    const { data, layout } = figureOf({ cases, windows });
    const ys = data.filter(({ name }) => !name!.includes('when')).flatMap((one) => (one as unknown as Bars).y);
    ys.slice(1).forEach((y, at) => {
      expect(y - ys[at]!).toBeGreaterThanOrEqual(26);
    });
    expect(layout.yaxis!.range![0]).toBeGreaterThan(ys.at(-1)!);
  });

  test('nothing in it is not a number, in any style; hostile names are no markup', () => {
    const name = '<img src=x onerror=alert(1)> & <b>bold</b>\u202e';
    for (const style of styles) {
      const cases = [{ name, heatCapacity: 2e6, coldState: true }, ...threeCases];
      const figure = figureOf({ cases, windows: [{ ...temperateWindow, name }, never] }, style);
      expect(notFinite(figure)).toEqual([]);
      expect(JSON.stringify([figure.data, figure.layout])).not.toMatch(/<img|<b>bold|\u202e/);
    }
  });

  test('there is a figure only where there are windows', () => {
    expect(columns().map(hasWindows)).toEqual([true, true, true]);
    expect(columns({ windows: [] }).some(hasWindows)).toBe(false);
  });
});
