/** Hands a file to the reader. */
import { element } from './element.ts';

/** Content as a data URL, which is unpacked here: a page without network may not fetch even that. */
export function saveFile(name: string, dataUrl: string): void {
  saveBlob(name, unpacked(dataUrl));
}

export function saveText(name: string, type: string, text: string): void {
  saveBlob(name, new Blob([text], { type: `${type};charset=utf-8` }));
}

function saveBlob(name: string, content: Blob): void {
  const url = URL.createObjectURL(content);
  element('a', { href: url, download: name }).click();
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}

function unpacked(dataUrl: string): Blob {
  const comma = dataUrl.indexOf(',');
  const head = dataUrl.slice('data:'.length, comma);
  const body = dataUrl.slice(comma + 1);
  const [type] = head.split(';') as [string];
  if (!head.endsWith(';base64')) return new Blob([decodeURIComponent(body)], { type });
  return new Blob([Uint8Array.from(atob(body), (character) => character.charCodeAt(0))], { type });
}
