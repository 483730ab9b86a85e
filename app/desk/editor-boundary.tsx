import { Component, type ReactNode } from 'react';
import { PlainText } from '../editor/plain-text';

/** Where the editor cannot be fetched or breaks, the text can still be written. */
export class EditorBoundary extends Component<{ readonly children: ReactNode }, { readonly failed: boolean }> {
  override state = { failed: false };

  static getDerivedStateFromError(): { readonly failed: boolean } {
    return { failed: true };
  }

  override render(): ReactNode {
    return this.state.failed ? <PlainText /> : this.props.children;
  }
}
