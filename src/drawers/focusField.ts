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

/** Puts the focus on a chemical's row once the chemicals drawer stands; its first field keeps it where there is no such row. */
export function focusChemical(id: string): void {
  requestAnimationFrame(() => {
    const rows = [...document.querySelectorAll<HTMLElement>('.drawer .chemicals > [data-chemical]')];
    const row = rows.find((element) => element.dataset.chemical === id);
    row?.focus();
    row?.scrollIntoView?.({ block: 'center' });
  });
}
