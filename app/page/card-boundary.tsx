import { Component, type ReactNode } from 'react';
import styles from './problems.module.css';

interface CardBoundaryProps {
  /** The card's content: when it changes, drawing is tried again. */
  readonly of: object;
  readonly children: ReactNode;
}

interface CardBoundaryState {
  readonly failedOn: object | null;
  readonly message: string;
}

/** A defect in drawing one card leaves the others standing. */
export class CardBoundary extends Component<CardBoundaryProps, CardBoundaryState> {
  override state: CardBoundaryState = { failedOn: null, message: '' };

  static getDerivedStateFromProps(props: CardBoundaryProps, state: CardBoundaryState): CardBoundaryState | null {
    return state.failedOn && state.failedOn !== props.of ? { failedOn: null, message: '' } : null;
  }

  static getDerivedStateFromError(error: unknown): Partial<CardBoundaryState> {
    return { message: error instanceof Error ? error.message : String(error) };
  }

  override componentDidCatch(): void {
    this.setState({ failedOn: this.props.of });
  }

  override render(): ReactNode {
    if (!this.state.message) return this.props.children;
    return (
      <p className={styles.problem} role="alert">
        This part of the page could not be drawn, which is a defect of Spherelathe, not of your text:{' '}
        {this.state.message}
      </p>
    );
  }
}
