/** The latest word on a stream or unit, and the last solved result where the latest has none to show. */
export interface Shown<T> {
  readonly latest: T;
  /** An older solved result, shown as out of date while the new one is missing. Never beside 'no solution'. */
  readonly older?: T;
}
