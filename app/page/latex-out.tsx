import { useState } from 'react';
import type { FormulaForm } from '../../engine/language/tree';
import type { LatexOutput } from '../../workers/types';
import { TextDialog } from '../desk/text-dialog';
import { useSession } from '../state/session';
import { copyText, fileName } from '../storage/files';
import { WordButton } from './word-button';

interface LatexOutProps {
  readonly theory: string;
  readonly form: FormulaForm;
}

/** The formula as LaTeX: a snippet for a paper, or a document that compiles by itself. */
export function LatexOut({ theory, form }: LatexOutProps) {
  const { client, outline, view, notices } = useSession();
  const [shown, setShown] = useState<{ readonly title: string; readonly text: string } | null>(null);

  async function latex(): Promise<LatexOutput | null> {
    try {
      const { notation } = view.get();
      const found = await client.document(outline.state.get().text, theory, form, { notation });
      if (found.refused === undefined) return found;
      notices.say(found.refused);
      return null;
    } catch (error) {
      notices.say(`No LaTeX could be made: ${error instanceof Error ? error.message : String(error)}`);
      return null;
    }
  }

  async function copySnippet(): Promise<void> {
    const found = await latex();
    if (!found) return;
    if (await copyText(found.snippet)) notices.say(`The LaTeX of ${theory} is on the clipboard.`);
    else setShown({ title: `LaTeX of ${theory}`, text: found.snippet });
  }

  async function showDocument(): Promise<void> {
    const found = await latex();
    if (found) setShown({ title: `Document of ${theory}`, text: found.document });
  }

  return (
    <>
      <WordButton aria-label={`LaTeX of ${theory}, copy`} onClick={() => void copySnippet()}>
        LaTeX
      </WordButton>
      <WordButton aria-label={`Document of ${theory}`} onClick={() => void showDocument()}>
        Document
      </WordButton>
      {shown ? (
        <TextDialog
          title={shown.title}
          text={shown.text}
          file={fileName(theory, 'tex')}
          onClose={() => setShown(null)}
        />
      ) : null}
    </>
  );
}
