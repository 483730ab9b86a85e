import { Form } from '../exact/form';
import type { Diagnostic, Expression, IndexRange, SpectrumBlock, TowerKind, TowerRow } from '../language/tree';
import { analyseTower, isRemark } from './analyse';
import { guarded } from './guard';
import { inspect } from './inspect';
import { type RefusalCode, type Remark, remark, type Spectrum, type WrittenRange, type WrittenTower } from './tower';

/** Power of its determinant that a field of each kind contributes (statistics and reality, Gaussian integrals). */
const EXPONENTS: Readonly<Record<Exclude<TowerKind, 'power'>, Form>> = {
  boson: Form.ratio(-1, 2),
  'complex boson': Form.number(-1),
  fermion: Form.one,
  'real fermion': Form.ratio(1, 2),
};

export function exponentOf(kind: Exclude<TowerKind, 'power'>): Form {
  return EXPONENTS[kind];
}

/**
 * A spectrum from its block. Parameters stay symbols; their values are kept beside, for values and for what can only
 * be said of numbers. Towers that cannot be used are reported and left out.
 */
export function readSpectrum(
  block: SpectrumBlock,
  parameters: ReadonlyMap<string, Form>,
): { readonly spectrum: Spectrum; readonly diagnostics: readonly Diagnostic[] } {
  const written = block.towers.map((row) => readTower(row, block.indices, parameters));
  const remarks: Remark[] = [];
  const sound = written.filter((tower, place) => {
    const found = guarded(() => analyseTower(tower, place), place);
    if (!isRemark(found)) return true;
    remarks.push(found);
    return false;
  });
  const diagnostics = remarks.map((found) => diagnosticOf(found, written, block));
  const spectrum = { name: block.name.name, towers: sound, parameters };
  if (block.towers.length === 0) {
    diagnostics.push(diagnosticOf(remark('spectrum-empty', null, 'row'), written, block));
  }
  const inspected = guarded(() => inspect(spectrum), null);
  const further = (isRemark(inspected) ? [inspected] : inspected).map((found) => diagnosticOf(found, sound, block));
  return { spectrum, diagnostics: [...diagnostics, ...further] };
}

function readTower(row: TowerRow, indices: readonly IndexRange[], parameters: ReadonlyMap<string, Form>): WrittenTower {
  const degeneracy = row.degeneracy?.form ?? Form.one;
  const eigenvalue = row.eigenvalue.map(({ factor, power }) => ({ form: factor.form, power }));
  const names = new Set([degeneracy, ...eigenvalue.map(({ form }) => form)].flatMap((form) => form.symbols()));
  const own = new Set(row.ranges.map(({ name }) => name.name));
  const inherited = indices.filter(({ name }) => names.has(name.name) && !own.has(name.name));
  const first = row.eigenvalue[0]?.factor.span;
  const last = row.eigenvalue.at(-1)?.factor.span;
  return {
    kind: row.kind,
    exponent: row.kind === 'power' ? exponentForm(row.exponent, parameters) : EXPONENTS[row.kind],
    eigenvalue,
    degeneracy,
    ranges: [...inherited, ...row.ranges].map((range) => readRange(range, parameters)),
    spans: {
      row: row.span,
      eigenvalue: first && last ? { from: first.from, to: last.to } : row.span,
      degeneracy: row.degeneracy?.span ?? row.span,
    },
    label: '',
  };
}

function exponentForm(exponent: Expression | null, parameters: ReadonlyMap<string, Form>): Form {
  return exponent === null ? Form.one : exponent.form.substitute((name) => parameters.get(name) ?? null);
}

/** A last value must be a definite number of steps away, so parameters in the ends of finite ranges are replaced. */
function readRange({ name, from, to, span }: IndexRange, parameters: ReadonlyMap<string, Form>): WrittenRange {
  const value = (form: Form): Form => form.substitute((symbol) => parameters.get(symbol) ?? null);
  if (to === null) return { name: name.name, from: from.form, to: null, span };
  return { name: name.name, from: value(from.form), to: value(to.form), span };
}

const WARNINGS: ReadonlySet<string> = new Set([
  'zero-mode',
  'square-root-sign',
  'negative-axis',
  'degeneracy-fraction',
]);
const HINTS: ReadonlySet<string> = new Set(['negative-modes', 'near-zero-mode', 'mixed-order', 'scale-dependent']);

function diagnosticOf(found: Remark, towers: readonly WrittenTower[], block: SpectrumBlock): Diagnostic {
  const tower = found.place === null ? undefined : towers[found.place];
  const span = found.span ?? tower?.spans[found.part] ?? block.name.span;
  const severity = WARNINGS.has(found.code) ? 'warning' : HINTS.has(found.code) ? 'hint' : 'error';
  return { code: found.code, span, severity, data: found.data };
}

/** True for a remark that leaves no value. */
export function isRefusal(found: Remark): found is Remark & { readonly code: RefusalCode } {
  return !WARNINGS.has(found.code) && !HINTS.has(found.code);
}
