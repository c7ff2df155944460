import { Newton } from './newton';
import { StageSystem, shapeOf } from './system';
import type { ColumnTask } from './types';

/** Scratch of columns of one shape and one model; its contents mean nothing between solves. */
export interface ColumnWork {
  readonly shape: string;
  readonly system: StageSystem;
  readonly newton: Newton;
}

/** The workspace for a task: the one given if it fits, else a new one. */
export function workFor(task: ColumnTask, known?: ColumnWork): ColumnWork {
  const shape = shapeOf(task);
  if (known?.shape === shape && known.system.model === task.model) return known;
  const system = new StageSystem(task);
  return { shape, system, newton: new Newton(system) };
}
