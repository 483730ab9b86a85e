import { useEffect, useState } from 'react';
import type { WeightPage } from '../../engine/requests/weight-page';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import { ScrollBox } from './scroll-box';
import { Tex } from './tex';
import styles from './weight-pages.module.css';
import { WordButton } from './word-button';

interface WeightPagesProps {
  readonly theory: string;
  /** The piece whose weights are shown. */
  readonly latex: string;
}

/** The weights of a piece with too many of them to be sent along, page by page. */
export function WeightPages({ theory, latex }: WeightPagesProps) {
  const { client, outline, view } = useSession();
  const text = useSelected(outline.state, (state) => state.text);
  const [page, setPage] = useState(0);
  const [found, setFound] = useState<WeightPage | null>(null);

  useEffect(() => {
    let current = true;
    const { notation } = view.get();
    client
      .weightPage(text, theory, latex, page, { notation })
      .then((next) => {
        if (current) setFound(next);
      })
      .catch(() => {
        if (current) setFound({ kind: 'none' });
      });
    return () => {
      current = false;
    };
  }, [client, view, text, theory, latex, page]);

  if (found === null) return <p className={styles.note}>Listing the weights ...</p>;
  if (found.kind === 'none') return <p className={styles.note}>The weights could not be listed.</p>;
  return (
    <>
      <p className={styles.note}>
        <span role="status">
          Weights {found.from} to {found.to} of {found.of}
        </span>{' '}
        <WordButton disabled={page === 0} onClick={() => setPage(page - 1)}>
          Previous
        </WordButton>
        <WordButton disabled={found.to >= found.of} onClick={() => setPage(page + 1)}>
          Next
        </WordButton>
      </p>
      <ScrollBox label="Some of the weights of this factor">
        <Tex tex={`\\displaystyle ${found.latex}`} />
      </ScrollBox>
    </>
  );
}
