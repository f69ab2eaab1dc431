/** What reading a scenario file yields. Plain data but for the closures inside each World. */
import type { Distribution } from '../quantity/types.ts';
import type { SolveOptions, Window, World } from '../world.ts';
import type { Posterior } from './posterior.ts';
import type { Branch } from './tree.ts';

/** One input as this case uses it. */
export interface CaseInput {
  /** Dotted key, `orbit.eccentricity`. List items by index: `planet.heatStore.0.mixedLayer`. */
  readonly key: string;
  /** SI; null for words (`rotationPeriod: synchronous`). */
  readonly value: number | null;
  readonly unit: string;
  /** Set for dates, whose `value` counts from there. */
  readonly since?: 'J2000.0 TDB';
  /** The unit that was typed, `Msun`; `1` for a pure number, `s` for a date, empty for words. */
  readonly writtenUnit: string;
  /** The user's own text, or the default's. */
  readonly text: string;
  readonly distribution: Distribution;
  readonly isDefault: boolean;
  /** False when this case's model leaves it unused. */
  readonly used: boolean;
  readonly label: string;
}

/** A value that follows from the inputs: shown by `check`, the report and the summary. */
export interface Derived {
  readonly key: string;
  readonly value: number;
  readonly unit: string;
  readonly label: string;
}

export interface ScenarioCase {
  readonly name: string;
  readonly model: string;
  readonly world: World;
  readonly options: SolveOptions;
  readonly windows: readonly Window[];
  readonly inputs: readonly CaseInput[];
  readonly derived: readonly Derived[];
  readonly warnings: readonly string[];
  /** What only `check` tells: harmless, but worth knowing. */
  readonly remarks: readonly string[];
}

export interface Scenario {
  readonly title: string | null;
  readonly notes: string | null;
  readonly file: string;
  /** Samples that `spread` draws from; null without. */
  readonly posterior: Posterior | null;
  readonly cases: readonly ScenarioCase[];
  /** The file as a tree: what changes its numbers starts from here. */
  readonly tree: Branch;
  /** `scenario.yaml` of the contract: every default shown, the user's own number text kept; running it again gives the same numbers. */
  readonly asUnderstood: string;
  /** The same with another path to the file of samples, for a file that stands elsewhere. */
  understoodWith(samples: string): string;
}

/** One thing wrong with a file. Printed `FILE:LINE:COL: key: what. mend.` */
export interface Problem {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly key: string;
  readonly what: string;
  readonly mend: string;
}
