import type { FormulaForm } from '../../engine/language/tree';
import type { FormulaView, TheoryCard as TheoryCardData } from '../../engine/requests/result';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import { ChargeTable } from '../table/charge-table';
import { CardFrame, CardName } from './card-frame';
import { Checks } from './checks';
import { Choice } from './choice';
import { Formula } from './formula';
import { LatexOut } from './latex-out';
import { Stale } from './stale';
import { Tex } from './tex';
import styles from './theory-card.module.css';

const forms: readonly { readonly value: FormulaForm; readonly content: string; readonly title: string }[] = [
  { value: 'modes', content: 'all modes', title: 'The product over every mode' },
  { value: 'unpaired', content: 'unpaired', title: 'What is left when modes have cancelled in pairs' },
  { value: 'functions', content: 'functions', title: 'In special functions' },
  { value: 'elementary', content: 'elementary', title: 'In elementary functions, where there is such a form' },
];

/** A notation's symbol as it is spelt: `\\Gamma_h` is Gamma_h. */
const inWords = (latex: string) => latex.replace(/[\\{}]/g, '');

/** The formula to show: while the text is broken, the last one that was whole, marked as such. */
function useFormula(card: TheoryCardData, form: FormulaForm): { formula: FormulaView; stale: boolean } {
  const { outline } = useSession();
  const sound = useSelected(outline.state, (state) => state.sound.get(card.id));
  const formula = card.formulas[form];
  if (formula.kind === 'formula' || sound === card || sound?.kind !== 'theory') return { formula, stale: false };
  const before = sound.formulas[form];
  return before.kind === 'formula' ? { formula: before, stale: true } : { formula, stale: false };
}

export function TheoryCard({ card }: { readonly card: TheoryCardData }) {
  const { view } = useSession();
  const form = useSelected(view, (state) => state.forms[card.name]) ?? card.preferredForm;
  const notation = useSelected(view, (state) => state.notation[card.name]) ?? 0;
  const { formula, stale } = useFormula(card, form);

  function choose(change: { readonly form?: FormulaForm; readonly notation?: number }): void {
    const now = view.get();
    view.set({
      ...now,
      forms: change.form ? { ...now.forms, [card.name]: change.form } : now.forms,
      notation: change.notation === undefined ? now.notation : { ...now.notation, [card.name]: change.notation },
    });
  }

  return (
    <CardFrame
      card={card}
      label={`Theory ${card.name}`}
      caption={
        <>
          <CardName card={card}>{card.name}</CardName>
          <span>
            <Tex tex={card.sphereLatex} />
            {card.supersymmetry ? `, ${card.supersymmetry}` : ''}
          </span>
        </>
      }
      tools={<LatexOut theory={card.name} form={form} />}
    >
      {card.columns.length > 0 ? <ChargeTable card={card} /> : null}
      <Checks checks={card.checks} />
      <div className={styles.choices}>
        <Choice label="Form of the formula" options={forms} value={form} onChange={(next) => choose({ form: next })} />
        {card.notations.length > 1 ? (
          <Choice
            label="notation"
            shown
            options={card.notations.map((latex, at) => ({
              value: at,
              content: <Tex tex={latex} />,
              name: inWords(latex),
            }))}
            value={notation}
            onChange={(next) => choose({ notation: next })}
          />
        ) : null}
      </div>
      <Stale on={stale} says="The formula as it was before the problem below.">
        <Formula formula={formula} theory={card.name} />
      </Stale>
    </CardFrame>
  );
}
