import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { universalChart } from '../../../sim/studies/grid/universalChart.ts';
import { contourLabels, crossings, type Mesh } from '../../../viewer/figures/contourLabels.ts';
import type { Figure, FigureStyle } from '../../../viewer/figures/figure.ts';
import { findingCurves } from '../../../viewer/figures/findingCurves.ts';
import { findingMap } from '../../../viewer/figures/findingMap.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import { placeNames } from '../../../viewer/figures/universalLabels.ts';
import { placedCases, universalMap } from '../../../viewer/figures/universalMap.ts';
import { valueScale } from '../../../viewer/figures/valueScale.ts';
import {
  curveGrid,
  eccentricityAxis,
  formula,
  gridCase,
  gridOf,
  heatCapacityAxis,
  mapGrid,
  togetherGrid,
  unplaced,
} from '../gridFixture.ts';

const style: FigureStyle = { theme: lightTheme, narrow: false, view: null };
interface Drawn {
  readonly x: number[];
  readonly y: number[];
  readonly z: number[][];
  readonly zmin: number;
  readonly zmax: number;
}
const styles: FigureStyle[] = [style, { ...style, narrow: true }, { ...style, theme: darkTheme }];
const named = ({ data }: Figure, name: string) => data.find((trace) => trace.name === name) as unknown as Drawn;
const texts = ({ layout }: Figure) => layout.annotations!.map(({ text }) => text!.replaceAll('\u00a0', ' '));

function notFinite(figure: Figure): string[] {
  const odd: string[] = [];
  JSON.stringify(figure, (key, value) => {
    if (typeof value === 'number' && !Number.isFinite(value)) odd.push(key);
    return value;
  });
  return odd;
}

describe('valueScale', () => {
  test('round levels within the range', () => {
    expect(valueScale([290, 357], false).levels).toEqual([290, 300, 310, 320, 330, 340, 350]);
    expect(valueScale([0, 1], false).levels).toEqual([0, 0.2, 0.4, 0.6, 0.8, 1]);
    expect(valueScale([0.02, 2100], true).levels).toEqual([0.03, 0.1, 0.3, 1, 3, 10, 30, 100, 300, 1000]);
  });

  test('one value all over: a range that is one, and no levels', () => {
    const { range, levels } = valueScale([120, 120], false);
    expect(range[1]).toBeGreaterThan(range[0]);
    expect(levels).toEqual([]);
  });
});

describe('contourLabels', () => {
  // z = x + y on the unit square: level c is the line y = c − x.
  const places = Array.from({ length: 11 }, (_, at) => at / 10);
  const mesh: Mesh = { x: places, y: places, z: places.map((y) => places.map((x) => x + y)) };
  const window = { x: [0, 1], y: [0, 1], width: 500, height: 500 } as const;

  test('every crossing lies on its line', () => {
    const found = crossings(mesh, 0.87);
    expect(found.length).toBeGreaterThan(10);
    for (const { x, y } of found) expect(x + y).toBeCloseTo(0.87, 12);
  });

  test('numbers keep clear of edges, of each other, and of what is taken', () => {
    const spots = contourLabels(mesh, [0.5, 1, 1.5], window, [{ x: 0.5, y: 0.5 }]);
    const known = spots.filter((spot) => spot !== null);
    expect(known).toHaveLength(3);
    for (const { x, y } of [...known]) {
      expect(Math.min(x, 1 - x) * 500).toBeGreaterThanOrEqual(28);
      expect(Math.min(y, 1 - y) * 500).toBeGreaterThanOrEqual(14);
      expect(Math.hypot(x - 0.5, y - 0.5) * 500).toBeGreaterThanOrEqual(34);
    }
  });

  test('a level that is passed nowhere, or only in a gap, has none', () => {
    expect(contourLabels(mesh, [7], window)).toEqual([null]);
    const gap: Mesh = { x: [0, 0.5, 1], y: [0.5], z: [[0, null, 2]] };
    expect(crossings(gap, 1)).toEqual([]);
  });
});

describe('findingMap', () => {
  test('the colours hold the nodes: rows along the second input', () => {
    const figure = findingMap(mapGrid(), 0, 'temperatureMax', style);
    const { z, x, y } = named(figure, 'Maximum temperature');
    expect([z.length, z[0]!.length]).toEqual([41, 31]);
    expect([x.length, y.length]).toEqual([32, 42]);
    const here = formula({ eccentricity: eccentricityAxis().nodes[20]!, heatCapacity: heatCapacityAxis().nodes[7]! });
    expect(z[7]![20]).toBeCloseTo(here.temperatureMax!, 9);
    expect(figure.layout.yaxis!.type).toBe('log');
    expect(figure.layout.yaxis!.range![0]).toBeCloseTo(4, 12);
  });

  test('the scenario’s own point and the failed nodes are marked where they are', () => {
    const figure = findingMap(mapGrid(), 1, 'temperatureMean', style);
    expect(named(figure, 'the scenario’s own point')).toMatchObject({ x: [0.42], y: [6e5] });
    const failed = named(figure, 'not computed');
    expect(failed.x).toHaveLength(5);
    expect(failed.x[0]).toBeCloseTo(0.9, 12); // node 1268 = 30 · 41 + 38
    expect(failed.y[0]).toBeCloseTo(10 ** 8.75, -3);
    expect(figure.caption).toContain('5 of 1271 worlds could not be computed');
    expect(texts(figure)).toContain('×  not computed');
  });

  test('contours carry their numbers with the unit', () => {
    const labels = texts(findingMap(mapGrid(), 0, 'temperatureMax', style));
    expect(labels).toContain('500 K');
    expect(texts(findingMap(mapGrid(), 0, 'radiativeTimeConstant', style))).toContain('10 d');
  });

  test('the colours mean the same in every case', () => {
    const ends = [0, 1, 2].map((at) =>
      named(findingMap(mapGrid(), at, 'damping', style), 'Damping (swing over steady swing)'),
    );
    expect(new Set(ends.map(({ zmin, zmax }) => `${zmin} ${zmax}`)).size).toBe(1);
  });

  test('without sight: lowest, highest, where, and the own point', () => {
    const text = findingMap(mapGrid(), 0, 'temperatureMean', style).textAlternative.replaceAll('\u00a0', ' ');
    expect(text).toBe(
      'shallow sea: lowest 290.0 K at eccentricity 0, heat capacity 10⁴ J m⁻² K⁻¹; highest 356.9 K at eccentricity 0.9, heat capacity 10⁴ J m⁻² K⁻¹. The scenario’s own point: eccentricity 0.42 and heat capacity 2.1 × 10⁷ J m⁻² K⁻¹.',
    );
  });

  test('names from a scenario are never markup', () => {
    const axes = [eccentricityAxis(4), heatCapacityAxis(4)];
    const report = gridOf(axes, [gridCase(axes, { name: '<img src=x onerror=alert(1)>' })]);
    const { data, layout } = findingMap(report, 0, 'temperatureMean', style);
    expect(JSON.stringify({ data, layout })).not.toContain('<img');
  });
});

describe('findingCurves', () => {
  test('a line a case, broken where nothing was computed, named at its end', () => {
    const figure = findingCurves(curveGrid(), 'temperatureMax', style);
    const lines = figure.data as Partial<ScatterData>[];
    expect(lines.map(({ name }) => name)).toEqual(['shallow sea', 'thin air', 'deep sea']);
    expect((lines[1]!.y as (number | null)[]).slice(28)).toEqual([expect.any(Number), null, null]);
    expect(texts(figure).filter((text) => text === '×')).toHaveLength(2);
    expect(texts(figure).some((text) => text.endsWith('deep sea'))).toBe(true);
  });

  test('own points stand at the scenario’s values, on a logarithmic axis as logarithms', () => {
    const figure = findingCurves(curveGrid(heatCapacityAxis()), 'radiativeTimeConstant', style);
    const { xaxis, yaxis, shapes, annotations } = figure.layout;
    expect([xaxis!.type, yaxis!.type]).toEqual(['log', 'log']);
    expect(shapes!.map(({ x0 }) => x0)).toEqual([2.1e7, 6e5, 4e8]);
    expect(annotations!.some(({ x }) => Math.abs(Number(x) - Math.log10(6e5)) < 1e-12)).toBe(true);
  });

  test('cases that share a line keep their own points, told apart by signs in the caption', () => {
    const figure = findingCurves(togetherGrid(), 'temperatureMean', style);
    expect(figure.data.map(({ name }) => name)).toEqual(['shallow sea = thin air = deep sea']);
    expect(figure.layout.shapes!.map(({ x0 }) => x0)).toEqual([2.1e7, 6e5, 4e8]);
    expect(figure.caption.replaceAll('\u00a0', ' ')).toContain(
      'the scenario’s own points, ● shallow sea, ■ thin air and ▲ deep sea.',
    );
    const report = mapGrid();
    const members = report.cases.flatMap((one) => one.members);
    const map = findingMap({ ...report, cases: [{ ...report.cases[0]!, members }] }, 0, 'temperatureMax', style);
    expect(named(map, 'own point of thin air')).toMatchObject({ x: [0.42], y: [6e5] });
    expect(map.caption).toContain('The white signs are the scenario’s own points.');
    expect(map.lines.map(({ marker }) => marker?.shape)).toEqual(['circle', 'square', 'triangle-up']);
    expect([...notFinite(figure), ...notFinite(map)]).toEqual([]);
  });

  test('without sight: from where to where, case by case', () => {
    const text = findingCurves(curveGrid(), 'temperatureMean', style).textAlternative.replaceAll('\u00a0', ' ');
    expect(text).toMatch(
      /^shallow sea: lowest 290\.0 K at eccentricity 0; highest 356\.9 K at eccentricity 0\.9\. thin air:/,
    );
    expect(text).toContain('2 worlds were not computed.');
  });
});

describe('universalMap', () => {
  const chart = universalChart({
    eccentricities: Float64Array.of(0, 0.3, 0.6, 0.9),
    storeNumbers: Float64Array.of(0.01, 0.1, 1, 10, 100),
  });
  const placed = placedCases(mapGrid().cases);

  test('cases stand at eccentricity and heat-store number, and are named', () => {
    const figure = universalMap(chart, placed, null, style);
    expect(named(figure, 'shallow sea')).toMatchObject({ x: [2.1e7 / 9.1e6], y: [0.42] });
    expect(texts(figure)).toEqual(expect.arrayContaining(['shallow sea', 'thin air', 'deep sea']));
    expect(figure.textAlternative).toContain('shallow sea: eccentricity 0.42, heat-store number 2.31');
    expect(placedCases(unplaced(mapGrid().cases))).toEqual([]);
  });

  test('names stay beside their markers where there is room, and are spread where they would touch', () => {
    const at = (storeNumber: number, name: string) => {
      return { name, caseIndex: 0, place: { eccentricity: 0.42, storeNumber, heatCapacityPerNumber: 1 } };
    };
    const view = { x: [-2, 2], y: [0, 0.95] } as const;
    const heights = (...numbers: number[]) =>
      placeNames(
        numbers.map((number) => at(number, String(number))),
        view,
        { width: 800, height: 420 },
      ).map(({ ay }) => Number(ay));
    expect(heights(0.1, 1, 30)).toEqual([0, 0, 0]);
    const [low, high] = heights(1, 1.3);
    expect(Math.abs(low! - high!)).toBeGreaterThanOrEqual(21 - 1e-9);
  });

  test('a limit without a reading is a bar without a cross', () => {
    const reading = { storeNumber: null, low: 2, high: null };
    const figure = universalMap(chart, placed, { eccentricity: 0.5, reading }, style);
    const marks = figure.data.filter(({ name }) => name === 'read back') as Partial<ScatterData>[];
    expect(marks.map(({ x }) => x)).toEqual([[2, 100]]);
    expect(figure.textAlternative).not.toContain('Read back');
  });

  test('a reading is a cross with its range; an open side goes to the edge', () => {
    const reading = { storeNumber: 3, low: 2, high: null };
    const figure = universalMap(chart, placed, { eccentricity: 0.5, reading }, style);
    const marks = figure.data.filter(({ name }) => name === 'read back') as Partial<ScatterData>[];
    expect(marks.map(({ x }) => x)).toEqual([[2, 100], [3]]);
    expect(figure.textAlternative).toContain('Read back at eccentricity 0.5: heat-store number 3.00.');
  });

  test('holds nothing but finite numbers, as every figure of a grid', () => {
    const axes = [eccentricityAxis(3), heatCapacityAxis(3)];
    const empty = gridOf(axes, [gridCase(axes, { failed: [0, 1, 2, 3, 4, 5, 6, 7, 8] })]);
    for (const how of styles) {
      expect(notFinite(universalMap(chart, placed, null, how))).toEqual([]);
      for (const { name } of mapGrid().cases[0]!.findings) {
        expect(notFinite(findingMap(mapGrid(), 1, name, how))).toEqual([]);
        expect(notFinite(findingCurves(curveGrid(), name, how))).toEqual([]);
        expect(notFinite(findingMap(empty, 0, name, how))).toEqual([]);
      }
    }
  });
});
