/** The time that a plain world spends in windows, off the nodes. */
import { enter, type Sheet } from '../../findings/sheet.ts';
import { meanFromBalanced } from '../../orbit/balanced.ts';
import type { Radians } from '../../si.ts';
import { placeOfLevel, type Turn } from '../../solve/periodicNodes.ts';
import type { Window } from '../../world.ts';
import { at } from './columns.ts';
import { enterInstellationWindow } from './entries.ts';
import { goToPiece, type Scratch, turn } from './plainScratch.ts';

export function enterWindows(scratch: Scratch, windows: readonly Window[], sheet: Sheet): void {
  let column: number = at.windows;
  for (let i = 0; i < windows.length; i++) {
    const window = windows[i];
    if (window.of === 'instellation') {
      enterInstellationWindow(scratch.world, window, 0, turn, column, sheet);
      column += 2;
    } else enter(sheet, column++, shareWithin(scratch, window));
  }
}

function shareWithin(scratch: Scratch, { from, to }: Window): number {
  const { moving, mean, state } = scratch;
  if (!moving) return mean >= from && mean <= to ? 1 : 0;
  const time = timeAbove(scratch, from / state.scale) - timeAbove(scratch, to / state.scale);
  return Math.min(1, Math.max(0, time / turn));
}

/** Mean anomaly spent above a level: between the one crossing on the way up and the one on the way down. */
function timeAbove(scratch: Scratch, level: number): Radians {
  const { highest, lowest } = scratch;
  if (level <= lowest.value) return turn;
  if (level > highest.value) return 0;
  const down = crossing(scratch, highest, lowest, level);
  const up = crossing(scratch, lowest, highest, level);
  const { eccentricity } = scratch.state;
  const time = meanFromBalanced(down, eccentricity) - meanFromBalanced(up, eccentricity);
  return time < 0 ? time + turn : time;
}

/** Where the curve passes `level` on its way from one extreme to the next. */
function crossing(scratch: Scratch, from: Turn, to: Turn, level: number): Radians {
  const { solution } = scratch.state;
  const { size, value } = solution;
  const rises = to.value > from.value;
  let index = from.index;
  let next = index + 1 === size ? 0 : index + 1;
  while (index !== to.index && value[next] > level !== rises) {
    index = next;
    next = index + 1 === size ? 0 : index + 1;
  }
  goToPiece(scratch, index);
  const { piece } = scratch;
  const x = placeOfLevel(piece, level, index === from.index ? from.x : 0, index === to.index ? to.x : 1);
  return piece.left + x * piece.width;
}
