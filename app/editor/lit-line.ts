import { type Extension, RangeSetBuilder, StateEffect, StateField } from '@codemirror/state';
import { Decoration, type DecorationSet, EditorView } from '@codemirror/view';
import type { Session } from '../state/session';

const setLit = StateEffect.define<{ readonly from: number; readonly to: number } | null>();
const tinted = Decoration.mark({ class: 'cm-lit' });

function tint(from: number, to: number): DecorationSet {
  const builder = new RangeSetBuilder<Decoration>();
  if (to > from) builder.add(from, to, tinted);
  return builder.finish();
}

/** Tints the line of the multiplet that is lit on the page. */
export const litLine: Extension = StateField.define<DecorationSet>({
  create: () => Decoration.none,
  update(before, transaction) {
    let shown = before.map(transaction.changes);
    for (const effect of transaction.effects) {
      if (effect.is(setLit)) shown = effect.value ? tint(effect.value.from, effect.value.to) : Decoration.none;
    }
    return shown;
  },
  provide: (field) => EditorView.decorations.from(field),
});

export function showLit(view: EditorView, { lit, outline, text }: Session): void {
  const on = lit.state.get();
  const { outline: shown, revision } = outline.state.get();
  const theory = shown?.cards.find((card) => card.kind === 'theory' && card.name === on?.theory);
  const row = theory?.kind === 'theory' ? theory.rows.find(({ name }) => name === on?.row) : undefined;
  const span = row ? text.spanNow(revision, row.span) : null;
  view.dispatch({ effects: setLit.of(span && span.to <= view.state.doc.length ? span : null) });
}
