import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import type { Figure, FigureStyle } from '../../../viewer/figures/figure.ts';
import { lagLoop } from '../../../viewer/figures/lagLoop.ts';
import { logTicks } from '../../../viewer/figures/logTicks.ts';
import { hasFluxSwing, loopArea, loopOpening } from '../../../viewer/figures/loopOpening.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import type { Column } from '../../../viewer/words/columns.ts';
import { type PlainCase, threeCases } from '../fixture.ts';
import { notFinite, orbitColumns } from './orbitColumns.ts';

const wide: FigureStyle = { theme: lightTheme, narrow: false, view: null };
const styles: FigureStyle[] = [wide, { ...wide, narrow: true }, { ...wide, theme: darkTheme }];
const figureOf = (cases: readonly PlainCase[] = threeCases, style = wide): Figure =>
  lagLoop(orbitColumns(cases), style);

interface Drawn extends ScatterData {
  readonly x: number[];
  readonly y: number[];
}
const trace = ({ data }: Figure, name: string) => data.find((one) => one.name === name) as unknown as Drawn;
const words = ({ layout }: Figure): string[] => layout.annotations!.map(({ text }) => text!);
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

/** With another temperature at every row. */
function tempered(column: Column, of: (row: number) => number): Column {
  const { temperature } = column.dataset.variables;
  const changed = { ...temperature!, data: temperature!.data.map((_, row) => of(row)) };
  return { ...column, dataset: { variables: { ...column.dataset.variables, temperature: changed } } };
}

describe('a loop’s area and opening', () => {
  test('area of an ellipse, and its sign by the sense', () => {
    const angles = Array.from({ length: 2000 }, (_, at) => (2 * Math.PI * at) / 2000);
    const [x, y] = [angles.map((one) => 5 + 3 * Math.cos(one)), angles.map((one) => 7 + 2 * Math.sin(one))];
    // πab; the polygon of 2000 corners misses (2π/2000)²/6 of it.
    expect(loopArea(x, y) / (6 * Math.PI)).toBeCloseTo(1, 5);
    expect(loopArea(x.toReversed(), y.toReversed()) / (6 * Math.PI)).toBeCloseTo(-1, 5);
  });

  test('a planet at its steady value draws a line: no area, no opening', () => {
    const [rock] = orbitColumns([{ name: 'rock', heatCapacity: 2e6 }]);
    const steady = loopOpening(rock!, 'steadyTemperature');
    const loop = loopOpening(rock!, 'temperature');
    expect(Math.abs(steady.area)).toBeLessThan(1e-9 * Math.abs(loop.area));
    // The mesh is symmetric about periapsis: what is left is rounding.
    expect(Math.abs(steady.widest)).toBeLessThan(1e-9);
  });

  test('the opening of a temperature made up of a known odd part is that part', () => {
    const [rock] = orbitColumns([{ name: 'rock', heatCapacity: 2e6 }]);
    const nu = rock!.dataset.variables.trueAnomaly!.data;
    const made = tempered(rock!, (row) => 300 + 20 * Math.cos(nu[row]!) + 15 * Math.sin(nu[row]!));
    const { widest, opposite, area } = loopOpening(made, 'temperature');
    expect(widest).toBeCloseTo(30, 1); // twice 15 K, at ν = 90°; straight lines between 240 rows
    expect(opposite).toBe(0);
    expect(area).toBeGreaterThan(0);
    const mirrored = tempered(rock!, (row) => 300 - 15 * Math.sin(nu[row]!));
    expect(loopOpening(mirrored, 'temperature').area).toBeLessThan(0);
    const eight = tempered(rock!, (row) => 300 + 15 * Math.sin(2 * nu[row]!));
    expect(Math.abs(loopOpening(eight, 'temperature').opposite)).toBeGreaterThan(25);
  });
});

describe('the lag loop', () => {
  test('each loop closes on itself and stands on the instellation of its rows', () => {
    const figure = figureOf();
    const [rock] = orbitColumns(threeCases);
    const { x, y } = trace(figure, 'bare rock');
    expect([x[0], y[0]]).toEqual([x.at(-1), y.at(-1)]);
    expect(x.slice(0, -1)).toEqual([...rock!.dataset.variables.instellation!.data]);
  });

  test('arrowheads: rightwards while the starlight grows, leftwards while it fades, cooler on the way in', () => {
    const { x, y, marker } = trace(figureOf(), 'shallow sea, sense');
    expect((marker as unknown as { size: number[] }).size).toEqual([0, 13, 0, 13]);
    expect(x[1]!).toBeGreaterThan(x[0]!);
    expect(x[3]!).toBeLessThan(x[2]!);
    expect(y[1]!).toBeLessThan(y[3]!);
  });

  test('signs stand a tenth of the period apart, the first at periapsis', () => {
    const { x } = trace(figureOf(), 'bare rock, tenths');
    const [rock] = orbitColumns(threeCases);
    const flux = rock!.dataset.variables.instellation!.data;
    expect(x).toHaveLength(10);
    expect(x[0]).toBe(Math.max(...flux));
    expect(x[5]!).toBeCloseTo(Math.min(...flux), 6);
    expect(x[3]!).toBeCloseTo(x[7]!, 6);
  });

  test('one steady curve where all share it, whatever their orbits; one each where they do not', () => {
    const named = (cases: readonly PlainCase[]): string[] =>
      figureOf(cases)
        .lines.filter(({ marker }) => marker === null)
        .map(({ plainName }) => plainName);
    expect(named(threeCases)).toEqual(['steady value']);
    const orbits = [0.3, 0.6].map((eccentricity) => ({ name: `e ${eccentricity}`, heatCapacity: 2e6, eccentricity }));
    expect(named(orbits)).toEqual(['steady value']);
    const albedos = [0.1, 0.5].map((albedo) => ({ name: `A ${albedo}`, heatCapacity: 2e6, albedo }));
    expect(named(albedos)).toEqual(['steady value: A 0.1', 'steady value: A 0.5']);
  });

  test('the axis is logarithmic where the flux spans more than a factor of five', () => {
    expect(figureOf().layout.xaxis!.type).toBe('log');
    // ((1 + e)/(1 − e))² = 3.4 at e = 0.3 and 5.4 at e = 0.4.
    const gentle = (eccentricity: number) => figureOf([{ name: 'a', heatCapacity: 2e6, eccentricity }]).layout.xaxis!;
    expect(gentle(0.3).type).toBe('linear');
    expect(gentle(0.4).type).toBe('log');
  });

  test('the finding tells opening, starlight and sense; a planet without memory is a line', () => {
    const { textAlternative } = figureOf();
    expect(plain(textAlternative)).toMatch(
      /^bare rock: up to [\d.]+ K warmer after periapsis than before it under the same starlight \([\d ×.⁰-⁹]+ W m⁻²\); gone round against the clock\. shallow sea: /,
    );
    expect(plain(figureOf([{ name: 'bare', heatCapacity: 1 }]).textAlternative)).toBe(
      'A line, not a loop: under the same starlight the temperature before and after periapsis differs by less than 0.1 K.',
    );
  });

  test('a circle has no loop: it is left out, by name', () => {
    const cases = [...threeCases, { name: 'round', heatCapacity: 2e6, eccentricity: 0 }];
    const figure = figureOf(cases);
    expect(orbitColumns(cases).map(hasFluxSwing)).toEqual([true, true, true, false]);
    expect(trace(figure, 'round')).toBeUndefined();
    expect(figure.caption).toContain('“round” left out');
  });

  test('names stand beside the end of most starlight, apart from each other; on a phone in the legend', () => {
    const { layout } = figureOf();
    const [low, high] = layout.yaxis!.range as [number, number];
    const places = layout
      .annotations!.map(({ y, ay }) => ((Number(y) - low) / (high - low)) * 400 - Number(ay))
      .sort((a, b) => a - b);
    expect(places).toHaveLength(4);
    places.slice(1).forEach((place, at) => {
      expect(place - places[at]!).toBeGreaterThan(20);
    });
    const phone = figureOf(threeCases, styles[1]);
    expect(words(phone)).toEqual([]);
    expect(phone.lines.map(({ plainName }) => plainName)).toEqual([
      'steady value',
      ...threeCases.map(({ name }) => name),
    ]);
  });

  test('a part of it has names only for what ends there', () => {
    const view = { x: [3, 4.4], y: [400, 600] } as const;
    const names = words(lagLoop(orbitColumns(threeCases), { ...wide, view }));
    expect(names.some((text) => text.includes('thick air'))).toBe(false);
    expect(names.some((text) => text.includes('bare rock'))).toBe(true);
  });

  test('nothing in it is not a number, with many states, in any style; hostile names are no markup', () => {
    const name = '<img src=x onerror=alert(1)> & <b>bold</b>\u202e';
    const cases = Array.from({ length: 8 }, (_, at) => ({
      name: `${name} ${at}`,
      heatCapacity: 10 ** (5 + at / 2),
      eccentricity: 0.1 * at,
      coldState: at % 3 === 0,
    }));
    for (const style of styles) {
      const figure = figureOf(cases, style);
      expect(notFinite(figure)).toEqual([]);
      expect(JSON.stringify([figure.data, figure.layout])).not.toMatch(/<img|<b>bold|\u202e/);
    }
  });
});

test('round numbers on a logarithmic axis', () => {
  expect(logTicks([3, 4], 4).tickvals).toEqual([1000, 2000, 5000, 10000]);
  expect(logTicks([0, 3], 4).ticktext).toEqual(['1', '10', '100', '1000']);
  expect(logTicks([2.5, 2.9], 8).tickvals).toEqual([400, 500, 600, 700]);
});
