import { describe, expect, test } from 'vitest';
import { meanFromTrue } from '../../../sim/orbit/anomaly.ts';
import { conjunctions, distanceAt, headingAt, orbitShape, placeAt } from '../../../viewer/figures/orbitShape.ts';
import { throughOrbit } from '../../../viewer/figures/throughOrbit.ts';
import type { Column } from '../../../viewer/words/columns.ts';
import { degrees, orbitColumns, semiMajorAxis } from './orbitColumns.ts';

const column = (eccentricity: number, given = {}): Column =>
  orbitColumns([{ name: 'rock', heatCapacity: 2e6, eccentricity }], given)[0]!;

describe('the shape of an orbit', () => {
  test.each([0.001, 0.3, 0.62, 0.97])('size and eccentricity %d come back from the rows', (eccentricity) => {
    const shape = orbitShape(column(eccentricity).dataset);
    // Rounding of the rows, 1e-16, over the eccentricity: 1e-12 leaves room.
    expect(shape.semiMajorAxis / semiMajorAxis).toBeCloseTo(1, 12);
    expect(shape.eccentricity).toBeCloseTo(eccentricity, 12);
  });

  test('they do so from rows that hold neither apsis', () => {
    const { dataset } = column(0.62);
    const variables = Object.fromEntries(
      Object.entries(dataset.variables).map(([name, one]) => [name, { ...one, data: one.data.slice(7, 80) }]),
    );
    expect(orbitShape({ variables }).eccentricity).toBeCloseTo(0.62, 12);
    expect(orbitShape({ variables }).semiMajorAxis / semiMajorAxis).toBeCloseTo(1, 12);
  });

  test('a circle is one, to the last bit', () => {
    expect(orbitShape(column(0).dataset)).toEqual({ semiMajorAxis, eccentricity: 0 });
  });

  test('every place has its two focal distances adding up to 2a, and motion is along the path', () => {
    const shape = { semiMajorAxis: 1, eccentricity: 0.7 };
    for (let nu = 0; nu < 6.2; nu += 0.37) {
      const { x, y } = placeAt(shape, nu);
      expect(Math.hypot(x, y)).toBeCloseTo(distanceAt(shape, nu), 12);
      expect(Math.hypot(x, y) + Math.hypot(x + 2 * 0.7, y)).toBeCloseTo(2, 12);
      const next = placeAt(shape, nu + 1e-6);
      const { x: dx, y: dy } = headingAt(shape, nu);
      // A chord of 1e-6 rad is parallel to the path to about 1e-6.
      expect((dx * (next.y - y) - dy * (next.x - x)) / Math.hypot(next.x - x, next.y - y)).toBeCloseTo(0, 5);
      expect(dx * (next.x - x) + dy * (next.y - y)).toBeGreaterThan(0);
    }
  });
});

describe('conjunctions', () => {
  // Winn (2010) in Exoplanets, ed. Seager, §2: conjunctions at ν = ±π/2 − ω.
  test.each([0, 30, 105, 200, 359])('transit at 90° − ω and eclipse at 270° − ω, for ω = %d°', (omegaDeg) => {
    const seen = conjunctions(column(0.3, { 'orbit.argumentOfPeriapsis': omegaDeg / degrees }))!;
    expect(seen.transit * degrees).toBeCloseTo((450 - omegaDeg) % 360, 9);
    expect(seen.eclipse * degrees).toBeCloseTo((630 - omegaDeg) % 360, 9);
  });

  test('none where ω is not known; on a circle a dated transit sets the count', () => {
    expect(conjunctions(column(0.3))).toBeNull();
    expect(conjunctions(column(0.3, { 'orbit.transitTime': 8e8 }))).toBeNull();
    expect(conjunctions(column(0, { 'orbit.transitTime': 8e8 }))).toEqual({ transit: 0, eclipse: Math.PI });
  });

  test('what follows from the inputs wins over what was typed', () => {
    const typed = column(0.3, { 'orbit.argumentOfPeriapsis': 1 });
    const omega = { key: 'orbit.argumentOfPeriapsis', value: Math.PI / 2, unit: 'rad', label: 'ω' };
    expect(conjunctions({ ...typed, derived: [omega] })!.transit).toBeCloseTo(0, 12);
  });
});

describe('a variable through the orbit', () => {
  const { dataset } = column(0.62);

  test('is itself at its rows, whatever the turn', () => {
    const temperature = throughOrbit(dataset, 'temperature');
    const { meanAnomaly, temperature: rows } = dataset.variables;
    for (const row of [0, 1, 100, 239]) {
      for (const turns of [-1, 0, 2]) {
        expect(temperature(meanAnomaly!.data[row]! + 2 * Math.PI * turns)).toBeCloseTo(rows!.data[row]!, 6);
      }
    }
  });

  test('and between them close to the truth, across the end of the orbit too', () => {
    const flux = throughOrbit(dataset, 'instellation');
    const most = Math.max(...dataset.variables.instellation!.data);
    for (const nu of [-0.02, -0.011, 0.005, 1, 3]) {
      const truth = most * (distanceAt({ semiMajorAxis: 1, eccentricity: 0.62 }, nu) / (1 - 0.62)) ** -2;
      // Straight lines between 240 rows: the second difference is some (2π/240)² of the flux.
      expect(Math.abs(flux(meanFromTrue(nu, 0.62)) / truth - 1)).toBeLessThan(2e-3);
    }
  });
});
