/** An edge between two nodes of a loop and what it costs to cut it. Several between the same nodes are cut together. */
export interface Arc {
  readonly from: number;
  readonly to: number;
  /** > 0. */
  readonly weight: number;
}

/** Up to so many nodes the least cut is found exactly; what runs straight through is taken out first. */
const EXACT = 12;

/**
 * An order of nodes 0..count - 1 in which the arcs that point back to the node itself or to one before it weigh as little as
 * was found: exactly the least for small loops, a good one for large ones. The same arcs give the same order.
 *
 * Nodes with one arc in and one out are drawn into their neighbours; then dynamic programming over sets (Held & Karp, J. SIAM 10
 * (1962) 196), or, above twelve nodes, Eades, Lin & Smyth, Inf. Process. Lett. 47 (1993) 319, improved by moving single nodes.
 */
export function cheapOrder(count: number, arcs: readonly Arc[]): number[] {
  const weight = Array.from({ length: count }, () => new Map<number, number>());
  const into = Array.from({ length: count }, () => new Set<number>());
  for (const { from, to, weight: w } of arcs) {
    if (from === to) continue;
    weight[from]!.set(to, (weight[from]!.get(to) ?? 0) + w);
    into[to]!.add(from);
  }
  const drawn = drawIn(count, weight, into);
  const left: number[] = [];
  for (let v = 0; v < count; v++) if (!drawn.some((d) => d.node === v)) left.push(v);
  const cost = (a: number, b: number): number => weight[left[a]!]!.get(left[b]!) ?? 0;
  const order = (left.length <= EXACT ? exact(left.length, cost) : greedy(left.length, cost)).map(
    (k) => left[k]!,
  );
  for (const { node, from, to, before } of drawn.reverse()) {
    const at = before ? order.indexOf(to) : order.indexOf(from) + 1;
    order.splice(at, 0, node);
  }
  return order;
}

interface DrawnIn {
  readonly node: number;
  readonly from: number;
  readonly to: number;
  /** The arc into the node is the cheaper one: it stands before its successor, else after its predecessor. */
  readonly before: boolean;
}

/** Takes nodes out that only pass on; their two arcs become one that costs what the cheaper one does. Mutates both lists. */
function drawIn(count: number, weight: Map<number, number>[], into: Set<number>[]): DrawnIn[] {
  const drawn: DrawnIn[] = [];
  for (let again = true; again; ) {
    again = false;
    for (let v = 0; v < count; v++) {
      if (into[v]!.size !== 1 || weight[v]!.size !== 1) continue;
      const from = [...into[v]!][0]!;
      const [to, leaving] = [...weight[v]!][0]!;
      const entering = weight[from]!.get(v)!;
      drawn.push({ node: v, from, to, before: entering < leaving });
      weight[from]!.delete(v);
      weight[v]!.clear();
      into[v]!.clear();
      into[to]!.delete(v);
      if (from !== to) {
        weight[from]!.set(to, (weight[from]!.get(to) ?? 0) + Math.min(entering, leaving));
        into[to]!.add(from);
      }
      again = true;
    }
  }
  return drawn;
}

/** The least cut over all orders: best[S] is the least for the nodes of S standing first. */
function exact(n: number, cost: (a: number, b: number) => number): number[] {
  const best = new Float64Array(1 << n).fill(Number.POSITIVE_INFINITY);
  const last = new Int8Array(1 << n);
  best[0] = 0;
  for (let set = 0; set < 1 << n; set++)
    for (let v = 0; v < n; v++) {
      if (set & (1 << v)) continue;
      let sum = best[set]!;
      for (let b = 0; b < n; b++) if (set & (1 << b)) sum += cost(v, b);
      const next = set | (1 << v);
      if (sum < best[next]!) {
        best[next] = sum;
        last[next] = v;
      }
    }
  const order: number[] = [];
  for (let set = (1 << n) - 1; set > 0; set ^= 1 << last[set]!) order.unshift(last[set]!);
  return order;
}

function greedy(n: number, cost: (a: number, b: number) => number): number[] {
  const open = new Set(Array.from({ length: n }, (_, v) => v));
  const head: number[] = [];
  const tail: number[] = [];
  const sum = (of: (other: number) => number): number => {
    let total = 0;
    for (const other of open) total += of(other);
    return total;
  };
  while (open.size > 0) {
    let pick = -1;
    let most = Number.NEGATIVE_INFINITY;
    for (const v of open) {
      const leaving = sum((other) => cost(v, other));
      const entering = sum((other) => cost(other, v));
      const gain = entering === 0 || leaving === 0 ? Number.POSITIVE_INFINITY : leaving - entering;
      if (pick < 0 || gain > most) [pick, most] = [v, gain];
    }
    const sink = sum((other) => cost(pick, other)) === 0;
    open.delete(pick);
    if (sink) tail.unshift(pick);
    else head.push(pick);
  }
  return improve([...head, ...tail], cost);
}

/** Moves single nodes to where they cut least, until none gains. */
function improve(order: number[], cost: (a: number, b: number) => number): number[] {
  for (let gained = true; gained; ) {
    gained = false;
    for (let at = 0; at < order.length; at++) {
      const v = order[at]!;
      let best = { change: 0, to: at };
      for (const step of [1, -1])
        for (let to = at + step, change = 0; to >= 0 && to < order.length; to += step) {
          // Whom it passes: what ran forward between the two runs back, and the other way round.
          const [first, second] = step > 0 ? [v, order[to]!] : [order[to]!, v];
          change += cost(first, second) - cost(second, first);
          if (change < best.change - 1e-9) best = { change, to };
        }
      if (best.to === at) continue;
      order.splice(at, 1);
      order.splice(best.to, 0, v);
      gained = true;
    }
  }
  return order;
}
