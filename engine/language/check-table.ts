import { listed } from './names';
import type { Reading } from './reading';
import type { TheoryDraft } from './theory-draft';

/** What only the whole theory tells: columns against groups, rows against the header, fields against rows. */
export function checkTable(draft: TheoryDraft, reading: Reading): void {
  const { header, multiplets } = draft;
  const [first] = multiplets.values();
  if (!header && first) reading.report('matter-missing', first.span, { name: first.name.name });
  if (draft.incomplete) return;
  checkColumns(draft, reading);
  checkMixed(draft, reading);
  const allowed = listed([...multiplets.keys()]);
  for (const { field } of draft.superpotential.flatMap((monomial) => monomial.fields)) {
    if (!multiplets.has(field.name)) reading.report('field-unknown', field.span, { name: field.name, allowed });
  }
}

function checkColumns({ header, groups }: TheoryDraft, reading: Reading): void {
  if (!header) return;
  const columns = new Set(header.columns.map((column) => column.name));
  const allowed = listed([...groups.keys()]);
  for (const { name, span } of header.columns) {
    if (name !== 'R' && !groups.has(name)) reading.report('column-unknown', span, { name, allowed });
  }
  const missing = [...groups.keys()].filter((name) => !columns.has(name));
  if (missing.length > 0) reading.report('column-missing', header.span, { names: listed(missing) });
}

function checkMixed({ mixed, groups }: TheoryDraft, reading: Reading): void {
  const allowed = listed([...groups.keys()]);
  for (const { name, span } of mixed.flatMap((line) => line.groups)) {
    if (!groups.has(name)) reading.report('group-unknown', span, { name, allowed });
  }
}
