/**
 * Positions for labels that want to stand at `wanted` but must keep `gap` apart, as near as they can, within [low, high].
 * Shape: n in, n out, same order; the order of the wanted positions is kept. Crowds past the room stand at equal steps.
 */
export function spreadLabels(wanted: readonly number[], gap: number, low: number, high: number): number[] {
  const order = wanted.map((_, index) => index).sort((a, b) => wanted[a]! - wanted[b]!);
  const step = Math.min(gap, (high - low) / Math.max(1, wanted.length - 1));
  const placed = new Array<number>(wanted.length);
  let groups: { members: number[]; centre: number }[] = [];
  for (const index of order) {
    groups.push({ members: [index], centre: wanted[index]! });
    groups = mergeTouching(groups, wanted, step, low, high);
  }
  for (const { members, centre } of groups) {
    members.forEach((index, place) => {
      placed[index] = centre + (place - (members.length - 1) / 2) * step;
    });
  }
  return placed;
}

function mergeTouching(
  groups: { members: number[]; centre: number }[],
  wanted: readonly number[],
  step: number,
  low: number,
  high: number,
): { members: number[]; centre: number }[] {
  const merged = groups.slice();
  for (;;) {
    const last = merged.pop()!;
    const half = ((last.members.length - 1) / 2) * step;
    const centre = Math.min(high - half, Math.max(low + half, last.centre));
    const before = merged.at(-1);
    const needed = before ? half + ((before.members.length - 1) / 2) * step + step : 0;
    if (!before || centre - before.centre >= needed - 1e-9) {
      merged.push({ members: last.members, centre });
      return merged;
    }
    merged.pop();
    const members = [...before.members, ...last.members];
    const mean = members.reduce((sum, index) => sum + wanted[index]!, 0) / members.length;
    merged.push({ members, centre: mean });
  }
}
