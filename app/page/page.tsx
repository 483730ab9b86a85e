import { memo } from 'react';
import type { Card, Outline, Problem } from '../../engine/requests/result';
import { useSession } from '../state/session';
import { useStore } from '../state/store';
import { CardBoundary } from './card-boundary';
import styles from './page.module.css';
import { ParameterCard } from './parameter-card';
import { ProblemLine } from './problems';
import { ProseCard } from './prose-card';
import { RequestCard } from './request-card';
import { SpectrumCard } from './spectrum-card';
import { TheoryCard } from './theory-card';

/** The sheet: one card a block or request, in the order of the text. */
export function Page() {
  const { outline } = useSession();
  const { outline: shown, cards, trouble } = useStore(outline.state);
  return (
    <div className={styles.sheet}>
      {trouble ? (
        <p className={styles.trouble} role="alert">
          The page stands still because of a defect of Spherelathe, and shows the text as it was before: {trouble}
        </p>
      ) : null}
      {shown ? items(shown, cards).map((item) => <Item key={item.key} item={item} />) : null}
      {shown && shown.cards.length === 0 ? (
        <p className={styles.empty}>An empty notebook: write a heading, a theory, a request beside this page.</p>
      ) : null}
    </div>
  );
}

type PageItem =
  | { readonly key: string; readonly at: number; readonly card: Card }
  | { readonly key: string; readonly at: number; readonly problem: Problem };

/** Cards, and between them the problems of lines that became no card. */
function items({ cards, problems }: Outline, drawn: readonly Card[]): readonly PageItem[] {
  const astray = problems.filter(
    ({ span }) => !cards.some((card) => span.from >= card.span.from && span.from <= card.span.to),
  );
  return [
    ...cards.map((card, index) => ({ key: card.id, at: card.span.from, card: drawn[index] ?? card })),
    ...astray.map((problem) => ({ key: `${problem.span.from} ${problem.message}`, at: problem.span.from, problem })),
  ].sort((left, right) => left.at - right.at);
}

const Item = memo(function Item({ item }: { readonly item: PageItem }) {
  if ('problem' in item) {
    return (
      <ul className={styles.astray}>
        <ProblemLine problem={item.problem} />
      </ul>
    );
  }
  return (
    <CardBoundary of={item.card}>
      <CardBody card={item.card} />
    </CardBoundary>
  );
}, sameItem);

function sameItem({ item: left }: { readonly item: PageItem }, { item: right }: { readonly item: PageItem }): boolean {
  return 'card' in left && 'card' in right && left.card === right.card;
}

function CardBody({ card }: { readonly card: Card }) {
  switch (card.kind) {
    case 'prose':
      return <ProseCard card={card} />;
    case 'let':
      return <ParameterCard card={card} />;
    case 'theory':
      return <TheoryCard card={card} />;
    case 'spectrum':
      return <SpectrumCard card={card} />;
    case 'request':
      return <RequestCard card={card} />;
  }
}
