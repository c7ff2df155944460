/** Puts the focus into the field of a path once the drawer that holds it stands. */
export function focusField(path: string): void {
  requestAnimationFrame(() => {
    const name = CSS.escape(path);
    const field = document.querySelector<HTMLElement>(`.drawer [data-field="${name}"]`);
    const target = field?.matches('input, select, textarea')
      ? field
      : field?.querySelector<HTMLElement>('input, select');
    target?.focus();
    target?.scrollIntoView({ block: 'center' });
  });
}
