/** Puts text where the reader can paste it from. */
import { element } from './element.ts';
import { saveText } from './saveFile.ts';

/** Pages from disk may lack the clipboard: then a selected field, as browsers had it before; at last a file of this name. */
export async function copyText(text: string, name: string): Promise<'copied' | 'saved'> {
  if ((await toClipboard(text)) || bySelection(text)) return 'copied';
  saveText(name, 'text/plain', text);
  return 'saved';
}

async function toClipboard(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return false; // not there, or not allowed
  }
}

function bySelection(text: string): boolean {
  const before = document.activeElement;
  const field = element('textarea', { class: 'unseen', 'aria-hidden': 'true', tabindex: '-1', readonly: '' });
  field.value = text;
  document.body.append(field);
  field.select();
  try {
    return document.execCommand('copy');
  } catch {
    return false;
  } finally {
    field.remove();
    if (before instanceof HTMLElement) before.focus();
  }
}
