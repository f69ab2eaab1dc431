/** Temperatures worth a line on a map: freezing, and both ends of every window. Pure. */
import { zeroCelsius } from '../../sim/constants.ts';
import type { Column } from '../words/columns.ts';
import { exact, list, nbsp } from '../words/number.ts';
import type { Dash } from './chartLine.ts';
import type { Level } from './mapLines.ts';
import { plainLabel } from './plainLabel.ts';
import { distinctWindows } from './windowSpans.ts';

export type TemperatureLevel = Level;

/** None is solid: that is the edge of the ice. Freezing has the long dashes, windows the others first. */
const windowDashes: readonly Dash[] = ['dot', 'dashdot', 'dash'];
/** Ends closer than this are one line. */
const sameTemperature = 0.005;
const longestName = 16;
const freezing: Bound = { value: zeroCelsius, words: 'freezing', label: 'freezing', dash: 'dash' };

interface Bound {
  readonly value: number;
  /** In full, and short enough to stand beside a map. */
  readonly words: string;
  readonly label: string;
  readonly dash: Dash;
}

/** From the lowest to the highest. */
export function temperatureLevels(column: Column): TemperatureLevel[] {
  const bounds = [freezing, ...windowBounds(column)];
  const groups: Bound[][] = [];
  for (const bound of bounds) {
    const group = groups.find(([first]) => Math.abs(first!.value - bound.value) < sameTemperature);
    if (group) group.push(bound);
    else groups.push([bound]);
  }
  return groups.map(levelOf).sort((a, b) => a.value - b.value);
}

function windowBounds(column: Column): Bound[] {
  return distinctWindows([column], 'temperature').flatMap(({ name, from, to }, index) => {
    const dash = windowDashes[index % windowDashes.length]!;
    return [bound(from, name, 'begins', dash), bound(to, name, 'ends', dash)];
  });
}

function bound(value: number, name: string, does: string, dash: Dash): Bound {
  return { value, words: `“${name}” ${does}`, label: `“${plainLabel(name, longestName)}” ${does}`, dash };
}

function levelOf(group: readonly Bound[]): TemperatureLevel {
  const { value, dash } = group[0]!;
  const temperature = `${exact(value)}${nbsp}K`;
  return {
    value,
    dash,
    width: group.includes(freezing) ? 2 : 1.5,
    plainName: `${temperature} (${list(group.map(({ words }) => words))})`,
    labels: [temperature, ...group.map(({ label }) => label)],
  };
}
