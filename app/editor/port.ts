import { redo, undo } from '@codemirror/commands';
import { Annotation, type ChangeSet, EditorSelection, type EditorState } from '@codemirror/state';
import { EditorView } from '@codemirror/view';
import type { Change } from '../state/changes';
import type { EditorPort } from '../state/notebook-text';

/** Marks what the text already knows, so that it is not reported back. */
export const known = Annotation.define<boolean>();

export function changesOf(set: ChangeSet): readonly Change[] {
  const changes: Change[] = [];
  set.iterChanges((from, to, _newFrom, _newTo, inserted) => {
    changes.push({ from, to, insert: inserted.toString() });
  });
  return changes;
}

/** The editor as the rest of the page sees it. `fresh` makes a state with an empty history. */
export function editorPort(view: EditorView, fresh: (text: string) => EditorState): EditorPort {
  return {
    scroller: view.scrollDOM,
    topOf: (offset) => view.lineBlockAt(Math.min(offset, view.state.doc.length)).top,
    apply(changes, cursor) {
      view.dispatch({
        changes: [...changes],
        ...(cursor === null ? {} : { selection: EditorSelection.cursor(cursor) }),
        userEvent: 'input.page',
      });
    },
    open(text, steps) {
      view.setState(fresh(text));
      for (const changes of steps) view.dispatch({ changes: [...changes], annotations: known.of(true) });
    },
    select(offset, focus) {
      const at = Math.min(offset, view.state.doc.length);
      view.dispatch({
        selection: EditorSelection.cursor(at),
        effects: EditorView.scrollIntoView(at, { y: 'nearest', yMargin: 60 }),
      });
      if (focus) view.focus();
    },
    undo: () => undo(view),
    redo: () => redo(view),
  };
}
