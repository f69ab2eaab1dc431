import { expect, test } from 'vitest';
import { SimError } from '../../../../sim/error.ts';
import { planGrid } from '../../../../sim/studies/grid/plan.ts';

// Both ends of the range are no bound orbit (0.5² + 0.95² > 1), its middle is.
const text = `star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eCosOmega: 0.1, eSinOmega: 0.5 }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m } }
`;
const along = 'orbit.eCosOmega=-0.95 to 0.95';

function plan(steps: number) {
  return planGrid({ text, file: 'one.yaml', only: null, alongs: [along], hold: null, steps, of: null });
}

test('a case that is sound between the nodes alone is refused in words of its own', () => {
  expect(() => plan(2)).toThrow(SimError);
  expect(() => plan(2)).toThrow(
    /^--along: case `.*` is sound at none of the 2 nodes, though between them; at the first: orbit\.eCosOmega/,
  );
  expect(plan(3).count).toBe(3);
  expect(plan(4).count).toBe(4); // at ±0.32, too
});
