import { spawnSync } from 'node:child_process';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { csvName, csvText } from '../../../viewer/words/csv.ts';
import { requireTool, toolPath } from '../../support/require.ts';

describe('csvText', () => {
  test('numbers in full, nothing where there is none', () => {
    const row = [0.1 + 0.2, 1e-300, -0, null, undefined, Number.NaN, Number.POSITIVE_INFINITY, true];
    expect(csvText(['a'], [row])).toBe('a\n0.30000000000000004,1e-300,0,,,,,true\n');
  });

  test.each([
    ['=1+1', "'=1+1"],
    ['+47 K', "'+47 K"],
    ['-30 % albedo', "'-30 % albedo"],
    ['@cell', "'@cell"],
    ['\t=cmd', "'\t=cmd"],
    ['＝1', "'＝1"],
    ['a=b', 'a=b'],
    ['−3', '−3'], // a real minus sign is no operator
  ])('%j cannot become a formula', (text, expected) => {
    expect(csvText([], [[text]])).toBe(`\n${expected}\n`);
  });

  test.skipIf(!requireTool('python'))('any text comes back from Python’s reader, behind an apostrophe at most', () => {
    const text = fc.string({ unit: fc.constantFrom(...'ab,"\n\r=+-@\'é漢 ;') });
    const tables = fc.sample(fc.array(fc.array(text, { minLength: 3, maxLength: 3 }), { maxLength: 5 }), 60);
    const program =
      'import csv, io, json, sys; print(json.dumps([list(csv.reader(io.StringIO(t, newline=""), strict=True)) for t in json.load(sys.stdin)]))';
    const { stdout } = spawnSync(toolPath('python')!, ['-c', program], {
      input: JSON.stringify(tables.map((rows) => csvText(['a', 'b', 'c'], rows))),
      encoding: 'utf8',
    });
    const bare = (cell: string, original: string) => (cell === original ? cell : cell.replace(/^'/, ''));
    const back = (JSON.parse(stdout) as string[][][]).map(([, ...rows], at) =>
      rows.map((row, r) => row.map((cell, c) => bare(cell, tables[at]![r]![c]!))),
    );
    expect(back).toEqual(tables);
  });
});

describe('csvName', () => {
  test.each([
    ['Time after periapsis', 'd', 'time_after_periapsis_d'],
    ['Temperature', 'K', 'temperature_K'],
    ['Insolation', 'W m⁻²', 'insolation_W_m2'],
    ['Insolation', 'W/m2', 'insolation_W_m2'],
    ['Heat capacity', 'J m⁻² K⁻¹', 'heat_capacity_J_m2_K'],
    ['Thermal inertia', 'J m⁻² K⁻¹ s⁻¹ᐟ²', 'thermal_inertia_J_m2_K_s^0.5'],
    ['Fastest warming', 'K\u00a0d⁻¹', 'fastest_warming_K_d'],
    ['Latitude', '°', 'latitude_deg'],
    ['Lag', '% of an orbit', 'lag_percent_of_an_orbit'],
    ['Instellation', 'S₀', 'instellation_S0'],
    ['Eccentricity', '1', 'eccentricity'],
    ['Time in “liquid water, 1 bar”', '', 'time_in_liquid_water_1_bar'],
  ])('%s, %s', (label, unit, expected) => {
    expect(csvName(label, unit)).toBe(expected);
  });
});
