import { createStore, del, get, set, values } from 'idb-keyval';
import { readView, type View } from '../state/view';

/** A notebook as kept in the browser. */
export interface StoredNotebook {
  readonly id: string;
  readonly title: string;
  readonly text: string;
  readonly view: View;
  /** Made anew at every save; a save that does not know the present one has been overtaken by another tab. */
  readonly version: string;
  readonly savedAt: number;
}

const shelf = createStore('spherelathe', 'notebooks');

function readNotebook(stored: unknown): StoredNotebook | null {
  if (typeof stored !== 'object' || stored === null) return null;
  if (!('id' in stored) || typeof stored.id !== 'string') return null;
  if (!('text' in stored) || typeof stored.text !== 'string') return null;
  return {
    id: stored.id,
    text: stored.text,
    title: 'title' in stored && typeof stored.title === 'string' ? stored.title : titleOf(stored.text),
    view: readView('view' in stored ? stored.view : null),
    version: 'version' in stored && typeof stored.version === 'string' ? stored.version : '',
    savedAt: 'savedAt' in stored && typeof stored.savedAt === 'number' ? stored.savedAt : 0,
  };
}

/** The first heading is a notebook's name. */
export function titleOf(text: string): string {
  const heading = /^#{1,6}[ \t]+(.+?)[ \t#]*$/m.exec(text)?.[1];
  return heading ?? 'Notebook without a heading';
}

export async function listNotebooks(): Promise<readonly StoredNotebook[]> {
  const all: unknown[] = await values(shelf);
  return all
    .map(readNotebook)
    .filter((notebook) => notebook !== null)
    .sort((left, right) => right.savedAt - left.savedAt);
}

export async function readStored(id: string): Promise<StoredNotebook | null> {
  const stored: unknown = await get(id, shelf);
  return readNotebook(stored);
}

export async function putBack(notebook: StoredNotebook): Promise<void> {
  await set(notebook.id, notebook, shelf);
}

export async function removeNotebook(id: string): Promise<void> {
  await del(id, shelf);
}

export function newId(): string {
  return crypto.randomUUID();
}

async function alone<Value>(id: string, work: () => Promise<Value>): Promise<Value> {
  if (!('locks' in navigator)) return work();
  return navigator.locks.request(`spherelathe notebook ${id}`, work);
}

export interface SaveOutcome {
  readonly saved: StoredNotebook;
  /** What another tab had saved since; it is kept as a notebook of its own. */
  readonly overtaken: StoredNotebook | null;
}

/**
 * Saves under a lock. Where another tab saved a different text since `knownVersion`, this newer text takes the place
 * and the other is kept beside it, so that nothing is lost.
 */
export async function saveNotebook(
  notebook: { readonly id: string; readonly text: string; readonly view: View },
  knownVersion: string | null,
): Promise<SaveOutcome> {
  return alone(notebook.id, async () => {
    const present = await readStored(notebook.id);
    const saved = { ...notebook, title: titleOf(notebook.text), version: newId(), savedAt: Date.now() };
    let overtaken: StoredNotebook | null = null;
    if (present && present.version !== knownVersion && present.text !== notebook.text) {
      overtaken = { ...present, id: newId(), title: `${present.title} (from another tab)`, version: newId() };
      await putBack(overtaken);
    }
    await putBack(saved);
    return { saved, overtaken };
  });
}
