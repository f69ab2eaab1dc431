import { describe, expect, test } from 'vitest';
import { latitudePlace, latitudeTicks, poleToPole } from '../../../viewer/figures/latitudeAxis.ts';

const plain = (labels: readonly string[]): string[] => labels.map((label) => label.replaceAll('\u00a0', ' '));

describe('latitude axis', () => {
  test('equal lengths are equal areas: half of each hemisphere lies within 30° of the equator', () => {
    expect(latitudePlace(30)).toBeCloseTo(0.5, 12);
    expect(latitudePlace(-90)).toBe(-1);
  });

  test('ticks stand at the sine of what they say, the equator and the poles among them', () => {
    const { tickvals, ticktext } = latitudeTicks(poleToPole, 320, 15);
    expect(plain(ticktext)).toEqual(['90° S', '60° S', '30° S', '0°', '30° N', '60° N', '90° N']);
    expect(tickvals[1]).toBeCloseTo(-Math.sqrt(3) / 2, 12);
  });

  test('where there is little room the poles go before 60°', () => {
    expect(plain(latitudeTicks(poleToPole, 280, 36).ticktext)).toEqual(['90° S', '30° S', '0°', '30° N', '90° N']);
  });

  test('a part of the globe gets finer ones, and none outside', () => {
    const { tickvals, ticktext } = latitudeTicks([0.7, 1], 320, 15);
    expect(tickvals.every((place) => place >= 0.7 - 1e-9 && place <= 1 + 1e-9)).toBe(true);
    expect(plain(ticktext)).toEqual(expect.arrayContaining(['45° N', '60° N', '75° N', '90° N']));
  });
});
