import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { stefanBoltzmann, zeroCelsius } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import { greyAtmosphere } from '../../../sim/surface/emission/greyAtmosphere.ts';
import { greyBody } from '../../../sim/surface/emission/greyBody.ts';
import { linearEmission } from '../../../sim/surface/emission/linear.ts';
import { relativeError } from '../relative.ts';

const laws = {
  'grey body': greyBody(0.95),
  'grey atmosphere': greyAtmosphere(0.83),
  linear: linearEmission({ a: 203.3, b: 2.09 }),
};

for (const [name, law] of Object.entries(laws)) {
  describe(name, () => {
    const temperature = fc.double({ min: 20, max: 2000, noNaN: true });

    test('inverse undoes the law', () => {
      fc.assert(
        fc.property(temperature, (t) => {
          // a unit or two; the linear law subtracts A and 273 K, ten times what it leaves at 20 K
          expect(relativeError(law.inverse(law.at(t)), t)).toBeLessThan(5e-15);
        }),
      );
    });

    test('strictly increasing, and the slope is the derivative', () => {
      fc.assert(
        fc.property(temperature, (t) => {
          const h = t * 1e-5; // central difference of T⁴: relative error h²/T² = 1e-10, rounding 1e-11
          expect(relativeError((law.at(t + h) - law.at(t - h)) / (2 * h), law.slopeAt(t))).toBeLessThan(1e-9);
          expect(law.slopeAt(t)).toBeGreaterThan(0);
        }),
      );
    });

    test('the coefficient that the fast solver uses is the law', () => {
      if (law.quarticCoefficient === null) expect(law.at(280) - law.at(270)).toBeCloseTo(10 * law.slopeAt(275), 10);
      else expect(relativeError(law.quarticCoefficient * 288 ** 4, law.at(288))).toBeLessThan(1e-15);
    });
  });
}

// σ·300⁴ = 459.300327939 W m⁻² (exact product of the CODATA digits).
test('Stefan–Boltzmann law', () => {
  expect(greyBody(1).at(300)).toBeCloseTo(459.300327939, 9);
  expect(greyBody(0.5).at(300)).toBeCloseTo(459.300327939 / 2, 9);
});

/**
 * Grey greenhouse in the Eddington approximation, T_s/T_e = (1 + 3τ/4)^¼: calculated, all digits. A single opaque layer has
 * 2^¼, as τ = 4/3: 303.248 K over 255 K (every textbook; calculated).
 */
describe('grey greenhouse', () => {
  const ratio = (opticalDepth: number) => greyAtmosphere(opticalDepth).inverse(stefanBoltzmann);

  test('surface over emission temperature', () => {
    // biome-ignore format: a table
    const reference = [[0, 1], [0.5, 1.0828683853339969], [1, 1.150163316895603], [2, 1.2574334296829355], [5, 1.4762958618685946], [100, 2.9525917237371893]] as const;
    for (const [opticalDepth, expected] of reference)
      expect(relativeError(ratio(opticalDepth), expected)).toBeLessThan(1e-15);
    expect(255 * ratio(4 / 3)).toBeCloseTo(303.248, 3);
  });

  // Surface temperatures of the fact sheets (from memory): Earth 288 K, Venus 735 K, over 255 and 232 K: τ calculated, 8 digits.
  test('the optical depth that Earth and Venus would need', () => {
    expect(255 * ratio(0.8361082778)).toBeCloseTo(288, 6);
    expect(232 * ratio(132.9852657)).toBeCloseTo(735, 5);
  });

  test('no atmosphere is a black body', () => expect(greyAtmosphere(0).at(280)).toBe(greyBody(1).at(280)));
});

/** Published sets A, B (W m⁻², W m⁻² K⁻¹; from memory): North (1975), North, Cahalan & Coakley (1981), Budyko form. A is what is emitted at 0 °C. */
describe('linear law', () => {
  for (const [a, b] of [
    [201.4, 1.45],
    [203.3, 2.09],
    [202, 1.9],
  ] as const) {
    test(`${a} + ${b} T`, () => {
      const law = linearEmission({ a, b });
      expect(law.at(zeroCelsius)).toBe(a);
      expect(law.at(zeroCelsius + 15)).toBeCloseTo(a + 15 * b, 10);
      expect(law.quarticCoefficient).toBeNull();
      expect(law.validity!.from).toBeCloseTo(213.15, 10);
      expect(law.validity!.to).toBeCloseTo(323.15, 10);
    });
  }

  // North, Cahalan & Coakley (1981) set without ice, Q = 334.4 W m⁻², co-albedo 0.681: global mean (Qa − A)/B (calculated, 14.77 °C less the P2 part of the co-albedo).
  test('global mean without ice', () => {
    expect(linearEmission({ a: 203.3, b: 2.09 }).inverse(334.4 * 0.681) - zeroCelsius).toBeCloseTo(11.6875, 3);
  });
});

test('errors', () => {
  for (const bad of [0, 1.01, -1, Number.NaN]) expect(() => greyBody(bad)).toThrow('planet.emissivity');
  for (const bad of [-0.1, Number.NaN, Number.POSITIVE_INFINITY]) expect(() => greyAtmosphere(bad)).toThrow(SimError);
  for (const bad of [0, -2, Number.NaN]) {
    expect(() => linearEmission({ a: bad, b: 2 })).toThrow(SimError);
    expect(() => linearEmission({ a: 200, b: bad })).toThrow(SimError);
  }
  expect(() => linearEmission({ a: 300, b: 1 })).toThrow('at absolute zero');
});

test('below 0 K a grey law falls on: a trial that strays there is drawn back', () => {
  const law = greyBody(1);
  expect(law.at(-50)).toBe(-law.at(50));
  expect(law.slopeAt(-50)).toBe(law.slopeAt(50));
});
