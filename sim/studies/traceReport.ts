/** What `trace` hands to files, terminal and page: plain data, the input in the unit in which it was typed. */
import type { Origin } from '../origin.ts';
import type { Kelvin } from '../si.ts';
import type { TraceBranch } from './trace.ts';

export interface TraceReportPoint {
  /** The input, in the user's unit. */
  readonly value: number;
  readonly stable: boolean;
  /** ln of the dominant multiplier of the year map: below 0 where a disturbance dies out. */
  readonly logMultiplier: number;
  readonly fold: boolean;
  readonly temperatureMean: Kelvin;
  readonly temperatureMax: Kelvin;
  readonly temperatureMin: Kelvin;
  readonly iceFraction: number;
}

export interface TraceReportBranch {
  readonly ended: TraceBranch['ended'];
  readonly points: readonly TraceReportPoint[];
}

export interface TraceReportCase {
  readonly name: string;
  readonly model: string;
  readonly branches: readonly TraceReportBranch[];
  /** In the user's unit, ascending. */
  readonly folds: readonly number[];
  readonly warnings: readonly string[];
}

export interface TraceReport extends Origin {
  readonly along: {
    readonly key: string;
    readonly label: string;
    readonly unit: string;
    readonly from: number;
    readonly to: number;
    readonly log: boolean;
  };
  readonly cases: readonly TraceReportCase[];
}
