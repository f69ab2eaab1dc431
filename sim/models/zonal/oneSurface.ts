/** One temperature a band: tridiagonal. */
import type { StageSystem } from '../../solve/rodas4.ts';
import { addMeridionalConvergence } from '../../transport/diffusion.ts';
import type { YearMesh } from './mesh.ts';
import { bandAlbedo, seaHeatCapacity, type ZonalPhysics } from './physics.ts';
import type { ZonalSystem } from './systemShape.ts';

export function oneSurface(physics: ZonalPhysics, mesh: YearMesh): ZonalSystem {
  const { bands, conductance, warm, warmAlbedo, iceAlbedo, world } = physics;
  const { emission, internalHeat } = world.surface;
  const size = bands.count;
  const row = () => new Float64Array(size);
  const [share, below, here, above, flux] = [row(), row(), row(), row(), row()];
  const varyingCapacity = physics.heatCapacity - physics.frozenHeatCapacity;

  function fluxInto(offset: number, y: Float64Array): void {
    for (let i = 0; i < size; i++) {
      const albedo = iceAlbedo + (warmAlbedo[i] - iceAlbedo) * share[i];
      flux[i] = mesh.insolation[offset + i] * (1 - albedo) + internalHeat - emission.at(y[i]);
    }
    addMeridionalConvergence(y, conductance, flux);
  }

  function jacobian(frozen: boolean): StageSystem['jacobianInto'] {
    return (step, y, matrix) => {
      const [lower, diagonal, upper] = matrix.diagonals;
      const offset = step * 5 * size;
      warm.slopesInto(y, share, below, here, above);
      if (varyingCapacity !== 0) fluxInto(offset, y);
      for (let i = 0; i < size; i++) {
        const fromBelow = i > 0 ? conductance[i - 1] : 0;
        const fromAbove = i < size - 1 ? conductance[i] : 0;
        const capacity = seaHeatCapacity(physics, y[i]);
        // Less ice absorbs more; an open sea stores more.
        const response = frozen ? 0 : mesh.insolation[offset + i] * (iceAlbedo - warmAlbedo[i]);
        const stores =
          varyingCapacity === 0 ? 0 : (flux[i] * varyingCapacity * physics.rampWeight.slopeAt(y[i])) / capacity;
        lower[i] = (fromBelow + response * below[i]) / capacity;
        upper[i] = (fromAbove + response * above[i]) / capacity;
        diagonal[i] = (-fromBelow - fromAbove - emission.slopeAt(y[i]) - stores + response * here[i]) / capacity;
      }
    };
  }

  return {
    size,
    width: 1,
    mesh,
    physics,
    rateInto(step, stage, y, rate) {
      warm.into(y, share);
      fluxInto((step * 5 + Math.min(stage, 4)) * size, y);
      for (let i = 0; i < size; i++) rate[i] = flux[i] / seaHeatCapacity(physics, y[i]);
    },
    jacobianInto: jacobian(false),
    frozenJacobianInto: jacobian(true),
    driftInto(step, y, drift) {
      warm.into(y, share);
      const offset = step * size;
      for (let i = 0; i < size; i++) {
        const absorbed = mesh.insolationDrift[offset + i] * (1 - bandAlbedo(physics, i, share[i]));
        drift[i] = absorbed / seaHeatCapacity(physics, y[i]);
      }
    },
  };
}
