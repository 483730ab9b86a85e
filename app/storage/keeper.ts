import { changeBetween } from '../state/changes';
import type { NotebookText } from '../state/notebook-text';
import type { Notices } from '../state/notices';
import type { SettingsStore } from '../state/settings';
import { createStore, type Readable, type Store } from '../state/store';
import { plainView, type View } from '../state/view';
import { exampleText, FIRST_EXAMPLE } from './examples';
import {
  listNotebooks,
  newId,
  putBack,
  readStored,
  removeNotebook,
  type StoredNotebook,
  saveNotebook,
} from './library';
import { textInFragment } from './share-link';

export type Saving = 'saved' | 'saving' | 'impossible';

export interface Kept {
  readonly id: string | null;
  readonly saving: Saving;
  readonly savedAt: number | null;
}

export interface Keeper {
  readonly state: Readable<Kept>;
  /** Opens what the address holds, or what was open last, or the worked example. */
  start(): Promise<void>;
  open(id: string): Promise<void>;
  /** A notebook with this text: the one that is kept already, or a new one. */
  create(text: string): Promise<void>;
  remove(notebook: StoredNotebook): Promise<void>;
  saveNow(): Promise<void>;
}

const PAUSE_MS = 300;

export function createKeeper(text: NotebookText, view: Store<View>, settings: SettingsStore, notices: Notices): Keeper {
  const state = createStore<Kept>({ id: null, saving: 'saved', savedAt: null });
  const tabs = 'BroadcastChannel' in globalThis ? new BroadcastChannel('spherelathe notebooks') : null;
  let version: string | null = null;
  /** What the browser holds of the open notebook. */
  let held: { readonly text: string; readonly view: View } = { text: '', view: plainView };
  let timer: ReturnType<typeof setTimeout> | undefined;

  const isHeld = () => text.state.get().text === held.text && view.get() === held.view;

  function show(notebook: Pick<StoredNotebook, 'id' | 'text' | 'view'>, knownVersion: string | null): void {
    clearTimeout(timer);
    version = knownVersion;
    held = { text: notebook.text, view: notebook.view };
    state.set({ id: notebook.id, saving: 'saved', savedAt: null });
    settings.change({ notebook: notebook.id });
    view.set(notebook.view);
    text.open(notebook.text);
  }

  async function saveNow(): Promise<void> {
    clearTimeout(timer);
    const { id } = state.get();
    if (id === null || isHeld()) return;
    const saving = { text: text.state.get().text, view: view.get() };
    try {
      const { saved, overtaken } = await saveNotebook({ id, ...saving }, version);
      tabs?.postMessage({ id, version: saved.version });
      if (state.get().id !== id) return;
      version = saved.version;
      held = saving;
      state.set({ id, saving: isHeld() ? 'saved' : 'saving', savedAt: saved.savedAt });
      if (overtaken)
        notices.say(`Another tab had changed this notebook too. Its text is kept as “${overtaken.title}”.`);
    } catch {
      state.set({ ...state.get(), saving: 'impossible' });
    }
  }

  function changed(): void {
    const { id, saving } = state.get();
    if (id === null) return;
    clearTimeout(timer);
    if (isHeld()) {
      if (saving === 'saving') state.set({ ...state.get(), saving: 'saved' });
      return;
    }
    if (saving === 'saved') state.set({ ...state.get(), saving: 'saving' });
    timer = setTimeout(() => void saveNow(), PAUSE_MS);
  }

  async function adopt(id: string): Promise<void> {
    // With changes of our own on their way, ours are newer; the save that follows keeps the other text beside it.
    if (id !== state.get().id || !isHeld()) return;
    const stored = await readStored(id);
    if (!stored || id !== state.get().id || !isHeld() || stored.version === version) return;
    version = stored.version;
    const change = changeBetween(text.state.get().text, stored.text);
    held = { text: stored.text, view: stored.view };
    view.set(stored.view);
    if (!change) return;
    text.edit([change]);
    notices.say('Another tab changed this notebook, and its text is shown here. Undo takes it back.');
  }

  async function create(content: string): Promise<void> {
    await saveNow();
    const same = (await listNotebooks().catch(() => [])).find((notebook) => notebook.text === content);
    if (same) {
      show(same, same.version);
      return;
    }
    show({ id: newId(), text: content, view: plainView }, null);
    // Not held yet, whatever the text: the first save puts it on the shelf.
    held = { text: '', view: { ...plainView } };
    await saveNow();
  }

  async function open(id: string): Promise<void> {
    await saveNow();
    const notebook = await readStored(id);
    if (notebook) show(notebook, notebook.version);
    else notices.say('That notebook is no longer kept in this browser.');
  }

  async function openFragment(): Promise<boolean> {
    if (location.hash.length < 2) return false;
    const shared = await textInFragment(location.hash);
    history.replaceState(null, '', location.pathname + location.search);
    if (shared === null) {
      notices.say('The link is damaged: no notebook could be read from it.');
      return false;
    }
    await create(shared);
    return true;
  }

  async function openLast(): Promise<void> {
    const last = settings.state.get().notebook;
    const [newest] = await listNotebooks();
    const notebook = (last === null ? null : await readStored(last)) ?? newest;
    if (notebook) show(notebook, notebook.version);
    else await create(await exampleText(FIRST_EXAMPLE));
  }

  async function start(): Promise<void> {
    text.state.subscribe(changed);
    view.subscribe(changed);
    tabs?.addEventListener('message', ({ data }: MessageEvent<{ readonly id: string }>) => void adopt(data.id));
    addEventListener('hashchange', () => void openFragment());
    addEventListener('pagehide', () => void saveNow());
    document.addEventListener('visibilitychange', () => {
      if (document.visibilityState === 'hidden') void saveNow();
    });
    addEventListener('beforeunload', (event) => {
      if (state.get().saving === 'impossible' && !isHeld()) event.preventDefault();
    });
    if (await openFragment()) return;
    try {
      await openLast();
    } catch {
      notices.say('This browser keeps no notebooks here: save yours as a file before you leave.');
      await create(await exampleText(FIRST_EXAMPLE).catch(() => '# A notebook\n\n'));
    }
  }

  return {
    state,
    start,
    open,
    create,
    saveNow,
    async remove(notebook) {
      const isOpen = notebook.id === state.get().id;
      if (isOpen) {
        await saveNow();
        state.set({ ...state.get(), id: null });
      }
      const stored = await readStored(notebook.id);
      await removeNotebook(notebook.id);
      if (isOpen) {
        settings.change({ notebook: null });
        await openLast();
      }
      const undo = async () => {
        await putBack(stored ?? notebook);
        if (isOpen) await open(notebook.id);
      };
      notices.say(`“${notebook.title}” was deleted.`, { label: 'Undo', perform: () => void undo() });
    },
  };
}
