import type { FormulaResult } from '../../engine/requests/result';
import { useSession } from '../state/session';
import { copyText } from '../storage/files';
import { WordButton } from './word-button';

export function FormulaTools({ result }: { readonly result: FormulaResult }) {
  const { notices } = useSession();
  const { formula } = result;
  if (formula.kind === 'refused') return null;

  async function copy(latex: string): Promise<void> {
    const copied = await copyText(latex);
    notices.say(
      copied
        ? `The LaTeX of ${result.of} is on the clipboard.`
        : 'The browser does not let the page write to the clipboard.',
    );
  }

  return (
    <WordButton aria-label={`LaTeX of ${result.of}, copy`} onClick={() => void copy(formula.latex)}>
      LaTeX
    </WordButton>
  );
}
