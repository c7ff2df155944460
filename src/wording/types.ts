/**
 * One sentence of the program: `{name}` is filled with the evidence of that name as number and unit, `{name%}` as a percentage,
 * `{unit}`, `{stream}`, `{port}`, `{setting}` with the place. `next` says what to do about it.
 */
export interface Sentence {
  readonly title: string;
  readonly says: string;
  readonly next?: string;
}

/** Words of one kind of unit. What is not listed is shown by its key's own words. */
export interface KindWords {
  /** In running text: "flash drum". */
  readonly name: string;
  /** One line under the name on the shelf. */
  readonly about: string;
  readonly ports?: Readonly<Record<string, string>>;
  readonly settings?: Readonly<Record<string, string>>;
  readonly results?: Readonly<Record<string, string>>;
  readonly options?: Readonly<Record<string, string>>;
  readonly sentences?: Readonly<Record<string, Sentence>>;
}
