/** Ticks for an axis on which equal steps are not equally far apart. Pure. */

export interface RoomyTicks {
  /** Candidate values, the most welcome list first. */
  readonly levels: readonly (readonly number[])[];
  /** Where a value stands on the axis; null when off it. */
  readonly place: (value: number) => number | null;
  /** Least distance between two ticks, in the axis's units. */
  readonly gap: number;
  /** With so many ticks no further list is looked at. */
  readonly enough: number;
}

export interface Tick {
  readonly value: number;
  readonly place: number;
}

/** Takes candidates list by list while they keep `gap` from those already taken. In order of place. */
export function roomyTicks({ levels, place, gap, enough }: RoomyTicks): Tick[] {
  const taken: Tick[] = [];
  for (const level of levels) {
    for (const value of level) {
      const at = place(value);
      if (at !== null && taken.every((tick) => Math.abs(tick.place - at) >= gap)) taken.push({ value, place: at });
    }
    if (taken.length >= enough) break;
  }
  return taken.sort((a, b) => a.place - b.place);
}

/** Whole multiples of `step` within [from, to]. */
export function multiples(step: number, from: number, to: number): number[] {
  const first = Math.ceil(from / step - 1e-9);
  const count = Math.max(0, Math.floor(to / step + 1e-9) - first + 1);
  return Array.from({ length: count }, (_, index) => (first + index) * step);
}
