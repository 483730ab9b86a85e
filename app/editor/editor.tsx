import { EditorState } from '@codemirror/state';
import { EditorView } from '@codemirror/view';
import { useEffect, useRef } from 'react';
import { useSession } from '../state/session';
import styles from './editor.module.css';
import { extensions } from './extensions';
import { showLit } from './lit-line';
import { editorPort } from './port';
import { showProblems } from './problems';

/** The text with all that helps to write it. */
export function Editor({ onReady }: { readonly onReady: () => void }) {
  const session = useSession();
  const place = useRef<HTMLDivElement>(null);

  // biome-ignore lint/correctness/useExhaustiveDependencies: made once; the session lives as long as the page
  useEffect(() => {
    if (!place.current) return;
    const fresh = (doc: string) => EditorState.create({ doc, extensions: extensions(session) });
    const view = new EditorView({ state: fresh(''), parent: place.current });
    const { cursor } = session.text.state.get();
    const detach = session.text.attach(editorPort(view, fresh));
    view.dispatch({ selection: { anchor: Math.min(cursor, view.state.doc.length) } });
    const problems = () => showProblems(view, session);
    const lit = () => showLit(view, session);
    problems();
    const leave = [session.outline.state.subscribe(problems), session.lit.state.subscribe(lit)];
    onReady();
    return () => {
      for (const stop of leave) stop();
      detach();
      view.destroy();
    };
  }, []);

  return <div ref={place} className={styles.place} />;
}
