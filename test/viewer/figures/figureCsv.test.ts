import { spawnSync } from 'node:child_process';
import type { Data, Layout } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { universalChart } from '../../../sim/studies/grid/universalChart.ts';
import { annualProfile } from '../../../viewer/figures/annualProfile.ts';
import { climateLoop } from '../../../viewer/figures/climateLoop.ts';
import type { Figure, FigureStyle } from '../../../viewer/figures/figure.ts';
import { figureCsv } from '../../../viewer/figures/figureCsv.ts';
import { findingCurves } from '../../../viewer/figures/findingCurves.ts';
import { findingMap } from '../../../viewer/figures/findingMap.ts';
import { importanceBars } from '../../../viewer/figures/importanceBars.ts';
import { insolationGroups, insolationMap } from '../../../viewer/figures/insolationMap.ts';
import { localLag } from '../../../viewer/figures/localLag.ts';
import { localLags } from '../../../viewer/figures/localLags.ts';
import { bandGroups, spreadBands } from '../../../viewer/figures/spreadBands.ts';
import { spreadHistogram } from '../../../viewer/figures/spreadHistogram.ts';
import { spreadScatter } from '../../../viewer/figures/spreadScatter.ts';
import { temperatureAfterStart } from '../../../viewer/figures/temperatureAfterStart.ts';
import { temperatureMap } from '../../../viewer/figures/temperatureMap.ts';
import { temperatureThroughOrbit } from '../../../viewer/figures/temperatureThroughOrbit.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { placedCases, universalMap } from '../../../viewer/figures/universalMap.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { sharedFindings } from '../../../viewer/words/spreadFindings.ts';
import { requireTool, toolPath } from '../../support/require.ts';
import { plainRun } from '../fixture.ts';
import { curveGrid, mapGrid } from '../gridFixture.ts';
import { spreadCase, spreadOf } from '../spreadFixture.ts';
import { loopCase, plainCase, traceOf } from '../traceFixture.ts';
import { twoClimates, zonalPeriod, zonalRun } from '../zonalFixture.ts';

const style: FigureStyle = { theme: lightTheme, narrow: false, view: null };
const report = spreadOf([spreadCase(), spreadCase({ name: 'bare rock', heatCapacity: [4e5, 4e6] })]);
const shared = (name: string) => sharedFindings(report.cases).find((one) => one.name === name)!;
const zonal = columnsOf(zonalRun({ cases: twoClimates }));
const run = plainRun();
const placed = placedCases(mapGrid().cases);
const chart = universalChart({ eccentricities: Float64Array.of(0, 0.4), storeNumbers: Float64Array.of(0.1, 1, 10) });

const figures: readonly Figure[] = [
  temperatureThroughOrbit(columnsOf(run), style),
  temperatureAfterStart(columnsOf(plainRun({ cases: [{ name: 'heated', heatCapacity: 8e7, forward: true }] })), style),
  temperatureMap(zonal, 0, style),
  insolationMap(insolationGroups(zonal), 0, style),
  annualProfile(zonal, style),
  localLag(zonal, style),
  climateLoop(traceOf([loopCase(), plainCase()]), style),
  spreadBands(bandGroups(report)[0]!, report, style),
  spreadHistogram(shared('temperatureMax'), report, style),
  importanceBars(shared('temperatureMax'), report, style),
  spreadScatter(shared('temperatureMax'), report.cases[0]!.inputs[0]!.key, report, style),
  findingCurves(curveGrid(), 'temperatureMean', style),
  findingMap(mapGrid(), 0, 'lagOfMaxOrbits', style),
  universalMap(chart, placed, null, style),
];
const [throughOrbit, , map, , profile, lag, loop, bands, histogram, importance, scatter, curves, overTwo, universal] =
  figures as readonly Figure[] & { readonly length: 14 };

type Row = Readonly<Record<string, string>>;

/** Read by a reader that is not ours. */
function readBack(texts: readonly string[]): Row[][] {
  const program =
    'import csv, io, json, sys; print(json.dumps([list(csv.DictReader(io.StringIO(t, newline=""), strict=True)) for t in json.load(sys.stdin)]))';
  const { stdout, stderr } = spawnSync(toolPath('python')!, ['-c', program], {
    input: JSON.stringify(texts),
    encoding: 'utf8',
    maxBuffer: 2 ** 28,
  });
  if (stdout === '') throw new Error(stderr);
  return JSON.parse(stdout) as Row[][];
}

const hasPython = requireTool('python');
const read = hasPython ? readBack(figures.map(figureCsv)) : [];
const rowsOf = (figure: Figure | undefined): Row[] => read[figures.indexOf(figure!)]!;
const names = (figure: Figure | undefined): string[] => Object.keys(rowsOf(figure)[0]!);
const numbers = (rows: readonly Row[], name: string): number[] => rows.map((row) => Number(row[name]));

describe.skipIf(!hasPython)('the data of every figure as CSV, read by Python', () => {
  test.each(figures.map((figure) => [figure.name, figure] as const))(
    '%s: a rectangle of finite numbers and words',
    (_, figure) => {
      const rows = rowsOf(figure);
      expect(rows.length).toBeGreaterThan(1);
      for (const name of names(figure)) expect(name).toMatch(/^[\p{L}\p{N}_.^]+$/u);
      const cells = rows.flatMap((row) => Object.values(row));
      expect(cells).not.toContain(undefined); // a short or a long line would give one
      expect(cells.filter((cell) => cell === null || /nan|infinity|undefined|object/i.test(cell))).toEqual([]);
    },
  );

  test('temperature through the orbit: each series whole, its numbers to the last bit', () => {
    expect(names(throughOrbit)).toEqual(['series', 'time_after_periapsis_d', 'temperature_K']);
    const rows = rowsOf(throughOrbit);
    expect([...new Set(rows.map(({ series }) => series))]).toEqual([
      expect.stringMatching(/^textbook [\d.]+.K$/),
      'steady value',
      'bare rock',
      'shallow sea',
      'thick air',
    ]);
    const sea = rows.filter(({ series }) => series === 'shallow sea');
    const { temperature } = run.cases[1]!.states[0]!.dataset.variables;
    expect(Math.max(...numbers(sea, 'temperature_K'))).toBe(Math.max(...temperature!.data));
    const times = numbers(sea, 'time_after_periapsis_d');
    expect(times).toEqual(times.toSorted((a, b) => a - b));
    // The fixture's orbit of 120 d, and a row beyond each end so that the line reaches the edges.
    expect(times.at(-1)! - times[0]!).toBeGreaterThanOrEqual(120);
    expect(times.at(-3)! - times[1]!).toBeLessThanOrEqual(120);
  });

  test('maps: a row for each cell, with ice beside the temperature', () => {
    expect(names(map)).toEqual([
      'case',
      'state',
      'time_after_periapsis_d',
      'solar_longitude_deg',
      'latitude_deg',
      'temperature_K',
      'ice_fraction',
    ]);
    const rows = rowsOf(map);
    const { bandTemperature, latitude } = zonal[0]!.dataset.variables;
    const known = new Set(bandTemperature!.data);
    expect(numbers(rows, 'temperature_K').filter((value) => !known.has(value))).toEqual([]);
    const latitudes = new Set(numbers(rows, 'latitude_deg'));
    expect(latitudes.size).toBe(latitude!.data.length);
    expect(Math.max(...latitudes)).toBeLessThan(90);
    for (const season of numbers(rows, 'solar_longitude_deg')) expect(season >= 0 && season <= 360).toBe(true);
  });

  test('annual profile: the mean lies between lowest and highest; insolation beside', () => {
    expect(names(profile)).toEqual([
      'case',
      'state',
      'latitude_deg',
      'mean_temperature_K',
      'lowest_temperature_K',
      'highest_temperature_K',
      'mean_insolation_W_m2',
    ]);
    for (const row of rowsOf(profile)) {
      expect(Number(row.mean_temperature_K)).toBeGreaterThanOrEqual(Number(row.lowest_temperature_K));
      expect(Number(row.mean_temperature_K)).toBeLessThanOrEqual(Number(row.highest_temperature_K));
    }
    expect(new Set(rowsOf(profile).map(({ case: name, state }) => `${name}, ${state}`)).size).toBe(zonal.length);
  });

  test('local lags: empty where there is none', () => {
    const found = localLags(zonal[0]!.dataset, zonalPeriod);
    const lags = rowsOf(lag)
      .slice(0, found.length)
      .map(({ lag_d }) => lag_d);
    expect(lags).toEqual(found.map((one) => (one === null ? '' : String(one.lag / 86_400))));
  });

  test('climates: every point of a branch once, in its order', () => {
    const [ice] = [loopCase()];
    const rows = rowsOf(loop).filter(({ case: name }) => name === ice.name);
    expect(numbers(rows, 'luminosity_Lsun')).toEqual(ice.branches[0]!.points.map(({ value }) => value));
    expect(rows.filter(({ fold }) => fold === 'true')).toHaveLength(2);
    expect(rows.filter(({ stable }) => stable === 'false').length).toBeGreaterThan(10);
  });

  test('spread: percentiles in order, shares that add up, indices with their intervals', () => {
    const levels = names(bands).filter((name) => name.includes('percentile'));
    expect(levels.map((name) => /percentile_([\d.]+)_K$/.exec(name)?.[1])).toEqual(['2.5', '16', '50', '84', '97.5']);
    for (const row of rowsOf(bands)) {
      const values = levels.map((name) => Number(row[name]));
      expect(values).toEqual(values.toSorted((a, b) => a - b));
    }
    const one = rowsOf(histogram).filter(({ case: name }) => name === 'bare rock');
    const { counts, beyond } = shared('temperatureMax').inCases[1]!.finding.histogram!;
    expect(numbers(one, 'draws')).toEqual(counts);
    const total = counts.reduce((sum, count) => sum + count, beyond);
    expect(numbers(one, 'share_of_the_draws').reduce((a, b) => a + b)).toBeCloseTo(1 - beyond / total, 12);
    expect(rowsOf(importance)).toHaveLength(report.cases.reduce((sum, { inputs }) => sum + inputs.length, 0));
    const { importance: known } = shared('temperatureMax').inCases[0]!.finding;
    expect(numbers(rowsOf(importance), 'total')).toContain(known.total![0]!.value);
    expect(rowsOf(scatter).filter(({ point }) => point !== 'draw')).toHaveLength(2);
  });

  test('grids: the value itself on a logarithmic map too, and why there is none', () => {
    expect(names(curves)).toEqual(['case', 'eccentricity', 'mean_temperature_K', 'note']);
    const [grid] = [mapGrid()];
    expect(names(overTwo)).toEqual([
      'case',
      'eccentricity',
      'heat_capacity_J_m2_K',
      'lag_of_the_maximum_share_of_an_orbit_percent_of_an_orbit',
      'note',
    ]);
    const name = names(overTwo)[3]!;
    const values = grid.cases[0]!.findings.find((finding) => finding.name === 'lagOfMaxOrbits')!.values;
    const rows = rowsOf(overTwo);
    expect(rows).toHaveLength(values.length);
    values.forEach((value, node) => {
      if (value === null) expect([rows[node]![name], rows[node]!.note]).toEqual(['', expect.stringMatching(/^no/)]);
      else expect(Number(rows[node]![name])).toBeCloseTo(100 * value, 12);
    });
  });

  test('the chart of plain worlds: its nodes, then the cases on it', () => {
    const rows = rowsOf(universal);
    expect(rows.filter(({ what }) => what === 'chart')).toHaveLength(6);
    expect(numbers(rows.slice(0, 6), 'damping')).toEqual(Array.from(chart.damping));
    expect(rows.slice(6).map(({ case: name }) => name)).toEqual(placed.map(({ name }) => name));
  });
});

describe('a figure whose builder gives no table', () => {
  const figure = (data: readonly object[], layout: object = {}): Figure => ({
    name: 'plain',
    title: '',
    textAlternative: '',
    caption: '',
    lines: [],
    data: data as Data[],
    layout: layout as Partial<Layout>,
  });
  const axes = { xaxis: { title: { text: 'Time (d)' } }, yaxis: { title: { text: 'Heat &amp; light (W m⁻²)' } } };

  test('names from the axes; what only decorates is left out, and what is drawn twice is there once', () => {
    const line = { type: 'scatter', name: 'a', x: [1, 2], y: Float64Array.of(3, 4.5) };
    const csv = figureCsv(
      figure(
        [
          { ...line, name: 'a, rim', hoverinfo: 'skip' },
          line,
          { ...line, name: 'twin' },
          { type: 'scatter', name: 'anchor', x: [0], y: [0], marker: { opacity: 0 } },
          { type: 'scatter', name: 'unseen', x: [0], y: [0], line: { color: 'rgba(0,0,0,0)' } },
          { type: 'scatter', name: 'shade', x: [0, 1], y: [0, 1], fill: 'toself' },
        ],
        axes,
      ),
    );
    expect(csv).toBe('series,time_d,heat_light_W_m2\na,1,3\na,2,4.5\ntwin,1,3\ntwin,2,4.5\n');
  });

  test('gaps and numbers that are none stay empty; errors become low and high; sizes and colour values stand beside', () => {
    const csv = figureCsv(
      figure(
        [
          {
            type: 'scatter',
            name: 'b',
            x: [1, 2],
            y: [null, Number.NaN],
            error_x: { type: 'data', symmetric: false, array: [0.5, 1], arrayminus: [0.25, 1] },
            marker: { size: [4, 9], color: [280, 290], colorbar: { title: { text: 'Temperature (K)' } } },
          },
        ],
        axes,
      ),
    );
    expect(csv).toBe(
      'series,time_d,heat_light_W_m2,time_low_d,time_high_d,size,temperature_K\nb,1,,0.75,1.5,4,280\nb,2,,1,3,9,290\n',
    );
  });

  test('a floating bar has its ends, a panel the names of its neighbour', () => {
    const bars = { type: 'bar', orientation: 'h', name: 'c', x: [2], y: ['rock'], base: [5], xaxis: 'x2' };
    const layout = { ...axes, xaxis2: { matches: 'x', title: { text: '' } } };
    expect(figureCsv(figure([bars], layout))).toBe(
      'series,time_d,heat_light_W_m2,time_from_d,time_to_d\nc,2,rock,5,7\n',
    );
  });

  test('maps: the middles of the cells, geometric on a logarithmic axis; contours of the same numbers are not told again', () => {
    const z = [[1, 2]];
    const heat = {
      type: 'heatmap',
      name: 'd',
      x: [1, 100, 10_000],
      y: [0, 2],
      z,
      colorbar: { title: { text: 'Lag (h)' } },
    };
    const layout = { xaxis: { type: 'log', title: { text: 'C' } }, yaxis: { title: { text: 'e' } } };
    const contour = { type: 'contour', name: 'level', x: [1, 2], y: [1], z, hoverinfo: 'skip' };
    expect(figureCsv(figure([heat, contour], layout))).toBe('series,c,e,lag_h\nd,10,1,1\nd,1000,1,2\n');
  });

  test('nothing to show: a header', () => {
    expect(figureCsv(figure([]))).toBe('series\n');
  });
});
