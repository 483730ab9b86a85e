import { type Atom, Form } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { Rational } from '../exact/rational';
import { reduceRoots } from './form-division';
import { type Polynomial, polynomialKey } from './polynomial';

/** A function in a closed form, of an exact argument. */
export type ClosedFunction =
  | {
      /** Gamma(x), Barnes G(x), 2 sin(pi x), 2 sinh(pi x), 2 cosh(pi x). */
      readonly name: 'gamma' | 'barnesG' | 'sine' | 'hyperbolicSine' | 'hyperbolicCosine';
      readonly argument: Form;
    }
  | {
      /** Gamma_N(x|w) and S_N(x|w) = Gamma_N(x)^-1 Gamma_N(|w| - x)^((-1)^N). */
      readonly name: 'multipleGamma' | 'multipleSine';
      readonly argument: Form;
      readonly periods: readonly Form[];
    }
  | {
      /** s_b(x) = S_2(Q/2 - i x|b, 1/b) and Upsilon_b(x) = Gamma_2(Q/2)^2/(Gamma_2(x) Gamma_2(Q - x)). */
      readonly name: 'doubleSine' | 'upsilon';
      readonly argument: Form;
      readonly b: Form;
    }
  | {
      /** Product of Gamma_order(argument - rho|1, ..., 1) over the roots rho of a polynomial. */
      readonly name: 'overRoots';
      readonly argument: Form;
      readonly order: number;
      readonly polynomial: Polynomial;
    };

/** A number in the exponent. */
export type ClosedConstant =
  | { readonly name: 'one' }
  /** zeta'(-order), order odd. */
  | { readonly name: 'zetaPrime'; readonly order: number }
  /** zeta(order), order odd and above 1. */
  | { readonly name: 'zeta'; readonly order: number }
  /** sum sin(2 pi n x)/n^order for even order, cos for odd; x rational. */
  | { readonly name: 'clausen'; readonly order: number; readonly argument: Form }
  /** Li_order(e^(2 pi i x)). */
  | { readonly name: 'polylogarithm'; readonly order: number; readonly argument: Form };

/** exp(sum of coefficient times constant) times product of base^power times product of function^power. */
export interface ClosedForm {
  readonly numbers: readonly { readonly base: Form; readonly power: Form }[];
  readonly functions: readonly { readonly of: ClosedFunction; readonly power: Form }[];
  readonly exponent: readonly { readonly coefficient: Form; readonly of: ClosedConstant }[];
}

/** Collects a closed form; equal pieces are added up, numbers split into primes, units and atoms. */
export class ClosedSum {
  private readonly numbers = new Map<string, { base: Form; power: Form }>();
  private readonly functions = new Map<string, { of: ClosedFunction; power: Form }>();
  private readonly constants = new Map<string, { of: ClosedConstant; coefficient: Form }>();
  /** Power of i. */
  private quarterTurns = Form.zero;

  number(base: Form, exponent: Form): void {
    const power = reduceRoots(exponent);
    if (power.isZero()) return;
    const only = base.terms[0];
    if (base.terms.length !== 1 || only === undefined) {
      this.keep(base, power);
      return;
    }
    for (const { atom, power: times } of only.factors) this.atom(atom, power.scale(times));
    const turns = turnsOf(only.coefficient);
    if (turns === null) {
      this.keep(Form.gaussian(only.coefficient), power);
      return;
    }
    this.quarterTurns = this.quarterTurns.add(power.scale(turns));
    const size = only.coefficient.re.isZero() ? only.coefficient.im.abs() : only.coefficient.re.abs();
    for (const [prime, times] of primesOf(size)) this.keep(Form.number(prime), power.scale(times));
  }

  function(of: ClosedFunction, exponent: Form): void {
    const power = reduceRoots(exponent);
    if (power.isZero()) return;
    const key = functionKey(of);
    const known = this.functions.get(key);
    this.functions.set(key, { of, power: known ? known.power.add(power) : power });
  }

  constant(of: ClosedConstant, factor: Form): void {
    const coefficient = reduceRoots(factor);
    const key = of.name === 'one' ? 'one' : `${of.name} ${of.order}${'argument' in of ? ` ${of.argument.key}` : ''}`;
    const known = this.constants.get(key);
    this.constants.set(key, { of, coefficient: known ? known.coefficient.add(coefficient) : coefficient });
  }

  finish(): ClosedForm {
    this.gatherPhase();
    return {
      numbers: joinConjugates([...this.numbers.values()].filter(({ power }) => !power.isZero())),
      functions: [...this.functions.values()].filter(({ power }) => !power.isZero()),
      exponent: [...this.constants.values()].filter(({ coefficient }) => !coefficient.isZero()),
    };
  }

  /** Powers of i and phases in the exponent together: a unit where they make one, else an exponential. */
  private gatherPhase(): void {
    const known = this.constants.get('one')?.coefficient ?? Form.zero;
    const phases = known.terms.filter(
      ({ coefficient, factors }) =>
        !coefficient.im.isZero() && factors.length === 1 && factors[0]?.atom.key === 'pi' && factors[0].power === 1,
    );
    const quarters = phases
      .reduce((sum, { coefficient }) => sum.add(coefficient.im), Rational.zero)
      .mul(Rational.of(2));
    const turns = this.quarterTurns.add(Form.number(quarters));
    const whole = turns.toRational();
    const phase = (count: Form): Form => Form.pi.mul(Form.i).mul(count).scale(Rational.of(1, 2));
    this.constant({ name: 'one' }, phase(Form.number(quarters)).neg());
    if (whole?.isInteger()) {
      const unit = Number(((whole.numerator % 4n) + 4n) % 4n);
      if (unit !== 0) this.keep(Form.gaussian(Gaussian.i.pow(unit)), Form.one);
    } else this.constant({ name: 'one' }, phase(turns));
  }

  /** Exponentials go into the exponent, roots of numbers become powers of them. */
  private atom(atom: Atom, power: Form): void {
    if (atom.kind === 'constant' && atom.name === 'e') this.constant({ name: 'one' }, power);
    else if (atom.kind === 'call' && atom.name === 'exp') {
      this.constant({ name: 'one' }, power.mul(atom.arguments[0] as Form));
    } else if (atom.kind === 'call' && atom.name === 'sqrt') {
      this.number(atom.arguments[0] as Form, power.scale(Rational.of(1, 2)));
    } else this.keep(Form.atom(atom), power);
  }

  private keep(base: Form, power: Form): void {
    const known = this.numbers.get(base.key);
    this.numbers.set(base.key, { base, power: known ? known.power.add(power) : power });
  }
}

/** Number of quarter turns of a unit times a positive rational. */
function turnsOf(value: Gaussian): number | null {
  if (value.im.isZero()) return value.re.sign() < 0 ? 2 : 0;
  if (!value.re.isZero()) return null;
  return value.im.sign() < 0 ? 3 : 1;
}

/** Largest prime that is looked for; a larger factor stays whole. */
const LARGEST_PRIME = 1000n;

function primesOf(value: Rational): [Rational, number][] {
  const found: [Rational, number][] = [];
  for (const [part, sign] of [
    [value.numerator, 1],
    [value.denominator, -1],
  ] as const) {
    let rest = part;
    for (let p = 2n; p * p <= rest && p < LARGEST_PRIME; p++) {
      let count = 0;
      for (; rest % p === 0n; rest /= p) count++;
      if (count > 0) found.push([Rational.of(p), sign * count]);
    }
    if (rest > 1n) found.push([Rational.of(rest), sign]);
  }
  return found;
}

function functionKey(of: ClosedFunction): string {
  if (of.name === 'overRoots') return `${of.name} ${of.argument.key} ${of.order} ${polynomialKey(of.polynomial)}`;
  const parameters = 'periods' in of ? of.periods.map(({ key }) => key).join(';') : 'b' in of ? of.b.key : '';
  return `${of.name} ${of.argument.key} ${parameters}`;
}

/** (q + i x)^p (q - i x)^p is (q^2 + x^2)^p. */
function joinConjugates(numbers: { base: Form; power: Form }[]): { base: Form; power: Form }[] {
  const result: { base: Form; power: Form }[] = [];
  const rest = [...numbers];
  for (let item = rest.shift(); item !== undefined; item = rest.shift()) {
    const { base, power } = item;
    const conjugate = base.conjugate();
    const partner = rest.findIndex((other) => other.base.equals(conjugate) && other.power.equals(power));
    if (partner < 0 || conjugate.equals(base)) result.push(item);
    else {
      rest.splice(partner, 1);
      result.push({ base: base.mul(conjugate), power });
    }
  }
  return result;
}
