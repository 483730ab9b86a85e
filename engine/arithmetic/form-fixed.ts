import type { Atom, CallName, Form } from '../exact/form';
import type { Rational } from '../exact/rational';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  expComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  powComplex,
  sinCosComplex,
  sinhCoshComplex,
  sqrtComplex,
  zeroComplex,
} from './fixed-complex';
import { piFixed } from './fixed-constants';

/** More guard bits than this are not tried: the form is then too ill-conditioned to be evaluated. */
const MAXIMAL_GUARD = 8192;

/**
 * Value of a form without symbols, `bits` fraction bits, within one unit in the last place. Rational forms are exact up
 * to the last rounding; others are computed at two working precisions, raised until both agree with eight bits to
 * spare. Null when the form has a symbol, divides by zero, or does not settle.
 */
export function formFixed(form: Form, bits: number): FixedComplex | null {
  const exact = form.toGaussian();
  if (exact) return { re: rationalFixed(exact.re, bits), im: rationalFixed(exact.im, bits) };
  let guard = 32;
  let before = evaluate(form, bits + guard);
  while (before !== null && guard <= MAXIMAL_GUARD) {
    const finer = evaluate(form, bits + 2 * guard);
    if (finer === null) return null;
    const rounded = shift(finer, guard);
    const difference = absoluteComplex({ re: rounded.re - before.re, im: rounded.im - before.im });
    if (difference >> BigInt(guard - 8) === 0n) return shift(finer, 2 * guard);
    before = finer;
    guard *= 2;
  }
  return null;
}

/** A rational as fixed point, rounded to nearest. */
export function rationalFixed(value: Rational, bits: number): bigint {
  const doubled = (value.numerator << BigInt(bits + 1)) / value.denominator;
  return (doubled + (doubled < 0n ? -1n : 1n)) / 2n;
}

function shift(value: FixedComplex, by: number): FixedComplex {
  const rounding = 1n << BigInt(by - 1);
  return { re: (value.re + rounding) >> BigInt(by), im: (value.im + rounding) >> BigInt(by) };
}

function evaluate(form: Form, bits: number): FixedComplex | null {
  let sum = zeroComplex;
  for (const term of form.terms) {
    let product: FixedComplex = {
      re: rationalFixed(term.coefficient.re, bits),
      im: rationalFixed(term.coefficient.im, bits),
    };
    for (const { atom, power } of term.factors) {
      const base = evaluateAtom(atom, bits);
      if (base === null) return null;
      const raised = integerPowerComplex(base, Math.abs(power), bits);
      if (power < 0 && absoluteComplex(raised) === 0n) return null;
      product = power < 0 ? divideComplex(product, raised, bits) : multiplyComplex(product, raised, bits);
    }
    sum = addComplex(sum, product);
  }
  return sum;
}

function evaluateAtom(atom: Atom, bits: number): FixedComplex | null {
  if (atom.kind === 'symbol') return null;
  if (atom.kind === 'constant') {
    return atom.name === 'pi' ? { re: piFixed(bits), im: 0n } : expComplex(oneComplex(bits), bits);
  }
  const args: FixedComplex[] = [];
  for (const argument of atom.arguments) {
    const value = evaluate(argument, bits);
    if (value === null) return null;
    args.push(value);
  }
  const z = args[0] as FixedComplex;
  const singular =
    z.re === 0n && z.im === 0n && (atom.name === 'log' || atom.name === 'inverse' || atom.name === 'power');
  if (singular || tooLarge(atom.name, z, bits)) return null;
  return CALLS[atom.name](z, bits, args[1] ?? zeroComplex);
}

/** Exponentials beyond e^(4096) have no use here and would only fill memory. */
function tooLarge(name: CallName, z: FixedComplex, bits: number): boolean {
  if (name === 'sqrt' || name === 'log' || name === 'abs' || name === 'inverse') return false;
  return absoluteComplex(z) >> BigInt(bits + 12) !== 0n;
}

const CALLS: Record<CallName, (z: FixedComplex, bits: number, y: FixedComplex) => FixedComplex | null> = {
  sqrt: (z, bits) => sqrtComplex(z, bits),
  exp: (z, bits) => expComplex(z, bits),
  log: (z, bits) => logComplex(z, bits),
  sin: (z, bits) => sinCosComplex(z, bits).sin,
  cos: (z, bits) => sinCosComplex(z, bits).cos,
  tan: (z, bits) => {
    const { sin, cos } = sinCosComplex(z, bits);
    return quotient(sin, cos, bits);
  },
  sinh: (z, bits) => sinhCoshComplex(z, bits).sinh,
  cosh: (z, bits) => sinhCoshComplex(z, bits).cosh,
  tanh: (z, bits) => {
    const { sinh, cosh } = sinhCoshComplex(z, bits);
    return quotient(sinh, cosh, bits);
  },
  abs: (z) => ({ re: absoluteComplex(z), im: 0n }),
  inverse: (z, bits) => divideComplex(oneComplex(bits), z, bits),
  power: (z, bits, y) => powComplex(z, y, bits),
};

function quotient(a: FixedComplex, b: FixedComplex, bits: number): FixedComplex | null {
  return b.re === 0n && b.im === 0n ? null : divideComplex(a, b, bits);
}
