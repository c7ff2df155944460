import type { Stores } from '../store/react';
import { copySelected, cutSelected, pasteText } from './clipboard';
import { onSheet } from './onSheet';

/**
 * Copy, cut and paste as the browser tells of them, so that nobody is asked for leave: with the sheet's focus, and no text
 * marked elsewhere. Returns a function that stops it.
 */
export function keepClipboard(stores: Stores): () => void {
  const isOurs = (): boolean =>
    onSheet(stores) &&
    (window.getSelection()?.isCollapsed ?? true) &&
    stores.session.getState().over === 'none';
  const give = (make: (stores: Stores) => string | undefined) => (event: ClipboardEvent) => {
    const text = isOurs() ? make(stores) : undefined;
    if (text === undefined || !event.clipboardData) return;
    event.clipboardData.setData('text/plain', text);
    event.preventDefault();
  };
  const [copy, cut] = [give(copySelected), give(cutSelected)];
  const paste = (event: ClipboardEvent): void => {
    const text = event.clipboardData?.getData('text/plain');
    if (!isOurs() || !text) return;
    event.preventDefault();
    pasteText(stores, text);
  };
  window.addEventListener('copy', copy);
  window.addEventListener('cut', cut);
  window.addEventListener('paste', paste);
  return () => {
    window.removeEventListener('copy', copy);
    window.removeEventListener('cut', cut);
    window.removeEventListener('paste', paste);
  };
}
