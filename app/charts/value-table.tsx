import { useState } from 'react';
import type { PlotResult } from '../../engine/requests/result';
import { numbered } from '../state/numbered';
import numbers from '../styles/number-table.module.css';
import { symbolText } from './symbol-text';
import { readoutText } from './ticks';
import styles from './value-table.module.css';

/** Rows and columns of the table in the page; the file with all points is one word away. */
const ROWS = 25;
const MAP_COLUMNS = 8;
const MAP_ROWS = 12;

function spread(count: number, wanted: number): readonly number[] {
  if (count <= wanted) return Array.from({ length: count }, (_, at) => at);
  return Array.from({ length: wanted }, (_, at) => Math.round((at * (count - 1)) / (wanted - 1)));
}

/** The drawing in numbers, for those who do not see it; built when it is opened. */
export function ValueTable({ result }: { readonly result: PlotResult }) {
  const [opened, setOpened] = useState(false);
  return (
    <details className={styles.values} onToggle={(event) => setOpened(event.currentTarget.open)}>
      <summary>Table of values</summary>
      {opened ? (
        <div className={numbers.scroll}>{result.axes.length > 1 ? mapTable(result) : curveTable(result)}</div>
      ) : null}
    </details>
  );
}

function curveTable(result: PlotResult) {
  const points = result.series[0]?.x ?? [];
  const columns = numbered(result.series, ({ name }) => name);
  return (
    <table className={styles.table}>
      <thead>
        <tr>
          <th scope="col">{symbolText(result.axes[0]?.name ?? '')}</th>
          {columns.map(({ key, item: series }) => (
            <th key={key} scope="col">
              {series.name}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {spread(points.length, ROWS).map((at) => (
          <tr key={at}>
            <th scope="row">{readoutText(points[at] ?? null)}</th>
            {columns.map(({ key, item: series }) => (
              <td key={key}>{readoutText(series.y[at] ?? null)}</td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function mapTable(result: PlotResult) {
  const [across, up] = result.axes;
  const [series] = result.series;
  if (!across || !up || !series?.z) return null;
  const columns = spread(series.x.length, MAP_COLUMNS);
  return (
    <table className={styles.table}>
      <thead>
        <tr>
          <th scope="col">
            {symbolText(up.name)} \ {symbolText(across.name)}
          </th>
          {columns.map((column) => (
            <th key={column} scope="col">
              {readoutText(series.x[column] ?? null)}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {spread(series.y.length, MAP_ROWS).map((row) => (
          <tr key={row}>
            <th scope="row">{readoutText(series.y[row] ?? null)}</th>
            {columns.map((column) => (
              <td key={column}>{readoutText(series.z?.[row]?.[column] ?? null)}</td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
