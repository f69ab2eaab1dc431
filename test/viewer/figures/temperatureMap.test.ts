import type { ContourData, HeatmapData, ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { inkOn } from '../../../viewer/figures/colourScale.ts';
import type { Figure } from '../../../viewer/figures/figure.ts';
import { temperatureMap } from '../../../viewer/figures/temperatureMap.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { temperateWindow } from '../fixture.ts';
import { type ZonalCase, type ZonalChoices, zonalRun } from '../zonalFixture.ts';

const wide = { theme: lightTheme, narrow: false, view: null };
const narrow = { theme: lightTheme, narrow: true, view: null };
const day = 86_400;
const sea: ZonalCase = { name: 'tilted sea' };

const figureOf = (choices: ZonalChoices = { cases: [sea] }, shown = 0, style = wide): Figure =>
  temperatureMap(columnsOf(zonalRun(choices)), shown, style);
const heatmap = ({ data }: Figure) => data[0] as Partial<HeatmapData> & { z: number[][]; x: number[]; y: number[] };
const contours = ({ data }: Figure) =>
  data.filter(({ type }) => type === 'contour') as (Partial<ContourData> & {
    z: number[][];
    x: number[];
    y: number[];
  })[];
const words = ({ layout }: Figure): string[] =>
  layout.annotations!.map(({ text }) => (text ?? '').replaceAll('\u00a0', ' '));
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('temperature by latitude and season', () => {
  test('every cell is the Dataset’s own number at its own time and latitude', () => {
    const run = zonalRun({ cases: [sea], bands: 12, samples: 90 });
    const { variables } = run.cases[0]!.states[0]!.dataset;
    const { z, x, y } = heatmap(temperatureMap(columnsOf(run), 0, wide));
    const period = 120;
    expect(y).toHaveLength(13);
    expect(x).toHaveLength(z[0]!.length + 1);
    variables.time!.data.forEach((t, row) => {
      const at = t / day > 0.75 * period ? t / day - period : t / day;
      const column = x.findIndex((edge, place) => edge <= at && at < x[place + 1]!);
      variables.latitude!.data.forEach((latitude, band) => {
        const place = y.findIndex((edge, below) => edge <= Math.sin(latitude) && Math.sin(latitude) < y[below + 1]!);
        expect(z[place]![column]).toBe(variables.bandTemperature!.data[row * 12 + band]);
      });
    });
    expect(x[0]).toBeLessThanOrEqual(-30);
    expect(x.at(-1)).toBeGreaterThanOrEqual(90);
  });

  test('large fields are thinned, and nothing in the figure is missing or no number', () => {
    const figure = figureOf({ cases: [sea], bands: 24, samples: 720 });
    expect(heatmap(figure).z[0]!.length).toBeLessThanOrEqual(202);
    expect(JSON.stringify([figure.data, figure.layout])).not.toMatch(/null|NaN/);
    expect(figure.data.map(({ type }) => type)).not.toContain('scattergl');
  });

  test('time below, solar longitude above, latitude in degrees on an axis of equal areas', () => {
    const { layout } = figureOf();
    expect(layout.xaxis?.title?.text).toBe('Time after periapsis (d)');
    expect(layout.xaxis2).toMatchObject({ side: 'top', matches: 'x' });
    expect(layout.xaxis2?.title?.text).toContain('Solar longitude');
    expect(layout.xaxis2?.ticktext).toEqual(expect.arrayContaining(['0°', '90°', '180°', '270°']));
    expect(layout.yaxis?.range).toEqual([-1, 1]);
    expect(layout.yaxis?.tickvals).toContain(0);
  });

  test('freezing and the ends of windows are labelled lines; equal ends are one line', () => {
    const figure = figureOf({
      cases: [sea],
      windows: [temperateWindow, { name: 'mild', of: 'temperature', from: 285, to: 300 }],
    });
    const levels = contours(figure).filter(({ contours: own }) => own?.showlabels);
    expect(levels.map(({ contours: own }) => [own?.start, own?.end])).toEqual([
      [273.15, 273.15],
      [285, 285],
      [300, 300],
    ]);
    expect(plain(levels[0]!.name!)).toBe('273.15 K (freezing and “liquid water at 1 bar” begins)');
    expect(levels.map(({ line }) => line?.dash)).toEqual(['dash', 'dashdot', 'dashdot']);
    expect(plain(figure.caption)).toContain('Reached nowhere: 373.15 K (“liquid water at 1 bar” ends).');
  });

  test('a line has the ink that stands out from its own colour, and its sample the same ground', () => {
    const figure = figureOf();
    for (const { ground, colour, casing } of figure.lines) {
      if (casing === undefined) expect(colour).toBe(inkOn(ground!));
    }
    const { z } = heatmap(figure);
    const grounds = figure.layout
      .shapes!.filter(({ name }) => name?.endsWith(', ground'))
      .map(({ fillcolor }) => fillcolor);
    expect(grounds).toEqual(figure.lines.map(({ ground }) => ground));
    expect(z.length).toBe(30);
  });

  test('the edge of the ice is where half of a band is frozen, drawn to the poles', () => {
    const edges = contours(figureOf()).filter(({ contours: own }) => own?.start === 0.5);
    expect(edges.map(({ line }) => line?.color)).toEqual(['#000000', '#ffffff']);
    expect(edges.map(({ line }) => line?.dash)).toEqual(['solid', 'solid']);
    expect(plain(figureOf().caption)).toContain('Solid, with a black rim: the edge of the ice');
    const { y, z } = edges[0]!;
    expect([y[0], y.at(-1)]).toEqual([-1, 1]);
    expect(z.at(-1)).toEqual(z.at(-2));
    expect(Math.max(...z.flat())).toBeLessThanOrEqual(1);
  });

  test('without ice, or with nothing else, there is no edge to draw', () => {
    const hot = figureOf({ cases: [{ ...sea, equator: 400 }], windows: [] });
    expect(contours(hot)).toEqual([]);
    expect(hot.textAlternative).toContain('There is no ice.');
    const white = figureOf({ cases: [{ ...sea, equator: 200 }] });
    expect(contours(white)).toEqual([]);
    expect(white.textAlternative).toContain('Ice covers every latitude all year.');
  });

  test('several states: a figure each, headed by case and state, in the same colours', () => {
    const run = columnsOf(zonalRun());
    const figures = run.map((_, shown) => temperatureMap(run, shown, wide));
    expect(figures.map(({ title }) => title)).toEqual([
      'Temperature by latitude and season: tilted sea, warm state',
      'Temperature by latitude and season: tilted sea, cold state',
      'Temperature by latitude and season: upright sea',
    ]);
    expect(new Set(figures.map(({ name }) => name)).size).toBe(3);
    const ranges = figures.map((figure) => [heatmap(figure).zmin, heatmap(figure).zmax]);
    expect(ranges[1]).toEqual(ranges[0]);
    expect(ranges[2]).toEqual(ranges[0]);
    const all = figures.flatMap((figure) => heatmap(figure).z.flat());
    expect(ranges[0]![0]).toBeLessThanOrEqual(Math.min(...all));
    expect(ranges[0]![1]).toBeGreaterThanOrEqual(Math.max(...all));
  });

  test('the pointer reads temperature, latitude, time, season and date', () => {
    const { customdata, hovertemplate } = heatmap(figureOf({ cases: [sea], periapsisTime: 825_872_469.185 }));
    const cell = (customdata as unknown as [string, string][][])[29]!.find(
      ([, when]) => when.startsWith('0.0 d') || when.startsWith('at'),
    )!;
    expect(plain(cell[0])).toBe('75.2° N');
    expect(plain(cell[1])).toBe('at periapsis<br>L<sub>s</sub> 250°<br>2026-03-04 05:00 UTC');
    expect(plain(hovertemplate as string)).toContain('%{z:.1f} K');
  });

  test('the hottest and the coldest moment are marked where the findings say', () => {
    const run = zonalRun({ cases: [sea] });
    const figure = temperatureMap(columnsOf(run), 0, wide);
    const marks = figure.data.find(({ name }) => name === 'hottest and coldest') as Partial<ScatterData> & {
      x: number[];
      y: number[];
    };
    const value = (name: string): number => run.cases[0]!.findings.find((one) => one.name === name)!.value!;
    const time = value('hottestTime') / day;
    expect(marks.x[0]).toBeCloseTo(time > 90 ? time - 120 : time, 9);
    expect(marks.y[0]).toBeCloseTo(Math.sin((value('hottestLatitude') * Math.PI) / 180), 12);
    expect(words(figure)).toContain(`hottest ${value('hottestTemperature').toFixed(1)} K`);
  });

  test('the text alternative says where and when, how much thaws, and the ice', () => {
    expect(plain(figureOf().textAlternative)).toMatch(
      /^tilted sea: hottest \d+\.\d K at \d+\.\d° [NS], \d+\.\d d (after|before) periapsis \(Ls \d+°\); coldest \d+\.\d K at \d+\.\d° [NS], .*\. Above freezing: \d+\.\d % of area and time\. Ice covers \d+\.\d % of the surface at some time and \d+\.\d % all year\.$/,
    );
  });

  test('the text alternative does without findings, from the rows', () => {
    const run = zonalRun({ cases: [sea] });
    const bare = run.cases.map((one) => ({
      ...one,
      states: one.states.map((state) => ({
        ...state,
        findings: state.findings.filter(({ name }) => name === 'period'),
      })),
    }));
    const text = temperatureMap(columnsOf({ ...run, cases: bare }), 0, wide).textAlternative;
    expect(text).toBe(temperatureMap(columnsOf(run), 0, wide).textAlternative);
  });

  test('where land and sea have temperatures of their own, the caption says that their mean is shown', () => {
    const run = zonalRun({ cases: [sea] });
    const [only] = run.cases;
    const { variables } = only!.states[0]!.dataset;
    const both = { variables: { ...variables, bandLandTemperature: variables.bandTemperature! } };
    const states = [{ ...only!.states[0]!, dataset: both }];
    const words = 'Land and sea of a latitude are shown as their mean.';
    expect(temperatureMap(columnsOf({ ...run, cases: [{ ...only!, states }] }), 0, wide).caption).toContain(words);
    expect(temperatureMap(columnsOf(run), 0, wide).caption).not.toContain(words);
  });

  test('a part of the map has its own ticks', () => {
    const view = { x: [-10, 10], y: [0.5, 1] } as const;
    const { layout } = temperatureMap(columnsOf(zonalRun({ cases: [sea] })), 0, { ...wide, view });
    expect([layout.xaxis?.range, layout.xaxis2?.range, layout.yaxis?.range]).toEqual([
      [-10, 10],
      [-10, 10],
      [0.5, 1],
    ]);
    expect((layout.xaxis2!.tickvals as number[]).every((at) => at >= -10 && at <= 10)).toBe(true);
  });

  test('on a phone the key is a legend on the page, and the bar of colours lies below', () => {
    const figure = figureOf({ cases: [sea] }, 0, narrow);
    expect(figure.layout.shapes).toEqual([]);
    expect(figure.lines.map(({ plainName }) => plain(plainName))).toEqual([
      '273.15 K (freezing and “liquid water at 1 bar” begins)',
      'edge of the ice (solid)',
    ]);
    expect(heatmap(figure).colorbar).toMatchObject({ orientation: 'h', x: 0.5 });
  });

  test('names from a scenario are never markup', () => {
    const name = '<img src=x onerror=alert(1)> & <b>bold</b>\u202e';
    const figure = figureOf({ cases: [{ ...sea, name }], windows: [{ ...temperateWindow, name }] });
    expect(JSON.stringify([figure.data, figure.layout.annotations])).not.toMatch(/<img|<b>bold|\u202e/);
  });

  test('page colours follow the theme, data colours do not; a build leaves its Dataset alone', () => {
    const run = zonalRun({ cases: [sea] });
    const before = structuredClone(run);
    const [light, dark] = [wide, { ...wide, theme: darkTheme }].map((style) =>
      temperatureMap(columnsOf(run), 0, style),
    );
    expect(dark!.layout.font?.color).toBe(darkTheme.ink);
    expect(heatmap(dark!).colorscale).toEqual(heatmap(light!).colorscale);
    expect(run).toEqual(before);
  });
});
