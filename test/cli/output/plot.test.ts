import { describe, expect, test } from 'vitest';
import { rowScale, ticks, tickText } from '../../../cli/output/axis.ts';
import { draw, valueAt } from '../../../cli/output/canvas.ts';
import { plotLines } from '../../../cli/output/plot.ts';
import { terminalOf } from '../../../cli/output/terminal.ts';
import { fixtureResult } from '../fixture.ts';

const canvas = { columns: 5, rows: 3, x: [0, 5], y: [0, 3], braille: false } as const;
const picture = (curves: Parameters<typeof draw>[0], on: Parameters<typeof draw>[1]) =>
  draw(curves, on).map((row) => row.map(({ text }) => text).join(''));

describe('canvas', () => {
  test('a rising line runs from the lower left to the upper right without a gap', () => {
    const rising = { x: [0, 5], y: [0, 3], dotted: false, mark: 'a' };
    expect(picture([rising], canvas)).toEqual(['   aa', ' aaa ', 'aa   ']);
  });

  test('a peak between two columns of samples is drawn at its height', () => {
    const peak = { x: [0, 2.4, 2.5, 2.6, 5], y: [0.5, 0.5, 2.9, 0.5, 0.5], dotted: false, mark: 'a' };
    expect(picture([peak], canvas)).toEqual(['  a  ', '  a  ', 'aaaaa']);
  });

  test('braille: one dot a corner, eight a character', () => {
    const on = { columns: 1, rows: 1, x: [0, 2], y: [0, 4], braille: true } as const;
    expect(picture([{ x: [0, 2], y: [0.5, 0.5], dotted: false, mark: 'a' }], on)).toEqual(['⣀']);
    expect(picture([{ x: [0, 2], y: [3.5, 3.5], dotted: false, mark: 'a' }], on)).toEqual(['⠉']);
    expect(picture([{ x: [0, 1, 1.001, 2], y: [0, 4, 0, 4], dotted: false, mark: 'a' }], on)).toEqual(['⣿']);
  });

  test('a dotted line draws every third dot; a later curve stands before it', () => {
    const level = { x: [0, 9], y: [0.5, 0.5], dotted: true, mark: '.' };
    const on = { columns: 9, rows: 1, x: [0, 9], y: [0, 1], braille: false } as const;
    expect(picture([level], on)).toEqual(['.  .  .  ']);
    expect(picture([level, { x: [0, 2.9], y: [0.5, 0.5], dotted: false, mark: 'a' }], on)).toEqual(['aaa.  .  ']);
  });

  test('values between samples lie on straight lines', () => {
    const curve = { x: [0, 1, 3], y: [0, 10, 30] };
    expect([-1, 0, 0.5, 1, 2, 3, 9].map((x) => valueAt(curve, x))).toEqual([0, 0, 5, 10, 20, 30, 30]);
  });
});

describe('axis', () => {
  test('rows hold the range, are round, and are not more than allowed', () => {
    for (const [low, high] of [
      [226.27, 467.2],
      [288, 288],
      [3, 2700],
      [287.99, 288.02],
      [0.2, 0.9],
      [-40, 55],
    ] as const) {
      const { lowest, step, rows } = rowScale(low, high, 13);
      expect(rows).toBeLessThanOrEqual(13);
      expect(lowest - step / 2).toBeLessThanOrEqual(low);
      expect(lowest + (rows - 0.5) * step).toBeGreaterThanOrEqual(high);
      expect(Math.abs(lowest / step - Math.round(lowest / step))).toBeLessThan(1e-9);
    }
  });

  test('ticks are round and inside', () => {
    expect(ticks(-66.05, 66.05, 6)).toEqual([-50, 0, 50]);
    expect(ticks(-0.5, 0.5, 5)).toEqual([-0.4, -0.2, 0, 0.2, 0.4]);
    expect(ticks(0, 20, 4)).toEqual([0, 5, 10, 15, 20]);
    expect([-0.4, 0, 0.2].map((value) => tickText(value, 0.2))).toEqual(['-0.4', '0.0', '0.2']);
    expect(tickText(-0, 20)).toBe('0');
  });
});

describe('plot', () => {
  const ascii = terminalOf({ columns: 80, env: {}, isTTY: false });

  test('periapsis is in the middle and the peak of the steady value stands on it', () => {
    const lines = plotLines(fixtureResult([{ name: 'base', damping: 1, lagOrbits: 0 }]), ascii);
    const [peakRow] = lines.filter((line) => line.includes('*'));
    const axis = lines.find((line) => line.trim().startsWith('+'))!;
    const labels = lines[lines.indexOf(axis) + 1]!;
    const zero = labels.search(/(?<![\d.-])0(?![\d.])/);
    expect(axis[zero]).toBe('+');
    expect(Math.abs(peakRow!.indexOf('*') - zero)).toBeLessThanOrEqual(1);
    expect(lines.at(-1)!.trim()).toBe('days after periapsis');
  });

  test('a lag of a quarter orbit puts the peak half-way to the right edge', () => {
    const [peakRow] = plotLines(fixtureResult([{ name: 'base', damping: 1, lagOrbits: 0.25 }]), ascii).filter((line) =>
      line.includes('*'),
    );
    const whole = plotLines(fixtureResult([{ name: 'base' }]), ascii).find((line) => line.trim().startsWith('+'))!;
    const left = whole.indexOf('+') + 1;
    expect(Math.abs((peakRow!.indexOf('*') - left) / (whole.length - left) - 0.75)).toBeLessThan(0.03);
  });

  test('runs from a start count orbits; orbits of different length are compared as orbits', () => {
    const forward = fixtureResult([{ name: 'a', states: [{ label: 'forward', stable: null, offset: 0 }] }]);
    expect(plotLines(forward, ascii).at(-1)!.trim()).toBe('orbits after the start');
    const mixed = fixtureResult([{ name: 'a' }, { name: 'b', periodDays: 7 }]);
    expect(plotLines(mixed, ascii).at(-1)!.trim()).toBe('orbits after periapsis');
  });

  test('what is not drawn is said', () => {
    const many = fixtureResult(Array.from({ length: 8 }, (_, index) => ({ name: `case ${index}` })));
    expect(plotLines(many, ascii).at(-1)).toBe('3 more in the report.');
  });
});
