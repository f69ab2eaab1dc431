/** The inputs of a grid in words: where a node stands. Pure. */
import type { GridAxis, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { type Along, alongText, labelInText } from './along.ts';
import { exact, list, withUnit } from './number.ts';

/** The axis as a range, from its first node to its last. */
export function rangeOf({ key, label, unit, log, nodes }: GridAxis): Along {
  return { key, label, unit, log, from: nodes[0]!, to: nodes.at(-1)! };
}

/** `eccentricity 0 to 0.9 and heat capacity 1 × 10⁴ to 1 × 10⁹ J m⁻² K⁻¹`. */
export function rangesText({ axes }: Pick<GridReport, 'axes'>): string {
  const ranges = axes.map((axis) => {
    const { from, to, unit } = rangeOf(axis);
    return `${labelInText(rangeOf(axis))} ${exact(from)} to ${withUnit(exact(to), unit)}`;
  });
  return list(ranges);
}

/** Places along each axis of a node, by its number: row-major. */
export function nodePlace(axes: readonly GridAxis[], node: number): number[] {
  const [first, second] = axes;
  if (second === undefined) return [first!.nodes[node]!];
  const inner = second.nodes.length;
  return [first!.nodes[Math.floor(node / inner)]!, second.nodes[node % inner]!];
}

/** `eccentricity 0.300, heat capacity 4.000 × 10⁶ J m⁻² K⁻¹`. */
export function nodeText(axes: readonly GridAxis[], node: number): string {
  const place = nodePlace(axes, node);
  return axes.map((axis, at) => axisText(axis, place[at]!)).join(', ');
}

/** `eccentricity 0.3`. */
export function axisText(axis: GridAxis, value: number): string {
  return `${labelInText(rangeOf(axis))} ${alongText(value, rangeOf(axis))}`;
}

/** The place on an axis: its logarithm on a logarithmic one. */
export function axisPlace({ log }: Pick<GridAxis, 'log'>, value: number): number {
  return log ? Math.log10(value) : value;
}
