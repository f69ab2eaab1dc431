import { describe, expect, test } from 'vitest';
import { constantAlbedo } from '../../../sim/surface/albedo/constant.ts';
import { greyBody } from '../../../sim/surface/emission/greyBody.ts';
import { consistentRows, contradictoryRows } from '../../published/factSheets.ts';

/** Whole-sphere steady temperature of a black body that reflects as our own albedo part says. */
function blackBody(irradiance: number, bondAlbedo: number, internalHeat = 0): number {
  const absorbed = (irradiance / 4) * (1 - constantAlbedo(bondAlbedo).at(250));
  return greyBody(1).inverse(absorbed + internalHeat);
}

/** Listed to 0.1 K, and the last digit of the listed albedo is worth as much again: 0.1 K in all. */
const tolerance = 0.1;

describe('fact sheets: (S(1 − A)/4σ)^¼', () => {
  for (const { body, irradiance, bondAlbedo, listed, computed } of consistentRows) {
    test(body, () => {
      const temperature = blackBody(irradiance, bondAlbedo);
      expect(Math.abs(temperature - computed)).toBeLessThan(1e-4); // 4 decimals by other software
      expect(Math.abs(temperature - listed)).toBeLessThan(tolerance);
    });
  }
});

describe('rows that contradict themselves', () => {
  for (const { body, irradiance, bondAlbedo, listed, excess } of contradictoryRows) {
    test(`${body}: ${excess} K beyond what is listed`, () => {
      const temperature = blackBody(irradiance, bondAlbedo);
      expect(Math.abs(temperature - listed)).toBeGreaterThan(10 * tolerance);
      expect(temperature - listed).toBeCloseTo(excess, 2);
    });
  }

  // The albedo that Pluto's 37.5 K would need is about 0.49 (calculated); an older sheet gave 0.4 to 0.6 (seen).
  test('Pluto: 37.5 K belongs to an albedo of 0.49', () => {
    expect(blackBody(0.873, 0.49)).toBeCloseTo(37.4, 1);
    expect(blackBody(0.873, 0.4)).toBeGreaterThan(37.5);
    expect(blackBody(0.873, 0.6)).toBeLessThan(37.5);
  });
});

/**
 * Jupiter: Li et al. (2018) Nature Communications 9, 3709 (seen): Bond albedo 0.503 and internal heat 7.485 W m⁻²; the earlier
 * pair 0.343 and 5.444 W m⁻². Both sum to the same emission temperature: 124.74 and 124.67 K (calculated, 2 decimals).
 */
test('internal heat: Jupiter before and after 2018', () => {
  expect(blackBody(50.26, 0.503, 7.485)).toBeCloseTo(124.74, 2);
  expect(blackBody(50.26, 0.343, 5.444)).toBeCloseTo(124.67, 2);
});
