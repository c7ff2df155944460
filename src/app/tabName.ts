let page: string | undefined;

/** The browser's tab goes by the sketch's name: several sketches in several tabs are told apart. */
export function nameTab(sketch: string | undefined): void {
  page ??= document.title;
  const name = sketch?.trim();
  document.title = name ? `${name} – ${page}` : page;
}
