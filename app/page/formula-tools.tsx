import type { FormulaResult } from '../../engine/requests/result';
import { useSession } from '../state/session';
import { copyText } from '../storage/files';
import { WordButton } from './word-button';

export function FormulaTools({ result }: { readonly result: FormulaResult }) {
  const { notices } = useSession();
  const { formula } = result;
  if (formula.kind === 'refused') return null;

  async function copy(latex: string, what: string): Promise<void> {
    const copied = await copyText(latex);
    notices.say(
      copied
        ? `The LaTeX of ${what} is on the clipboard.`
        : 'The browser does not let the page write to the clipboard.',
    );
  }

  const { pairing } = formula;
  return (
    <>
      <WordButton aria-label={`LaTeX of ${result.of}, copy`} onClick={() => void copy(formula.latex, result.of)}>
        LaTeX
      </WordButton>
      {pairing ? (
        <WordButton
          aria-label={`LaTeX of the pairs of modes of ${result.of}, copy`}
          onClick={() => void copy(pairing.latex, `the pairs of modes of ${result.of}`)}
        >
          Pairs
        </WordButton>
      ) : null}
    </>
  );
}
