import type { ParameterCard as ParameterCardData } from '../../engine/requests/result';
import { Slider } from '../charts/slider';
import { readoutText } from '../charts/ticks';
import { CardFrame } from './card-frame';
import styles from './parameter-card.module.css';
import { Tex } from './tex';

export function ParameterCard({ card }: { readonly card: ParameterCardData }) {
  return (
    <CardFrame card={card} label={`Parameter ${card.name}`}>
      {card.range && card.value !== null ? (
        <div className={styles.slider}>
          <Slider card={card} />
          <span className={styles.range}>
            {readoutText(card.range.from)} … {readoutText(card.range.to)}
          </span>
        </div>
      ) : (
        <p className={styles.value}>
          <Tex tex={card.latex} />
        </p>
      )}
    </CardFrame>
  );
}
