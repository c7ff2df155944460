/** Puts the focus into the field of a path once the drawer that holds it stands. */
export function focusField(path: string): void {
  requestAnimationFrame(() => {
    const fields = [...document.querySelectorAll<HTMLElement>('.drawer [data-field]')];
    const field = fields.find((element) => element.dataset.field === path);
    const isControl = field?.matches('input, select, textarea');
    const target = isControl ? field : field?.querySelector<HTMLElement>('input, select');
    target?.focus();
    target?.scrollIntoView?.({ block: 'center' });
  });
}
