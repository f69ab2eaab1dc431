import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { constantAlbedo } from '../../../sim/surface/albedo/constant.ts';
import { rampAlbedo } from '../../../sim/surface/albedo/ramp.ts';

const temperature = fc.double({ min: 1, max: 500, noNaN: true });

test('constant', () => {
  const albedo = constantAlbedo(0.3);
  expect(albedo).toMatchObject({ warm: 0.3, ice: 0.3, ramp: null });
  for (const t of [0, 100, 1000]) expect([albedo.at(t), albedo.slopeAt(t)]).toEqual([0.3, 0]);
});

describe('ramp', () => {
  const ramp = rampAlbedo({ warm: 0.3, ice: 0.62, from: 258, to: 273 });

  test('ends, middle, and the cubic between them', () => {
    expect(ramp).toMatchObject({ warm: 0.3, ice: 0.62, ramp: { from: 258, to: 273 } });
    expect([ramp.at(258), ramp.at(200), ramp.at(273), ramp.at(400)]).toEqual([0.62, 0.62, 0.3, 0.3]);
    expect(ramp.at(265.5)).toBeCloseTo(0.46, 15); // halfway: 3/4 − 2/8
    expect(ramp.at(261.75)).toBeCloseTo(0.62 - 0.32 * (3 / 16 - 2 / 64), 15); // a quarter of the way
  });

  test('never outside its two values, never rising', () => {
    fc.assert(
      fc.property(temperature, temperature, (x, y) => {
        const [low, high] = x < y ? [x, y] : [y, x];
        expect(ramp.at(high)).toBeLessThanOrEqual(ramp.at(low) + 1e-16);
        expect(ramp.at(x)).toBeGreaterThanOrEqual(0.3 - 1e-16);
        expect(ramp.at(x)).toBeLessThanOrEqual(0.62 + 1e-16);
      }),
    );
  });

  test('the slope is the derivative, and has no step', () => {
    fc.assert(
      fc.property(temperature, (t) => {
        const h = 1e-4; // the second derivative steps at the ends, by 6 · 0.32/15² = 8.6e-3: h times half of it
        const difference = (ramp.at(t + h) - ramp.at(t - h)) / (2 * h);
        expect(Math.abs(difference - ramp.slopeAt(t))).toBeLessThan(h * 4.4e-3 + 1e-11);
      }),
    );
    expect(ramp.slopeAt(258)).toBe(0);
    expect(ramp.slopeAt(273)).toBe(0);
  });
});

test('from = to is a step: warm at that temperature', () => {
  const step = rampAlbedo({ warm: 0.3, ice: 0.6, from: 263, to: 263 });
  expect([step.at(262.999999), step.at(263), step.at(300)]).toEqual([0.6, 0.3, 0.3]);
  expect(step.slopeAt(263)).toBe(0);
  expect(step.ramp).toEqual({ from: 263, to: 263 });
});

test('errors', () => {
  for (const bad of [-0.01, 1, Number.NaN]) {
    expect(() => constantAlbedo(bad)).toThrow(SimError);
    expect(() => rampAlbedo({ warm: bad, ice: 0.6, from: 250, to: 270 })).toThrow('planet.albedo.warm');
    expect(() => rampAlbedo({ warm: 0.3, ice: bad, from: 250, to: 270 })).toThrow('planet.albedo.ice');
  }
  expect(() => rampAlbedo({ warm: 0.3, ice: 0.6, from: 280, to: 270 })).toThrow('`from` (280 K) is above `to` (270 K)');
  expect(() => rampAlbedo({ warm: 0.3, ice: 0.6, from: 0, to: 270 })).toThrow(SimError);
});
