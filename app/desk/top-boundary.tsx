import { Component, type ReactNode } from 'react';
import styles from './top-boundary.module.css';

interface TopBoundaryProps {
  /** The text as it is, for saving it from a page that cannot go on. */
  readonly text: () => string;
  readonly children: ReactNode;
}

/** The last resort: whatever breaks, the text can be taken away. */
export class TopBoundary extends Component<TopBoundaryProps, { readonly message: string | null }> {
  override state: { readonly message: string | null } = { message: null };

  static getDerivedStateFromError(error: unknown): { readonly message: string } {
    return { message: error instanceof Error ? error.message : String(error) };
  }

  override render(): ReactNode {
    if (this.state.message === null) return this.props.children;
    return (
      <main className={styles.rescue}>
        <h1>The page cannot go on</h1>
        <p>A defect of Spherelathe stopped it: {this.state.message}</p>
        <p>Your text is here. Copy it, then load the page again; it is also kept in this browser.</p>
        <textarea aria-label="Text of the notebook" readOnly rows={24} defaultValue={this.props.text()} />
        <button type="button" onClick={() => location.reload()}>
          Load again
        </button>
      </main>
    );
  }
}
