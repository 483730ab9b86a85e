import type { SpectrumCard as SpectrumCardData } from '../../engine/requests/result';
import { numbered } from '../state/numbered';
import { cardNow } from '../state/outline';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import type { SpectrumForm } from '../state/view';
import { CardFrame, CardName } from './card-frame';
import { Checks } from './checks';
import { Choice } from './choice';
import { Formula } from './formula';
import styles from './spectrum-card.module.css';
import { Tex } from './tex';

const forms: readonly { readonly value: SpectrumForm; readonly content: string }[] = [
  { value: 'product', content: 'product' },
  { value: 'unpaired', content: 'unpaired' },
  { value: 'closed', content: 'closed form' },
];

export function SpectrumCard({ card }: { readonly card: SpectrumCardData }) {
  const { view, text, outline } = useSession();
  const form = useSelected(view, (state) => state.spectrumForms[card.name]) ?? 'closed';
  return (
    <CardFrame
      card={card}
      label={`Spectrum ${card.name}`}
      caption={
        <>
          <CardName card={card}>{card.name}</CardName>
          <span>spectrum</span>
        </>
      }
    >
      <ul className={styles.towers} aria-label="Towers">
        {numbered(card.towers, ({ latex }) => latex).map(({ key, item: tower, at }) => (
          <li key={key}>
            <button
              type="button"
              className={styles.kind}
              onClick={() => {
                const now = outline.state.get();
                const span = cardNow(now, card)?.towers[at]?.span;
                if (span) text.goTo(now.revision, span.from, true);
              }}
            >
              {tower.kind}
            </button>
            <span>
              <Tex tex={tower.latex} />
              {tower.spins === null ? null : (
                <span className={styles.spins}>
                  spins <Tex tex={tower.spins} /> on <Tex tex="S^3" />
                </span>
              )}
            </span>
          </li>
        ))}
      </ul>
      {card.pairing.length > 0 ? <Pairing pairing={card.pairing} /> : null}
      <Checks checks={card.checks} />
      <div className={styles.choices}>
        <Choice
          label="Form of the determinant"
          options={forms}
          value={form}
          onChange={(next) => {
            const now = view.get();
            view.set({ ...now, spectrumForms: { ...now.spectrumForms, [card.name]: next } });
          }}
        />
      </div>
      <Formula formula={card.formulas[form]} theory={null} />
    </CardFrame>
  );
}

/** Which modes cancel against which: one row a linear factor, one column a tower, and what is left. */
function Pairing({ pairing }: { readonly pairing: SpectrumCardData['pairing'] }) {
  const towers = [...new Set(pairing.flatMap(({ rows }) => rows.map(({ tower }) => tower)))];
  return (
    <div className={styles.scroll}>
      <table className={styles.table}>
        <caption>Multiplicities by linear factor</caption>
        <thead>
          <tr>
            <th scope="col">factor</th>
            {towers.map((tower) => (
              <th key={tower} scope="col">
                {tower}
              </th>
            ))}
            <th scope="col">left</th>
          </tr>
        </thead>
        <tbody>
          {pairing.map((line) => (
            <tr key={line.factor}>
              <th scope="row">
                <Tex tex={line.factor} />
              </th>
              {towers.map((tower) => (
                <td key={tower}>
                  {line.rows
                    .filter((row) => row.tower === tower)
                    .map((row) => (
                      <Tex key={row.multiplicity} tex={row.multiplicity} />
                    ))}
                </td>
              ))}
              <td className={styles.left}>
                <Tex tex={line.left} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
