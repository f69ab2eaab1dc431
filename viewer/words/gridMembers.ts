/** The scenario's own cases on a grid, of which some may have become one. Pure. */
import type { GridCase, GridMember, GridReport } from '../../sim/studies/grid/gridReport.ts';

/** In the order of the scenario. */
export function membersOf({ cases }: Pick<GridReport, 'cases'>): GridMember[] {
  return cases.flatMap(({ members }) => members).sort((a, b) => a.index - b.index);
}

/** What gives a case its colour and sign: the place of its first member. */
export function lookOf({ members }: Pick<GridCase, 'members'>): number {
  return members[0]!.index;
}
