/** A traced branch cut into arcs that are stable or unstable throughout and never turn back. Pure. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';

export type TraceCase = TraceReport['cases'][number];
export type TracePoint = TraceCase['branches'][number]['points'][number];

export interface Arc {
  readonly stable: boolean;
  /** At least two, in order along the branch; an arc shares its end with the next, so that nothing is missing between. */
  readonly points: readonly TracePoint[];
}

/** Of every branch, in order. */
export function arcsOf({ branches }: TraceCase): Arc[] {
  return branches.flatMap(({ points }) => cut(points));
}

function cut(points: readonly TracePoint[]): Arc[] {
  const arcs: { stable: boolean; points: TracePoint[] }[] = [];
  for (let at = 1; at < points.length; at++) {
    const [from, to] = [points[at - 1]!, points[at]!];
    const stable = isStable(from, to);
    const open = arcs.at(-1);
    if (open && open.stable === stable && !from.fold) open.points.push(to);
    else arcs.push({ stable, points: [from, to] });
  }
  return arcs;
}

/** A fold is neither stable nor unstable: the other end decides. A step across a change without fold counts as unstable. */
function isStable(from: TracePoint, to: TracePoint): boolean {
  if (from.fold && !to.fold) return to.stable;
  if (to.fold && !from.fold) return from.stable;
  return from.stable && to.stable;
}

/** Lowest and highest input of an arc. */
export function spanOf({ points }: Arc): [number, number] {
  const [first, last] = [points[0]!.value, points.at(-1)!.value];
  return [Math.min(first, last), Math.max(first, last)];
}

/** Mean temperature of an arc at an input, on the straight line between its points; null outside the arc. */
export function temperatureAt({ points }: Arc, value: number): number | null {
  for (let at = 1; at < points.length; at++) {
    const [from, to] = [points[at - 1]!, points[at]!];
    if ((from.value - value) * (to.value - value) > 0) continue;
    const share = from.value === to.value ? 0 : (value - from.value) / (to.value - from.value);
    return from.temperatureMean + share * (to.temperatureMean - from.temperatureMean);
  }
  return null;
}
