import { describe, expect, test } from 'vitest';
import { runScenario } from '../../../sim/run.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { lagLoop } from '../../../viewer/figures/lagLoop.ts';
import { momentValues } from '../../../viewer/figures/moments.ts';
import { orbitFromAbove } from '../../../viewer/figures/orbitFromAbove.ts';
import { axisNames } from '../../../viewer/figures/reading.ts';
import { temperatureMap } from '../../../viewer/figures/temperatureMap.ts';
import { temperatureThroughOrbit } from '../../../viewer/figures/temperatureThroughOrbit.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { values } from '../../../viewer/figures/variables.ts';
import { columnsOf, periodOf } from '../../../viewer/words/columns.ts';
import { zonalRun } from '../zonalFixture.ts';

const scenario = `
star: { luminosity: 0.5 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.6 au, eccentricity: 0.4, periapsisTime: 2026-03-04T05:00Z }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 2 m } }
`;
const columns = columnsOf(runScenario(readScenario(scenario, 'x.yaml'), { sha256: '', version: '0' }));
const [column] = columns;
const style = { theme: lightTheme, narrow: false, view: null };
const shares = [0, 0.03, 0.2, 0.5, 0.74, 0.76, 0.99];

/** Apart on the circle of shares. */
const apart = (a: number, b: number) => Math.abs(a - b - Math.round(a - b));

describe.each(axisNames.filter((name) => name !== 'solarLongitude'))('on the chart by %s', (axis) => {
  const { moments } = temperatureThroughOrbit(columns, { ...style, reading: { axis, unit: 'K', against: null } });

  test.each(shares)('the place of a share of %f leads back to it', (share) => {
    const [line, point] = moments!.placesOf(share);
    expect(line!.y).toBeNull();
    expect(point!.x).toBeCloseTo(line!.x, 9);
    expect(apart(moments!.shareAt(line!.x, 0)!, share)).toBeLessThan(1e-9);
  });
});

describe('on every figure', () => {
  test('rows of the run stand at their own places', () => {
    const time = values(column!.dataset, 'time');
    const row = 123;
    const share = time[row]! / periodOf(column!);
    const [now] = momentValues(columns, share);
    expect(now!.temperature).toBeCloseTo(values(column!.dataset, 'temperature')[row]!, 6);
    const loop = lagLoop(columns, style).moments!.placesOf(share)[0]!;
    expect(loop.x).toBeCloseTo(values(column!.dataset, 'instellation')[row]!, 6);
    expect(loop.y).toBeCloseTo(values(column!.dataset, 'temperature')[row]!, 6);
    const place = orbitFromAbove(columns, 0, style).moments!.placesOf(share)[0]!;
    const au = 1.495978707e11;
    expect(Math.hypot(place.x, place.y!)).toBeCloseTo(values(column!.dataset, 'distance')[row]! / au, 6);
    expect(Math.atan2(place.y!, place.x)).toBeCloseTo(values(column!.dataset, 'trueAnomaly')[row]!, 6);
  });

  test.each(shares)('a place of the orbit and of the loop at a share of %f leads back to it', (share) => {
    for (const { moments } of [orbitFromAbove(columns, 0, style), lagLoop(columns, style)]) {
      const { x, y } = moments!.placesOf(share)[0]!;
      expect(apart(moments!.shareAt(x, y!)!, share)).toBeLessThan(1 / 360 + 1e-9);
    }
  });

  test('a map is marked across, where its own axis has the moment', () => {
    const { moments } = temperatureMap(columnsOf(zonalRun()), 0, style);
    for (const share of shares) {
      const [place] = moments!.placesOf(share);
      expect(apart(moments!.shareAt(place!.x, 0)!, share)).toBeLessThan(1e-12);
    }
  });
});
