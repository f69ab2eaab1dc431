/** What a zonal balance on a year's mesh looks like to those who march it. */
import type { StageSystem } from '../../solve/rodas4.ts';
import type { YearMesh } from './mesh.ts';
import type { ZonalPhysics } from './physics.ts';

export interface ZonalSystem extends StageSystem {
  readonly mesh: YearMesh;
  readonly physics: ZonalPhysics;
  /** ∂f/∂y as `jacobianInto`, with the albedo's response to temperature left out. */
  readonly frozenJacobianInto: StageSystem['jacobianInto'];
}
