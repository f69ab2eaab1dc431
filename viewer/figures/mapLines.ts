/** Lines on a map: where a field passes a level. Pure. */
import type { Data } from 'plotly.js-dist-min';
import type { Dash, LegendLine } from './chartLine.ts';
import { type ColourScale, colourAt, inkOn } from './colourScale.ts';
import { poleToPole } from './latitudeAxis.ts';
import type { MapGrid } from './mapGrid.ts';
import { plainLabel } from './plainLabel.ts';

export interface MapLine extends LegendLine {
  /** Short enough to stand beside the map, a line each. */
  readonly labels: readonly string[];
  readonly width: number;
  readonly traces: readonly Data[];
}

export interface Level {
  readonly value: number;
  readonly plainName: string;
  readonly labels: readonly string[];
  readonly dash: Dash;
  readonly width: number;
}

/** What a line lies on. */
export interface Ground {
  readonly scale: ColourScale;
  readonly range: readonly [number, number];
}

/** A level of the field that the map itself shows: the colour beneath it is known, and so is the ink. The number stands in it. */
export function levelLine(level: Level, z: readonly (readonly number[])[], grid: MapGrid, ground: Ground): MapLine {
  const { value, plainName, labels, dash, width } = level;
  const beneath = colourAt(ground.scale, value, ground.range);
  const colour = inkOn(beneath);
  const trace = contour(plainName, value, z, grid, { color: colour, width, dash }, colour);
  return { plainName, labels, colour, dash, width, marker: null, ground: beneath, traces: [trace] };
}

/** The level of another field: white with a black edge, to be seen on any colour. */
export function casedLine(
  level: Omit<Level, 'dash'>,
  z: readonly (readonly number[])[],
  grid: MapGrid,
  ground: string,
): MapLine {
  const { value, plainName, labels, width } = level;
  const [colour, casing] = ['#ffffff', '#000000'];
  const traces = [
    contour(`${plainName}, edge`, value, z, grid, { color: casing, width: width + 2.5, dash: 'solid' }, null),
    contour(plainName, value, z, grid, { color: colour, width, dash: 'solid' }, null),
  ];
  return { plainName, labels, colour, casing, dash: 'solid', width, marker: null, ground, traces };
}

/** Whether a field passes a level anywhere. */
export function isCrossed(value: number, z: readonly (readonly number[])[]): boolean {
  const isBelow = z[0]![0]! < value;
  return z.some((row) => row.some((cell) => cell < value !== isBelow));
}

/** Drawn to the poles: the outermost bands hold that far. */
function contour(
  name: string,
  value: number,
  z: readonly (readonly number[])[],
  grid: MapGrid,
  line: { readonly color: string; readonly width: number; readonly dash: Dash },
  labelColour: string | null,
): Data {
  const font = labelColour === null ? {} : { showlabels: true, labelfont: { color: labelColour, size: 11 } };
  return {
    type: 'contour',
    name: plainLabel(name, 60),
    x: grid.times,
    y: [poleToPole[0], ...grid.bands.middles, poleToPole[1]],
    z: [z[0]!, ...z, z.at(-1)!].map((row) => [...row]),
    autocontour: false,
    contours: { start: value, end: value, size: 1, coloring: 'none', ...font },
    line: { ...line, smoothing: 0 },
    showscale: false,
    showlegend: false,
    hoverinfo: 'skip',
  };
}
