import { describe, expect, test } from 'vitest';
import {
  colourAt,
  inkOn,
  insolationScale,
  plotlyScale,
  relativeLuminance,
  temperatureScale,
} from '../../../viewer/figures/colourScale.ts';

const scales = [
  ['temperature', temperatureScale],
  ['insolation', insolationScale],
] as const;

/**
 * Linear RGB as other eyes see it. Machado, Oliveira & Fernandes (2009) "A physiologically-based model for simulation of
 * color vision deficiency", IEEE Trans. Vis. Comput. Graph. 15, 1291, severity 1 (matrices from memory).
 */
const eyes = {
  normal: [1, 0, 0, 0, 1, 0, 0, 0, 1],
  protanopia: [0.152286, 1.052583, -0.204868, 0.114503, 0.786281, 0.099216, -0.003882, -0.048116, 1.051998],
  deuteranopia: [0.367322, 0.860646, -0.227968, 0.280085, 0.672501, 0.047413, -0.01182, 0.04294, 0.968881],
  tritanopia: [1.255528, -0.076749, -0.178779, -0.078411, 0.930809, 0.147602, 0.004733, 0.691367, 0.3039],
} as const;

const linear = (value: number): number => (value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4);

/** CIE 1976 lightness L*, 0 … 100, of an sRGB colour through some eye. CIE 15:2004, eq. 8.3; sRGB: IEC 61966-2-1. */
function lightness(colour: string, eye: readonly number[]): number {
  const rgb = [1, 3, 5].map((at) => linear(Number.parseInt(colour.slice(at, at + 2), 16) / 255));
  const seen = [0, 3, 6].map((row) => rgb.reduce((sum, value, at) => sum + eye[row + at]! * value, 0));
  const Y = 0.2126 * seen[0]! + 0.7152 * seen[1]! + 0.0722 * seen[2]!;
  return Y > 216 / 24389 ? 116 * Math.cbrt(Y) - 16 : (24389 / 27) * Y;
}

const steps = (values: readonly number[]): number[] => values.slice(1).map((value, at) => value - values[at]!);

describe.each(scales)('the scale of %s', (_, scale) => {
  const fine = Array.from({ length: 101 }, (_, percent) => colourAt(scale, percent, [0, 100]));

  test.each(Object.entries(eyes))('grows lighter all the way for %s', (_, eye) => {
    expect(Math.min(...steps(fine.map((colour) => lightness(colour, eye))))).toBeGreaterThan(0);
  });

  test('grows lighter at an even pace', () => {
    const rises = steps(scale.map((colour) => lightness(colour, eyes.normal)));
    const mean = rises.reduce((a, b) => a + b) / rises.length;
    // Both are even in CAM02-UCS; L* parts from it near black: half of the mean either way, a rainbow misses it by far.
    for (const rise of rises) expect(Math.abs(rise / mean - 1)).toBeLessThan(0.5);
  });

  test('black or white stands out on every colour by 4.5 : 1', () => {
    for (const ground of fine) {
      const [one, other] = [relativeLuminance(ground), relativeLuminance(inkOn(ground))];
      expect((Math.max(one, other) + 0.05) / (Math.min(one, other) + 0.05)).toBeGreaterThanOrEqual(4.5);
    }
  });

  test('as Plotly takes it: from 0 to 1', () => {
    const stops = plotlyScale(scale);
    expect([stops[0], stops.at(-1)]).toEqual([
      [0, scale[0]],
      [1, scale.at(-1)],
    ]);
  });
});

test('an insolation of nothing is black, or all but', () => {
  expect(lightness(insolationScale[0]!, eyes.normal)).toBeLessThan(1);
});

describe('colourAt', () => {
  test('stops are met, between them colours mix, beyond the ends they stay', () => {
    const scale = ['#000000', '#804020', '#ffffff'];
    expect(colourAt(scale, 250, [200, 300])).toBe('#804020');
    expect(colourAt(scale, 225, [200, 300])).toBe('#402010');
    expect(colourAt(scale, 100, [200, 300])).toBe('#000000');
    expect(colourAt(scale, 900, [200, 300])).toBe('#ffffff');
  });

  test('a range of no width has a colour', () => {
    expect(colourAt(temperatureScale, 250, [250, 250])).toBe(temperatureScale[0]);
  });
});
