/** What a spread was asked for: kept beside its rows, so that `gather` can go on. */
export interface SpreadContext {
  readonly command: 'spread';
  readonly file: string;
  readonly text: string;
  readonly sha256: string;
  readonly version: string;
  readonly samplesSha256: string | null;
  readonly only: readonly string[] | null;
  readonly draws: number;
  readonly seed: number;
  readonly sampling: 'sobol' | 'random';
  readonly indices: boolean;
}
