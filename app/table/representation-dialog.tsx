import { type KeyboardEvent, useEffect, useState } from 'react';
import type { RepresentationChoice } from '../../workers/types';
import { Dialog } from '../desk/dialog';
import { Says, Tex } from '../page/tex';
import { WordButton } from '../page/word-button';
import { useSession } from '../state/session';
import styles from './representation-dialog.module.css';
import { YoungDiagram } from './young-diagram';

interface RepresentationDialogProps {
  readonly group: string;
  /** Called with the word to write into the cell. */
  readonly onChoose: (word: string) => void;
  readonly onClose: () => void;
}

const FIRST = 40;

export function RepresentationDialog({ group, onChoose, onClose }: RepresentationDialogProps) {
  const { client } = useSession();
  const [limit, setLimit] = useState(FIRST);
  const [choices, setChoices] = useState<readonly RepresentationChoice[] | null>(null);
  const [filter, setFilter] = useState('');
  const [trouble, setTrouble] = useState('');

  useEffect(() => {
    let gone = false;
    client.representations(group, limit).then(
      (found) => gone || setChoices(found),
      (error: unknown) => gone || setTrouble(String(error)),
    );
    return () => {
      gone = true;
    };
  }, [client, group, limit]);

  const found = choices?.filter((choice) => matches(choice, filter)) ?? [];
  const choose = (word: string) => {
    onChoose(word);
    onClose();
  };

  return (
    <Dialog title={`Representations of ${group}`} onClose={onClose}>
      <label className={styles.filter}>
        Find by word, dimension, labels or reality
        <input
          type="search"
          value={filter}
          data-first=""
          onChange={(event) => setFilter(event.target.value)}
          onKeyDown={(event) => {
            const [first] = found;
            if (event.key === 'Enter' && first) choose(first.word);
          }}
        />
      </label>
      <p className={styles.count} role="status">
        {trouble || (choices ? `${found.length} of ${choices.length} shown` : 'Looking them up…')}
      </p>
      <div className={styles.list}>
        <table className={styles.table} onKeyDown={moveInList}>
          <thead>
            <tr>
              <th scope="col">write</th>
              <th scope="col" className={styles.wide}>
                name
              </th>
              <th scope="col">labels</th>
              <th scope="col" className={styles.wide}>
                diagram
              </th>
              <th scope="col">dimension</th>
              <th scope="col">index</th>
              <th scope="col">reality</th>
            </tr>
          </thead>
          <tbody>
            {found.map((choice) => (
              <tr key={choice.word}>
                <th scope="row">
                  <button type="button" className={styles.word} data-choice="" onClick={() => choose(choice.word)}>
                    {choice.word}
                  </button>
                </th>
                <td className={styles.wide}>
                  <Tex tex={choice.latex} />
                </td>
                <td className={styles.labels}>[{choice.labels.join(',')}]</td>
                <td className={styles.wide}>{choice.young ? <YoungDiagram rows={choice.young} /> : null}</td>
                <td>{choice.dimension}</td>
                <td>
                  <Says text={choice.index} />
                </td>
                <td>{choice.reality}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {choices && choices.length >= limit ? (
        <WordButton onClick={() => setLimit(limit * 2)}>Show larger ones</WordButton>
      ) : null}
    </Dialog>
  );
}

/** Every word of the filter must begin the word, the dimension, the labels or the reality. */
function matches(choice: RepresentationChoice, filter: string): boolean {
  const said = [choice.word, choice.dimension, `[${choice.labels.join(',')}]`, choice.labels.join(','), choice.reality];
  return filter
    .trim()
    .toLowerCase()
    .split(/\s+/)
    .every((part) => said.some((text) => text.toLowerCase().startsWith(part)));
}

function moveInList(event: KeyboardEvent<HTMLTableElement>): void {
  const by = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
  if (by === 0) return;
  const buttons = [...event.currentTarget.querySelectorAll<HTMLElement>('[data-choice]')];
  const next = buttons[buttons.findIndex((button) => button.matches(':focus')) + by];
  if (!next) return;
  event.preventDefault();
  next.focus();
}
