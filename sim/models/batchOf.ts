/** Many worlds to findings with any model: by its own batch, or by solving one world after another. */
import { SimError } from '../error.ts';
import type { Finding } from '../findings/finding.ts';
import type { SolveOptions, Window, World } from '../world.ts';
import type { Batch, Model } from './model.ts';

/**
 * `template`: any world of the batch; a model without a batch of its own solves it to learn the set of findings.
 * Errors: SimError for a name in `only` that is no finding; for such a model also those of solving the template.
 */
export function batchOf(
  model: Model,
  options: SolveOptions,
  windows: readonly Window[],
  template: World,
  only?: readonly string[],
): Batch {
  return model.batch?.(options, windows, only) ?? solvedOneByOne(model, options, windows, template, only);
}

function solvedOneByOne(
  model: Model,
  options: SolveOptions,
  windows: readonly Window[],
  template: World,
  only: readonly string[] | undefined,
): Batch {
  const { findings } = model.solve(template, options, windows).states[0];
  const chosen = only === undefined ? findings : only.map((name) => named(findings, name));
  const columns = chosen.map(({ name, unit, label }) => ({ name, unit, label }));
  return {
    columns,
    into(world, row) {
      const [first] = model.solve(world, options, windows).states;
      for (const [i, { name }] of columns.entries()) {
        row[i] = first.findings.find((finding) => finding.name === name)?.value ?? Number.NaN;
      }
      return first.converged && first.label !== 'cold';
    },
  };
}

function named(findings: readonly Finding[], name: string): Finding {
  const found = findings.find((finding) => finding.name === name);
  if (found !== undefined) return found;
  const names = findings.map((finding) => finding.name).join(', ');
  throw new SimError('of', `“${name}” is no finding of this model`, `Choose from ${names}`);
}
