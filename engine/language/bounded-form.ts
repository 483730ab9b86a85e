import { type CallName, Form, FormTooLargeError } from '../exact/form';

/** What an expression is refused for; a code of the wording table. */
export type FormRefusal =
  | 'expression-too-large'
  | 'number-too-large'
  | 'exponent-too-large'
  | 'division-by-zero'
  | 'log-of-zero';

/** Largest integer exponent that is multiplied out. */
export const MAXIMAL_EXPONENT = 256;

/** Most bits of a numerator or denominator; 1,233 decimal digits. */
const MAXIMAL_BITS = 4096;

/**
 * Most steps spent on one expression, a step being one product of two factors of a few dozen digits. Nine linear
 * factors in one index multiply out in some three hundred; all of them take some ten milliseconds.
 */
const MAXIMAL_STEPS = 10_000;

/** Terms added at once; between two such chunks the size is checked. */
const CHUNK = 32;

/** A root of a rational number is searched for square factors. */
const ROOT_STEPS = 200;

/** Bits from which arithmetic is charged more: its time grows with the square. */
const CHEAP_BITS = 512;

/** The constant e, so that e^x and exp(x) are one form. */
export const EULER = Form.atom({ kind: 'constant', name: 'e', key: 'e' });

/** Arithmetic on forms that stops before it takes long, whatever the expression. */
export class BoundedForms {
  #steps = 0;

  sum(forms: readonly Form[]): Form | FormRefusal {
    let total: Form | FormRefusal = Form.zero;
    for (let at = 0; at < forms.length; at += CHUNK) {
      const chunk: Form[] = at === 0 ? forms.slice(0, CHUNK) : [total, ...forms.slice(at, at + CHUNK)];
      const terms: number = total.terms.length + CHUNK;
      total = this.#bounded(() => Form.sum(chunk), terms);
      if (typeof total === 'string') return total;
    }
    return total;
  }

  multiply(a: Form, b: Form): Form | FormRefusal {
    const factors = longestTerm(a) + longestTerm(b);
    return this.#bounded(() => a.mul(b), a.terms.length * b.terms.length * (1 + factors));
  }

  divide(a: Form, b: Form): Form | FormRefusal {
    const inverse = this.#inverse(b);
    return typeof inverse === 'string' ? inverse : this.multiply(a, inverse);
  }

  power(base: Form, exponent: Form): Form | FormRefusal {
    const rational = exponent.toRational();
    if (rational?.isInteger()) {
      if (rational.numerator > MAXIMAL_EXPONENT || rational.numerator < -MAXIMAL_EXPONENT) return 'exponent-too-large';
      return this.#integerPower(base, Number(rational.numerator));
    }
    if (rational?.denominator === 2n) {
      const root = this.call('sqrt', base);
      if (typeof root === 'string') return root;
      return this.power(root, Form.number(rational.numerator));
    }
    if (base.equals(EULER)) return this.call('exp', exponent);
    return this.#bounded(() => Form.call('power', base, exponent), 1);
  }

  call(name: CallName, argument: Form): Form | FormRefusal {
    if (name === 'log' && argument.isZero()) return 'log-of-zero';
    return this.#bounded(() => Form.call(name, argument), name === 'sqrt' ? ROOT_STEPS : 1);
  }

  #inverse(form: Form): Form | FormRefusal {
    return form.isZero() ? 'division-by-zero' : this.#bounded(() => form.inverse(), 1);
  }

  #integerPower(base: Form, exponent: number): Form | FormRefusal {
    const factor = exponent < 0 ? this.#inverse(base) : base;
    let result: Form | FormRefusal = Form.one;
    for (let k = 0; k < Math.abs(exponent); k++) {
      if (typeof factor === 'string') return factor;
      result = this.multiply(result, factor);
      if (typeof result === 'string') return result;
    }
    return result;
  }

  #bounded(compute: () => Form, steps: number): Form | FormRefusal {
    this.#steps += steps;
    if (this.#steps > MAXIMAL_STEPS) return 'expression-too-large';
    try {
      const form = compute();
      const bits = largestBits(form);
      this.#steps += (bits / CHEAP_BITS) ** 2;
      return bits > MAXIMAL_BITS ? 'number-too-large' : form;
    } catch (error) {
      if (error instanceof FormTooLargeError) return 'expression-too-large';
      throw error;
    }
  }
}

function longestTerm(form: Form): number {
  let longest = 0;
  for (const term of form.terms) longest = Math.max(longest, term.factors.length);
  return longest;
}

function largestBits(form: Form): number {
  let largest = 0;
  for (const { coefficient } of form.terms) {
    for (const part of [coefficient.re, coefficient.im]) {
      largest = Math.max(largest, bitsOf(part.numerator), bitsOf(part.denominator));
    }
  }
  return largest;
}

const SMALL = BigInt(Number.MAX_SAFE_INTEGER);

/** Length in bits, rounded up to four; 0 for everything a double holds. */
function bitsOf(value: bigint): number {
  return value <= SMALL && value >= -SMALL ? 0 : value.toString(16).length * 4;
}
