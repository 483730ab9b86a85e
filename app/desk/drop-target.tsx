import { useEffect, useState } from 'react';
import { useSession } from '../state/session';
import styles from './drop-target.module.css';

/** Largest file taken for a notebook: thousands of pages of text, yet no film dropped by mistake. */
const LARGEST = 4_000_000;

const carriesFile = (event: DragEvent) => event.dataTransfer?.types.includes('Files') ?? false;

/** A notebook file dragged over the desk is opened where it is dropped. */
export function DropTarget() {
  const { keeper, notices } = useSession();
  const [over, setOver] = useState(false);

  useEffect(() => {
    async function take(file: File): Promise<void> {
      if (file.size > LARGEST) {
        notices.say(`${file.name} is too large to be a notebook.`);
        return;
      }
      await keeper.create(await file.text());
      notices.say(`${file.name} is open.`);
    }
    const onDragOver = (event: DragEvent) => {
      if (!carriesFile(event)) return;
      event.preventDefault();
      setOver(true);
    };
    const onDragLeave = (event: DragEvent) => {
      if (event.relatedTarget === null) setOver(false);
    };
    const onDrop = (event: DragEvent) => {
      if (!carriesFile(event)) return;
      event.preventDefault();
      event.stopPropagation();
      setOver(false);
      const file = event.dataTransfer?.files[0];
      if (file) take(file).catch((error: unknown) => notices.say(`${file.name} could not be opened: ${String(error)}`));
    };
    addEventListener('dragover', onDragOver, true);
    addEventListener('dragleave', onDragLeave, true);
    addEventListener('drop', onDrop, true);
    return () => {
      removeEventListener('dragover', onDragOver, true);
      removeEventListener('dragleave', onDragLeave, true);
      removeEventListener('drop', onDrop, true);
    };
  }, [keeper, notices]);

  return over ? <div className={styles.target}>Drop the notebook here</div> : null;
}
