/** A picture's size on paper, written into it so that a paper sets it as it is meant. Pure. */

const millimetresPerInch = 25.4;

/** The SVG with its own width and height, mm, in place of pixels. Its view box stays. */
export function svgInMillimetres(svg: string, width: number, height: number): string {
  return svg.replace(/^(?:<\?xml[^>]*\?>\s*)?<svg\b[^>]*>/, (head) =>
    head
      .replace(/\swidth="[^"]*"/, ` width="${rounded(width)}mm"`)
      .replace(/\sheight="[^"]*"/, ` height="${rounded(height)}mm"`),
  );
}

function rounded(value: number): number {
  return Number(value.toFixed(3));
}

/** Pixels of a picture that is so wide. */
export function pixelsAcross(widthMm: number, dpi: number): number {
  return Math.round((widthMm / millimetresPerInch) * dpi);
}

const signatureLength = 8;

/**
 * The PNG with a pHYs chunk before its first data.
 * Errors: throws where the bytes are no PNG with its header in place.
 * Source: PNG specification (W3C, 3rd ed. 2025), 11.3.4.3 (pHYs) and 5.3 (layout of a chunk).
 */
export function pngWithDensity(png: Uint8Array, dpi: number): Uint8Array<ArrayBuffer> {
  const header = chunkAt(png, signatureLength);
  if (png[0] !== 0x89 || header.type !== 'IHDR') throw new Error('this is no PNG');
  const next = chunkAt(png, header.end);
  const rest = png.subarray(next.type === 'pHYs' ? next.end : header.end);
  const density = densityChunk(Math.round((1000 * dpi) / millimetresPerInch));
  const made = new Uint8Array(header.end + density.length + rest.length);
  made.set(png.subarray(0, header.end));
  made.set(density, header.end);
  made.set(rest, header.end + density.length);
  return made;
}

function chunkAt(png: Uint8Array, at: number): { readonly type: string; readonly end: number } {
  const length = new DataView(png.buffer, png.byteOffset).getUint32(at);
  const type = String.fromCharCode(...png.subarray(at + 4, at + 8));
  return { type, end: at + 12 + length };
}

/** Length, type, pixels a metre along both axes, the unit, and the check over type and data. */
function densityChunk(pixelsPerMetre: number): Uint8Array {
  const chunk = new Uint8Array(21);
  const view = new DataView(chunk.buffer);
  view.setUint32(0, 9);
  chunk.set([0x70, 0x48, 0x59, 0x73], 4);
  view.setUint32(8, pixelsPerMetre);
  view.setUint32(12, pixelsPerMetre);
  view.setUint8(16, 1);
  view.setUint32(17, crc32(chunk.subarray(4, 17)));
  return chunk;
}

/** ISO 3309, as PNG takes it (its annex D): polynomial 0xEDB88320, reflected, inverted at both ends. */
function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) {
    crc ^= byte;
    for (let bit = 0; bit < 8; bit++) crc = crc & 1 ? (crc >>> 1) ^ 0xedb88320 : crc >>> 1;
  }
  return (crc ^ 0xffffffff) >>> 0;
}
