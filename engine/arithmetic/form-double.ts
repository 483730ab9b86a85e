import type { Atom, CallName, Form } from '../exact/form';

/** A complex number in doubles. */
export interface DoubleValue {
  readonly re: number;
  readonly im: number;
}

/**
 * Value of a form in doubles; `values` gives the symbols, null for one that has none. Returns null when a symbol has
 * no value; not finite where the form is not. Error: a few ulps of the largest term.
 */
export function formDouble(form: Form, values: (name: string) => DoubleValue | null): DoubleValue | null {
  let re = 0;
  let im = 0;
  for (const term of form.terms) {
    let product: DoubleValue = { re: term.coefficient.re.toNumber(), im: term.coefficient.im.toNumber() };
    for (const { atom, power } of term.factors) {
      const base = atomDouble(atom, values);
      if (base === null) return null;
      product = multiply(product, integerPower(base, power));
    }
    re += product.re;
    im += product.im;
  }
  return { re, im };
}

function atomDouble(atom: Atom, values: (name: string) => DoubleValue | null): DoubleValue | null {
  if (atom.kind === 'symbol') return values(atom.name);
  if (atom.kind === 'constant') return { re: atom.name === 'pi' ? Math.PI : Math.E, im: 0 };
  const args: DoubleValue[] = [];
  for (const argument of atom.arguments) {
    const value = formDouble(argument, values);
    if (value === null) return null;
    args.push(value);
  }
  return CALLS[atom.name](args[0] as DoubleValue, args[1] ?? { re: 0, im: 0 });
}

const CALLS: Record<CallName, (z: DoubleValue, y: DoubleValue) => DoubleValue> = {
  sqrt: (z) => (z.im === 0 && z.re >= 0 ? { re: Math.sqrt(z.re), im: 0 } : exp(scale(log(z), 0.5))),
  exp,
  log,
  sin: (z) => ({ re: Math.sin(z.re) * Math.cosh(z.im), im: Math.cos(z.re) * Math.sinh(z.im) }),
  cos: (z) => ({ re: Math.cos(z.re) * Math.cosh(z.im), im: -Math.sin(z.re) * Math.sinh(z.im) }),
  tan: (z) => divide(CALLS.sin(z, z), CALLS.cos(z, z)),
  sinh: (z) => ({ re: Math.sinh(z.re) * Math.cos(z.im), im: Math.cosh(z.re) * Math.sin(z.im) }),
  cosh: (z) => ({ re: Math.cosh(z.re) * Math.cos(z.im), im: Math.sinh(z.re) * Math.sin(z.im) }),
  tanh: (z) => (z.im === 0 ? { re: Math.tanh(z.re), im: 0 } : divide(CALLS.sinh(z, z), CALLS.cosh(z, z))),
  abs: (z) => ({ re: Math.hypot(z.re, z.im), im: 0 }),
  inverse: (z) => divide({ re: 1, im: 0 }, z),
  power: (z, y) => (z.im === 0 && y.im === 0 && z.re > 0 ? { re: z.re ** y.re, im: 0 } : exp(multiply(y, log(z)))),
};

function multiply(a: DoubleValue, b: DoubleValue): DoubleValue {
  if (a.im === 0 && b.im === 0) return { re: a.re * b.re, im: 0 };
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

function divide(a: DoubleValue, b: DoubleValue): DoubleValue {
  if (b.im === 0) return { re: a.re / b.re, im: a.im / b.re };
  const norm = b.re * b.re + b.im * b.im;
  return { re: (a.re * b.re + a.im * b.im) / norm, im: (a.im * b.re - a.re * b.im) / norm };
}

function scale(a: DoubleValue, factor: number): DoubleValue {
  return { re: a.re * factor, im: a.im * factor };
}

function integerPower(base: DoubleValue, power: number): DoubleValue {
  if (power === 1) return base;
  if (base.im === 0) return { re: base.re ** power, im: 0 };
  let result: DoubleValue = { re: 1, im: 0 };
  for (let k = Math.abs(power); k > 0; k--) result = multiply(result, base);
  return power < 0 ? divide({ re: 1, im: 0 }, result) : result;
}

function exp(z: DoubleValue): DoubleValue {
  const size = Math.exp(z.re);
  return z.im === 0 ? { re: size, im: 0 } : { re: size * Math.cos(z.im), im: size * Math.sin(z.im) };
}

function log(z: DoubleValue): DoubleValue {
  return { re: Math.log(Math.hypot(z.re, z.im)), im: Math.atan2(z.im, z.re) };
}
