import type { Quantity } from '../sketch/types';

/** What a field does to the document: one entry for a text, one for a whole slide. */
export interface FieldEdit {
  /** A whole new text; undefined takes the value away. */
  set(next: Quantity | undefined): void;
  /** A slide: any number of changes, then commit or cancel. */
  begin(): void;
  change(text: Quantity): void;
  commit(): void;
  cancel(): void;
}
