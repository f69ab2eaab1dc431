/** A map of a field by season and latitude: what the maps of temperature and insolation have in common. Pure. */
import type { Annotation, Data, Layout } from 'plotly.js-dist-min';
import type { Column } from '../words/columns.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { plotlyScale } from './colourScale.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureColumn, type FigureTable, words } from './figureTable.ts';
import { latitudeTicks, poleToPole } from './latitudeAxis.ts';
import { cellWords, type MapGrid, mapTime } from './mapGrid.ts';
import { colourBar, keyHeight, mapKey } from './mapKey.ts';
import type { Ground, MapLine } from './mapLines.ts';
import { momentsAcross } from './moments.ts';
import { seasonAt, seasonAxisLayout } from './seasonAxis.ts';
import { topAxisAnchor } from './topAxis.ts';
import type { View } from './view.ts';

export interface SeasonMap {
  readonly column: Column;
  readonly grid: MapGrid;
  /** South to north, a row a band. */
  readonly z: number[][];
  /** What else the data of the figure tell of each cell, laid out as `z`. */
  readonly beside?: { readonly column: FigureColumn; readonly z: number[][] };
  readonly quantity: 'Temperature' | 'Insolation';
  readonly unit: string;
  readonly ground: Ground;
  readonly lines: readonly MapLine[];
  readonly marks: readonly Data[];
  readonly names: readonly Partial<Annotation>[];
  /** One of several on the page: lower, so that they can be compared. */
  readonly isOneOfMany: boolean;
  readonly style: FigureStyle;
}

/** What the time axis takes under the map on a phone, before the colour bar begins, and a line more: a redrawn bar can stand higher by its title. */
const narrowAxisRoom = 68;

export function seasonMapFigure(
  map: SeasonMap,
  said: Pick<Figure, 'name' | 'title' | 'textAlternative' | 'caption'>,
): Figure {
  const { grid, lines, marks, style } = map;
  const view = style.view ?? { x: grid.range, y: poleToPole };
  return {
    ...said,
    lines,
    data: [
      colours(map),
      ...lines.flatMap(({ traces }) => traces),
      ...marks,
      topAxisAnchor('seasons', view.x[0], view.y[0]),
    ],
    layout: mapLayout(map, view),
    moments: momentsAcross(
      (x) => (x * grid.unit.seconds) / grid.period,
      (share) => mapTime(grid, share * grid.period),
    ),
    table: () => tableOf(map),
  };
}

/** A row for each cell: the middle of its time and its latitude. */
function tableOf({ column, grid, z, quantity, unit, beside }: SeasonMap): FigureTable {
  const { caseName, state } = column;
  const seasons = grid.times.map((time) => seasonAt(grid.seasons, time));
  return {
    columns: [
      words('case'),
      words('state'),
      { name: 'Time after periapsis', unit: grid.unit.symbol },
      { name: 'Solar longitude', unit: 'deg' },
      { name: 'Latitude', unit: 'deg' },
      { name: quantity, unit },
      ...(beside ? [beside.column] : []),
    ],
    rows: z.flatMap((row, band) =>
      row.map((value, at) => [
        caseName,
        state.label,
        grid.times[at],
        seasons[at],
        grid.bands.middlesDeg[band],
        value,
        ...(beside ? [beside.z[band]![at]] : []),
      ]),
    ),
  };
}

function colours(map: SeasonMap): Data {
  const { column, grid, z, quantity, unit, ground, style } = map;
  return {
    type: 'heatmap',
    name: quantity,
    x: grid.timeEdges,
    y: [...grid.bands.edges],
    z,
    customdata: cellWords(column, grid) as unknown as string[][],
    zmin: ground.range[0],
    zmax: ground.range[1],
    colorscale: plotlyScale(ground.scale),
    colorbar: colourBar(`${quantity} (${unit})`, mapHeight(map), narrowAxisRoom, style),
    hovertemplate: `<b>%{z:.1f} ${unit}</b><br>%{customdata[0]}<br>%{customdata[1]}<extra></extra>`,
  };
}

function mapHeight({ style, isOneOfMany, lines }: SeasonMap): number {
  if (style.narrow) return 260;
  return Math.max(isOneOfMany ? 240 : 320, keyHeight(lines));
}

function mapLayout(map: SeasonMap, view: View): Partial<Layout> {
  const { grid, style, lines } = map;
  const height = mapHeight(map);
  const margin = margins(style);
  const key = style.narrow ? { shapes: [], annotations: [] } : mapKey(lines, style);
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'closest',
    xaxis: {
      ...axisStyle(style),
      title: { text: `Time after periapsis (${grid.unit.symbol})`, standoff: 8 },
      range: [...view.x],
      nticks: style.narrow ? 5 : 10,
      showgrid: false,
    },
    xaxis2: seasonAxisLayout(grid.seasons, view.x, style),
    yaxis: {
      ...axisStyle(style),
      title: { text: 'Latitude', standoff: 10 },
      range: [...view.y],
      ...latitudeTicks(view.y, height, 15),
      mirror: true,
      showgrid: false,
    },
    shapes: key.shapes,
    annotations: [...map.names, ...key.annotations],
  };
}

function margins({ narrow }: FigureStyle): { l: number; r: number; t: number; b: number } {
  return narrow ? { l: 60, r: 14, t: 48, b: narrowAxisRoom + 54 } : { l: 64, r: 224, t: 52, b: 50 };
}
