import { Component, type ReactNode } from 'react';
import type { Stores } from '../store/react';
import { saveFile } from './documents';

interface Props {
  readonly stores: Stores;
  readonly children: ReactNode;
}

/** Our own mistakes end here: the sketch can still be saved, and the page can be shown again. */
export class ErrorBoundary extends Component<Props, { readonly error: Error | null }> {
  override state: { readonly error: Error | null } = { error: null };

  static getDerivedStateFromError(error: Error): { readonly error: Error } {
    return { error };
  }

  /** With nothing open and nothing selected: what could not be drawn may be what was open. */
  private readonly again = (): void => {
    this.props.stores.session.setState({ drawer: null, over: 'none', units: [], streams: [], notes: [] });
    this.setState({ error: null });
  };

  override render(): ReactNode {
    const { error } = this.state;
    const { stores, children } = this.props;
    if (!error) return children;
    const last = stores.sketch.getState().past.at(-1)?.label;
    return (
      <main className="broken" role="alert">
        <h1>This page hit a fault of its own</h1>
        <p>Your sketch is not lost. Save it as a file, then show the page again.</p>
        <p className="muted">{error.message}</p>
        <p className="notice-steps">
          <button type="button" className="button line" onClick={() => saveFile(stores)}>
            Save as a file
          </button>
          {last ? (
            <button
              type="button"
              className="button line"
              onClick={() => {
                stores.sketch.undo();
                this.again();
              }}
            >
              Undo “{last}” and show the page again
            </button>
          ) : null}
          <button type="button" className="button fill" onClick={this.again}>
            Show the page again
          </button>
        </p>
      </main>
    );
  }
}
