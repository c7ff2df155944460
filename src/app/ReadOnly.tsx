import { useState } from 'react';
import { useSketch, useStores } from '../store/react';
import { editCopy } from './documents';
import { theTakeOver } from './storage';
import './readOnly.css';

/** The sketch belongs to another tab: says so, and offers the two ways to work on. */
export function ReadOnly() {
  const stores = useStores();
  const writable = useSketch((state) => state.writable);
  const [asking, setAsking] = useState(false);
  if (writable) return null;
  const takeOver = async (): Promise<void> => {
    const take = theTakeOver();
    if (!take) return;
    setAsking(true);
    try {
      await take();
    } finally {
      setAsking(false);
    }
  };
  return (
    <section className="read-only" aria-label="Read only" role="status">
      <p>
        <strong>Read only.</strong> Another tab is editing this sketch.
      </p>
      <button type="button" className="button line" disabled={asking} onClick={() => editCopy(stores)}>
        Edit a copy
      </button>
      <button
        type="button"
        className="button line"
        disabled={asking}
        title="The other tab becomes read only; what was done there is kept"
        onClick={() => void takeOver()}
      >
        {asking ? 'Taking over' : 'Take over'}
      </button>
    </section>
  );
}
