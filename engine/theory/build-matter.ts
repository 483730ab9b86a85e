import type { Form } from '../exact/form';
import type { MultipletRow, TheoryBlock } from '../language/tree';
import { parseRepresentation, type Representation } from '../lie/representation';
import { problem, type Report, refused, valueAt } from './report';
import type { SphereRules } from './rules';
import type { Multiplet, TheoryGroup } from './theory';
import { matterWeights } from './weights';

/** A row of the charge table: what each cell means, null where it could not be read, and the multiplet if all could. */
export interface ReadRow {
  readonly row: MultipletRow;
  readonly cells: readonly (
    | { readonly kind: 'representation'; readonly representation: Representation }
    | { readonly kind: 'R'; readonly form: Form }
    | null
  )[];
  readonly multiplet: Multiplet | null;
}

/** Reads the charge table. Columns may stand in any order; a group without a column leaves all multiplets neutral. */
export function buildMatter(
  block: TheoryBlock,
  groups: readonly TheoryGroup[],
  parameters: ReadonlyMap<string, Form>,
  rules: SphereRules,
  report: Report,
): ReadRow[] {
  const header = block.header;
  if (header === null) return [];
  for (const column of header.columns) {
    if (column.name !== 'R' && !block.groups.some((line) => line.name.name === column.name)) {
      report(problem('column-unknown', column.span, { name: column.name, known: names(groups) }));
    }
  }
  return block.multiplets.map((row) => readRow(row, block, groups, parameters, rules, report));
}

function names(groups: readonly TheoryGroup[]): string {
  return [...groups.map(({ name }) => `\`${name}\``), '`R`'].join(', ');
}

function readRow(
  row: MultipletRow,
  block: TheoryBlock,
  groups: readonly TheoryGroup[],
  parameters: ReadonlyMap<string, Form>,
  rules: SphereRules,
  report: Report,
): ReadRow {
  const columns = block.header?.columns ?? [];
  const representations = new Map<string, Representation>();
  const allowed = rules.multiplets.includes(row.kind);
  if (!allowed) report(problem('multiplet-kind', row.span, kindData(row, rules)));
  const canonical = rules.rCharge(row.kind);
  let rCharge: Form | null = canonical.value;
  const cells = row.cells.map((cell, k): ReadRow['cells'][number] => {
    const column = columns[k]?.name;
    if (column === 'R') {
      rCharge = readRCharge(cell, parameters, canonical, report);
      return rCharge === null ? null : { kind: 'R', form: rCharge };
    }
    const group = groups.find(({ name }) => name === column);
    if (column === undefined || !group) return null;
    const read = parseRepresentation(group.group, cell.text);
    if (read.kind === 'refusal') {
      report(refused(read, cell.span));
      return null;
    }
    representations.set(column, read.representation);
    return read;
  });
  const complete = allowed && rCharge !== null && cells.length === columns.length && !cells.includes(null);
  if (!complete || rCharge === null) return { row, cells, multiplet: null };
  const multiplet: Multiplet = {
    kind: row.kind,
    name: row.name.name,
    representations: groups.map((group) => representations.get(group.name) ?? trivial(group)),
    rCharge,
    row,
  };
  if (row.kind === 'halfhyper' && rules.halvesWeights && !comesInPairs(groups, multiplet)) {
    report(problem('half-hyper', row.span, { name: row.name.name }));
    return { row, cells, multiplet: null };
  }
  return { row, cells, multiplet };
}

/** Whether the weights are w, -w in pairs, zero taken an even number of times. */
function comesInPairs(groups: readonly TheoryGroup[], { representations }: Multiplet): boolean {
  return matterWeights(groups, representations).every(({ weights, multiplicity }) =>
    weights === null ? multiplicity % 2 === 0 : weights.key === weights.oppositeKey,
  );
}

function kindData(row: MultipletRow, rules: SphereRules): Record<string, string> {
  const allowed = rules.multiplets.map((word) => `\`${word}\``).join(', ');
  return { kind: row.kind, sphere: rules.name, allowed, why: rules.refusals[row.kind] ?? '' };
}

function readRCharge(
  cell: MultipletRow['cells'][number],
  parameters: ReadonlyMap<string, Form>,
  canonical: { readonly value: Form; readonly fixed: boolean },
  report: Report,
): Form | null {
  const { expression } = cell;
  if (expression === null) {
    report(problem('r-charge', cell.span, { text: cell.text }));
    return null;
  }
  const unknown = expression.names.filter(({ name }) => !parameters.has(name));
  for (const name of unknown) {
    report(problem('r-charge-name', name.span, { name: name.name, text: cell.text }));
  }
  if (unknown.length > 0) return null;
  const value = valueAt(expression, parameters, report);
  if (value === null) return null;
  if (canonical.fixed && !value.equals(canonical.value)) {
    report(problem('r-charge-fixed', cell.span, { text: cell.text, value: canonical.value.key }));
    return null;
  }
  return expression.form;
}

function trivial(group: TheoryGroup): Representation {
  const read = parseRepresentation(group.group, group.group.isAbelian ? '0' : '1');
  if (read.kind === 'refusal') throw new Error(`No trivial representation of ${group.group.name}.`);
  return read.representation;
}
