/** Runs a scenario: every case through its model, then the two accounts. Pure; files and clocks stay with the caller. */
import type { Finding } from './findings/finding.ts';
import { orbitMeanByQuadrature, orbitMeanClosedForm } from './findings/orbitMean.ts';
import { textbookTemperature } from './findings/world.ts';
import { models } from './models/index.ts';
import type { State } from './models/model.ts';
import { type Identity, type Origin, originOf } from './origin.ts';
import { spreadNotes } from './scenario/spreads.ts';
import type { CaseInput, Derived, Scenario, ScenarioCase } from './scenario/types.ts';
import { type PlainPlace, plainPlace } from './studies/grid/storeNumber.ts';
import type { Window, World } from './world.ts';

export interface OrbitMeanCheck {
  /** W m⁻², by a quadrature that the solver did not use. */
  readonly computed: number;
  /** L / (4πa²√(1−e²)). */
  readonly closedForm: number;
  readonly relativeDifference: number;
  readonly passed: boolean;
}

export interface EnergyCheck {
  readonly relativeDifference: number;
  readonly passed: boolean;
}

export interface CaseResult {
  readonly name: string;
  readonly model: string;
  readonly inputs: readonly CaseInput[];
  readonly derived: readonly Derived[];
  readonly windows: readonly Window[];
  /** `tolerance` of this case and the limit both accounts must keep: max(1e-9, 10 × tolerance). */
  readonly tolerance: number;
  readonly accountLimit: number;
  /** Those of the first state: the warm one, unless its start ended in no climate. */
  readonly findings: readonly Finding[];
  /** Warm first; each with its Dataset. */
  readonly states: readonly State[];
  readonly checks: { readonly orbitMeanInstellation: OrbitMeanCheck; readonly energyBalance: EnergyCheck };
  /** Textbook steady values for absorbing fractions ¼, ½, ⅔, 1 (K): [f L(1−A)/(4πσa²)]^¼. */
  readonly steadyByFraction: readonly { readonly fraction: number; readonly temperature: number }[];
  /** Where the case stands among all plain lumped worlds. */
  readonly plain: PlainPlace;
  readonly warnings: readonly string[];
  /** Both accounts kept, no state failed and every one within the tolerance; the command line exits 3 otherwise. */
  readonly passed: boolean;
}

export interface RunResult extends Origin {
  readonly cases: readonly CaseResult[];
  /** Of the run as a whole: that spreads are not propagated, and which centres are used instead. */
  readonly notes: readonly string[];
}

/** Runs every case, in order. `identity` is what only the caller knows. */
export function runScenario(scenario: Scenario, identity: Identity): RunResult {
  return {
    ...originOf(scenario, identity),
    cases: scenario.cases.map(runCase),
    notes: spreadNotes(scenario),
  };
}

/** One case through its model, with its two accounts. */
export function runCase(scenarioCase: ScenarioCase): CaseResult {
  const { name, model, world, options, inputs, derived, windows } = scenarioCase;
  const solution = models[model].solve(world, options, windows);
  const accountLimit = Math.max(1e-9, 10 * options.tolerance);
  const orbitMeanInstellation = checkOrbitMean(world, accountLimit);
  const relativeDifference = Math.max(...solution.states.map((state) => state.energyBalance.relativeDifference));
  const energyBalance = { relativeDifference, passed: relativeDifference <= accountLimit };
  const { failures = [] } = solution;
  const unconverged = solution.states.filter((state) => !state.converged);
  return {
    name,
    model,
    inputs,
    derived,
    windows,
    tolerance: options.tolerance,
    accountLimit,
    findings: solution.states[0].findings,
    states: solution.states,
    checks: { orbitMeanInstellation, energyBalance },
    steadyByFraction: [1 / 4, 1 / 2, 2 / 3, 1].map((fraction) => {
      return { fraction, temperature: textbookTemperature(world, fraction) };
    }),
    plain: plainPlace(model, world, options),
    warnings: [
      ...scenarioCase.warnings,
      ...solution.warnings,
      ...failures,
      ...unconverged.map((state) => missed(state, options.tolerance)),
    ],
    passed: orbitMeanInstellation.passed && energyBalance.passed && unconverged.length === 0 && failures.length === 0,
  };
}

function checkOrbitMean(world: World, limit: number): OrbitMeanCheck {
  const computed = orbitMeanByQuadrature(world);
  const closedForm = orbitMeanClosedForm(world);
  const relativeDifference = Math.abs(computed / closedForm - 1);
  return { computed, closedForm, relativeDifference, passed: relativeDifference <= limit };
}

function missed(state: State, tolerance: number): string {
  return `The ${state.label} state is known to ${state.errorEstimate.toExponential(1)} only, not to the tolerance of ${tolerance}.`;
}
