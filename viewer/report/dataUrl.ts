/** What a data URL holds. A page without network may not fetch even that. Pure. */

export function typeOf(dataUrl: string): string {
  return headOf(dataUrl).split(';')[0]!;
}

export function unpackedBytes(dataUrl: string): Uint8Array<ArrayBuffer> {
  const body = bodyOf(dataUrl);
  if (!headOf(dataUrl).endsWith(';base64')) return new TextEncoder().encode(decodeURIComponent(body));
  return Uint8Array.from(atob(body), (character) => character.charCodeAt(0));
}

export function unpackedText(dataUrl: string): string {
  return new TextDecoder().decode(unpackedBytes(dataUrl));
}

function headOf(dataUrl: string): string {
  return dataUrl.slice('data:'.length, dataUrl.indexOf(','));
}

function bodyOf(dataUrl: string): string {
  return dataUrl.slice(dataUrl.indexOf(',') + 1);
}
