import { type KeyboardEvent, useState } from 'react';
import type { TheoryCard, TheoryColumn, TheoryRow } from '../../engine/requests/result';
import { Tex } from '../page/tex';
import { WordButton } from '../page/word-button';
import type { Change } from '../state/changes';
import { numbered } from '../state/numbered';
import { cardNow } from '../state/outline';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import { Cell } from './cell';
import styles from './charge-table.module.css';
import { addedGroup, changedGroup } from './group-edits';
import { RepresentationDialog } from './representation-dialog';
import { addedRow, cellChange, copiedRow, movedRow, removedRow } from './row-edits';

const GROUPS = ['gauge', 'flavor'] as const;

interface Choosing {
  readonly row: number;
  readonly column: number;
  readonly group: string;
}

type Edit = (text: string, card: TheoryCard) => readonly Change[] | null;

/** Edits speak of the text the outline was made from; they are carried to where that text is now. */
function useEdit(card: TheoryCard) {
  const { text, outline, notices } = useSession();
  return (edit: Edit) => {
    const now = outline.state.get();
    const here = cardNow(now, card);
    const changes = here && edit(now.text, here);
    if (!changes) return;
    if (!text.editSince(now.revision, changes))
      notices.say('The text changed there in the meantime; nothing was done.');
  };
}

/** The charge table as papers print it; every edit in it is an edit of the text. */
export function ChargeTable({ card }: { readonly card: TheoryCard }) {
  const edit = useEdit(card);
  const [choosing, setChoosing] = useState<Choosing | null>(null);
  const kinds = new Set(card.rows.map((row) => row.kind));

  function setCell(row: number, column: number, content: string): void {
    edit((text, here) => {
      const cell = here.rows[row]?.cells[column];
      return cell ? [cellChange(text, cell.span, content)] : null;
    });
  }

  return (
    <div className={styles.whole}>
      <div className={styles.scroll}>
        <table className={styles.table} onKeyDown={moveBetweenCells}>
          <caption className="heard">Multiplets of {card.name}</caption>
          <thead>
            <tr>
              <th scope="col">
                <span className="heard">multiplet</span>
              </th>
              {card.columns.map((column, index) => (
                <th key={column.name} scope="col" title={column.name}>
                  {column.typed ? (
                    <Cell
                      label={`Group ${column.name}`}
                      text={column.typed.text}
                      latex={column.latex}
                      onChange={(group) => edit((text, here) => changedGroup(text, here, index, group))}
                    />
                  ) : (
                    <Tex tex={column.latex} />
                  )}
                </th>
              ))}
              <th className={styles.toolsHead}>
                <span className="heard">changes</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {numbered(card.rows, ({ name }) => name).map(({ key, item: row, at }) => (
              <Row
                key={key}
                card={card}
                row={row}
                at={at}
                showKind={kinds.size > 1}
                onCell={(column, content) => setCell(at, column, content)}
                onChoose={(column, group) => setChoosing({ row: at, column, group })}
              />
            ))}
          </tbody>
        </table>
      </div>
      <p className={styles.adders}>
        {(card.insertRowAt === null ? [] : card.multipletKinds).map((kind) => (
          <WordButton
            key={kind}
            onClick={() =>
              edit((text, here) => {
                const change = addedRow(text, here, kind);
                return change && [change];
              })
            }
          >
            + {kind}
          </WordButton>
        ))}
        {(card.insertGroupAt === null ? [] : GROUPS).map((role) => (
          <WordButton key={role} onClick={() => edit((text, here) => addedGroup(text, here, role))}>
            + {role} group
          </WordButton>
        ))}
      </p>
      {choosing ? (
        <RepresentationDialog
          group={choosing.group}
          onChoose={(word) => setCell(choosing.row, choosing.column, word)}
          onClose={() => setChoosing(null)}
        />
      ) : null}
    </div>
  );
}

interface RowProps {
  readonly card: TheoryCard;
  readonly row: TheoryRow;
  readonly at: number;
  readonly showKind: boolean;
  readonly onCell: (column: number, content: string) => void;
  readonly onChoose: (column: number, group: string) => void;
}

function Row({ card, row, at, showKind, onCell, onChoose }: RowProps) {
  const edit = useEdit(card);
  const { lit } = useSession();
  const isLit = useSelected(lit.state, (on) => on !== null && on.theory === card.name && on.row === row.name);
  const here = { theory: card.name, row: row.name };
  return (
    <tr
      className={styles.row}
      data-lit={isLit || undefined}
      data-multiplet={row.name}
      onPointerEnter={() => lit.point(here)}
      onPointerLeave={() => lit.point(null)}
      onFocus={() => lit.focus(here)}
      onBlur={() => lit.focus(null)}
    >
      <th scope="row">
        <Cell
          label={`Name of ${row.name}`}
          text={row.name}
          latex={row.latex}
          onChange={(name) =>
            edit((text, now) => {
              const place = now.rows[at]?.nameSpan;
              return place ? [cellChange(text, place, name)] : null;
            })
          }
        />
        {showKind ? <span className={styles.kind}>{row.kind}</span> : null}
      </th>
      {card.columns.map((column, index) => {
        const cell = row.cells[index];
        return (
          <td key={column.name}>
            {cell ? (
              <Cell
                label={`${row.name}, ${column.name}`}
                text={cell.text}
                latex={cell.latex}
                onChange={(content) => onCell(index, content)}
                onChoose={holdsRepresentation(column) ? () => onChoose(index, column.group ?? '') : undefined}
              />
            ) : null}
          </td>
        );
      })}
      <td className={styles.tools}>
        <WordButton aria-label={`Copy ${row.name}`} onClick={() => edit((text, now) => copiedRow(text, now, at))}>
          copy
        </WordButton>
        <WordButton
          aria-label={`Move ${row.name} up`}
          disabled={at === 0}
          onClick={() => edit((text, now) => movedRow(text, now, at, -1))}
        >
          up
        </WordButton>
        <WordButton
          aria-label={`Move ${row.name} down`}
          disabled={at === card.rows.length - 1}
          onClick={() => edit((text, now) => movedRow(text, now, at, 1))}
        >
          down
        </WordButton>
        <WordButton
          aria-label={`Remove ${row.name}`}
          onClick={(event) => {
            focusNeighbour(event.currentTarget);
            edit((_text, now) => removedRow(now, at));
          }}
        >
          remove
        </WordButton>
      </td>
    </tr>
  );
}

/** Before a row goes, the focus moves to the row that takes its place. */
function focusNeighbour(button: HTMLElement): void {
  const row = button.closest('tr');
  const neighbour = row?.nextElementSibling ?? row?.previousElementSibling;
  neighbour?.querySelector<HTMLElement>('[data-cell]')?.focus();
}

function holdsRepresentation({ role, group }: TheoryColumn): boolean {
  return role !== 'R' && group !== null && group !== 'U(1)';
}

const steps: Readonly<Record<string, readonly [number, number]>> = {
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
  ArrowLeft: [0, -1],
  ArrowRight: [0, 1],
};

/** The arrow keys move between cells that are not being edited. */
function moveBetweenCells(event: KeyboardEvent<HTMLTableElement>): void {
  const step = steps[event.key];
  const { target } = event;
  if (!step || !(target instanceof HTMLElement) || !target.matches('[data-cell]')) return;
  const rows = [...(event.currentTarget.tBodies[0]?.rows ?? [])].map((row) => [
    ...row.querySelectorAll<HTMLElement>('[data-cell]'),
  ]);
  const row = rows.findIndex((cells) => cells.includes(target));
  const column = rows[row]?.indexOf(target) ?? -1;
  const next = rows[row + step[0]]?.[column + step[1]];
  if (!next) return;
  event.preventDefault();
  next.focus();
}
