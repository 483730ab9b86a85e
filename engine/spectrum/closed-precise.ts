import { numberFromFixed } from '../arithmetic/fixed';
import { type FixedComplex, oneComplex } from '../arithmetic/fixed-complex';
import { formFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { Estimate } from '../functions/euler-maclaurin';
import { hurwitzZetaDerivative } from '../functions/hurwitz-derivative';
import { zetaInteger } from '../functions/riemann-zeta-precise';
import type { ExactParameter, FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';
import { logarithmOf } from './anomaly';
import type { ClosedConstant, ClosedForm, ClosedFunction } from './closed-form';
import { estimateOf, scaleEstimate, sumOf } from './total';

/**
 * log of a closed form without open names, every function by its own precise routine. Null where a function has none
 * here (multiple Gamma functions, polylogarithms), or where it vanishes.
 */
export function closedPrecise(closed: ClosedForm, bits: number): Estimate | null {
  const parts: Estimate[] = [];
  const add = (value: Estimate | null, power: Form): boolean => {
    const factor = estimateOf(power, bits);
    if (value === null || factor === null) return false;
    parts.push(scaleEstimate(value, factor, bits));
    return true;
  };
  const complete =
    closed.numbers.every(({ base, power }) => add(estimateOf(logarithmOf(base), bits), power)) &&
    closed.functions.every(({ of, power }) => add(functionLog(of, bits), power)) &&
    closed.exponent.every(({ of, coefficient }) => add(constantValue(of, bits), coefficient));
  return complete ? sumOf(parts) : null;
}

function functionLog(of: ClosedFunction, bits: number): Estimate | null {
  const x = of.argument;
  switch (of.name) {
    case 'gamma':
    case 'hyperbolicSine':
    case 'hyperbolicCosine':
      return fromTable(of.name, x, [], bits);
    case 'sine': {
      // 2 sin(pi x) = -i 2 sinh(i pi x).
      const log = fromTable('hyperbolicSine', x.mul(Form.i), [], bits);
      const phase = estimateOf(Form.pi.mul(Form.i).scale(Rational.of(-1, 2)), bits);
      return log === null || phase === null ? null : sumOf([log, phase]);
    }
    case 'doubleSine':
    case 'upsilon':
      return fromTable(of.name, x, [of.b], bits);
    case 'multipleSine':
      if (of.periods.length === 3) return fromTable('tripleSine', x, of.periods, bits);
      return of.periods.length === 2 ? doubleSineOf(x, of.periods as [Form, Form], bits) : null;
    case 'multipleGamma':
    case 'overRoots':
    case 'barnesG':
      return null;
  }
}

/** S_2(z|w) = s_b(i (z/sqrt(w_1 w_2) - Q/2)), b = sqrt(w_1/w_2): homogeneous of degree 0. */
function doubleSineOf(z: Form, [w, v]: readonly [Form, Form], bits: number): Estimate | null {
  const b = Form.call('sqrt', w.div(v));
  const half = b.add(b.inverse()).scale(Rational.of(1, 2));
  const argument = Form.i.mul(z.div(Form.call('sqrt', w.mul(v))).sub(half));
  return fromTable('doubleSine', argument, [b], bits);
}

function fromTable(name: FunctionName, x: Form, parameters: readonly Form[], bits: number): Estimate | null {
  const argument = formFixed(x, bits);
  const exact = parameters.map(exactParameter);
  if (argument === null || !exact.every((p) => p !== null)) return null;
  const log = functions[name].precise(argument, exact, bits);
  return log.kind === 'value' ? { value: { re: log.re, im: log.im }, error: log.error } : null;
}

const ROUGH_BITS = 64;

/** A real positive number as a period. */
function exactParameter(form: Form): ExactParameter | null {
  const rough = formFixed(form, ROUGH_BITS);
  if (rough === null || rough.im !== 0n || rough.re <= 0n) return null;
  return {
    square: form.mul(form).toRational(),
    // The form has a value at some precision, so it has one at any.
    value: (bits): FixedComplex => formFixed(form, bits) ?? oneComplex(bits),
    approx: { re: numberFromFixed(rough.re, ROUGH_BITS), im: 0 },
  };
}

function constantValue(of: ClosedConstant, bits: number): Estimate | null {
  switch (of.name) {
    case 'one':
      return { value: oneComplex(bits), error: 0n };
    case 'zetaPrime':
      return hurwitzZetaDerivative(of.order, oneComplex(bits), bits);
    case 'zeta':
      return { value: { re: zetaInteger(of.order, bits), im: 0n }, error: 1n };
    case 'clausen':
    case 'polylogarithm':
      return null;
  }
}
