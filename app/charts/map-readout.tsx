import { type KeyboardEvent, type PointerEvent, useState } from 'react';
import type { PlotResult } from '../../engine/requests/result';
import type { Frame } from './axes';
import styles from './readout.module.css';
import { symbolText } from './symbol-text';
import { readoutText } from './ticks';

interface MapReadoutProps {
  readonly result: PlotResult;
  readonly frame: Frame;
}

interface Place {
  readonly column: number;
  readonly row: number;
}

/** Reads a map at one point: under the pointer, or where the arrow keys lead. */
export function MapReadout({ result, frame }: MapReadoutProps) {
  const [place, setPlace] = useState<Place | null>(null);
  const [across, up] = result.axes;
  const values = result.series[0]?.z ?? [];
  const rows = values.length;
  const columns = values[0]?.length ?? 0;
  if (!across || !up || rows === 0 || columns === 0) return null;
  const middle: Place = { column: Math.floor(columns / 2), row: Math.floor(rows / 2) };
  const width = frame.right - frame.left;
  const height = frame.bottom - frame.top;

  const said = (at: Place) => {
    const x = across.from + ((across.to - across.from) * at.column) / Math.max(1, columns - 1);
    const y = up.from + ((up.to - up.from) * at.row) / Math.max(1, rows - 1);
    const value = values[at.row]?.[at.column] ?? null;
    return `${symbolText(across.name)} = ${readoutText(x)}, ${symbolText(up.name)} = ${readoutText(y)}: ${readoutText(value)}`;
  };

  const within = ({ column, row }: Place): Place => ({
    column: Math.max(0, Math.min(columns - 1, column)),
    row: Math.max(0, Math.min(rows - 1, row)),
  });

  function follow(event: PointerEvent<HTMLElement>): void {
    const box = event.currentTarget.getBoundingClientRect();
    const column = Math.floor(((event.clientX - box.left) / box.width) * columns);
    const row = rows - 1 - Math.floor(((event.clientY - box.top) / box.height) * rows);
    setPlace(within({ column, row }));
  }

  function step(event: KeyboardEvent): void {
    const by = event.shiftKey ? 10 : 1;
    const moves: Readonly<Record<string, readonly [number, number]>> = {
      ArrowRight: [by, 0],
      ArrowLeft: [-by, 0],
      ArrowUp: [0, by],
      ArrowDown: [0, -by],
    };
    const move = moves[event.key];
    if (!move) return;
    event.preventDefault();
    const { column, row } = place ?? middle;
    setPlace(within({ column: column + move[0], row: row + move[1] }));
  }

  const here = place ?? middle;
  return (
    <>
      <div
        className={styles.field}
        style={{ left: frame.left, top: frame.top, width, height }}
        role="slider"
        tabIndex={0}
        aria-label="Read the map with the arrow keys"
        aria-valuemin={0}
        aria-valuemax={rows * columns - 1}
        aria-valuenow={here.row * columns + here.column}
        aria-valuetext={said(here)}
        onPointerMove={follow}
        onPointerLeave={() => setPlace(null)}
        onKeyDown={step}
        onBlur={() => setPlace(null)}
      />
      {place ? (
        <div className={styles.read} aria-hidden="true">
          <span
            className={styles.dot}
            style={{
              left: frame.left + ((place.column + 0.5) / columns) * width,
              top: frame.bottom - ((place.row + 0.5) / rows) * height,
              background: 'var(--curve-2)',
            }}
          />
          <span className={styles.says} style={{ left: frame.left, top: 0 }}>
            {said(place)}
          </span>
        </div>
      ) : null}
    </>
  );
}
