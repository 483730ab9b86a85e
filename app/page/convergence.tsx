import type { DecimalComplex, ValueResult } from '../../engine/requests/result';
import numbers from '../styles/number-table.module.css';
import styles from './convergence.module.css';
import { errorText } from './digits';

type Rows = NonNullable<ValueResult['convergence']>;

/** How products cut off at more and more modes come close to the regularised value. */
export function Convergence({ rows }: { readonly rows: Rows }) {
  return (
    <details className={styles.convergence}>
      <summary>Products cut off, and how they converge</summary>
      <div className={numbers.scroll}>
        <table className={numbers.table}>
          <thead>
            <tr>
              <th scope="col">cut-off</th>
              <th scope="col">logarithm of the product</th>
              <th scope="col">counterterms</th>
              <th scope="col">sum</th>
              <th scope="col">distance</th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <tr key={row.cutoff}>
                <th scope="row">{row.cutoff}</th>
                <td>{shortText(row.product)}</td>
                <td>{shortText(row.counterterms)}</td>
                <td>{shortText(row.regulated)}</td>
                <td>{errorText(row.distance)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}

/** Digits shown of a number in the table; the value itself is shown in full above. */
const SHOWN = 14;

const short = (text: string) => (/[eE]/.test(text) ? errorText(text) : text.slice(0, SHOWN)).replace('-', '−');

function shortText({ re, im }: DecimalComplex): string {
  if (/^[-+]?0(?:\.0*)?$/.test(im)) return short(re);
  return `${short(re)} ${im.startsWith('-') ? '−' : '+'} ${short(im.replace(/^[-+]/, ''))} i`;
}
