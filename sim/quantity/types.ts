/** What the border hands inward: a number with its unit as written, its SI centre and its spread. Plain data. */

/** SI; `centre` rules as in the scenario contract. */
export type Distribution =
  | { readonly form: 'exact' }
  | { readonly form: 'normal'; readonly sigma: number }
  /** Half the probability on each side, so that 16/50/84 % are as published. */
  | { readonly form: 'splitNormal'; readonly up: number; readonly down: number }
  | { readonly form: 'uniform'; readonly low: number; readonly high: number }
  | { readonly form: 'logUniform'; readonly low: number; readonly high: number }
  /** Half-normal on [0, ∞) whose `confidence` quantile is `limit`. */
  | { readonly form: 'upperLimit'; readonly limit: number; readonly confidence: number }
  /** Directions equally likely: p(x) ∝ sin x on [0, π]. */
  | { readonly form: 'isotropic' };

export interface Quantity {
  /** As the user typed it. */
  readonly text: string;
  /** Unit symbol as the user wrote it, normalised for printing (`W/m2`); `1` for a pure number. */
  readonly unit: string;
  /** SI centre: the value as written; a range's midpoint (geometric for log); a limit's median. */
  readonly value: number;
  readonly distribution: Distribution;
}
