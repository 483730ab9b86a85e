import type { RequestCard as RequestCardData, Result } from '../../engine/requests/result';
import { CardFrame, CardName } from './card-frame';
import { Formula } from './formula';
import { FormulaTools } from './formula-tools';
import { PlotBody, PlotTools } from './plot-body';
import { RepresentationBody } from './representation-body';
import styles from './request-card.module.css';
import { Stale } from './stale';
import { Says, Tex } from './tex';
import { useAnswer, useHeldFor } from './use-answer';
import { ValueBody, ValueTools } from './value-body';
import { Working } from './working';

/** An older result is called old only when its successor takes longer than this. */
const PATIENCE_MS = 400;

export function RequestCard({ card }: { readonly card: RequestCardData }) {
  const { answer, result, stale } = useAnswer(card);
  const old = useHeldFor(stale, PATIENCE_MS);
  return (
    <CardFrame
      card={card}
      label={card.text}
      caption={
        <>
          <CardName card={card}>{card.caption}</CardName>
          {card.conditions ? (
            <span>
              <Tex tex={card.conditions} />
            </span>
          ) : null}
        </>
      }
      tools={result ? <Tools card={card} result={result} /> : undefined}
    >
      <div aria-busy={answer?.state === 'working'}>
        <Working card={card} answer={answer} />
        {result ? (
          <Stale on={old} says="The answer to the text as it was before.">
            <Body card={card} result={result} />
            <Notes notes={result.notes} />
          </Stale>
        ) : null}
      </div>
    </CardFrame>
  );
}

interface ResultProps {
  readonly card: RequestCardData;
  readonly result: Result;
}

function Body({ card, result }: ResultProps) {
  switch (result.kind) {
    case 'formula':
      return <Formula formula={result.formula} theory={result.of} />;
    case 'value':
      return <ValueBody result={result} />;
    case 'plot':
      return <PlotBody card={card} result={result} />;
    case 'representation':
      return <RepresentationBody result={result} />;
    case 'failure':
      return (
        <p className={styles.failure}>
          <span className={styles.mark} aria-hidden="true">
            !
          </span>{' '}
          <Says text={result.failure.message} />
        </p>
      );
  }
}

function Tools({ card, result }: ResultProps) {
  switch (result.kind) {
    case 'formula':
      return <FormulaTools result={result} />;
    case 'value':
      return <ValueTools result={result} />;
    case 'plot':
      return <PlotTools card={card} result={result} />;
    case 'representation':
    case 'failure':
      return null;
  }
}

function Notes({ notes }: { readonly notes: readonly string[] }) {
  return notes.map((note) => (
    <p key={note} className={styles.note}>
      <Says text={note} />
    </p>
  ));
}
