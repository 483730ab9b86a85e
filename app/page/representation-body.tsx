import type { RepresentationResult } from '../../engine/requests/result';
import styles from './representation-body.module.css';
import { ScrollBox } from './scroll-box';
import { Says, Tex } from './tex';

const SHOWN = 40;

export function RepresentationBody({ result }: { readonly result: RepresentationResult }) {
  const facts = [
    ['dimension', result.dimension],
    ['index', result.index],
    ['cubic index', result.cubic],
    ['reality', result.reality],
    ['distinct weights', String(result.weights)],
  ] as const;
  return (
    <>
      <ScrollBox label="Decomposition">
        <Tex tex={`\\displaystyle ${result.latex}`} />
      </ScrollBox>
      <dl className={styles.facts}>
        {facts.map(([name, value]) => (
          <div key={name}>
            <dt>{name}</dt>
            <dd>
              <Says text={value} />
            </dd>
          </div>
        ))}
      </dl>
      <div className={styles.tables}>
        <LabelTable
          title="Irreducible parts"
          rows={result.parts.map(({ labels, multiplicity, dimension }) => ({ labels, multiplicity, dimension }))}
        />
        {result.dominant ? <LabelTable title="Dominant weights" rows={result.dominant} /> : null}
      </div>
    </>
  );
}

interface LabelRow {
  readonly labels: readonly number[];
  readonly multiplicity: number;
  readonly dimension?: string;
}

function LabelTable({ title, rows }: { readonly title: string; readonly rows: readonly LabelRow[] }) {
  const withDimension = rows.some(({ dimension }) => dimension !== undefined);
  const rest = rows.length - SHOWN;
  return (
    <table className={styles.table}>
      <caption>{title}</caption>
      <thead>
        <tr>
          <th scope="col">labels</th>
          {withDimension ? <th scope="col">dimension</th> : null}
          <th scope="col">multiplicity</th>
        </tr>
      </thead>
      <tbody>
        {rows.slice(0, SHOWN).map(({ labels, multiplicity, dimension }) => (
          <tr key={labels.join(',')}>
            <th scope="row">[{labels.join(', ')}]</th>
            {withDimension ? <td>{dimension}</td> : null}
            <td>{multiplicity}</td>
          </tr>
        ))}
      </tbody>
      {rest > 0 ? (
        <tfoot>
          <tr>
            <td colSpan={3}>and {rest} more</td>
          </tr>
        </tfoot>
      ) : null}
    </table>
  );
}
