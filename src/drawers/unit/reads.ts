import type { Form } from './form';

/** Where the fields of a drawer get their form from: as it stands now, and word of every change. */
export interface FormSource {
  get(): Form;
  subscribe(then: () => void): () => void;
}

const same = (a: unknown, b: unknown): boolean =>
  Object.is(a, b) ||
  (typeof a === 'object' && typeof b === 'object' && JSON.stringify(a) === JSON.stringify(b));

type Ask = (form: Form) => unknown;

/**
 * What one view asked of the form while it was drawn. As long as a newer form gives the same answers the view stays as it is:
 * a number that is dragged draws its own field and what else shows it.
 */
export class Reads {
  private readonly answers: (readonly [ask: Ask, answer: unknown])[] = [];
  private open = true;

  constructor(
    private readonly source: FormSource,
    private readonly form: Form,
  ) {}

  /** Drawing is over: who asks from now on (a click) is told of the form as it stands then. */
  close(): void {
    this.open = false;
  }

  holdsFor(form: Form): boolean {
    return form === this.form || this.answers.every(([ask, answer]) => same(ask(form), answer));
  }

  /** The form, noting what is asked of it. */
  noting(): Form {
    const note = <T>(ask: (form: Form) => T): T => {
      if (!this.open) return ask(this.source.get());
      const answer = ask(this.form);
      this.answers.push([ask, answer]);
      return answer;
    };
    const unit = new Proxy(this.form.unit, {
      get: (_, key) => note((form) => Reflect.get(form.unit, key)),
    });
    return {
      kind: this.form.kind,
      Editor: this.form.Editor,
      unit,
      get site() {
        return note((form) => form.site);
      },
      get disabled() {
        return note((form) => form.disabled);
      },
      get findings() {
        return note((form) => form.findings);
      },
      get assumptions() {
        return note((form) => form.assumptions);
      },
      value: (path) => note((form) => form.value(path)),
      has: (path) => note((form) => form.has(path)),
      ask: (question) => note(question),
      word: this.form.word,
      set: (changes, label) => this.source.get().set(changes, label),
      edit: (...about) => {
        note((form) => form.unit.tag);
        return this.source.get().edit(...about);
      },
    };
  }
}
