import { useEffect, useState } from 'react';
import { useSketch, useStores } from '../../store/react';
import { Dialogue } from '../Dialogue';
import { saveFile } from '../documents';

interface Made {
  readonly link: string;
  readonly isLong: boolean;
  readonly limit: number;
}

const count = (n: number): string => n.toLocaleString('en-GB');

/** The open sketch as a link that holds all of it. */
export function ShareDialogue() {
  const stores = useStores();
  const sketch = useSketch((state) => state.sketch);
  const [made, setMade] = useState<Made | null>(null);
  const [said, setSaid] = useState('');
  useEffect(() => {
    let alive = true;
    import('./link').then(
      ({ linkOf, LONG_LINK }) => {
        if (!alive) return;
        const link = location.origin + location.pathname + linkOf(sketch);
        setMade({ link, isLong: link.length > LONG_LINK, limit: LONG_LINK });
      },
      (error: unknown) => alive && setSaid(`The link could not be made: ${String(error)}`),
    );
    return () => {
      alive = false;
    };
  }, [sketch]);

  const copy = async (link: string): Promise<void> => {
    try {
      await navigator.clipboard.writeText(link);
      setSaid('Copied.');
    } catch (error) {
      if (!(error instanceof DOMException || error instanceof TypeError)) throw error;
      setSaid('The browser does not let the page copy: select the link and press Ctrl+C.');
    }
  };

  return (
    <Dialogue title="Share as a link">
      <p>
        The whole sketch is in the link itself, after the #. It is not sent to any server, neither now nor
        when the link is opened; whoever has the link has the sketch.
      </p>
      {made ? (
        <>
          <textarea
            className="share-text plain-field"
            aria-label="Link"
            readOnly
            value={made.link}
            onFocus={(event) => event.currentTarget.select()}
          />
          <p data-link-length={made.link.length}>{count(made.link.length)} characters.</p>
          {made.isLong ? (
            <p className="share-long">
              <strong>Long.</strong> Some mail programs cut links of more than {count(made.limit)} characters
              (common practice). A link that was cut is told when it is opened; a file is the safer way.
            </p>
          ) : null}
          <p className="notice-steps">
            <button type="button" className="button fill" onClick={() => void copy(made.link)}>
              Copy the link
            </button>
            <button type="button" className="button line" onClick={() => saveFile(stores)}>
              Save as a file
            </button>
          </p>
        </>
      ) : null}
      <p className="sketch-said" role="status">
        {said}
      </p>
    </Dialogue>
  );
}
