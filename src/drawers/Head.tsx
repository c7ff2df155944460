import { useStores } from '../store/react';

interface Props {
  /** What the drawer is about, for screen readers. */
  readonly label: string;
  readonly mark?: React.ReactNode;
  readonly title?: React.ReactNode;
  readonly sentence: React.ReactNode;
}

/** Title, one sentence, and a way out. */
export function Head({ label, mark, title, sentence }: Props) {
  const { session } = useStores();
  return (
    <header className="drawer-head">
      <div className="title-line">
        {mark}
        {title ? <h2 className="unseen">{label}</h2> : null}
        {title ?? <h2>{label}</h2>}
        <button type="button" className="link quiet" onClick={() => session.openDrawer(null)}>
          Close
        </button>
      </div>
      <p>{sentence}</p>
    </header>
  );
}
