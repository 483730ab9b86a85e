import { add, type DoubleComplex, log, multiply, negate, scale, subtract } from '../arithmetic/double-complex';
import { numberFromFixed } from '../arithmetic/fixed';
import { formDouble } from '../arithmetic/form-double';
import { memoiseBounded } from '../arithmetic/memo';
import type { Form } from '../exact/form';
import { barnesGammaDouble } from '../functions/barnes-gamma-double';
import { hurwitzZetaDerivative } from '../functions/hurwitz-derivative';
import { polylogarithmDouble, zetaDouble } from '../functions/polylogarithm-double';
import type { FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';
import { logarithmOf } from './anomaly';
import type { ClosedConstant, ClosedForm, ClosedFunction } from './closed-form';
import { complexRoots } from './complex-roots';

type Lookup = (name: string) => DoubleComplex | null;

/**
 * log of a closed form in doubles, every function by its own routine; NaN where a name has no value. The imaginary part
 * is a logarithm of the value, not of its factors.
 */
export function closedValue(closed: ClosedForm, lookup: Lookup): DoubleComplex {
  const value = (form: Form): DoubleComplex => formDouble(form, lookup) ?? { re: Number.NaN, im: Number.NaN };
  let total: DoubleComplex = { re: 0, im: 0 };
  for (const { base, power } of closed.numbers) total = add(total, multiply(value(power), value(logarithmOf(base))));
  for (const { of, power } of closed.functions) total = add(total, multiply(value(power), functionValue(of, value)));
  for (const { of, coefficient } of closed.exponent) {
    total = add(total, multiply(value(coefficient), constantValue(of, value)));
  }
  return total;
}

type Value = (form: Form) => DoubleComplex;

function functionValue(of: ClosedFunction, value: Value): DoubleComplex {
  const x = value(of.argument);
  switch (of.name) {
    case 'gamma':
      return fromTable('gamma', x, []);
    case 'hyperbolicSine':
      return hyperbolic(x, -1);
    case 'hyperbolicCosine':
      return hyperbolic(x, 1);
    case 'sine':
      // 2 sin(pi x) = -i 2 sinh(i pi x).
      return add(hyperbolic({ re: -x.im, im: x.re }, -1), { re: 0, im: -Math.PI / 2 });
    case 'barnesG': {
      const logGamma = barnesGammaDouble([ONE, ONE])(x);
      const lead = add({ re: zetaPrime(1), im: 0 }, scale(subtract(x, ONE), Math.log(2 * Math.PI) / 2));
      return subtract(lead, logGamma);
    }
    case 'multipleGamma':
      return barnesGammaDouble(of.periods.map(value))(x);
    case 'multipleSine': {
      const periods = of.periods.map(value);
      const logGamma = barnesGammaDouble(periods);
      const opposite = logGamma(subtract(periods.reduce(add), x));
      return subtract(periods.length % 2 === 0 ? opposite : negate(opposite), logGamma(x));
    }
    case 'overRoots': {
      const logGamma = barnesGammaDouble(Array.from({ length: of.order }, () => ONE));
      return complexRoots(of.polynomial.map(value)).reduce<DoubleComplex>(
        (sum, root) => add(sum, logGamma(subtract(x, root))),
        { re: 0, im: 0 },
      );
    }
    case 'doubleSine':
    case 'upsilon':
      return fromTable(of.name, x, [value(of.b)]);
  }
}

const ONE: DoubleComplex = { re: 1, im: 0 };

/** log(e^(pi x) + sign e^(-pi x)), by the larger exponential. */
function hyperbolic(x: DoubleComplex, sign: 1 | -1): DoubleComplex {
  const flip = x.re < 0;
  const y = scale(x, flip ? -Math.PI : Math.PI);
  const small = Math.exp(-2 * y.re);
  const rest = { re: 1 + sign * small * Math.cos(2 * y.im), im: -sign * small * Math.sin(2 * y.im) };
  const value = add(y, log(rest));
  return flip && sign < 0 ? add(value, { re: 0, im: Math.PI }) : value;
}

function fromTable(name: FunctionName, x: DoubleComplex, parameters: readonly DoubleComplex[]): DoubleComplex {
  const re = new Float64Array(1);
  const im = new Float64Array(1);
  functions[name].double(parameters).addLog(Float64Array.of(x.re), Float64Array.of(x.im), 1, re, im);
  return { re: re[0] as number, im: im[0] as number };
}

function constantValue(of: ClosedConstant, value: Value): DoubleComplex {
  switch (of.name) {
    case 'one':
      return ONE;
    case 'zetaPrime':
      return { re: zetaPrime(of.order), im: 0 };
    case 'zeta':
      return { re: zetaDouble(of.order), im: 0 };
    case 'clausen': {
      const x = value(of.argument);
      const sum = polylogarithmDouble(of.order, { re: 0, im: 2 * Math.PI * (x.re > 0.5 ? x.re - 1 : x.re) });
      return { re: of.order % 2 === 0 ? sum.im : sum.re, im: 0 };
    }
    case 'polylogarithm': {
      const mu = scale(multiply({ re: 0, im: 1 }, value(of.argument)), 2 * Math.PI);
      const turns = Math.round(mu.im / (2 * Math.PI));
      return polylogarithmDouble(of.order, { re: mu.re, im: mu.im - 2 * Math.PI * turns });
    }
  }
}

const ZETA_PRIME_BITS = 80;

const zetaPrimeFixed = memoiseBounded(
  16,
  (k: number): bigint =>
    hurwitzZetaDerivative(k, { re: 1n << BigInt(ZETA_PRIME_BITS), im: 0n }, ZETA_PRIME_BITS).value.re,
);

/** zeta'(-k) in doubles. */
function zetaPrime(k: number): number {
  return numberFromFixed(zetaPrimeFixed(k), ZETA_PRIME_BITS);
}
