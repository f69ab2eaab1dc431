/** Lines over latitude: what the annual profile and the local lag have in common. Pure. */
import type { Data, Layout } from 'plotly.js-dist-min';
import { latitudeText } from '../words/latitude.ts';
import type { Bands } from './bands.ts';
import { axisStyle } from './chartLayout.ts';
import type { FigureStyle } from './figure.ts';
import { latitudeTicks } from './latitudeAxis.ts';

export const latitudeMargins = {
  wide: { l: 64, r: 224, t: 16, b: 50 },
  narrow: { l: 56, r: 22, t: 12, b: 46 },
} as const;

/** Rough length of the axis on the page, in pixels: for the room between ticks only. */
const axisLength = { wide: 640, narrow: 280 };

export function latitudeAxisLayout(view: readonly [number, number], style: FigureStyle): Partial<Layout['xaxis']> {
  const { narrow } = style;
  return {
    ...axisStyle(style),
    ...latitudeTicks(view, narrow ? axisLength.narrow : axisLength.wide, narrow ? 36 : 42),
    title: { text: 'Latitude', standoff: 8 },
    range: [...view],
    unifiedhovertitle: { text: 'Latitude' },
    showgrid: false,
  };
}

/** An unseen line that says the latitude under the pointer, which the axis itself keeps as a sine. */
export function latitudeWords({ middles, middlesDeg }: Bands, height: number): Data {
  return {
    type: 'scatter',
    mode: 'lines',
    name: 'latitude',
    x: [...middles],
    y: middles.map(() => height),
    customdata: middlesDeg.map(latitudeText),
    line: { width: 0, color: 'rgba(0,0,0,0)' },
    hovertemplate: '%{customdata}<extra></extra>',
  };
}
