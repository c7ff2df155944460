import { type Memory, makeMemory, type Posted } from '../engine/network/memory';
import type { Basis } from '../engine/network/types';

/** Memories that are kept, so that undoing a change of chemicals or model finds its answers again. */
const KEPT_MEMORIES = 2;
/** Bases that are kept; the page posts one again when it comes back to it. */
const KEPT_BASES = 4;

/** Puts an entry last and lets the oldest go. */
function keep<T>(kept: Map<string, T>, id: string, value: T, most: number): void {
  kept.delete(id);
  kept.set(id, value);
  for (const old of [...kept.keys()].slice(0, -most)) kept.delete(old);
}

/** Bases that the page has posted, and a memory for each of those last solved; all share what has been handed out. */
export class Memories {
  private readonly bases = new Map<string, Basis>();
  private readonly memories = new Map<string, Memory>();

  constructor(private readonly posted: Posted) {}

  learn(basis: Basis): void {
    keep(this.bases, basis.id, basis, KEPT_BASES);
  }

  /** The memory of a basis, asked for last and so forgotten last. Throws when no such basis was posted. */
  of(id: string): Memory {
    const basis = this.bases.get(id);
    const memory = this.memories.get(id) ?? (basis && makeMemory(basis, this.posted));
    if (!memory) throw new Error(`no basis ${id} was posted`);
    keep(this.memories, id, memory, KEPT_MEMORIES);
    return memory;
  }

  forget(id: string): void {
    this.memories.delete(id);
  }
}
