import { Form } from '../exact/form';
import { Rational } from '../exact/rational';

import { powerSums } from './bernoulli-polynomial';
import { formText } from './form-text';
import { polynomialIn } from './polynomial';
import { MAXIMAL_MODES, type Remark, remark, type WrittenTower } from './tower';

/** An index from `from` in steps of 1; `last` steps, or endless (null). */
export interface Range {
  readonly name: string;
  readonly from: Form;
  readonly last: number | null;
}

/** The ranges of a tower, checked. */
export function readRanges(written: WrittenTower, place: number): { ranges: Range[] } | Remark {
  const names = written.ranges.map(({ name }) => name);
  const ranges: Range[] = [];
  let modes = 1;
  for (const { name, from, to, span } of written.ranges) {
    const bound = [from, ...(to === null ? [] : [to])].find((form) => form.symbols().some((s) => names.includes(s)));
    if (bound !== undefined)
      return remark('tower-range-bound', place, 'row', { index: name, bound: formText(bound) }, span);
    if (to === null) {
      ranges.push({ name, from, last: null });
      continue;
    }
    const length = to.sub(from).toRational();
    if (length === null || !length.isInteger()) {
      return remark('tower-range-bound', place, 'row', { index: name, bound: formText(to) }, span);
    }
    if (length.compare(Rational.of(-1)) < 0) {
      return remark('tower-range-order', place, 'row', { index: name, from: formText(from), to: formText(to) }, span);
    }
    const last = Number(length.numerator);
    modes *= last + 1;
    if (modes > MAXIMAL_MODES) return remark('tower-range-length', place, 'row', { limit: `${MAXIMAL_MODES}` }, span);
    ranges.push({ name, from, last });
  }
  return { ranges };
}

/** sum of the form over the values 0 ... last of an index; null where it is no polynomial in it. */
export function summedOver(form: Form, { name, last }: Range): Form | null {
  const p = polynomialIn(form, name);
  if (p === null || last === null) return null;
  return powerSums(p, Form.number(last + 1)).sub(powerSums(p, Form.zero));
}
