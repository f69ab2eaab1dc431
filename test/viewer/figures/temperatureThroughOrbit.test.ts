import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import type { Figure, FigureStyle } from '../../../viewer/figures/figure.ts';
import { temperatureThroughOrbit } from '../../../viewer/figures/temperatureThroughOrbit.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import { temperatureBands } from '../../../viewer/figures/windowBands.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { instellationWindow, plainRun, type RunChoices, temperateWindow } from '../fixture.ts';

const wide = { theme: lightTheme, narrow: false, view: null };
const narrow = { theme: lightTheme, narrow: true, view: null };
const day = 86_400;

const figureOf = (choices: RunChoices = {}, style = wide): Figure =>
  temperatureThroughOrbit(columnsOf(plainRun(choices)), style);
const traces = ({ data }: Figure) => data as Partial<ScatterData>[];
const trace = (figure: Figure, name: string) => traces(figure).find((one) => one.name === name)!;
const shapes = ({ layout }: Figure, name: string) => layout.shapes!.filter((shape) => shape.name === name);
const words = ({ layout }: Figure): string[] => layout.annotations!.map(({ text }) => text ?? '');

describe('temperature through the orbit', () => {
  test('a line a case, one steady value for all, one textbook value, one point that carries the dates', () => {
    expect(traces(figureOf()).map(({ name }) => name)).toEqual([
      'textbook 312.0 K',
      'steady value',
      'bare rock',
      'shallow sea',
      'thick air',
      'dates',
    ]);
  });

  test('cases with other starlight have their own steady and textbook lines', () => {
    const cases = [0.1, 0.5].map((albedo) => ({ name: `albedo ${albedo}`, heatCapacity: 2e6, albedo }));
    const names = traces(figureOf({ cases, periapsisTime: null })).map(({ name }) => name);
    expect(names.filter((name) => name?.startsWith('steady value'))).toEqual([
      'steady value: albedo 0.1',
      'steady value: albedo 0.5',
    ]);
    expect(names).toHaveLength(6);
  });

  test('shows every row of the Dataset at its own time, from a quarter before periapsis to three quarters after', () => {
    const run = plainRun();
    const variables = run.cases[0]!.states[0]!.dataset.variables;
    const { x, y } = trace(temperatureThroughOrbit(columnsOf(run), wide), 'bare rock') as { x: number[]; y: number[] };
    const drawn = new Map(x.map((t, at) => [(((t + 120) % 120) + 120) % 120, y[at]!] as const));
    variables.time!.data.forEach((t, row) => {
      const near = [...drawn].find(([at]) => Math.abs(at - t / day) < 1e-9 || Math.abs(at - t / day) > 120 - 1e-9);
      expect(near?.[1]).toBe(variables.temperature!.data[row]);
    });
    expect(x[0]).toBeLessThanOrEqual(-30);
    expect(x.at(-1)).toBeGreaterThanOrEqual(90);
  });

  test.each([0, 0.3, 0.62, 0.97])('time increases and no value is missing at e = %s', (eccentricity) => {
    const figure = figureOf({ cases: [{ name: 'a', heatCapacity: 8e7, eccentricity }] });
    for (const { x, y } of traces(figure) as { x: number[]; y: number[] }[]) {
      expect(x.every((t, at) => at === 0 || t > x[at - 1]!)).toBe(true);
      expect([...x, ...y].every(Number.isFinite)).toBe(true);
    }
    expect(JSON.stringify(figure.layout)).not.toMatch(/null|NaN/);
  });

  test('axes name their quantity and unit; the range holds every line', () => {
    const { layout, data } = figureOf();
    expect(layout.xaxis?.title?.text).toBe('Time after periapsis (d)');
    expect(layout.yaxis?.title?.text).toBe('Temperature (K)');
    expect(layout.xaxis?.range).toEqual([-30, 90]);
    const [low, high] = layout.yaxis!.range as [number, number];
    for (const { y } of data.slice(0, -1) as { y: number[] }[]) {
      expect(y.every((T) => T > low && T < high)).toBe(true);
    }
  });

  test('steady values are dashed, temperatures solid with a marker of their own', () => {
    const figure = figureOf();
    expect(trace(figure, 'steady value')).toMatchObject({ mode: 'lines', line: { dash: 'dash' } });
    const cases = ['bare rock', 'shallow sea', 'thick air'].map((name) => trace(figure, name));
    expect(cases.every(({ line }) => line?.dash === 'solid')).toBe(true);
    expect(new Set(cases.map(({ marker }) => marker?.symbol)).size).toBe(3);
    expect(new Set(cases.map(({ line }) => line?.color)).size).toBe(3);
  });

  test('states of one case share its colour and differ in dash and marker', () => {
    const figure = figureOf({ cases: [{ name: 'ice', heatCapacity: 8e7, coldState: true }] });
    const [warm, cold] = [trace(figure, 'ice, warm state'), trace(figure, 'ice, cold state')];
    expect(warm.line?.color).toBe(cold.line?.color);
    expect([warm.line?.dash, cold.line?.dash]).toEqual(['solid', 'dashdot']);
    expect([warm.marker?.symbol, cold.marker?.symbol]).toEqual(['circle', 'circle-open']);
  });

  test('periapsis and apoapsis are marked', () => {
    const figure = figureOf();
    expect(shapes(figure, 'periapsis')[0]).toMatchObject({ x0: 0, x1: 0 });
    expect(shapes(figure, 'apoapsis')[0]).toMatchObject({ x0: 60, x1: 60 });
    expect(words(figure)).toEqual(expect.arrayContaining(['<b>periapsis</b>', 'apoapsis']));
  });

  test('a temperature window is a named band between its own bounds', () => {
    const figure = figureOf();
    expect(shapes(figure, temperateWindow.name)[0]).toMatchObject({ y0: 273.15, y1: 373.15, yref: 'y' });
    expect(words(figure)).toContain(temperateWindow.name);
    expect(figure.caption).toContain('Shaded: temperature windows.');
  });

  test('the name of a window keeps clear of names at the upper edge', () => {
    const surround = { lines: [], view: { x: [0, 100], y: [273.15, 373.15] } as const, height: 300 };
    const edge = (topNames: readonly { text: string; x: number }[]) =>
      temperatureBands([temperateWindow], { ...surround, topNames }, narrow).annotations[0]!;
    expect(edge([])).toMatchObject({ xanchor: 'left', yanchor: 'top' });
    expect(edge([{ text: 'apoapsis', x: 10 }])).toMatchObject({ xanchor: 'left', yanchor: 'bottom' });
  });

  test('a window outside the temperatures shown is not silently dropped', () => {
    const molten = { name: 'molten', of: 'temperature', from: 2000, to: 3000 } as const;
    const figure = figureOf({ windows: [molten] });
    expect(words(figure)).not.toContain('molten');
    expect(figure.caption).toContain('Outside the temperatures shown: “molten”.');
  });

  test('bars show when the instellation is inside, once where all cases agree', () => {
    const bars = shapes(figureOf(), instellationWindow.name);
    const seconds = bars.reduce((sum, { x0, x1 }) => sum + (Number(x1) - Number(x0)) * day, 0);
    const share = plainRun().cases[0]!.findings.find(({ name }) => name.endsWith(instellationWindow.name))!.value!;
    // The finding counts whole rows of 240: it may miss by a row (up to 1.6 % of the orbit) at each of the two crossings.
    expect(Math.abs(seconds / (120 * day) - share)).toBeLessThan(0.032);
    const apart = [0.5, 0.62].map((eccentricity) => ({ name: `e ${eccentricity}`, heatCapacity: 2e6, eccentricity }));
    const both = figureOf({ cases: apart });
    expect(shapes(both, instellationWindow.name)).toEqual([]);
    expect(shapes(both, `${instellationWindow.name}: e 0.5`).length).toBeGreaterThan(0);
  });

  test('dates stand on a second axis when they are known and shared, at their true places', () => {
    const figure = figureOf({ periapsisTime: 825_872_469.185 }); // 2026-03-04T05:00 UTC
    const { tickvals, ticktext } = figure.layout.xaxis2!;
    const april = (ticktext as string[]).indexOf('Apr');
    const daysToApril = (Date.UTC(2026, 3, 1) - Date.UTC(2026, 2, 4, 5)) / 86_400_000;
    expect((tickvals as number[])[april]).toBeCloseTo(daysToApril, 6); // a tenth of a second; dates are kept to the second
    expect(figureOf({ periapsisTime: null }).layout.xaxis2).toBeUndefined();
  });

  test('lines are named beside them on a wide page, in a legend on a narrow one', () => {
    expect(words(figureOf()).some((text) => text.includes('shallow sea'))).toBe(true);
    expect(words(figureOf({}, narrow)).some((text) => text.includes('shallow sea'))).toBe(false);
    expect(figureOf({}, narrow).lines.map(({ plainName }) => plainName)).toContain('shallow sea');
  });

  test('in a part of the orbit names stand where lines leave it, and dates are finer', () => {
    const run = plainRun();
    const build = (view: FigureStyle['view']) => temperatureThroughOrbit(columnsOf(run), { ...wide, view });
    const part = build({ x: [-10, 10], y: [200, 550] });
    expect(part.layout.xaxis?.range).toEqual([-10, 10]);
    expect(part.layout.yaxis?.range).toEqual([200, 550]);
    const name = part.layout.annotations!.find(({ text }) => text?.endsWith('bare rock'))!;
    const { x, y } = trace(part, 'bare rock') as { x: number[]; y: number[] };
    const after = x.findIndex((t) => t > 10);
    const within = [y[after - 1]!, y[after]!].sort((a, b) => a - b);
    expect(name.y).toBeGreaterThanOrEqual(within[0]!);
    expect(name.y).toBeLessThanOrEqual(within[1]!);
    expect(part.layout.xaxis2?.ticktext).toContain('Mar 4');
    expect(build(null).layout.xaxis2?.ticktext).not.toContain('Mar 4');
  });

  test('a line that the view does not show has no name there', () => {
    const style = { ...wide, view: { x: [-10, 10], y: [400, 550] } } as const;
    const names = words(temperatureThroughOrbit(columnsOf(plainRun()), style));
    expect(names.some((text) => text.endsWith('thick air'))).toBe(false);
  });

  test('names from a scenario are never markup', () => {
    const name = '<img src=x onerror=alert(1)> & <b>bold</b>\u202e';
    const figure = figureOf({ cases: [{ name, heatCapacity: 2e6 }], windows: [{ ...temperateWindow, name }] });
    const texts = JSON.stringify([figure.data, figure.layout]);
    expect(texts).not.toMatch(/<img|<b>bold|\u202e/);
    expect(texts).toContain('&lt;img src=x onerror');
  });

  test('the text alternative states the finding of every case', () => {
    const { textAlternative } = figureOf();
    expect(textAlternative).toMatch(/bare rock: The temperature goes from .* shallow sea: .* thick air: /s);
  });

  test('colours follow the theme, and a build leaves its Dataset alone', () => {
    const run = plainRun();
    const before = structuredClone(run);
    const dark = temperatureThroughOrbit(columnsOf(run), { theme: darkTheme, narrow: false, view: null });
    expect(trace(dark, 'bare rock').line?.color).toBe(darkTheme.cases[0]);
    expect(run).toEqual(before);
  });
});
