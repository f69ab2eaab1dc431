/** A step of the method, and when it is told. */
export interface Step {
  readonly words: string;
  /** Plain mathematics: `x_{name}` is a subscript, `x^{name}` a superscript. */
  readonly equation?: string;
  readonly source?: string;
}

/** What decides whether a step was used. */
export interface Used {
  /** Does some case have this input, or one below it? Places in a list do not count: `heatStore.0.ground` is `heatStore.ground`. */
  has(key: string): boolean;
  /** Does some case write just this there? */
  says(key: string, text: string): boolean;
  /** Some case tells latitudes apart; some case has one temperature for all. */
  readonly byLatitude: boolean;
  readonly asOne: boolean;
  readonly periodic: boolean;
  readonly forward: boolean;
  readonly habitableLimits: boolean;
  /** The page shows the accounts. */
  readonly accounts: boolean;
}

export interface Rule {
  readonly when: (used: Used) => boolean;
  readonly step: Step;
}
