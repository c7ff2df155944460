/** What the headless command was asked to do. */
export interface Orders {
  readonly files: readonly string[];
  readonly json?: string;
  readonly jsonDir?: string;
  readonly csv?: string;
  readonly pdf?: string;
  readonly xlsx?: string;
  /** The drawing alone. */
  readonly svg?: string;
  /** TAG.path and value text, in the order given. */
  readonly sets: readonly (readonly [string, string])[];
  readonly strict: boolean;
}

export type ReadOrders =
  | { readonly ok: true; readonly orders: Orders }
  | { readonly ok: false; readonly why: string };

export const USAGE =
  'npm run -s solve -- FILE... [--json OUT | --json-dir DIR] [--csv OUT] [--pdf OUT] [--xlsx OUT] [--svg OUT] [--set TAG.path=value]... [--strict]';

const SINGLE = ['--json', '--csv', '--pdf', '--xlsx', '--svg'] as const;
const WITH_VALUE = [...SINGLE, '--json-dir', '--set'] as const;
type WithValue = (typeof WITH_VALUE)[number];
const isWithValue = (text: string): text is WithValue => (WITH_VALUE as readonly string[]).includes(text);

/** Reads the command line; a wrong one is refused with the reason. */
export function readOrders(args: readonly string[]): ReadOrders {
  const files: string[] = [];
  const sets: [string, string][] = [];
  const outs: Partial<Record<WithValue, string>> = {};
  let strict = false;
  for (let k = 0; k < args.length; k += 1) {
    const arg = args[k] ?? '';
    if (arg === '--strict') strict = true;
    else if (isWithValue(arg)) {
      k += 1;
      const value = args[k];
      if (value === undefined) return { ok: false, why: `${arg} needs a value` };
      if (arg === '--set') {
        const cut = value.indexOf('=');
        if (cut < 1) return { ok: false, why: `--set ${value}: expected TAG.path=value` };
        sets.push([value.slice(0, cut), value.slice(cut + 1)]);
      } else if (outs[arg] !== undefined) return { ok: false, why: `${arg} stands twice` };
      else outs[arg] = value;
    } else if (arg.startsWith('--')) return { ok: false, why: `unknown option ${arg}` };
    else files.push(arg);
  }
  if (files.length === 0) return { ok: false, why: 'no sketch file was named' };
  const single = SINGLE.find((name) => outs[name] !== undefined);
  if (files.length > 1 && single)
    return { ok: false, why: `${single} goes with one file; use --json-dir for several` };
  if (outs['--json'] && outs['--json-dir'])
    return { ok: false, why: '--json and --json-dir exclude each other' };
  return {
    ok: true,
    orders: {
      files,
      sets,
      strict,
      ...(outs['--json'] === undefined ? {} : { json: outs['--json'] }),
      ...(outs['--json-dir'] === undefined ? {} : { jsonDir: outs['--json-dir'] }),
      ...(outs['--csv'] === undefined ? {} : { csv: outs['--csv'] }),
      ...(outs['--pdf'] === undefined ? {} : { pdf: outs['--pdf'] }),
      ...(outs['--xlsx'] === undefined ? {} : { xlsx: outs['--xlsx'] }),
      ...(outs['--svg'] === undefined ? {} : { svg: outs['--svg'] }),
    },
  };
}
