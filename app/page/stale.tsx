import type { ReactNode } from 'react';
import styles from './stale.module.css';

interface StaleProps {
  readonly on: boolean;
  /** Why it is old, in words. */
  readonly says: string;
  readonly children: ReactNode;
}

/** What was right for an earlier text: kept in sight, and marked so that nobody takes it for the present one. */
export function Stale({ on, says, children }: StaleProps) {
  return (
    <div className={on ? styles.stale : undefined}>
      {on ? <p className={styles.says}>{says}</p> : null}
      {children}
    </div>
  );
}
