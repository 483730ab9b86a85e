import { autocompletion, closeBrackets, closeBracketsKeymap, completionKeymap } from '@codemirror/autocomplete';
import { defaultKeymap, history, historyKeymap } from '@codemirror/commands';
import { bracketMatching, foldGutter, foldKeymap } from '@codemirror/language';
import { lintKeymap } from '@codemirror/lint';
import { highlightSelectionMatches, searchKeymap } from '@codemirror/search';
import type { Extension } from '@codemirror/state';
import { drawSelection, dropCursor, EditorView, highlightSpecialChars, keymap, lineNumbers } from '@codemirror/view';
import type { Session } from '../state/session';
import { completion } from './completion';
import { help } from './help';
import { litLine } from './lit-line';
import { notebookLanguage } from './notebook-language';
import { changesOf, known } from './port';
import { theme } from './theme';

/** Everything the editor is made of. Tab is left alone: it leads out of the text. */
export function extensions(session: Session): Extension {
  // Nothing else on the page moves by itself.
  const still = matchMedia('(prefers-reduced-motion: reduce)').matches;
  return [
    lineNumbers(),
    foldGutter({ openText: '▾', closedText: '▸' }),
    highlightSpecialChars(),
    history(),
    drawSelection({ cursorBlinkRate: still ? 0 : 1200 }),
    dropCursor(),
    bracketMatching(),
    closeBrackets(),
    autocompletion({ override: [completion(session)], icons: false }),
    highlightSelectionMatches(),
    help(session.client),
    keymap.of([
      ...closeBracketsKeymap,
      ...defaultKeymap,
      ...searchKeymap,
      ...historyKeymap,
      ...foldKeymap,
      ...completionKeymap,
      ...lintKeymap,
    ]),
    notebookLanguage,
    litLine,
    theme,
    EditorView.lineWrapping,
    EditorView.contentAttributes.of({ 'aria-label': 'Text of the notebook', spellcheck: 'false', tabindex: '0' }),
    EditorView.updateListener.of((update) => {
      const cursor = update.state.selection.main.head;
      const reported = update.transactions.filter((step) => step.docChanged && !step.annotation(known));
      if (reported.length > 0) {
        session.text.typed(changesOf(update.changes), update.state.doc.toString(), cursor);
      } else if (update.selectionSet) session.text.moveCursor(cursor);
    }),
  ];
}
