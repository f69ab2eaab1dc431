/** What a model exports for `trace`, which follows its climates as one input changes. */
import type { Kelvin } from '../si.ts';
import type { BranchPoint, Family } from '../solve/continuation.ts';
import type { World } from '../world.ts';

export interface TraceModel {
  /** Stable states at one world, warm first, as the family's unknowns. */
  startsAt(world: World, tolerance: number): readonly Float64Array[];
  family(worldAt: (value: number) => World, pScale: number, reference: number): Family;
  summarise(world: World, point: BranchPoint): TraceNumbers;
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
