/** The inputs of a grid in words: where a node stands. Pure. */
import type { GridAxis, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { type Along, labelInText } from './along.ts';
import { exact, list, raised, unitText, withUnit } from './number.ts';

/** The axis as a range, from its first node to its last. */
export function rangeOf({ key, label, unit, log, nodes }: GridAxis): Along {
  return { key, label, unit, log, from: nodes[0]!, to: nodes.at(-1)! };
}

/** `eccentricity 0 to 0.9 and heat capacity 10⁴ to 10⁹ J m⁻² K⁻¹`. */
export function rangesText({ axes }: Pick<GridReport, 'axes'>): string {
  const ranges = axes.map((axis) => {
    const { from, to, unit } = rangeOf(axis);
    return `${labelInText(rangeOf(axis))} ${wholePower(axis, from) ?? exact(from)} to ${withUnit(wholePower(axis, to) ?? exact(to), unit)}`;
  });
  return list(ranges);
}

/** `10⁴` for a power of ten on an axis of decades; null for anything else. */
function wholePower({ log }: Pick<GridAxis, 'log'>, value: number): string | null {
  const power = Math.log10(value);
  const isWhole = log && Math.abs(power) > 2 && Math.abs(power - Math.round(power)) < 1e-12;
  return isWhole ? `10${raised(Math.round(power))}` : null;
}

/** Places along each axis of a node, by its number: row-major. */
export function nodePlace(axes: readonly GridAxis[], node: number): number[] {
  const [first, second] = axes;
  if (second === undefined) return [first!.nodes[node]!];
  const inner = second.nodes.length;
  return [first!.nodes[Math.floor(node / inner)]!, second.nodes[node % inner]!];
}

/** `eccentricity 0.3, heat capacity 4 × 10⁶ J m⁻² K⁻¹`. */
export function nodeText(axes: readonly GridAxis[], node: number): string {
  const place = nodePlace(axes, node);
  return axes.map((axis, at) => axisText(axis, place[at]!)).join(', ');
}

/** `eccentricity 0.3`. */
export function axisText(axis: GridAxis, value: number): string {
  return `${labelInText(rangeOf(axis))} ${withUnit(placeNumber(axis, value), axis.unit)}`;
}

/** `0.9, 10⁹`: a node in the fewest words, in the order of `axesText`. */
export function bareNodeText(axes: readonly GridAxis[], node: number): string {
  const place = nodePlace(axes, node);
  return axes.map((axis, at) => placeNumber(axis, place[at]!)).join(', ');
}

/** `eccentricity, heat capacity in J m⁻² K⁻¹`. */
export function axesText(axes: readonly GridAxis[]): string {
  return axes
    .map((axis) => {
      const unit = unitText(axis.unit);
      return unit === '' ? labelInText(rangeOf(axis)) : `${labelInText(rangeOf(axis))} in ${unit}`;
    })
    .join(', ');
}

function placeNumber(axis: GridAxis, value: number): string {
  return wholePower(axis, value) ?? exact(Number(value.toPrecision(4)));
}

/** The place on an axis: its logarithm on a logarithmic one. */
export function axisPlace({ log }: Pick<GridAxis, 'log'>, value: number): number {
  return log ? Math.log10(value) : value;
}
