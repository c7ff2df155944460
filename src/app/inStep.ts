import type { Sketch } from '../sketch/types';
import type { CompiledState } from '../store/compiledStore';
import type { Stores } from '../store/react';

export interface InStep {
  readonly sketch: Sketch;
  readonly compiled: CompiledState;
}

/**
 * The sketch that is shown together with what it compiles to. While data of its chemicals are on their way, what was
 * compiled last belongs to an older document or to another sketch: then the new one is waited for, so that no document
 * carries the numbers of another. Rejected with the reason when the data cannot be had, or when the signal says so.
 */
export function inStep({ sketch, compiled }: Stores, signal?: AbortSignal): Promise<InStep> {
  return new Promise((resolve, reject) => {
    let stop = (): void => undefined;
    const end = (): void => {
      stop();
      signal?.removeEventListener('abort', abort);
    };
    const abort = (): void => {
      end();
      reject(signal?.reason);
    };
    const look = (): void => {
      const [shown, now] = [sketch.getState(), compiled.getState()];
      if (now.trouble !== undefined) {
        end();
        reject(new Error(now.trouble));
      } else if (now.edit === shown.edit) {
        end();
        resolve({ sketch: shown.sketch, compiled: now });
      }
    };
    if (signal?.aborted) {
      abort();
      return;
    }
    signal?.addEventListener('abort', abort);
    stop = compiled.subscribe(look);
    look();
  });
}
