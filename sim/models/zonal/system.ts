/** The zonal balance as a stiff system on a year's mesh. Unknowns are band temperatures; with land, sea and land by turns. */
import { landAndSea } from './landAndSea.ts';
import type { YearMesh } from './mesh.ts';
import { oneSurface } from './oneSurface.ts';
import type { ZonalPhysics } from './physics.ts';
import type { ZonalSystem } from './systemShape.ts';

/** Binds physics to a mesh; owns scratch buffers. */
export function zonalSystem(physics: ZonalPhysics, mesh: YearMesh): ZonalSystem {
  return physics.land === null ? oneSurface(physics, mesh) : landAndSea(physics, physics.land, mesh);
}
