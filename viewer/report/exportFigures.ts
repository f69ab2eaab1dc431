/** What the command line asks of the page: every figure as a picture for a paper. */

import { unpackedBytes, unpackedText } from './dataUrl.ts';
import type { FigureView } from './figureView.ts';
import { pixelsAcross, pngWithDensity, svgInMillimetres } from './printSize.ts';

export interface ExportRequest {
  readonly format: 'svg' | 'png';
  readonly widthMm: number;
  /** Of a PNG. */
  readonly dpi: number;
}

export interface ExportedFigure {
  /** Without extension; holds what users have written. */
  readonly name: string;
  /** An SVG as text, a PNG in base64. */
  readonly data: string;
}

/** Letters of 12 px come out at 7 pt. */
const pixelsPerMm = 120 / 25.4;
/** Names beside the lines need this room: a narrower picture is the same, with smaller letters. */
const leastWidth = 700;

/** Offers `perilagFigures(request)` to whoever drives the browser; `figures` gives them in their order on the page. */
export function offerFigures(figures: () => readonly FigureView[]): void {
  const perilagFigures = async (request: ExportRequest): Promise<ExportedFigure[]> => {
    const made: ExportedFigure[] = [];
    for (const figure of figures()) made.push(await exported(figure, request));
    return made;
  };
  Object.assign(globalThis, { perilagFigures });
}

async function exported(figure: FigureView, { format, widthMm, dpi }: ExportRequest): Promise<ExportedFigure> {
  const width = Math.max(leastWidth, Math.round(widthMm * pixelsPerMm));
  // Plotly cuts the pixels off behind the point: a hundredth more keeps a rounding from taking one.
  const scale = (pixelsAcross(widthMm, dpi) + 0.01) / width;
  if (format === 'png') {
    const { name, dataUrl } = await figure.picture('png', { width, scale });
    return { name, data: base64(pngWithDensity(unpackedBytes(dataUrl), dpi)) };
  }
  const { name, dataUrl, height } = await figure.picture('svg', { width, scale: 1 });
  return { name, data: svgInMillimetres(unpackedText(dataUrl), widthMm, (height / width) * widthMm) };
}

/** In pieces, since a call takes only so many arguments. */
function base64(bytes: Uint8Array): string {
  const pieces: string[] = [];
  for (let at = 0; at < bytes.length; at += 8192) pieces.push(String.fromCharCode(...bytes.subarray(at, at + 8192)));
  return btoa(pieces.join(''));
}
