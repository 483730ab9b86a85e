import { useEffect, useState } from 'react';
import { WordButton } from '../page/word-button';
import { useSession } from '../state/session';
import { useStore } from '../state/store';
import { type Example, exampleText, listExamples } from '../storage/examples';
import { downloadText, fileName, pickTextFile } from '../storage/files';
import { listNotebooks, type StoredNotebook, titleOf } from '../storage/library';
import { Dialog } from './dialog';
import styles from './notebooks-dialog.module.css';

const BLANK = '# New notebook\n\n';

/** The notebooks kept in this browser, files, and the examples that come along. */
export function NotebooksDialog({ onClose }: { readonly onClose: () => void }) {
  const { keeper, notices, text } = useSession();
  const { id: openId } = useStore(keeper.state);
  const [notebooks, setNotebooks] = useState<readonly StoredNotebook[] | null>(null);
  const [examples, setExamples] = useState<readonly Example[]>([]);

  async function list(): Promise<void> {
    await keeper.saveNow();
    setNotebooks(await listNotebooks().catch(() => []));
  }

  // biome-ignore lint/correctness/useExhaustiveDependencies: read once, when the dialog opens
  useEffect(() => {
    list().catch(() => setNotebooks([]));
    listExamples().then(setExamples, () => undefined);
  }, []);

  /** Does it, closes the dialog, and says so if it could not be done. */
  function act(work: () => Promise<void>): void {
    work().then(onClose, (error: unknown) => notices.say(`That could not be done: ${String(error)}`));
  }

  async function openFile(): Promise<void> {
    const content = await pickTextFile('.lathe,text/plain');
    if (content !== null) await keeper.create(content);
  }

  function saveFile(): void {
    const { text: content } = text.state.get();
    const name = fileName(titleOf(content), 'lathe');
    downloadText(name, content);
    notices.say(`Saved as ${name}.`);
  }

  return (
    <Dialog title="Notebooks" onClose={onClose}>
      <p className={styles.ways}>
        <WordButton data-first="" onClick={() => act(() => keeper.create(BLANK))}>
          New
        </WordButton>
        <WordButton onClick={() => act(openFile)}>Open a file…</WordButton>
        <WordButton onClick={saveFile}>Save this one as a file</WordButton>
      </p>
      <section aria-labelledby="kept-here">
        <h3 id="kept-here" className={styles.heading}>
          In this browser
        </h3>
        <ul className={styles.list}>
          {notebooks?.map((notebook) => (
            <li key={notebook.id} aria-current={notebook.id === openId || undefined}>
              <button type="button" className={styles.title} onClick={() => act(() => keeper.open(notebook.id))}>
                {notebook.title}
              </button>
              <span className={styles.when}>
                {notebook.id === openId ? 'open now' : `saved ${whenText(notebook.savedAt)}`}
              </span>
              <WordButton
                aria-label={`Delete ${notebook.title}`}
                onClick={() => {
                  keeper.remove(notebook).then(list, (error: unknown) => notices.say(String(error)));
                }}
              >
                Delete
              </WordButton>
            </li>
          ))}
        </ul>
        <p className={styles.remark}>A notebook's first heading is its name.</p>
      </section>
      {examples.length > 0 ? (
        <section aria-labelledby="examples">
          <h3 id="examples" className={styles.heading}>
            Examples
          </h3>
          <ul className={styles.list}>
            {examples.map((example) => (
              <li key={example.file}>
                <button
                  type="button"
                  className={styles.title}
                  onClick={() => act(async () => keeper.create(await exampleText(example.file)))}
                >
                  {example.title}
                </button>
                <span className={styles.when}>{example.says}</span>
              </li>
            ))}
          </ul>
        </section>
      ) : null}
    </Dialog>
  );
}

const moment = new Intl.DateTimeFormat(undefined, { dateStyle: 'medium', timeStyle: 'short' });

function whenText(savedAt: number): string {
  return moment.format(savedAt);
}
