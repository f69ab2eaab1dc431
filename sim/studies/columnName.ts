/** Names of the columns of a table in which several cases stand side by side. */
import { SimError } from '../error.ts';
import type { FindingColumn } from '../findings/finding.ts';

/** `case: name`; with a single case the name alone. */
export function columnName(cases: number, caseName: string, name: string): string {
  return cases === 1 ? name : `${caseName}: ${name}`;
}

/** Findings case after case. Errors: SimError where two of them would have the same name, as a case or a window has a colon in its own. */
export function findingColumns(
  cases: readonly { readonly name: string; readonly findings: readonly FindingColumn[] }[],
): FindingColumn[] {
  const columns = cases.flatMap(({ name, findings }) =>
    findings.map((finding) => ({ ...finding, name: columnName(cases.length, name, finding.name) })),
  );
  const seen = new Set<string>();
  for (const { name } of columns) {
    if (seen.has(name)) {
      const what = `two findings would both stand in column \`${name}\``;
      throw new SimError('cases', what, 'Give the case or the window a name without a colon');
    }
    seen.add(name);
  }
  return columns;
}
