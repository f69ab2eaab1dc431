/** What a model exports for `trace`, which follows its climates as one input changes. */
import type { Kelvin } from '../si.ts';
import type { Family } from '../solve/continuation.ts';
import type { World } from '../world.ts';

export interface TraceModel {
  /** Stable states at one world, warm first, as the family's unknowns. */
  startsAt(world: World, tolerance: number): readonly Float64Array[];
  family(worldAt: (value: number) => World, range: TraceRange): TraceFamily;
}

/** Of the input, SI. */
export interface TraceRange {
  readonly from: number;
  readonly to: number;
}

export interface TraceFamily extends Family {
  /** The year of a state at an input; null where it cannot be marched. */
  summarise(value: number, y: Float64Array): TraceNumbers | null;
}

/** Year means of one state. */
export interface TraceNumbers {
  /** Area and time mean, K. */
  readonly temperatureMean: Kelvin;
  /** Of the area mean through the year. */
  readonly temperatureMax: Kelvin;
  readonly temperatureMin: Kelvin;
  /** Area and time under ice; of one temperature, how far along the albedo ramp. */
  readonly iceFraction: number;
}
