/** Temperature as a Curve over the balanced anomaly, and what its solver knows of it. */
import type { Curve } from '../../solve/curve.ts';

export interface Trajectory {
  /** K over s; a periodic state spans [0, 2π], a forward run starts at its own s. */
  readonly curve: Curve;
  /** Upper bound of the relative error of temperature. */
  readonly errorEstimate: number;
  readonly converged: boolean;
  /** ln of the orbit map's multiplier, and with the albedo frozen; null for a forward run. */
  readonly logMultiplier: number | null;
  readonly frozenLogMultiplier: number | null;
  /** Newton sweeps or steps. */
  readonly effort: number;
}
