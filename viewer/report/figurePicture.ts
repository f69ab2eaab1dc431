/** A figure as a picture in a file, light and wide whatever the screen is. */
import type { Figure, FigureStyle } from '../figures/figure.ts';
import { lightTheme } from '../figures/theme.ts';
import { plotly } from './plotly.ts';

export type PictureFormat = 'svg' | 'png';

export interface PictureSize {
  /** CSS pixels that the figure is laid out in. */
  readonly width: number;
  /** Device pixels to each of them. */
  readonly scale: number;
}

export interface Picture {
  /** Without extension. */
  readonly name: string;
  readonly dataUrl: string;
  /** CSS pixels. */
  readonly height: number;
}

export const pictureStyle: FigureStyle = { theme: lightTheme, narrow: false, view: null };

export async function figurePicture(
  build: (style: FigureStyle) => Figure,
  format: PictureFormat,
  { width, scale }: PictureSize,
): Promise<Picture> {
  const { data, layout, name } = build(pictureStyle);
  const size = { width, height: layout.height! };
  const picture = { data, layout: { ...layout, ...size, paper_bgcolor: '#ffffff' } };
  return { name, dataUrl: await plotly().toImage(picture, { format, ...size, scale }), height: size.height };
}
