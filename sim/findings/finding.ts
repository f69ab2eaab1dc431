/** One number that people quote. */
export interface Finding {
  /** The contract's name, e.g. `temperatureMax`. */
  readonly name: string;
  /** SI; null where the quantity is not defined, with the reason. Never NaN. */
  readonly value: number | null;
  /** `K`, `s`, `W/m2`, `K/s` or `1`. */
  readonly unit: string;
  /** Plain words for tables, axes and the report, e.g. `Maximum temperature`. */
  readonly label: string;
  /** Why the value is null. */
  readonly reason?: string;
  /** Numerical error bound, ± in `unit`, where one is known. */
  readonly plusMinus?: number;
}
