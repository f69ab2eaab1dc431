/** What a zonal balance on a year's mesh looks like to those who march it. */
import type { Banded } from '../../solve/banded.ts';
import type { StageSystem } from '../../solve/rodas4.ts';
import type { YearMesh } from './mesh.ts';
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
  /** What transport alone contributes to −∂f_i/∂y_i at these temperatures, s⁻¹: stiff on fine bands, and no memory of a store. */
  transportRatesInto(y: Float64Array, into: Float64Array): void;
}
