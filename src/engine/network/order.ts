/**
 * Strongly connected components of a directed graph, upstream first.
 *
 * @param after  after[i] = nodes that need node i (edges i -> j); nodes are 0..after.length - 1
 * @returns every node once; a component of several nodes, or of one with an edge to itself, is a loop. The order depends on the
 *   graph and the numbering alone; nodes inside a component are ascending.
 * Source: Tarjan, SIAM J. Comput. 1 (1972) 146. Written without recursion, so that long trains do not exhaust the stack.
 */
export function components(after: readonly (readonly number[])[]): number[][] {
  const count = after.length;
  const index = new Int32Array(count).fill(-1);
  const low = new Int32Array(count);
  const onStack = new Uint8Array(count);
  const next = new Int32Array(count);
  const stack: number[] = [];
  const path: number[] = [];
  const found: number[][] = [];
  let counter = 0;
  // Components come out downstream first; starting from the last node keeps the reversed order near the numbering.
  for (let root = count - 1; root >= 0; root--) {
    if (index[root] !== -1) continue;
    path.push(root);
    while (path.length > 0) {
      const node = path[path.length - 1]!;
      if (index[node] === -1) {
        index[node] = low[node] = counter++;
        stack.push(node);
        onStack[node] = 1;
      }
      const edges = after[node]!;
      let deeper = false;
      while (next[node]! < edges.length) {
        const to = edges[next[node]!++]!;
        if (index[to] === -1) {
          path.push(to);
          deeper = true;
          break;
        }
        if (onStack[to]) low[node] = Math.min(low[node]!, index[to]!);
      }
      if (deeper) continue;
      path.pop();
      const parent = path[path.length - 1];
      if (parent !== undefined) low[parent] = Math.min(low[parent]!, low[node]!);
      if (low[node] !== index[node]) continue;
      const component: number[] = [];
      for (;;) {
        const member = stack.pop()!;
        onStack[member] = 0;
        component.push(member);
        if (member === node) break;
      }
      found.push(component.sort((a, b) => a - b));
    }
  }
  return found.reverse();
}
