/** What a number that people quote is called, and what it is measured in. */
export interface FindingColumn {
  /** The contract's name, e.g. `temperatureMax`. */
  readonly name: string;
  /** `K`, `s`, `W/m2`, `K/s` or `1`. */
  readonly unit: string;
  /** Plain words for tables, axes and the report, e.g. `Maximum temperature`. */
  readonly label: string;
}

/** One number that people quote. */
export interface Finding extends FindingColumn {
  /** SI; null where the quantity is not defined, with the reason. Never NaN. */
  readonly value: number | null;
  /** Why the value is null. */
  readonly reason?: string;
  /** Numerical error bound, ± in `unit`, where one is known. */
  readonly plusMinus?: number;
}
