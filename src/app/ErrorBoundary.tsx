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

  override render(): ReactNode {
    const { error } = this.state;
    if (!error) return this.props.children;
    return (
      <main className="broken" role="alert">
        <h1>This page hit a fault of its own</h1>
        <p>Your sketch is not lost. Save it as a file, then show the page again.</p>
        <p className="muted">{error.message}</p>
        <p>
          <button type="button" className="button line" onClick={() => saveFile(this.props.stores)}>
            Save as a file
          </button>{' '}
          <button type="button" className="button fill" onClick={() => this.setState({ error: null })}>
            Show the page again
          </button>
        </p>
      </main>
    );
  }
}
