import { type ReactNode, useEffect, useRef } from 'react';
import { useStores } from '../store/react';
import { UnderWayList } from './export/UnderWayList';

/** A dialogue over the page: the browser's own, so that focus stays inside and Esc closes it. */
export function Dialogue({
  title,
  wide = false,
  aside = false,
  children,
}: {
  readonly title: string;
  readonly wide?: boolean;
  /** Small, at the side and without a veil: the sheet is watched meanwhile. */
  readonly aside?: boolean;
  readonly children: ReactNode;
}) {
  const stores = useStores();
  const ref = useRef<HTMLDialogElement>(null);
  const close = (): void => stores.session.setState({ over: 'none' });
  useEffect(() => {
    const dialogue = ref.current;
    if (dialogue && !dialogue.open) dialogue.showModal();
    return () => dialogue?.close();
  }, []);
  return (
    <dialog
      ref={ref}
      className={['dialogue', wide ? 'wide' : '', aside ? 'aside' : ''].filter(Boolean).join(' ')}
      aria-modal="true"
      aria-label={title}
      onClose={close}
    >
      <div className="dialogue-head">
        <h2>{title}</h2>
        <button type="button" className="button line" onClick={close}>
          Close
        </button>
      </div>
      <UnderWayList />
      {children}
    </dialog>
  );
}
