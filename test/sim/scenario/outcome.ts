/** What must hold of anything that is read as a scenario: numbers without flaw, or problems that help. */
import { expect } from 'vitest';
import { ScenarioError } from '../../../sim/scenario/problem.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import type { Problem, Scenario } from '../../../sim/scenario/types.ts';

/** `reads` or `refused`; fails the test on anything else. */
export function outcomeOf(text: string): 'reads' | 'refused' {
  let scenario: Scenario;
  try {
    scenario = readScenario(text, 'p.yaml');
  } catch (error) {
    if (!(error instanceof ScenarioError)) throw new Error(`not a ScenarioError for\n${text}`, { cause: error });
    expectHelpful(error.problems, text);
    return 'refused';
  }
  expectUsable(scenario, text);
  return 'reads';
}

function expectHelpful(problems: readonly Problem[], text: string): void {
  expect(problems.length).toBeGreaterThan(0);
  const lines = text.split('\n').length;
  for (const { line, column, key, what, mend } of problems) {
    const message = `${key}: ${what}. ${mend}.`;
    const isPlaced =
      line >= 1 && line <= lines + 1 && column >= 1 && Number.isInteger(line) && Number.isInteger(column);
    const isClean = !/undefined|\[object|\bNaN\b|Error:|\n|\p{Cc}|\.\.$/u.test(message.replace(/`[^`]*`/g, ''));
    if (!isPlaced || !isClean || !key || !what || !mend)
      throw new Error(`${line}:${column}: ${message}\n--- for\n${text}`);
  }
}

function expectUsable(scenario: Scenario, text: string): void {
  const flaw = flawIn(scenario.cases, 'cases');
  if (flaw) throw new Error(`${flaw}\n--- for\n${text}`);
  const again = readScenario(scenario.asUnderstood, 'p.yaml');
  const numbers = ({ cases }: Scenario) =>
    cases.map(({ name, world, options, windows }) => ({ name, world, options, windows }));
  if (JSON.stringify(numbers(again)) !== JSON.stringify(numbers(scenario))) {
    throw new Error(`other numbers when read again\n${scenario.asUnderstood}\n--- for\n${text}`);
  }
  if (again.title !== scenario.title || again.notes !== scenario.notes) throw new Error(`other title for\n${text}`);
}

/** Path to a number that is not finite; null when all are. */
export function flawIn(value: unknown, path: string): string | null {
  if (typeof value === 'number') return Number.isFinite(value) ? null : `${path} is ${value}`;
  if (typeof value !== 'object' || value === null) return null;
  for (const [key, inner] of Object.entries(value)) {
    const flaw = flawIn(inner, `${path}.${key}`);
    if (flaw) return flaw;
  }
  return null;
}
