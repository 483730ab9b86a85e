import { superscript } from '../charts/ticks';
import styles from './digits.module.css';

function groupsOfFive(fraction: string): readonly { readonly place: number; readonly digits: string }[] {
  return [...fraction.matchAll(/\d{1,5}/g)].map((group) => ({ place: group.index, digits: group[0] }));
}

/** A decimal number as the engine printed it, its digits in groups of five; copied, it is one unbroken word. */
export function Digits({ text }: { readonly text: string }) {
  const [, sign = '', whole = text, fraction = '', exponent = ''] =
    /^([-+−]?)(\d+)(?:\.(\d+))?(?:[eE]([-+]?\d+))?$/.exec(text) ?? [];
  return (
    <span className={styles.digits}>
      {sign === '-' ? '−' : sign}
      {whole}
      {fraction === '' ? null : '.'}
      {groupsOfFive(fraction).map(({ place, digits }) => (
        <span key={place} className={styles.group}>
          {digits}
        </span>
      ))}
      {exponent ? <PowerOfTen exponent={exponent} /> : null}
    </span>
  );
}

function PowerOfTen({ exponent }: { readonly exponent: string }) {
  return <span className={styles.power}>·10{superscript(Number(exponent))}</span>;
}

/** An error bound: `4e-34` as 4·10⁻³⁴. */
export function errorText(error: string): string {
  const [, digits, exponent] = /^([\d.]+)[eE]([-+]?\d+)$/.exec(error) ?? [];
  return digits === undefined ? error : `${digits}·10${superscript(Number(exponent))}`;
}

/** Time as people say it. */
export function secondsText(seconds: number): string {
  if (seconds < 0.01) return `${(seconds * 1000).toPrecision(2)} ms`;
  if (seconds < 1) return `${Math.round(seconds * 1000)} ms`;
  if (seconds < 100) return `${seconds.toPrecision(2)} s`;
  return `${Math.round(seconds / 60)} min`;
}
