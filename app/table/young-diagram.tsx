import styles from './young-diagram.module.css';

const BOX = 9;

function boxes(rows: readonly number[]): readonly { readonly x: number; readonly y: number }[] {
  return rows.flatMap((length, row) =>
    Array.from({ length }, (_, column) => ({ x: column * BOX + 0.5, y: row * BOX + 0.5 })),
  );
}

/** Boxes of a Young diagram, rows from the top. */
export function YoungDiagram({ rows }: { readonly rows: readonly number[] }) {
  const filled = rows.filter((length) => length > 0);
  if (filled.length === 0) return <span className={styles.none}>no box</span>;
  const width = Math.max(...filled) * BOX + 1;
  const height = filled.length * BOX + 1;
  return (
    <svg
      className={styles.diagram}
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={`Young diagram with rows of ${filled.join(', ')}`}
    >
      {boxes(filled).map(({ x, y }) => (
        <rect key={`${x} ${y}`} x={x} y={y} width={BOX} height={BOX} />
      ))}
    </svg>
  );
}
