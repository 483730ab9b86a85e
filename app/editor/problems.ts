import { type Diagnostic, setDiagnostics } from '@codemirror/lint';
import type { EditorView } from '@codemirror/view';
import type { Session } from '../state/session';
import { saysNode } from './says-node';

/** Underlines the outline's problems where they are now, after what was typed since. */
export function showProblems(view: EditorView, { outline, text }: Session): void {
  const { outline: shown, revision } = outline.state.get();
  const length = view.state.doc.length;
  const found = (shown?.problems ?? []).flatMap((problem): Diagnostic[] => {
    const span = text.spanNow(revision, problem.span);
    if (!span || span.to > length) return [];
    return [
      {
        ...span,
        severity: problem.severity,
        message: problem.message,
        renderMessage: () => saysNode(problem.message),
      },
    ];
  });
  view.dispatch(setDiagnostics(view.state, found));
}
