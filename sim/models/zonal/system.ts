/** The zonal balance as a stiff system on a year's mesh. Unknowns are band temperatures; with land, sea and land by turns. */
import type { Banded } from '../../solve/banded.ts';
import type { StageSystem } from '../../solve/rodas4.ts';
import { landAndSea } from './landAndSea.ts';
import type { YearMesh } from './mesh.ts';
import { oneSurface } from './oneSurface.ts';
import type { ZonalPhysics } from './physics.ts';

export interface ZonalSystem extends StageSystem {
  readonly mesh: YearMesh;
  readonly physics: ZonalPhysics;
  /** ∂f/∂y at the start of step `step`. */
  jacobianInto(step: number, y: Float64Array, matrix: Banded): void;
  /** The same, with the albedo's response to temperature left out. */
  frozenJacobianInto(step: number, y: Float64Array, matrix: Banded): void;
  /** ∂f/∂t at the start of step `step`. */
  driftInto(step: number, y: Float64Array, drift: Float64Array): void;
}

/** Binds physics to a mesh; owns scratch buffers. */
export function zonalSystem(physics: ZonalPhysics, mesh: YearMesh): ZonalSystem {
  return physics.land === null ? oneSurface(physics, mesh) : landAndSea(physics, physics.land, mesh);
}
