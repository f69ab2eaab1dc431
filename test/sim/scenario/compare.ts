/** Worlds compared to the last bit: numbers as they are, laws at probe temperatures. */
import { expect } from 'vitest';
import type { Law, World } from '../../../sim/world.ts';

const probes = [40, 100, 200, 257, 258, 260, 266, 270, 273, 290, 400, 900, 2500];

/** A World as plain data; -0 and NaN stay themselves. */
export function asData({ star, orbit, surface, globe = null }: World) {
  const { albedo, emission, ...rest } = surface;
  return {
    star,
    orbit,
    globe,
    rest,
    albedo: [albedo.warm, albedo.ice, albedo.ramp, albedo.breaks, law(albedo), albedo.pieces.map(law)],
    emission: [
      emission.quarticCoefficient,
      emission.validity,
      law(emission),
      probes.map((flux) => emission.inverse(flux)),
    ],
  };
}

function law(one: Law): number[] {
  return probes.flatMap((temperature) => [one.at(temperature), one.slopeAt(temperature)]);
}

export function expectSameWorld(a: World, b: World): void {
  expect(asData(a)).toStrictEqual(asData(b));
}
