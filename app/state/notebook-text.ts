import type { Span } from '../../engine/language/tree';
import { applyChanges, type Change, changeBetween, mapOffset, mapSpan } from './changes';
import { createStore, type Readable } from './store';

export interface TextState {
  readonly text: string;
  /** Grows by one with every change; what is derived from the text carries it. */
  readonly revision: number;
  readonly cursor: number;
  /** Grows when another notebook is opened: undo does not reach across. */
  readonly opened: number;
}

/** What the editor can be asked for once it is there. */
export interface EditorPort {
  /** Applies changes as one step of its history and reports back through `typed`. */
  apply(changes: readonly Change[], cursor: number | null): void;
  /** Starts afresh with a text, its history empty, then replays changes as steps of the history. */
  open(text: string, steps: readonly (readonly Change[])[]): void;
  select(offset: number, focus: boolean): void;
  undo(): void;
  redo(): void;
  /** What scrolls, and how far down in it an offset stands. */
  readonly scroller: HTMLElement;
  topOf(offset: number): number;
}

export interface NotebookText {
  readonly state: Readable<TextState>;
  open(text: string): void;
  /** Changes in the offsets of the text as it is now. */
  edit(changes: readonly Change[]): void;
  /** Changes in the offsets of an earlier revision; false, and nothing done, where the text there changed since. */
  editSince(revision: number, changes: readonly Change[]): boolean;
  /** What a plain text field holds after a keystroke. */
  typeInto(text: string, cursor: number): void;
  /** The editor's report: its changes are already in its own text. */
  typed(changes: readonly Change[], text: string, cursor: number): void;
  moveCursor(cursor: number): void;
  /** Puts the cursor where an offset of an earlier revision is now. */
  goTo(revision: number, offset: number, focus: boolean): void;
  spanNow(revision: number, span: Span): Span | null;
  undo(): void;
  redo(): void;
  attach(port: EditorPort): () => void;
  editor(): EditorPort | null;
}

/** So many changes back a position can still be followed; answers that are older have long been replaced. */
const REMEMBERED = 400;

export function createNotebookText(): NotebookText {
  const state = createStore<TextState>({ text: '', revision: 0, cursor: 0, opened: 0 });
  let log: { readonly revision: number; readonly changes: readonly Change[] }[] = [];
  let forgotten = 0;
  let port: EditorPort | null = null;
  /** Until the editor is loaded, its history is kept for it: the text as opened and every step since. */
  let openedText = '';
  let steps: (readonly Change[])[] = [];

  function record(changes: readonly Change[], text: string, cursor: number): void {
    const before = state.get();
    const revision = before.revision + 1;
    log.push({ revision, changes });
    if (log.length > REMEMBERED) {
      forgotten = log[log.length - REMEMBERED - 1]?.revision ?? forgotten;
      log = log.slice(-REMEMBERED);
    }
    state.set({ ...before, text, revision, cursor });
  }

  function changesSince(revision: number): (readonly Change[])[] | null {
    if (revision < forgotten) return null;
    return log.filter((entry) => entry.revision > revision).map((entry) => entry.changes);
  }

  function edit(changes: readonly Change[]): void {
    if (changes.length === 0) return;
    if (port) {
      port.apply(changes, null);
      return;
    }
    const { text, cursor } = state.get();
    steps.push(changes);
    record(changes, applyChanges(text, changes), mapOffset(cursor, changes));
  }

  function spanNow(revision: number, span: Span): Span | null {
    const since = changesSince(revision);
    if (!since) return null;
    return since.reduce<Span | null>((at, changes) => at && mapSpan(at, changes), span);
  }

  return {
    state,
    edit,
    spanNow,
    open(text) {
      const before = state.get();
      log = [];
      steps = [];
      openedText = text;
      forgotten = before.revision + 1;
      state.set({ text, revision: forgotten, cursor: 0, opened: before.opened + 1 });
      port?.open(text, []);
    },
    editSince(revision, changes) {
      const now: Change[] = [];
      for (const change of changes) {
        const span = spanNow(revision, change);
        if (!span) return false;
        now.push({ ...span, insert: change.insert });
      }
      edit(now);
      return true;
    },
    typeInto(text, cursor) {
      const change = changeBetween(state.get().text, text);
      if (!change) return;
      steps.push([change]);
      record([change], text, cursor);
    },
    typed: record,
    moveCursor(cursor) {
      if (cursor !== state.get().cursor) state.set({ ...state.get(), cursor });
    },
    goTo(revision, offset, focus) {
      const since = changesSince(revision);
      if (!since) return;
      const now = since.reduce(mapOffset, offset);
      if (port) port.select(now, focus);
      else state.set({ ...state.get(), cursor: now });
    },
    editor: () => port,
    undo: () => port?.undo(),
    redo: () => port?.redo(),
    attach(editor) {
      port = editor;
      editor.open(openedText, steps);
      steps = [];
      return () => {
        port = null;
        openedText = state.get().text;
      };
    },
  };
}
