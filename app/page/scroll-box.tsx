import { type ReactNode, useRef } from 'react';
import styles from './scroll-box.module.css';
import { useOverflow } from './use-overflow';

/** Wide content scrolls in its own box; the box takes the focus only when there is something to scroll. */
export function ScrollBox({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  const ref = useRef<HTMLDivElement>(null);
  const overflows = useOverflow(ref);
  const reach = overflows ? { tabIndex: 0, role: 'group', 'aria-label': label } : {};
  return (
    <div ref={ref} className={styles.box} {...reach}>
      <div className={styles.content}>{children}</div>
    </div>
  );
}
