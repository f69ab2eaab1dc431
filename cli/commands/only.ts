/** `--only CASE`: the cases that were asked for, or the nearest name to one that there is not. */
import { SimError } from '../../sim/error.ts';
import { nearest } from '../../sim/quantity/nearest.ts';
import type { ScenarioFile } from '../scenarioFile.ts';

/** In the order of each file; all of them when `only` is empty. Errors: SimError for a name in no file, a file with none. */
export function onlyCases(items: readonly ScenarioFile[], only: readonly string[]): readonly ScenarioFile[] {
  if (only.length === 0) return items;
  const known = items.flatMap(({ scenario }) => scenario.cases.map(({ name }) => name));
  const missing = only.find((name) => !known.includes(name));
  if (missing !== undefined) throw new SimError('--only', `there is no case \`${missing}\``, advice(missing, known));
  return items.map((item) => {
    const cases = item.scenario.cases.filter(({ name }) => only.includes(name));
    if (cases.length === 0)
      throw new SimError(item.file, 'it has none of the cases that --only names', 'Leave this file out');
    return { ...item, scenario: { ...item.scenario, cases } };
  });
}

function advice(missing: string, known: readonly string[]): string {
  const near = nearest(missing, known);
  return near === null ? `The cases are: ${known.join(', ')}` : `Did you mean \`${near}\``;
}
