import { useSession, useStores } from '../store/react';

/** What was refused or needs to be known, over the sheet until it is put away. */
export function Notice() {
  const stores = useStores();
  const notice = useSession((state) => state.notice);
  if (!notice) return null;
  return (
    <section className="notice" data-tone={notice.tone} role="alert" key={notice.key}>
      <h2>{notice.title}</h2>
      {notice.lines.length === 1 ? <p>{notice.lines[0]}</p> : null}
      {notice.lines.length > 1 ? (
        <ul>
          {notice.lines.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      ) : null}
      <button type="button" className="button line" onClick={() => stores.session.dismiss()}>
        Close
      </button>
    </section>
  );
}
