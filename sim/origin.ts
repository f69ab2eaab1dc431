/** What made a result, from what: the same in a run and in a trace, in their files and on their pages. */
export interface Origin {
  readonly program: { readonly name: 'perilag'; readonly version: string };
  readonly scenario: {
    readonly title: string | null;
    readonly notes: string | null;
    readonly file: string;
    readonly sha256: string;
  };
}

/** What only the caller knows. */
export interface Identity {
  readonly sha256: string;
  readonly version: string;
}

export function originOf(
  { title, notes, file }: Omit<Origin['scenario'], 'sha256'>,
  { sha256, version }: Identity,
): Origin {
  return { program: { name: 'perilag', version }, scenario: { title, notes, file, sha256 } };
}
