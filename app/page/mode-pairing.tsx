import type { FormulaView } from '../../engine/requests/result';
import { numbered } from '../state/numbered';
import styles from './mode-pairing.module.css';
import { ScrollBox } from './scroll-box';
import { Tex } from './tex';

type Pairing = NonNullable<Extract<FormulaView, { kind: 'formula' }>['pairing']>;
type Table = Pairing['tables'][number];

/** Which bosonic modes pair with which fermionic ones, multiplet by multiplet, and what is left of them. */
export function ModePairing({ tables }: { readonly tables: Pairing['tables'] }) {
  return (
    <ScrollBox label="Pairs of modes">
      {numbered(tables, ({ from, weights }) => `${from} ${weights}`).map(({ key, item }) => (
        <PairingOf key={key} table={item} />
      ))}
    </ScrollBox>
  );
}

function PairingOf({ table }: { readonly table: Table }) {
  return (
    <table className={styles.table}>
      <caption>
        Pairs of modes of {table.from}
        {table.weights === '' ? null : (
          <>
            , for each weight of <Tex tex={table.weights} />
          </>
        )}
      </caption>
      <thead>
        <tr>
          <th scope="col">factor</th>
          <th scope="col">levels</th>
          <th scope="col">bosons</th>
          <th scope="col">fermions</th>
          <th scope="col">left</th>
        </tr>
      </thead>
      <tbody>
        {table.rows.map((row) => (
          <tr key={`${row.factor} ${row.bosons.spins}`}>
            <th scope="row">
              <Tex tex={row.factor} />
            </th>
            <td>
              <Tex tex={row.levels} />
            </td>
            <Field field={row.bosons} />
            <Field field={row.fermions} />
            <td className={styles.left}>
              <Tex tex={`${row.left},\\;j_L=${row.spin}`} />
            </td>
          </tr>
        ))}
      </tbody>
      <tfoot>
        <tr>
          <th scope="row">product left</th>
          <td colSpan={4}>
            <Tex tex={`\\displaystyle ${table.unpaired}`} />
          </td>
        </tr>
      </tfoot>
    </table>
  );
}

function Field({ field }: { readonly field: Table['rows'][number]['bosons'] }) {
  return (
    <td>
      <span className={styles.field}>{field.field}</span> <Tex tex={`${field.spins}:\\;${field.multiplicity}`} />
    </td>
  );
}
