/** Small choices kept on this computer. A browser that denies storage forgets them, and nothing else changes. */

const PREFIX = 'splitwright.';

/** What was kept under a key; undefined where nothing was, or where storage is denied. */
export function remembered(key: string): string | undefined {
  try {
    return localStorage.getItem(PREFIX + key) ?? undefined;
  } catch (error) {
    if (error instanceof DOMException) return undefined;
    throw error;
  }
}

/** Keeps a text under a key; without effect where storage is denied or full. */
export function remember(key: string, text: string): void {
  try {
    localStorage.setItem(PREFIX + key, text);
  } catch (error) {
    if (!(error instanceof DOMException)) throw error;
  }
}

/** Windows that want the same arrangement: what is folded and how wide the drawer is are kept for each of them. */
export type WindowClass = 'small' | 'medium' | 'wide';

/** @param width inner width of the window [px] */
export const windowClass = (width: number): WindowClass =>
  width <= 1100 ? 'small' : width <= 1680 ? 'medium' : 'wide';
