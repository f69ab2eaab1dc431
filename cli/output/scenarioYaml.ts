/** `scenario.yaml`: the scenario as understood, so that running it again gives the same numbers. */
import type { Scenario } from '../../sim/scenario/types.ts';

export function scenarioYamlText(scenario: Scenario): string {
  return scenario.asUnderstood.endsWith('\n') ? scenario.asUnderstood : `${scenario.asUnderstood}\n`;
}
