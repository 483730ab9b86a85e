// The page's own state machine; there is no outside source.
import { expect, test } from 'vitest';
import { applyChanges, type Change } from '../../app/state/changes';
import { createNotebookText, type EditorPort, type NotebookText } from '../../app/state/notebook-text';

/** An editor that holds a text and remembers its steps, as far as the page can tell. */
function attachEditor(text: NotebookText) {
  const editor = { content: '', steps: 0 };
  const port: EditorPort = {
    scroller: Object.create(null),
    topOf: () => 0,
    select: (offset) => text.moveCursor(offset),
    undo: () => undefined,
    redo: () => undefined,
    open(content, steps) {
      editor.content = steps.reduce(applyChanges, content);
      editor.steps = steps.length;
    },
    apply(changes: readonly Change[]) {
      editor.content = applyChanges(editor.content, changes);
      editor.steps += 1;
      text.typed(changes, editor.content, 0);
    },
  };
  return { editor, detach: text.attach(port) };
}

test('an edit of the page is applied where the text has moved to, or not at all', () => {
  const text = createNotebookText();
  text.open('let r = 1/3\nlet h = 2\n');
  const { revision } = text.state.get();
  text.edit([{ from: 0, to: 0, insert: '# Title\n\n' }]);
  expect(text.editSince(revision, [{ from: 8, to: 11, insert: '0.4' }])).toBe(true);
  expect(text.state.get().text).toBe('# Title\n\nlet r = 0.4\nlet h = 2\n');
  expect(text.editSince(revision, [{ from: 8, to: 11, insert: '0.5' }])).toBe(false);
  expect(text.state.get().text).toBe('# Title\n\nlet r = 0.4\nlet h = 2\n');
  expect(text.state.get().revision).toBe(revision + 2);
});

test('what was done before the editor came is in its history', () => {
  const text = createNotebookText();
  text.open('one');
  text.edit([{ from: 3, to: 3, insert: ' two' }]);
  text.typeInto('one two three', 13);
  const { editor } = attachEditor(text);
  expect(editor).toEqual({ content: 'one two three', steps: 2 });
  text.edit([{ from: 0, to: 3, insert: 'ONE' }]);
  expect(editor).toEqual({ content: 'ONE two three', steps: 3 });
  expect(text.state.get().text).toBe('ONE two three');
});

test('opening another notebook forgets the positions of the one before', () => {
  const text = createNotebookText();
  text.open('first');
  const { revision, opened } = text.state.get();
  text.open('second');
  expect(text.state.get().opened).toBe(opened + 1);
  expect(text.spanNow(revision, { from: 0, to: 5 })).toBeNull();
  expect(text.editSince(revision, [{ from: 0, to: 5, insert: 'x' }])).toBe(false);
});

test('positions are forgotten after many changes rather than guessed', () => {
  const text = createNotebookText();
  text.open('x');
  const { revision } = text.state.get();
  for (let step = 0; step < 400; step += 1) text.edit([{ from: 0, to: 0, insert: '.' }]);
  expect(text.spanNow(revision, { from: 0, to: 1 })).toEqual({ from: 400, to: 401 });
  text.edit([{ from: 0, to: 0, insert: '.' }]);
  expect(text.spanNow(revision, { from: 0, to: 1 })).toBeNull();
});

test('without an editor the page goes on, and a later editor starts from there', () => {
  const text = createNotebookText();
  text.open('a');
  attachEditor(text).detach();
  text.edit([{ from: 1, to: 1, insert: 'b' }]);
  expect(attachEditor(text).editor).toEqual({ content: 'ab', steps: 1 });
});
