/** Components that React rendered, by name, through the hook it offers to its tools. Import it before React. */
interface Fiber {
  readonly flags: number;
  readonly type: unknown;
  readonly child: Fiber | null;
  readonly sibling: Fiber | null;
  readonly alternate: Fiber | null;
}

const PERFORMED_WORK = 1;

function nameOf(type: unknown): string {
  if (typeof type === 'function') return type.name;
  if (typeof type === 'object' && type !== null && 'type' in type) return nameOf(type.type);
  return '';
}

export const rendered: string[] = [];

function walk(now: Fiber, before: Fiber | null): void {
  if (nameOf(now.type) !== '' && (now.flags & PERFORMED_WORK) !== 0) rendered.push(nameOf(now.type));
  if (now.child === before?.child) return;
  for (let child = now.child; child; child = child.sibling) walk(child, child.alternate);
}

Object.assign(globalThis, {
  __REACT_DEVTOOLS_GLOBAL_HOOK__: {
    supportsFiber: true,
    inject: () => 1,
    checkDCE: () => undefined,
    onCommitFiberUnmount: () => undefined,
    onPostCommitFiberRoot: () => undefined,
    onCommitFiberRoot: (_id: number, root: { readonly current: Fiber }) =>
      walk(root.current, root.current.alternate),
  },
});
