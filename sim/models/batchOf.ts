/** Many worlds to findings with any model: by its own batch, or by solving one world after another. */
import type { Finding } from '../findings/finding.ts';
import type { SolveOptions, Window, World } from '../world.ts';
import { columnNumbers } from './columnNumbers.ts';
import type { Batch, Model } from './model.ts';

/**
 * `template`: any world of the batch; a model without a batch of its own solves it to learn the set of findings, and not once more when it is asked for.
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
  const solved = (world: World): Solved => {
    const [{ findings, converged, label }] = model.solve(world, options, windows).states;
    return { findings, isKept: converged && label !== 'cold' };
  };
  const learnt = solved(template);
  const columns = columnNumbers(learnt.findings, only).map((place) => {
    const { name, unit, label } = learnt.findings[place];
    return { name, unit, label };
  });
  return {
    columns,
    into(world, row) {
      const { findings, isKept } = world === template ? learnt : solved(world);
      for (const [i, { name }] of columns.entries()) {
        row[i] = findings.find((finding) => finding.name === name)?.value ?? Number.NaN;
      }
      return isKept;
    },
  };
}

/** What is kept of a solution: not its dataset. */
interface Solved {
  readonly findings: readonly Finding[];
  readonly isKept: boolean;
}
