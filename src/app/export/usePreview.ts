import { useEffect, useState } from 'react';
import type { Made } from '../../documents/messages';
import type { Sketch } from '../../sketch/types';
import { writeSketch } from '../../sketch/write';
import { useSketch, useStores } from '../../store/react';
import { fingerprint } from '../reporting';
import { fontsAddress, orderOf, type Solved, solvedForDocuments } from './exports';
import { CANCELLED, type Making, previewMaker } from './maker';

export type Preview =
  | { readonly is: 'solving' | 'nothing' | 'cancelled' }
  | { readonly is: 'making'; readonly doing: string; readonly share: number; readonly cancel: () => void }
  | { readonly is: 'made'; readonly made: Made; readonly address: string; readonly of: Sketch }
  | { readonly is: 'failed'; readonly why: string };

/** Changes of choices in quick succession are one order [ms]. */
const PAUSE_MS = 250;

/** The clean answer with the sketch as it stands: its choices may have changed since it was solved, its numbers not. */
export const upToDate = async (clean: Solved, sketch: Sketch): Promise<Solved> => ({
  ...clean,
  input: { ...clean.input, sketch, fingerprint: await fingerprint(writeSketch(sketch)) },
});

/**
 * The sketch solved once from nothing when the dialogue opens; the pages of its summary, made again in the worker after
 * each change of choices. A newer order ends an older one.
 */
export function usePreview(): {
  readonly solved: Solved | undefined;
  readonly preview: Preview;
  readonly again: () => void;
} {
  const stores = useStores();
  const sketch = useSketch((state) => state.sketch);
  const [clean, setClean] = useState<Solved | undefined>();
  const [preview, setPreview] = useState<Preview>({ is: 'solving' });
  const [round, setRound] = useState(0);

  useEffect(() => {
    let alive = true;
    const end = new AbortController();
    previewMaker().wake(fontsAddress());
    solvedForDocuments(stores, end.signal).then(
      (solved) => {
        if (!alive) return;
        setClean(solved);
        if (!solved) setPreview({ is: 'nothing' });
      },
      (error: Error) => {
        if (alive) setPreview({ is: 'failed', why: error.message });
      },
    );
    return () => {
      alive = false;
      end.abort(new Error(CANCELLED));
    };
  }, [stores]);

  // biome-ignore lint/correctness/useExhaustiveDependencies: a new round makes the same pages again
  useEffect(() => {
    if (!clean) return;
    let making: Making | undefined;
    let address = '';
    let alive = true;
    const make = async (): Promise<void> => {
      const { input } = await upToDate(clean, sketch);
      if (!alive) return;
      const progress = (doing: string, share: number): void => {
        if (alive) setPreview({ is: 'making', doing, share, cancel: () => making?.cancel() });
      };
      making = previewMaker().make(orderOf('summary-pdf', input), progress);
      progress('Starting', 0);
      try {
        const made = await making.made;
        if (!alive) return;
        address = URL.createObjectURL(new Blob([made.bytes], { type: made.type }));
        setPreview({ is: 'made', made, address, of: sketch });
      } catch (error) {
        if (!alive) return;
        const why = error instanceof Error ? error.message : String(error);
        setPreview(why === CANCELLED ? { is: 'cancelled' } : { is: 'failed', why });
      }
    };
    const timer = setTimeout(() => void make(), PAUSE_MS);
    return () => {
      alive = false;
      clearTimeout(timer);
      making?.cancel();
      if (address) URL.revokeObjectURL(address);
    };
  }, [clean, sketch, round]);

  return { solved: clean, preview, again: () => setRound(round + 1) };
}
