/** The part of a figure that is shown: ends of both axes, in their units. */
export interface View {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
}
