import { describe, expect, test } from 'vitest';
import { runScenario } from '../../../sim/run.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import type { ChartLine } from '../../../viewer/figures/chartLine.ts';
import { availableAxes, orbitAxis } from '../../../viewer/figures/orbitAxis.ts';
import { temperatureThroughOrbit } from '../../../viewer/figures/temperatureThroughOrbit.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { values } from '../../../viewer/figures/variables.ts';
import { columnsOf, periodOf } from '../../../viewer/words/columns.ts';
import { plainRun } from '../fixture.ts';
import { zonalRun } from '../zonalFixture.ts';

const scenario = `
star: { luminosity: 0.5 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.6 au, eccentricity: 0.2, periapsisTime: 2026-03-04T05:00Z }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 2 m } }
cases: { near: { orbit: { semiMajorAxis: 0.3 au, eccentricity: 0.5 } }, far: {} }
`;
const columns = columnsOf(runScenario(readScenario(scenario, 'x.yaml'), { sha256: '', version: '0' }));
const [near] = columns;
const degrees = 180 / Math.PI;

describe('orbitAxis', () => {
  test('shares of the period run from a quarter before periapsis to three quarters after, whatever the period', () => {
    const axis = orbitAxis('phase', columns);
    for (const column of columns) {
      const { time, rows } = axis.span(column);
      expect(time[0]).toBeLessThanOrEqual(-0.25);
      expect(time.at(-1)).toBeGreaterThanOrEqual(0.75);
      const at = rows.indexOf(40, 2);
      expect(time[at]).toBeCloseTo(
        values(column.dataset, 'time')[40]! / periodOf(column) - (time[at]! < 0 ? 1 : 0),
        12,
      );
    }
    expect(axis.apoapsis).toBe(0.5);
  });

  test('the true anomaly makes one turn round periapsis, in order, with the rows that it belongs to', () => {
    const { time, rows } = orbitAxis('trueAnomaly', columns).span(near!);
    expect(time[0]).toBeLessThanOrEqual(-180);
    expect(time.at(-1)).toBeGreaterThanOrEqual(180);
    expect(time).toEqual(time.toSorted((a, b) => a - b));
    const anomaly = values(near!.dataset, 'trueAnomaly');
    for (const [i, row] of rows.entries()) {
      const turns = (time[i]! - anomaly[row]! * degrees) / 360;
      expect(turns).toBeCloseTo(Math.round(turns), 9);
    }
  });

  test('seasons only where there are latitudes, dates only where all share them', () => {
    expect(availableAxes(columns)).not.toContain('solarLongitude');
    expect(availableAxes(columns)).not.toContain('date');
    expect(availableAxes(columnsOf(zonalRun()))).toContain('solarLongitude');
    expect(orbitAxis('solarLongitude', columns).name).toBe('time');
  });
});

describe.each(['phase', 'trueAnomaly', 'date'] as const)('the chart by %s', (axis) => {
  test('has the same temperatures, and says what it runs by', () => {
    const run = columnsOf(plainRun());
    const reading = { axis, unit: 'K', against: null } as const;
    const style = { theme: lightTheme, narrow: false, view: null };
    const [plain, other] = [temperatureThroughOrbit(run, style), temperatureThroughOrbit(run, { ...style, reading })];
    const peak = ({ lines }: typeof plain, name: string) =>
      Math.max(...(lines.find(({ plainName }) => plainName === name) as ChartLine).y);
    for (const { caseName } of run) expect(peak(other, caseName)).toBe(peak(plain, caseName));
    const title = { phase: 'Share of the period after periapsis', trueAnomaly: 'True anomaly (°)', date: 'Date (UTC)' };
    expect((other.layout.xaxis!.title as { text: string }).text).toBe(title[axis]);
    expect(JSON.stringify(other)).not.toMatch(/NaN/);
  });
});
