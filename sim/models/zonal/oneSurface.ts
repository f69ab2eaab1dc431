/** One temperature a band: tridiagonal. */
import { addMeridionalConvergence } from '../../transport/diffusion.ts';
import type { YearMesh } from './mesh.ts';
import { seaHeatCapacity, type ZonalPhysics } from './physics.ts';
import type { ZonalSystem } from './systemShape.ts';

export function oneSurface(physics: ZonalPhysics, mesh: YearMesh): ZonalSystem {
  const { bands, conductance, warm, world } = physics;
  const { emission, internalHeat } = world.surface;
  const size = bands.count;
  const row = () => new Float64Array(size);
  const [share, below, here, above, flux, inverseCapacity] = [row(), row(), row(), row(), row(), row()];
  const varyingCapacity = physics.heatCapacity - physics.frozenHeatCapacity;
  inverseCapacity.fill(1 / physics.heatCapacity);
  const iceAbsorbs = 1 - physics.iceAlbedo;
  /** What a band absorbs more without ice than with it, as a share. */
  const gain = physics.warmAlbedo.map((albedo) => physics.iceAlbedo - albedo);

  /** From `share`. */
  function fluxInto(offset: number, y: Float64Array): void {
    const { insolation } = mesh;
    for (let i = 0; i < size; i++) {
      flux[i] = insolation[offset + i] * (iceAbsorbs + gain[i] * share[i]) + internalHeat - emission.at(y[i]);
    }
    addMeridionalConvergence(y, conductance, flux);
    if (varyingCapacity !== 0) for (let i = 0; i < size; i++) inverseCapacity[i] = 1 / seaHeatCapacity(physics, y[i]);
  }

  /** From `share`, `flux` and the slopes of `share`. */
  function jacobian(step: number, y: Float64Array, frozen: boolean, [lower, diagonal, upper]: readonly Float64Array[]) {
    const offset = step * 5 * size;
    const { insolation } = mesh;
    for (let i = 0; i < size; i++) {
      const fromBelow = i > 0 ? conductance[i - 1] : 0;
      const fromAbove = i < size - 1 ? conductance[i] : 0;
      const inverse = inverseCapacity[i];
      // Less ice absorbs more; an open sea stores more.
      const response = frozen ? 0 : insolation[offset + i] * gain[i];
      const stores = varyingCapacity === 0 ? 0 : flux[i] * varyingCapacity * physics.rampWeight.slopeAt(y[i]) * inverse;
      lower[i] = (fromBelow + response * below[i]) * inverse;
      upper[i] = (fromAbove + response * above[i]) * inverse;
      diagonal[i] = (response * here[i] - fromBelow - fromAbove - emission.slopeAt(y[i]) - stores) * inverse;
    }
  }

  function rate(f: Float64Array): void {
    for (let i = 0; i < size; i++) f[i] = flux[i] * inverseCapacity[i];
  }

  /** From `share`. */
  function drift(step: number, into: Float64Array): void {
    const offset = step * size;
    const { insolationDrift } = mesh;
    for (let i = 0; i < size; i++) {
      into[i] = insolationDrift[offset + i] * (iceAbsorbs + gain[i] * share[i]) * inverseCapacity[i];
    }
  }

  function jacobianInto(frozen: boolean): ZonalSystem['jacobianInto'] {
    return (step, y, { diagonals }) => {
      warm.slopesInto(y, share, below, here, above);
      if (varyingCapacity !== 0) fluxInto(step * 5 * size, y);
      jacobian(step, y, frozen, diagonals);
    };
  }

  return {
    size,
    width: 1,
    mesh,
    physics,
    rateInto(step, stage, y, f) {
      warm.into(y, share);
      fluxInto((step * 5 + Math.min(stage, 4)) * size, y);
      rate(f);
    },
    lineariseInto(step, y, f, matrix, driftOfStep) {
      warm.slopesInto(y, share, below, here, above);
      fluxInto(step * 5 * size, y);
      rate(f);
      jacobian(step, y, false, matrix.diagonals);
      drift(step, driftOfStep);
    },
    jacobianInto: jacobianInto(false),
    frozenJacobianInto: jacobianInto(true),
    transportRatesInto(y, into) {
      for (let i = 0; i < size; i++) {
        into[i] = ((conductance[i - 1] ?? 0) + (conductance[i] ?? 0)) / seaHeatCapacity(physics, y[i]);
      }
    },
    driftInto(step, y, into) {
      warm.into(y, share);
      if (varyingCapacity !== 0) fluxInto(step * 5 * size, y);
      drift(step, into);
    },
  };
}
