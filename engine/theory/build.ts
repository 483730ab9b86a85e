import { formDouble } from '../arithmetic/form-double';
import type { Form } from '../exact/form';
import type { Diagnostic, MultipletRow, Name, SphereLine, TheoryBlock } from '../language/tree';
import type { Representation } from '../lie/representation';
import { buildGroups, buildMixed } from './build-groups';
import { buildMatter, type ReadRow } from './build-matter';
import { problem, type Report, unknownNames, valueAt } from './report';
import type { SphereRules } from './rules';
import type { SuperpotentialTerm, Theory, TheoryGroup } from './theory';

/** What a block says, as far as it can be read. */
export interface BuiltTheory {
  /** Null when anything in the block is in error: a formula without the faulty line would mislead. */
  readonly theory: Theory | null;
  readonly rules: SphereRules;
  readonly groups: readonly TheoryGroup[];
  readonly rows: readonly ReadRow[];
  readonly diagnostics: readonly Diagnostic[];
}

export type { ReadRow };
export type ReadCell = Representation | Form | null;

/**
 * Reads a theory from its block. `parameters` are the exact values of the `let`s above it, `rules` those of its
 * sphere. Never throws on a user's mistake: all of them are in `diagnostics`.
 */
export function buildTheory(
  block: TheoryBlock,
  parameters: ReadonlyMap<string, Form>,
  rules: SphereRules,
): BuiltTheory {
  const diagnostics: Diagnostic[] = [];
  const report: Report = (diagnostic) => diagnostics.push(diagnostic);
  const geometry = buildGeometry(block.sphere, rules, parameters, report);
  const { groups, backgrounds, couplings } = buildGroups(block.groups, parameters, rules, report);
  const mixed = buildMixed(block.mixed, groups, parameters, rules, report);
  const supersymmetry = buildSupersymmetry(block, rules, report);
  const rows = buildMatter(block, groups, parameters, rules, report);
  const multiplets = rows.flatMap(({ multiplet }) => multiplet ?? []);
  const superpotential = buildSuperpotential(block, rows, report);
  const failed = diagnostics.some(({ severity }) => severity === 'error') || multiplets.length !== rows.length;
  const theory: Theory = {
    name: block.name.name,
    sphere: rules.name,
    geometry: geometry.values,
    round: geometry.round,
    supersymmetry,
    groups,
    mixed,
    multiplets,
    superpotential,
    parameters,
    backgrounds,
    couplings,
  };
  return { theory: failed ? null : theory, rules, groups, rows, diagnostics };
}

/** Squashing parameters: exact, without free names, positive. */
function buildGeometry(
  line: SphereLine | null,
  rules: SphereRules,
  parameters: ReadonlyMap<string, Form>,
  report: Report,
): { values: ReadonlyMap<string, Form>; round: boolean } {
  const values = new Map(rules.squashing.map(({ symbol, round }) => [symbol, round]));
  let round = true;
  for (const option of line?.options ?? []) {
    const known = rules.squashing.find(({ name }) => name === option.name.name);
    if (!known) {
      const allowed = rules.squashing.map(({ name }) => `\`${name}\``).join(', ');
      const data = { name: option.name.name, sphere: rules.name, allowed: allowed === '' ? 'no parameter' : allowed };
      report(problem('sphere-option', option.name.span, data));
      continue;
    }
    const unknown = unknownNames(option.value, parameters);
    if (unknown.length > 0) {
      for (const name of unknown) report(problem('name-unknown', name.span, { name: name.name }));
      continue;
    }
    const value = valueAt(option.value, parameters, report);
    if (value === null) continue;
    const sign = signOf(value, known.mayBeComplex);
    if (sign !== null) {
      report(problem(`squashing-${sign}`, option.value.span, { name: known.name, value: option.value.text }));
      continue;
    }
    values.set(known.symbol, value);
    if (!value.equals(known.round)) round = false;
  }
  return { values, round };
}

/** What is wrong with a squashing; null where nothing is. */
function signOf(value: Form, mayBeComplex: boolean): 'negative' | 'zero' | 'complex' | 'half-plane' | 'extreme' | null {
  const numeric = approximate(value);
  if (numeric === null || !Number.isFinite(numeric.re) || !Number.isFinite(numeric.im)) return 'extreme';
  const size = Math.hypot(numeric.re, numeric.im);
  if (size === 0) return 'zero';
  if (Math.abs(numeric.im) > 1e-12 * Math.abs(numeric.re)) {
    if (!mayBeComplex) return 'complex';
    if (numeric.re <= 1e-12 * size) return 'half-plane';
  } else if (numeric.re < 0) return 'negative';
  return size < MINIMAL_SQUASHING || size > 1 / MINIMAL_SQUASHING ? 'extreme' : null;
}

/** Beyond this the two periods of the double sine differ by more than 10^4 and no table of it fits. */
const MINIMAL_SQUASHING = 1e-2;

function buildSupersymmetry(block: TheoryBlock, rules: SphereRules, report: Report): number | null {
  if (block.supersymmetry === null) return null;
  const { value, span } = block.supersymmetry;
  if (rules.supersymmetries.includes(value)) return value;
  const allowed = rules.supersymmetries.join(' or ');
  report(problem('supersymmetry', span, { value: `${value}`, sphere: rules.name, allowed }));
  return null;
}

function buildSuperpotential(block: TheoryBlock, rows: readonly ReadRow[], report: Report): SuperpotentialTerm[] {
  const known = new Map<string, ReadRow>(rows.map((row) => [row.row.name.name, row]));
  return block.superpotential.flatMap((monomial) => {
    const missing = monomial.fields.filter(({ field }) => !known.has(field.name));
    for (const { field } of missing) report(problem('field-unknown', field.span, fieldData(field, block.multiplets)));
    const fields = monomial.fields.flatMap(({ field, power }) => {
      const multiplet = known.get(field.name)?.multiplet;
      return multiplet ? [{ multiplet, power, field }] : [];
    });
    return fields.length === monomial.fields.length ? [{ fields, span: monomial.span }] : [];
  });
}

function fieldData(field: Name, rows: readonly MultipletRow[]): Record<string, string> {
  const names = rows.map(({ name }) => `\`${name.name}\``);
  return { name: field.name, known: names.length === 0 ? 'none' : names.join(', ') };
}

function approximate(value: Form): { re: number; im: number } | null {
  return formDouble(value, () => null);
}
