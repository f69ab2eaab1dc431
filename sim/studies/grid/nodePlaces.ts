/** Place on each axis of a node that is counted through them all; the last axis runs fastest. */
export function nodePlaces(lengths: readonly number[], node: number): number[] {
  const places: number[] = [];
  let rest = node;
  for (const length of lengths.toReversed()) {
    places.unshift(rest % length);
    rest = Math.floor(rest / length);
  }
  return places;
}
