import { useSession, useStores } from '../store/react';
import type { SessionState } from '../store/session';
import { saveFile } from './documents';
import { takeUpdate } from './offline';
import { ReadOnly } from './ReadOnly';

/** Over the sheet: that it can only be read; and what was refused or needs to be known, until it is put away. */
export function Notice() {
  const notice = useSession((state) => state.notice);
  return (
    <>
      <ReadOnly />
      {notice ? <Told notice={notice} /> : null}
    </>
  );
}

function Told({ notice }: { readonly notice: NonNullable<SessionState['notice']> }) {
  const stores = useStores();
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
      <div className="notice-steps">
        {notice.steps?.map((step) => (
          <button
            key={step.label}
            type="button"
            className="button line"
            onClick={() => {
              stores.session.dismiss();
              step.run();
            }}
          >
            {step.label}
          </button>
        ))}
        <button type="button" className="button line" onClick={() => stores.session.dismiss()}>
          Close
        </button>
      </div>
    </section>
  );
}

/** At the foot of the sheet: that there is a new version, which waits as long as one likes, or that the page has lost a part. */
export function Update() {
  const stores = useStores();
  const update = useSession((state) => state.update);
  const outdated = useSession((state) => state.outdated);
  const kept = useSession(({ saved }) => saved.state === 'saved' || saved.state === 'read-only');
  if (outdated)
    return (
      <section className="foot-line" role="alert" aria-label="Reload needed">
        <span>
          <strong>This page needs to be loaded again.</strong> A part of it could not be fetched: a new
          version may have taken its place, or there is no network.{' '}
          {kept ? 'What you drew is kept.' : 'Save what you drew as a file first.'}
        </span>
        <button type="button" className="button line" onClick={() => saveFile(stores)}>
          Save as a file
        </button>
        <button type="button" className="button fill" onClick={takeUpdate}>
          Reload
        </button>
      </section>
    );
  if (!update) return null;
  return (
    <section className="foot-line update" role="status" aria-label="New version">
      <p>A new version is ready.</p>
      <button type="button" className="button line" onClick={takeUpdate}>
        Reload
      </button>
    </section>
  );
}
