/** Lines of equal value on a map of two inputs, with their numbers on them. Pure. */
import type { Annotation, Data } from 'plotly.js-dist-min';
import type { Dash } from './chartLine.ts';
import { colourAt, inkOn } from './colourScale.ts';
import { contourLabels, type Mesh, type Spot, type Window } from './contourLabels.ts';
import type { Ground } from './mapLines.ts';
import { plainLabel } from './plainLabel.ts';

export interface Contours {
  /** Values of the nodes, as the axes have them: not their logarithms. */
  readonly x: readonly number[];
  readonly y: readonly number[];
  readonly mesh: Mesh;
  /** As `mesh.z` has them, with their numbers. */
  readonly levels: readonly { readonly place: number; readonly text: string }[];
  readonly window: Window;
}

export interface ContourDrawing {
  readonly data: Data[];
  readonly annotations: Partial<Annotation>[];
  /** For further numbers on the same map. */
  readonly taken: readonly Spot[];
}

/** Of the quantity that the colours show: the ground beneath a line is known, and so is its ink. */
export function levelContours(contours: Contours, ground: Ground, taken: readonly Spot[] = []): ContourDrawing {
  return drawn(contours, taken, (place) => {
    const beneath = colourAt(ground.scale, place, ground.range);
    const ink = inkOn(beneath);
    return { lines: [{ color: ink, width: 1, dash: 'solid' }], ink, beneath };
  });
}

/** Of another quantity: white and dashed with a black edge, to be seen on any colour. */
export function casedContours(contours: Contours, taken: readonly Spot[] = []): ContourDrawing {
  const lines = [
    { color: '#000000', width: 2.5, dash: 'solid' },
    { color: '#ffffff', width: 1.25, dash: 'dash' },
  ] as const;
  return drawn(contours, taken, () => ({ lines, ink: '#000000', beneath: '#ffffff' }));
}

interface Look {
  readonly lines: readonly { readonly color: string; readonly width: number; readonly dash: Dash }[];
  readonly ink: string;
  readonly beneath: string;
}

function drawn(
  { x, y, mesh, levels, window }: Contours,
  taken: readonly Spot[],
  look: (place: number) => Look,
): ContourDrawing {
  const spots = contourLabels(
    mesh,
    levels.map(({ place }) => place),
    window,
    taken,
  );
  return {
    data: levels.flatMap(({ place, text }) =>
      look(place).lines.map((line): Data => contour(plainLabel(text), place, x, y, mesh.z, line)),
    ),
    annotations: spots.flatMap((spot, at) => {
      if (spot === null) return [];
      const { ink, beneath } = look(levels[at]!.place);
      const font = { color: ink, size: 11 };
      return [{ ...spot, text: plainLabel(levels[at]!.text), showarrow: false, font, bgcolor: beneath, borderpad: 1 }];
    }),
    taken: [...taken, ...spots.filter((spot) => spot !== null)],
  };
}

function contour(
  name: string,
  value: number,
  x: readonly number[],
  y: readonly number[],
  z: Mesh['z'],
  line: Look['lines'][number],
): Data {
  return {
    type: 'contour',
    name,
    x: [...x],
    y: [...y],
    z: z.map((row) => [...row]),
    connectgaps: false,
    autocontour: false,
    contours: { start: value, end: value, size: 1, coloring: 'none' },
    line: { ...line, smoothing: 0 },
    showscale: false,
    showlegend: false,
    hoverinfo: 'skip',
  } as Data;
}
