/** What page and worker say to each other. Plain data. */
import type { CaseResult } from '../../../sim/run.ts';
import type { Dial } from '../../../sim/scenario/dial.ts';
import type { EditedCase } from '../../../sim/scenario/edited.ts';

export interface CaseDials {
  readonly name: string;
  readonly dials: readonly Dial[];
}

export type Request =
  /** First of all: the scenario, as `toPortableTree` gives it. */
  | { readonly kind: 'open'; readonly tree: unknown; readonly file: string }
  | { readonly kind: 'run' | 'write'; readonly id: number; readonly cases: readonly EditedCase[] };

export type Answer =
  | { readonly kind: 'opened'; readonly cases: readonly CaseDials[] }
  | { readonly kind: 'ran'; readonly id: number; readonly cases: readonly CaseResult[]; readonly seconds: number }
  | { readonly kind: 'written'; readonly id: number; readonly text: string }
  /** `where` is a key; null where it is our own fault. */
  | { readonly kind: 'failed'; readonly id: number; readonly where: string | null; readonly message: string };
