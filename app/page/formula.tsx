import { memo, useId, useRef, useState } from 'react';
import type { FormulaPiece, FormulaView } from '../../engine/requests/result';
import { numbered } from '../state/numbered';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import styles from './formula.module.css';
import { ModePairing } from './mode-pairing';
import { ScrollBox } from './scroll-box';
import { Says, Tex } from './tex';
import { useWrapMarks } from './use-wrap-marks';
import { WeightPages } from './weight-pages';

interface FormulaProps {
  readonly formula: FormulaView;
  /** Whose multiplets the pieces name; they light up together with its table. */
  readonly theory: string | null;
}

/** A formula, one element a piece: it wraps between pieces, and one changed piece is one piece drawn anew. */
export const Formula = memo(function Formula({ formula, theory }: FormulaProps) {
  if (formula.kind === 'refused') {
    return (
      <p className={styles.refused}>
        <Says text={formula.message} />
      </p>
    );
  }
  return (
    <>
      <Pieces lead={formula.lead} pieces={formula.pieces} theory={theory} />
      {formula.notes.map((note) => (
        <p key={note} className={styles.note}>
          <Says text={note} />
        </p>
      ))}
      {formula.pairing ? <ModePairing tables={formula.pairing.tables} /> : null}
    </>
  );
});

interface PiecesProps {
  readonly lead: string;
  readonly pieces: readonly FormulaPiece[];
  readonly theory: string | null;
}

function Pieces({ lead, pieces, theory }: PiecesProps) {
  const [opened, setOpened] = useState<string | null>(null);
  const line = useRef<HTMLDivElement>(null);
  const expandedId = useId();
  const shown = pieces.find((piece) => piece.latex === opened && canOpen(piece, theory));
  useWrapMarks(line, pieces);
  return (
    <>
      <div ref={line} className={styles.line}>
        <span className={styles.lead}>
          <Tex tex={`\\displaystyle ${lead}`} />
        </span>
        {numbered(pieces, ({ latex }) => latex).map(({ key, item: piece }) => (
          <Piece
            key={key}
            piece={piece}
            theory={theory}
            opened={piece === shown}
            expandedId={expandedId}
            onToggle={() => setOpened(piece === shown ? null : piece.latex)}
          />
        ))}
      </div>
      <div id={expandedId} className={styles.expanded}>
        {shown?.expanded ? (
          <ScrollBox label="All weights of this factor">
            <Tex tex={`\\displaystyle ${shown.expanded}`} />
          </ScrollBox>
        ) : null}
        {shown?.weights && theory !== null ? (
          <WeightPages key={shown.latex} theory={theory} latex={shown.latex} />
        ) : null}
      </div>
    </>
  );
}

/** Weights stand beside the piece, or can be asked for. */
function canOpen({ expanded, weights }: FormulaPiece, theory: string | null): boolean {
  return expanded !== null || (weights !== undefined && theory !== null);
}

interface PieceProps {
  readonly piece: FormulaPiece;
  readonly theory: string | null;
  readonly opened: boolean;
  readonly expandedId: string;
  readonly onToggle: () => void;
}

const Piece = memo(function Piece({ piece, theory, opened, expandedId, onToggle }: PieceProps) {
  const { lit } = useSession();
  const isLit = useSelected(lit.state, (on) => on !== null && on.theory === theory && piece.from.includes(on.row));
  const [row] = piece.from;
  const here = theory !== null && row !== undefined ? { theory, row } : null;
  const tex = <Tex tex={`\\displaystyle ${piece.latex}`} />;
  return (
    <span
      className={styles.piece}
      data-lit={isLit || undefined}
      data-piece=""
      onPointerEnter={() => lit.point(here)}
      onPointerLeave={() => lit.point(null)}
    >
      {!canOpen(piece, theory) ? (
        tex
      ) : (
        <button
          type="button"
          className={styles.opener}
          aria-expanded={opened}
          aria-controls={expandedId}
          title={opened ? 'Hide the weights' : 'Show all weights of this factor'}
          onFocus={() => lit.focus(here)}
          onBlur={() => lit.focus(null)}
          onClick={onToggle}
        >
          {tex}
        </button>
      )}
    </span>
  );
});
