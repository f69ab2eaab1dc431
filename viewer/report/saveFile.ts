/** Hands a file to the reader. */
import { typeOf, unpackedBytes } from './dataUrl.ts';
import { element } from './element.ts';

/** Content as a data URL. */
export function saveFile(name: string, dataUrl: string): void {
  saveBlob(name, new Blob([unpackedBytes(dataUrl)], { type: typeOf(dataUrl) }));
}

export function saveText(name: string, type: string, text: string): void {
  saveBlob(name, new Blob([text], { type: `${type};charset=utf-8` }));
}

function saveBlob(name: string, content: Blob): void {
  const url = URL.createObjectURL(content);
  element('a', { href: url, download: name }).click();
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}
