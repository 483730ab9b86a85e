import { type ReactNode, useEffect, useId, useRef } from 'react';
import { WordButton } from '../page/word-button';
import styles from './dialog.module.css';

interface DialogProps {
  readonly title: string;
  readonly onClose: () => void;
  readonly children: ReactNode;
}

/** A native modal dialog: Escape, a click beside it or its own word close it, and the focus goes back where it was. */
export function Dialog({ title, onClose, children }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const heading = useId();

  useEffect(() => {
    const dialog = ref.current;
    const before = document.activeElement;
    dialog?.showModal();
    // A dialog begins where its work begins; by itself it would begin at the word that closes it.
    dialog?.querySelector<HTMLElement>('[data-first]')?.focus();
    return () => {
      dialog?.close();
      if (before instanceof HTMLElement) before.focus();
    };
  }, []);

  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: Escape closes a native dialog by itself
    <dialog
      ref={ref}
      className={styles.dialog}
      aria-labelledby={heading}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onClick={(event) => {
        if (event.target === ref.current) onClose();
      }}
    >
      <div className={styles.body}>
        <header className={styles.head}>
          <h2 id={heading}>{title}</h2>
          <WordButton onClick={onClose}>Close</WordButton>
        </header>
        {children}
      </div>
    </dialog>
  );
}
