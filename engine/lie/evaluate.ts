import { Rational } from '../exact/rational';
import { dimensionLabels } from './dimension-names';
import type { Group } from './group';
import { type Refusal, refusal } from './refusal';
import type { Expression } from './representation-grammar';
import { type Budget, tensorPower, tensorProduct } from './tensor-product';
import { collect, conjugateTerms, type Term, term, trivialTerm, unitaryTerm } from './terms';
import { globalFormRefusal, wordTerms } from './words';

/** Labels above this are refused; it keeps every label of an orbit within 16 bits. */
const LABEL_LIMIT = 1000;
/** Numerators and denominators of charges stay within 32 bits. */
const CHARGE_LIMIT = Rational.of(1_000_000_000);
/** Summands (with multiplicity) a representation may have. */
const COPIES_LIMIT = 1_000_000;
/** Powers of representations above this are refused. */
const POWER_LIMIT = 40;

export type Terms = readonly Term[] | Refusal;

/** The irreducible parts of what a cell or request says, each within the limits above. */
export function evaluate(group: Group, expression: Expression, budget: Budget): Terms {
  switch (expression.kind) {
    case 'sum': {
      const parts: Term[] = [];
      for (const part of expression.parts) {
        const terms = evaluate(group, part, budget);
        if ('kind' in terms) return terms;
        parts.push(...terms);
      }
      return checked(group, collect(parts));
    }
    case 'product': {
      let result: readonly Term[] = [trivialTerm(group)];
      for (const part of expression.parts) {
        const terms = evaluate(group, part, budget);
        if ('kind' in terms) return terms;
        const product = checked(group, tensorProduct(group, result, terms, budget));
        if ('kind' in product) return product;
        result = product;
      }
      return result;
    }
    case 'multiple': {
      const terms = evaluate(group, expression.part, budget);
      if ('kind' in terms) return terms;
      if (expression.times < 1 || expression.times > COPIES_LIMIT) {
        const why = `A multiple lies between 1 and ${COPIES_LIMIT}.`;
        return refusal('labels-wrong', `${expression.times} copies cannot be taken.`, why, 'Change the number.');
      }
      return terms.map((one) => ({ ...one, multiplicity: one.multiplicity * expression.times }));
    }
    case 'dual': {
      const terms = evaluate(group, expression.part, budget);
      return 'kind' in terms ? terms : conjugateTerms(group, terms);
    }
    case 'power': {
      const terms = evaluate(group, expression.part, budget);
      if ('kind' in terms) return terms;
      if (expression.power > POWER_LIMIT) {
        const what = `The power ${expression.power} is too high.`;
        return refusal('product-too-large', what, `Powers are limited to ${POWER_LIMIT}.`, 'Take a lower power.');
      }
      return checked(group, tensorPower(group, expression.how, expression.power, terms, budget));
    }
    case 'word':
      return checked(group, wordTerms(group, expression.text));
    case 'determinant': {
      if (group.family !== 'U' || group.isAbelian) return wordTerms(group, 'det');
      return [unitaryTerm(new Array<number>(group.size as number).fill(expression.power))];
    }
    case 'dimension': {
      if (expression.text === '1') return [trivialTerm(group)];
      if (group.family === 'U') {
        const why = 'A dimension leaves the charge under the U(1) of U(n) open.';
        const remedy = 'Write a word such as fund or sym2.det^-1, or a highest weight such as (2,1,0).';
        return refusal(
          'representation-ambiguous',
          `'${expression.text}' does not name a representation of U(n).`,
          why,
          remedy,
        );
      }
      const labels = dimensionLabels(group, expression.text);
      return 'kind' in labels ? labels : [term(labels)];
    }
    case 'labels':
      return dynkinTerm(group, expression.entries);
    case 'weight':
      return highestWeightTerm(group, expression.entries);
    case 'charge':
      return checked(group, [term([], expression.value)]);
  }
}

function dynkinTerm(group: Group, labels: readonly number[]): Terms {
  const name = `[${labels.join()}]`;
  const wrong = (why: string, remedy: string): Refusal =>
    refusal('labels-wrong', `${name} is not a representation of ${group.name}.`, why, remedy);
  if (group.isAbelian) return wrong('Representations of U(1) are charges.', 'Write an exact number.');
  if (group.family === 'U') {
    return wrong('Dynkin labels leave the charge under the U(1) open.', 'Write a highest weight such as (2,1,0).');
  }
  const { rank } = group.system;
  if (labels.length !== rank)
    return wrong(`It has ${labels.length} labels.`, `Write ${rank} labels, in Bourbaki's order.`);
  if (labels.some((label) => label < 0)) {
    return wrong('The labels of a highest weight are not negative.', 'Write integers from 0 on.');
  }
  return globalFormRefusal(group, labels) ?? checked(group, [term(labels)]);
}

function highestWeightTerm(group: Group, entries: readonly number[]): Terms {
  const name = `(${entries.join()})`;
  const wrong = (why: string, remedy: string): Refusal =>
    refusal('labels-wrong', `${name} is not a highest weight of ${group.name}.`, why, remedy);
  if (group.family !== 'U' || group.isAbelian)
    return wrong('Highest weights are written for U(n).', 'Write Dynkin labels.');
  if (entries.length !== group.size) return wrong(`It has ${entries.length} entries.`, `Write ${group.size} entries.`);
  if (entries.some((entry, i) => i > 0 && entry > (entries[i - 1] as number))) {
    return wrong('The entries have to fall from left to right.', 'Sort them.');
  }
  return checked(group, [unitaryTerm(entries)]);
}

function withinLimit(group: Group, { labels, charge }: Term): Refusal | null {
  const large = labels.some((label) => label > LABEL_LIMIT);
  if (!large && charge.abs().compare(CHARGE_LIMIT) <= 0 && charge.denominator <= CHARGE_LIMIT.numerator) return null;
  const name = large ? `[${labels.join()}]` : `The charge ${charge.toString()}`;
  const why = `Labels are limited to ${LABEL_LIMIT}, numerators and denominators of charges to ${CHARGE_LIMIT.toString()}.`;
  return refusal('label-too-large', `${name} of ${group.name} is too large.`, why, 'Take smaller numbers.');
}

/** Checks the labels that a product has brought about, before anything further is built on them. */
function checked(group: Group, terms: Terms): Terms {
  return 'kind' in terms
    ? terms
    : (terms.map((one) => withinLimit(group, one)).find((found) => found !== null) ?? terms);
}
