/** `scenario.yaml`: the scenario as understood, so that running it again gives the same numbers. */
import type { Scenario } from '../../sim/scenario/types.ts';

/** `samples`: the path to the file of samples from where the text will stand; left out, it is as typed. */
export function scenarioYamlText(scenario: Scenario, samples: string | null = null): string {
  const text = samples === null ? scenario.asUnderstood : scenario.understoodWith(samples);
  return text.endsWith('\n') ? text : `${text}\n`;
}
