import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { factorise } from './factorise';
import { formText } from './form-text';
import { coefficient, degreeOf, type Polynomial, polynomialIn } from './polynomial';
import { type Range, readRanges, summedOver } from './ranges';
import {
  MAXIMAL_DEGENERACY_DEGREE,
  MAXIMAL_DEGREE,
  MAXIMAL_INDICES,
  type Remark,
  remark,
  type ScaleRecord,
  type Tower,
  type TowerFactor,
  type WrittenTower,
} from './tower';

/** Name of the index of a mode that stands alone. */
const SINGLE_MODE = '@mode';

/** The towers a written tower consists of, finite ranges beside endless ones written out; or why it has none. */
export function analyseTower(written: WrittenTower, place: number): Tower[] | Remark {
  const exponent = written.exponent.toRational();
  if (exponent === null) return remark('tower-power', place, 'row', { exponent: formText(written.exponent) });
  const ranges = readRanges(written, place);
  if (!('ranges' in ranges)) return ranges;
  const endless = ranges.ranges.filter(({ last }) => last === null);
  const finite = ranges.ranges.filter(({ last }) => last !== null);
  if (endless.length > MAXIMAL_INDICES) {
    return remark('tower-indices', place, 'row', { count: `${endless.length}`, limit: `${MAXIMAL_INDICES}` });
  }
  const context: Context = { written, place, exponent };
  const start = shifted(written, ranges.ranges);
  if (start.eigenvalue.some(({ form }) => form.isZero())) return remark('tower-zero-eigenvalue', place, 'eigenvalue');
  const unused = endless.find(({ name }) => start.eigenvalue.every(({ form }) => !form.symbols().includes(name)));
  if (unused) return remark('degeneracy-infinite', place, 'eigenvalue', { index: unused.name });
  if (ranges.ranges.length === 0) return remark('tower-without-index', place, 'eigenvalue');
  if (endless.length === 0) return finiteTower(context, start, finite);
  const names = endless.map(({ name }) => name);
  const towers: Tower[] = [];
  for (const values of over(start, finite)) {
    const tower = endlessTower(context, values, names, null);
    if (isRemark(tower)) return tower;
    if (tower !== null) towers.push(tower);
  }
  return towers;
}

interface Context {
  readonly written: WrittenTower;
  readonly place: number;
  readonly exponent: Rational;
}

/** Eigenvalue and degeneracy in indices that start at 0. */
interface Values {
  readonly eigenvalue: WrittenTower['eigenvalue'];
  readonly degeneracy: Form;
}

export function isRemark(value: object | null): value is Remark {
  return value !== null && 'code' in value;
}

function substituteValues({ eigenvalue, degeneracy }: Values, values: (name: string) => Form | null): Values {
  return {
    eigenvalue: eigenvalue.map(({ form, power }) => ({ form: form.substitute(values), power })),
    degeneracy: degeneracy.substitute(values),
  };
}

function shifted(written: WrittenTower, ranges: readonly Range[]): Values {
  return substituteValues(written, (name) => {
    const range = ranges.find((r) => r.name === name);
    return range === undefined || range.from.isZero() ? null : range.from.add(Form.symbol(name));
  });
}

/** Every combination of values of the finite indices. */
function over(start: Values, finite: readonly Range[]): Values[] {
  return finite.reduce<Values[]>(
    (list, { name, last }) =>
      list.flatMap((values) =>
        Array.from({ length: (last ?? 0) + 1 }, (_, k) =>
          substituteValues(values, (n) => (n === name ? Form.number(k) : null)),
        ),
      ),
    [start],
  );
}

function finiteTower(context: Context, start: Values, finite: readonly Range[]): Tower[] | Remark {
  const used = finite.filter(({ name }) => start.eigenvalue.some(({ form }) => form.symbols().includes(name)));
  const only = used[0];
  const rest = finite.filter((range) => range !== only);
  if (used.length <= 1 && rest.every((range) => range.last !== null)) {
    const degeneracy = rest.reduce<Form | null>(
      (sum, range) => (sum === null ? null : summedOver(sum, range)),
      start.degeneracy,
    );
    if (degeneracy === null) return remark('degeneracy-not-polynomial', context.place, 'degeneracy');
    const values = { eigenvalue: start.eigenvalue, degeneracy };
    const tower = only ? endlessTower(context, values, [only.name], only.last) : singleMode(context, values);
    return tower === null ? [] : isRemark(tower) ? tower : [tower];
  }
  const modes: Tower[] = [];
  for (const values of over(start, finite)) {
    const mode = singleMode(context, values);
    if (mode !== null) modes.push(mode);
  }
  return modes;
}

/** One eigenvalue: every factor is a linear form j + value at j = 0. */
function singleMode({ place, exponent }: Context, { eigenvalue, degeneracy }: Values): Tower | null {
  if (degeneracy.isZero()) return null;
  return {
    place,
    exponent,
    indices: [SINGLE_MODE],
    last: 0,
    degeneracy,
    factors: eigenvalue.map(({ form, power }) => linearFactor([Form.one], form, [], power)),
    order: eigenvalue.reduce((sum, { power }) => sum + power, 0),
  };
}

function linearFactor(
  periods: readonly Form[],
  constant: Form,
  scale: readonly ScaleRecord[],
  power: number,
): TowerFactor {
  return { kind: 'linear', periods, constant, scale, power };
}

/** Also a finite tower in one index: `last`. */
function endlessTower(
  context: Context,
  values: Values,
  indices: readonly string[],
  last: number | null,
): Tower | Remark | null {
  const { place, exponent } = context;
  const refusal = checkDegeneracy(values.degeneracy, indices, place);
  if (refusal !== null) return refusal;
  if (values.degeneracy.isZero()) return null;
  const factors: TowerFactor[] = [];
  const constants: ScaleRecord[] = [];
  let order = 0;
  for (const { form, power } of values.eigenvalue) {
    const split = splitFactor(form, indices, place);
    if (isRemark(split)) return split;
    order += split.order * power;
    if (split.factors.length === 0) constants.push(...signed(form, Rational.of(power)));
    for (const factor of split.factors) factors.push({ ...factor, power: factor.power * power });
  }
  if (order > MAXIMAL_DEGREE) {
    return remark('tower-degree', place, 'eigenvalue', { degree: `${order}`, limit: `${MAXIMAL_DEGREE}` });
  }
  if (order === 0) return remark('tower-without-index', place, 'eigenvalue');
  const shared = constants.map(({ base, weight }) => ({ base, weight: weight.div(Rational.of(order)) }));
  const complete = factors.map((factor) => ({ ...factor, scale: [...factor.scale, ...shared] }));
  return { place, exponent, indices, last, degeneracy: values.degeneracy, factors: complete, order };
}

function checkDegeneracy(degeneracy: Form, indices: readonly string[], place: number): Remark | null {
  for (const name of indices) {
    const p = polynomialIn(degeneracy, name);
    if (p === null) return remark('degeneracy-not-polynomial', place, 'degeneracy', { index: name });
    if (degreeOf(p) > MAXIMAL_DEGENERACY_DEGREE) {
      const data = { degree: `${degreeOf(p)}`, limit: `${MAXIMAL_DEGENERACY_DEGREE}` };
      return remark('degeneracy-degree', place, 'degeneracy', data);
    }
  }
  return null;
}

interface Split {
  readonly factors: readonly TowerFactor[];
  readonly order: number;
}

function splitFactor(form: Form, indices: readonly string[], place: number): Split | Remark {
  const used = indices.filter((name) => form.symbols().includes(name));
  const main = used[0];
  if (main === undefined) return { factors: [], order: 0 };
  const p = polynomialIn(form, main);
  if (p === null || used.some((name) => polynomialIn(form, name) === null)) {
    return remark('tower-not-polynomial', place, 'eigenvalue', { factor: formText(form), index: used.join(', ') });
  }
  if (degreeOf(p) > MAXIMAL_DEGREE) {
    return remark('tower-degree', place, 'eigenvalue', { degree: `${degreeOf(p)}`, limit: `${MAXIMAL_DEGREE}` });
  }
  return indices.length === 1 ? splitPolynomial(p) : splitForms(form, p, indices, place);
}

function splitPolynomial(p: Polynomial): Split {
  const { leading, linear, irreducible } = factorise(p);
  const order = degreeOf(p);
  const scale = signed(leading, Rational.of(1, order));
  const factors: TowerFactor[] = linear.map(({ shift, power }) => linearFactor([Form.one], shift, scale, power));
  for (const { polynomial, power } of irreducible) factors.push({ kind: 'irreducible', polynomial, scale, power });
  return { factors, order };
}

/** Linear forms in several indices; a polynomial of higher degree must be a product of such forms. */
function splitForms(form: Form, p: Polynomial, indices: readonly string[], place: number): Split | Remark {
  const linear = degreeOf(p) === 1 ? { leading: Form.one, shifts: [form] } : shiftsOf(p, indices[0] as string);
  const refused = remark('tower-several-indices', place, 'eigenvalue', {
    factor: formText(form),
    index: indices.join(', '),
  });
  if (linear === null || linear.leading.symbols().some((name) => indices.includes(name))) return refused;
  const factors: TowerFactor[] = [];
  for (const shift of linear.shifts) {
    const factor = linearForm(shift, indices);
    if (factor === null) return refused;
    const missing = indices.find((_, k) => (factor.periods[k] as Form).isZero());
    if (missing !== undefined) return remark('degeneracy-infinite', place, 'eigenvalue', { index: missing });
    factors.push(factor);
  }
  const scale = signed(linear.leading, Rational.of(1, factors.length));
  return { factors: factors.map((f) => ({ ...f, scale: [...f.scale, ...scale] })), order: factors.length };
}

function shiftsOf(p: Polynomial, main: string): { leading: Form; shifts: Form[] } | null {
  const { leading, linear, irreducible } = factorise(p);
  if (irreducible.length > 0) return null;
  const shifts = linear.flatMap(({ shift, power }) =>
    Array.from({ length: power }, () => Form.symbol(main).add(shift)),
  );
  return { leading, shifts };
}

/** The form as periods and constant, minus taken out where every period has a negative number in front. */
function linearForm(form: Form, indices: readonly string[]): (TowerFactor & { kind: 'linear' }) | null {
  const periods: Form[] = [];
  let rest = form;
  for (const name of indices) {
    const p = polynomialIn(rest, name);
    if (p === null || degreeOf(p) > 1) return null;
    periods.push(coefficient(p, 1));
    rest = coefficient(p, 0);
  }
  if (periods.some((w) => w.symbols().some((name) => indices.includes(name)))) return null;
  const negative = periods.every((w) => isNegative(w));
  const factor = (f: Form): Form => (negative ? f.neg() : f);
  const scale = negative ? [{ base: Form.number(-1), weight: Rational.one }] : [];
  return { kind: 'linear', periods: periods.map(factor), constant: factor(rest), scale, power: 1 };
}

/** A single term with a negative number in front. */
function isNegative(form: Form): boolean {
  const only = form.terms[0];
  return form.terms.length === 1 && only !== undefined && only.coefficient.isReal() && only.coefficient.re.sign() < 0;
}

/** base^weight, the sign apart: log(-c) is taken as log(-1) + log c. */
function signed(base: Form, weight: Rational): ScaleRecord[] {
  if (base.equals(Form.one)) return [];
  if (!isNegative(base)) return [{ base, weight }];
  const sign = { base: Form.number(-1), weight };
  const positive = base.neg();
  return positive.equals(Form.one) ? [sign] : [sign, { base: positive, weight }];
}
