import type { Theme } from '../store/session';

const KEY = 'splitwright.theme';
const isTheme = (text: string | null): text is Theme =>
  text === 'system' || text === 'light' || text === 'dark';

/** The theme chosen on this computer; a browser that denies storage follows the system. */
export function storedTheme(): Theme {
  try {
    const text = localStorage.getItem(KEY);
    return isTheme(text) ? text : 'system';
  } catch (error) {
    if (error instanceof DOMException) return 'system';
    throw error;
  }
}

/** Shows and remembers a theme; 'system' follows the system from now on. Returns a function that stops following. */
export function applyTheme(theme: Theme): () => void {
  const dark = matchMedia('(prefers-color-scheme: dark)');
  const show = (): void => {
    const isDark = theme === 'dark' || (theme === 'system' && dark.matches);
    document.documentElement.dataset.theme = isDark ? 'dark' : 'light';
  };
  show();
  try {
    localStorage.setItem(KEY, theme);
  } catch (error) {
    if (!(error instanceof DOMException)) throw error;
  }
  dark.addEventListener('change', show);
  return () => dark.removeEventListener('change', show);
}
