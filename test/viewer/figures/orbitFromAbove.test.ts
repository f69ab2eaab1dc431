import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { metresPerAu, solarRadius } from '../../../sim/constants.ts';
import type { Figure, FigureStyle } from '../../../viewer/figures/figure.ts';
import { orbitFromAbove } from '../../../viewer/figures/orbitFromAbove.ts';
import { roundDistances } from '../../../viewer/figures/orbitPlan.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import type { Column } from '../../../viewer/words/columns.ts';
import { threeCases } from '../fixture.ts';
import { degrees, notFinite, orbitColumns, semiMajorAxis, trueAnomalyAt } from './orbitColumns.ts';

const wide: FigureStyle = { theme: lightTheme, narrow: false, view: null };
const styles: FigureStyle[] = [wide, { ...wide, narrow: true }, { ...wide, theme: darkTheme }];
const omega = { 'orbit.argumentOfPeriapsis': 105 / degrees };
const rock = (eccentricity = 0.62, given: Record<string, number> = omega): Column[] =>
  orbitColumns([{ name: 'rock', heatCapacity: 2e6, eccentricity }], given);
const figureOf = (columns = rock(), shown = 0, style = wide): Figure => orbitFromAbove(columns, shown, style);

interface Drawn extends ScatterData {
  readonly x: number[];
  readonly y: number[];
  readonly customdata: string[][];
}
const trace = ({ data }: Figure, name: string) => data.find((one) => one.name === name) as unknown as Drawn;
const words = ({ layout }: Figure): string[] => layout.annotations!.map(({ text }) => text!.replaceAll('\u00a0', ' '));
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('the orbit from above', () => {
  test('the path is the ellipse with the star at its focus, to scale', () => {
    const figure = figureOf();
    const { x, y } = trace(figure, 'temperature');
    const a = semiMajorAxis / metresPerAu;
    x.forEach((_, at) => {
      expect(Math.hypot(x[at]!, y[at]!) + Math.hypot(x[at]! + 2 * 0.62 * a, y[at]!)).toBeCloseTo(2 * a, 9);
    });
    expect(x[0]).toBeCloseTo(a * 0.38, 9);
    expect(figure.layout.yaxis).toMatchObject({ scaleanchor: 'x', scaleratio: 1 });
  });

  test('each spot says its own distance, by r = a(1 − e²)/(1 + e cos ν), and starlight', () => {
    const { x, y, customdata } = trace(figureOf(), 'temperature');
    for (const at of [0, 50, 240, 333]) {
      const [, , , nu, distance, flux] = customdata[at]!.map(plain);
      const r = Math.hypot(x[at]!, y[at]!);
      expect((Number(nu!.replace('°', '')) / degrees).toFixed(2)).toBe(
        ((Math.atan2(y[at]!, x[at]!) + 2 * Math.PI) % (2 * Math.PI)).toFixed(2),
      );
      expect(Number(distance!.split(' ')[0]) / r).toBeCloseTo(1, 2);
      // S = 0.52 S0 / r² with S0 = 1361 W/m² at 1 au, to the four digits shown.
      expect(Math.abs(Number(flux!.split(' ')[0]) / ((0.52 * 1361.17) / r ** 2) - 1)).toBeLessThan(2e-3);
    }
  });

  test('transit lies on the line of sight at 90° − ω, eclipse opposite, the observer beyond', () => {
    const figure = figureOf();
    const bearing = (name: string): number =>
      (Math.atan2(trace(figure, name).y[0]!, trace(figure, name).x[0]!) * degrees + 360) % 360;
    expect(bearing('transit')).toBeCloseTo(345, 9);
    expect(bearing('to the observer')).toBeCloseTo(345, 9);
    expect(bearing('eclipse')).toBeCloseTo(165, 9);
    expect(words(figure)).toEqual(expect.arrayContaining(['transit', 'eclipse']));
    expect(figure.textAlternative).toMatch(/In transit it has .* in eclipse /);
  });

  test('without ω neither is drawn, and the caption says why', () => {
    const figure = figureOf(rock(0.62, {}));
    expect(trace(figure, 'transit')).toBeUndefined();
    expect(figure.layout.shapes!.some(({ name }) => name === 'sight')).toBe(false);
    expect(figure.caption).toContain('Without an argument of periapsis');
  });

  test('hottest and coldest stand where the planet is at those times', () => {
    const columns = rock();
    const figure = figureOf(columns);
    for (const [name, kind] of [['timeOfMax', 'hottest'] as const, ['timeOfMin', 'coldest'] as const]) {
      const time = columns[0]!.state.findings.find((one) => one.name === name)!.value!;
      const { x, y } = trace(figure, kind);
      expect(Math.cos(Math.atan2(y[0]!, x[0]!) - trueAnomalyAt(time, 0.62))).toBeCloseTo(1, 9);
    }
    expect(plain(figure.textAlternative)).toMatch(/^Hottest [\d.]+ d after periapsis, \d+\.\d K \(true anomaly/);
  });

  test('apsides carry their distances', () => {
    expect(words(figureOf())).toEqual(expect.arrayContaining(['periapsis<br>0.182 au', 'apoapsis<br>0.778 au']));
  });

  test('arrowheads point the way the planet goes, more of them where it is slow', () => {
    const { x, y, marker } = trace(figureOf(), 'motion');
    expect(x).toHaveLength(10);
    x.forEach((_, at) => {
      const clockwise = (marker as unknown as { angle: number[] }).angle[at]! / degrees;
      // Against the clock round the star: the angular momentum x·vy − y·vx is above zero.
      expect(x[at]! * Math.cos(clockwise) - y[at]! * Math.sin(clockwise)).toBeGreaterThan(0);
    });
    // From ν = 0 to the latus rectum and back passes far less than half of the time at e = 0.62.
    expect(x.filter((place) => place > 0).length).toBeLessThan(4);
  });

  test('a circle has no apsides; one whose temperature stays says so', () => {
    const figure = figureOf(rock(0));
    expect(trace(figure, 'periapsis')).toBeUndefined();
    expect(trace(figure, 'hottest')).toBeUndefined();
    expect(figure.textAlternative).toContain('hardly changes');
    expect(figure.caption).toContain('A circle has no periapsis');
    const { cmin, cmax } = trace(figure, 'temperature').marker as { cmin: number; cmax: number };
    expect(cmax).toBeGreaterThan(cmin);
  });

  test('the star is to scale where that can be seen, and the caption tells when not', () => {
    const disc = (radius: number): { width: number; caption: string } => {
      const figure = figureOf(rock(0.62, { ...omega, 'star.radius': radius }));
      const { x0, x1 } = figure.layout.shapes!.find(({ name }) => name === 'star')!;
      return { width: Number(x1) - Number(x0), caption: figure.caption };
    };
    const giant = disc(20 * solarRadius);
    expect(giant.width).toBeCloseTo((40 * solarRadius) / metresPerAu, 9);
    expect(giant.caption).toContain('to scale as well');
    const sun = disc(solarRadius);
    const times = Number(/drawn ([\d.]+) times/.exec(sun.caption)![1]);
    expect(Math.abs((times * 2 * solarRadius) / metresPerAu / sun.width - 1)).toBeLessThan(0.05); // two digits are said
    expect(figureOf().caption).toContain('size is not given');
  });

  test('cases share the colours; the figure and its file tell which one is shown', () => {
    const columns = orbitColumns(threeCases);
    const figures = columns.map((_, shown) => figureOf(columns, shown));
    const ranges = figures.map((figure) => trace(figure, 'temperature').marker as { cmin: number; cmax: number });
    expect(new Set(ranges.map(({ cmin, cmax }) => `${cmin} ${cmax}`)).size).toBe(1);
    expect(figures.map(({ title }) => title.split(': ')[1])).toEqual(threeCases.map(({ name }) => name));
    expect(new Set(figures.map(({ name }) => name)).size).toBe(3);
  });

  test('names keep clear of each other on either side of the orbit', () => {
    const crowded = rock(0.9, { 'orbit.argumentOfPeriapsis': Math.PI / 2 });
    for (const style of styles) {
      const { layout } = figureOf(crowded, 0, style);
      const [low, high] = layout.yaxis!.range as [number, number];
      const margin = layout.margin as { t: number; b: number };
      const pixels = (layout.height! - margin.t - margin.b) / (high - low);
      const right = layout.annotations!.filter(({ xanchor }) => xanchor === 'left');
      const places = right.map(({ y, ay }) => (Number(y) - low) * pixels - Number(ay)).sort((a, b) => a - b);
      expect(places.length).toBeGreaterThanOrEqual(3);
      places.slice(1).forEach((place, at) => {
        expect(place - places[at]!).toBeGreaterThan(18);
      });
    }
  });

  test('on a phone names are short and there is less beside the orbit', () => {
    const narrow = figureOf(rock(), 0, styles[1]);
    expect(words(narrow)).toEqual(expect.arrayContaining(['periapsis', 'transit']));
    expect(narrow.layout.margin!.r).toBeLessThan(10);
    expect(narrow.layout.height!).toBeLessThan(420);
  });

  test('nothing in it is not a number, at any shape, in any style; hostile names are no markup', () => {
    const name = '<img src=x onerror=alert(1)> & <b>bold</b>\u202e';
    for (const eccentricity of [0, 0.01, 0.5, 0.97]) {
      for (const style of styles) {
        const columns = orbitColumns([{ name, heatCapacity: 2e6, eccentricity }], omega);
        const figure = figureOf(columns, 0, style);
        expect(notFinite(figure)).toEqual([]);
        expect(JSON.stringify([figure.data, figure.layout])).not.toMatch(/<img|<b>bold|\u202e/);
      }
    }
  });
});

test('quiet circles stand at round distances within apoapsis', () => {
  expect(roundDistances(0.96, 0)).toEqual([0.2, 0.4, 0.6, 0.8]);
  expect(roundDistances(31, 0)).toEqual([10, 20, 30]);
  expect(roundDistances(0.96, 0.4)).toEqual([0.5]);
  expect(roundDistances(0.1, 1)).toEqual([]);
});
