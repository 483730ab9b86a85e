import type { RequestCard } from '../../engine/requests/result';
import { cardNow } from '../state/outline';
import { useSession } from '../state/session';
import { Choice } from './choice';

const parts = ['abs', 'arg', 're', 'im', 'log'] as const;

interface PartChoiceProps {
  readonly card: RequestCard;
  readonly curves: number;
}

/** Which part of a complex quantity one curve or map shows; the choice is a word in the text. */
export function PartChoice({ card, curves }: PartChoiceProps) {
  const { text, outline } = useSession();
  const now = /^plot\s+(abs|arg|re|im|log)\b/.exec(card.text)?.[1] ?? '';
  if (curves !== 1) return null;

  function choose(part: string): void {
    const now = outline.state.get();
    const span = cardNow(now, card)?.span;
    if (!span) return;
    const line = now.text.slice(span.from, span.to);
    const [, head = '', old = ''] = /^(plot\s+)((?:abs|arg|re|im|log)\s+)?/.exec(line) ?? [];
    if (head === '') return;
    const from = span.from + head.length;
    text.editSince(now.revision, [{ from, to: from + old.length, insert: `${part} ` }]);
  }

  return (
    <Choice
      label="part shown"
      options={parts.map((part) => ({ value: part, content: part }))}
      value={parts.find((part) => part === now) ?? 'none'}
      onChange={choose}
    />
  );
}
