import { type CSSProperties, lazy, Suspense, useEffect, useRef, useState } from 'react';
import { PlainText } from '../editor/plain-text';
import { Page } from '../page/page';
import { useSession } from '../state/session';
import { useSelected, useStore } from '../state/store';
import { copyText } from '../storage/files';
import { fragmentOf } from '../storage/share-link';
import { type Command, commandFor } from './commands';
import styles from './desk.module.css';
import { DropTarget } from './drop-target';
import { EditorBoundary } from './editor-boundary';
import { Header } from './header';
import { KeysDialog } from './keys-dialog';
import { NotebooksDialog } from './notebooks-dialog';
import { NoticesShown } from './notices-shown';
import { PaneSwitch } from './pane-switch';
import { Splitter } from './splitter';
import { TextDialog } from './text-dialog';
import { useScrollTogether } from './use-scroll-together';

const Editor = lazy(async () => ({ default: (await import('../editor/editor')).Editor }));

type Opened = { readonly what: 'notebooks' | 'keys' } | { readonly what: 'link'; readonly link: string } | null;

/** Two halves: the text, and the page it makes. */
export function Desk() {
  const session = useSession();
  const { settings } = session;
  const { split, pane, theme } = useStore(settings.state);
  const [opened, setOpened] = useState<Opened>(null);
  const [editorReady, setEditorReady] = useState(false);
  const page = useRef<HTMLElement>(null);
  const editor = useRef<HTMLDivElement>(null);
  const commands = useCommands(setOpened, page, editor);
  useScrollTogether(page, editorReady);

  useEffect(() => {
    const root = document.documentElement;
    if (theme === 'system') delete root.dataset.theme;
    else root.dataset.theme = theme;
  }, [theme]);

  const title = useSelected(session.outline.state, ({ outline }) => outline?.title ?? '');
  useEffect(() => {
    document.title = title ? `${title} – Spherelathe` : 'Spherelathe';
  }, [title]);

  const style: CSSProperties & { readonly '--split': string } = { '--split': `${split}%` };
  const close = () => setOpened(null);
  return (
    <div className={styles.desk}>
      <Header commands={commands} />
      <PaneSwitch />
      <div className={styles.halves} data-pane={pane} style={style}>
        <div id="text-half" ref={editor} className={styles.text} data-half="text">
          <EditorBoundary>
            <Suspense fallback={<PlainText />}>
              <Editor onReady={() => setEditorReady(true)} />
            </Suspense>
          </EditorBoundary>
        </div>
        <Splitter />
        <main ref={page} className={styles.page} data-half="page" tabIndex={-1} aria-label="Page">
          <Page />
        </main>
      </div>
      {opened?.what === 'notebooks' ? <NotebooksDialog onClose={close} /> : null}
      {opened?.what === 'keys' ? <KeysDialog commands={commands} onClose={close} /> : null}
      {opened?.what === 'link' ? (
        <TextDialog title="Link to this notebook" text={opened.link} file="link.txt" onClose={close} />
      ) : null}
      <NoticesShown />
      <DropTarget />
    </div>
  );
}

type Place = { readonly current: HTMLElement | null };

function useCommands(open: (opened: Opened) => void, page: Place, editor: Place): readonly Command[] {
  const { text, notices, settings, keeper } = useSession();

  async function share(): Promise<void> {
    const link = `${location.href.replace(/#.*$/, '')}#${await fragmentOf(text.state.get().text)}`;
    if (await copyText(link)) notices.say('A link that holds the whole text is on the clipboard.');
    else open({ what: 'link', link });
  }

  function toOtherHalf(): void {
    const inText = editor.current?.contains(document.activeElement) ?? false;
    settings.change({ pane: inText ? 'page' : 'text' });
    if (inText) page.current?.focus();
    else editor.current?.querySelector<HTMLElement>('.cm-content, textarea')?.focus();
  }

  const commands: readonly Command[] = [
    { name: 'Notebooks', label: 'Notebooks', key: 'o', mod: true, perform: () => open({ what: 'notebooks' }) },
    { name: 'Share', label: 'Copy a link that holds the text', key: null, mod: false, perform: () => void share() },
    { name: 'Print', label: 'Print the page', key: 'p', mod: true, perform: () => print() },
    { name: 'Keys', label: 'This list', key: 'F1', mod: false, perform: () => open({ what: 'keys' }) },
    { name: 'other-half', label: 'From text to page and back', key: 'F6', mod: false, perform: toOtherHalf },
  ];

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      // Saving happens by itself; the habit of asking for it does no harm.
      if ((event.ctrlKey || event.metaKey) && event.key === 's') {
        event.preventDefault();
        keeper.saveNow().then(
          () => notices.say('Saved in this browser.'),
          () => undefined,
        );
        return;
      }
      const command = commandFor(event, commands);
      if (!command || document.querySelector('dialog[open]')) return;
      event.preventDefault();
      command.perform();
    };
    addEventListener('keydown', onKey);
    return () => removeEventListener('keydown', onKey);
  });

  return commands;
}
