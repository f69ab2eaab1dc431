import { expect, test } from 'vitest';
import { smallCosine, smallSine } from '../../../sim/solve/smallAngle.ts';

test('sine and cosine within one radian, against the language', () => {
  for (let i = -1000; i <= 1000; i++) {
    const angle = i / 1000;
    // The first term left out is 1/19! = 8e-18 and 1/20!; the rest is two roundings of a number up to 1.
    expect(Math.abs(smallSine(angle) - Math.sin(angle))).toBeLessThan(3e-16);
    expect(Math.abs(smallCosine(angle) - Math.cos(angle))).toBeLessThan(3e-16);
  }
});
