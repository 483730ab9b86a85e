import type { DecimalComplex, ValueResult } from '../../engine/requests/result';
import { useSession } from '../state/session';
import { copyText } from '../storage/files';
import { Convergence } from './convergence';
import { Digits, errorText, secondsText } from './digits';
import { Says } from './tex';
import styles from './value-body.module.css';
import { WordButton } from './word-button';

export function ValueBody({ result }: { readonly result: ValueResult }) {
  return (
    <>
      <ComplexNumber value={result.value} />
      <p className={styles.second}>
        {result.crossCheck ? (
          <>
            second route: <Says text={result.crossCheck.route} />, <Says text={result.crossCheck.agrees} />
            {' · '}
          </>
        ) : null}
        {secondsText(result.seconds)}
      </p>
      <DeterminantFacts result={result} />
      {result.convergence && result.convergence.length > 0 ? <Convergence rows={result.convergence} /> : null}
    </>
  );
}

const isZero = (text: string) => /^[-+]?0(?:\.0*)?(?:[eE][-+]?\d+)?$/.test(text);

/** Real and imaginary part one above the other, where there are two. */
function ComplexNumber({ value }: { readonly value: DecimalComplex }) {
  const real = isZero(value.im);
  return (
    <p className={styles.value} data-value="">
      <span className={styles.part}>
        <Digits text={value.re} />
      </span>{' '}
      {real ? null : (
        <span className={styles.part}>
          <span className={styles.sign}>{value.im.startsWith('-') ? '−' : '+'}</span>{' '}
          <Digits text={value.im.replace(/^[-+]/, '')} /> <i>i</i>
        </span>
      )}{' '}
      <span className={styles.error}>{isZero(value.error) ? 'exact' : `± ${errorText(value.error)}`}</span>
    </p>
  );
}

/** What else is said of a determinant: how it depends on the regularisation. */
function DeterminantFacts({ result }: { readonly result: ValueResult }) {
  const facts = [
    { value: result.zeta0, says: 'zeta function at 0' },
    { value: result.scale, says: 'response of the logarithm to a factor c in every linear factor, per log c' },
    { value: result.anomaly, says: 'logarithm by operator minus logarithm by factors' },
  ].filter((fact): fact is { value: DecimalComplex; says: string } => fact.value !== undefined);
  if (facts.length === 0) return null;
  return (
    <dl className={styles.facts}>
      {facts.map((fact) => (
        <div key={fact.says}>
          <dt>{fact.says}</dt>
          <dd>
            <ComplexNumber value={fact.value} />
          </dd>
        </div>
      ))}
    </dl>
  );
}

function plain({ re, im }: DecimalComplex): string {
  return isZero(im) ? re : `${re} ${im.startsWith('-') ? '-' : '+'} ${im.replace(/^[-+]/, '')} i`;
}

export function ValueTools({ result }: { readonly result: ValueResult }) {
  const { notices } = useSession();

  async function copy(): Promise<void> {
    const copied = await copyText(plain(result.value));
    notices.say(
      copied ? 'The number is on the clipboard.' : 'The browser does not let the page write to the clipboard.',
    );
  }

  return (
    <WordButton aria-label={`Copy the value of ${result.request}`} onClick={() => void copy()}>
      Copy
    </WordButton>
  );
}
