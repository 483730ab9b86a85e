import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { ClosedSum } from './closed-form';
import { zetaAtNegative } from './expansion';
import type { Polynomial } from './polynomial';

/**
 * Adds -sum_k c_k zeta'(-k, start) for a whole or half-integer start > 0 in terms of logarithms, zeta'(-1),
 * zeta'(-3), ... and zeta(3)/pi^2, ...: shifts by recursion, zeta(s, 1/2) = (2^s - 1) zeta(s) (DLMF 25.11.11), and
 * zeta'(-2m) = (-1)^m (2m)! zeta(2m+1)/(2 (2 pi)^(2m)) (DLMF 25.6.15 and the functional equation).
 */
export function addRational(sum: ClosedSum, expansion: Polynomial, start: Rational): void {
  const half = start.denominator === 2n;
  const base = half ? Rational.of(1, 2) : Rational.one;
  const steps = Number(start.sub(base).numerator);
  expansion.forEach((c, k) => {
    const weight = c.neg();
    // zeta'(-k, A) = zeta'(-k, base) + sum over the values left out of j^k log j.
    for (let j = 0; j < steps; j++) {
      const value = base.add(Rational.of(j));
      sum.number(Form.number(value), weight.scale(value.pow(k)));
    }
    if (!half) addZetaPrime(sum, k, weight);
    else {
      const power = Rational.of(1, 2).pow(k);
      addZetaPrime(sum, k, weight.scale(power.sub(Rational.one)));
      sum.number(Form.number(2), weight.mul(zetaAtNegative(k, Form.one)).scale(power));
    }
  });
}

/** weight times zeta'(-k). */
function addZetaPrime(sum: ClosedSum, k: number, weight: Form): void {
  if (k === 0) {
    const half = weight.scale(Rational.of(-1, 2));
    sum.number(Form.number(2), half);
    sum.number(Form.pi, half);
  } else if (k % 2 === 1) sum.constant({ name: 'zetaPrime', order: k }, weight);
  else {
    let factor = Rational.of((k / 2) % 2 === 0 ? 1 : -1, 2).mul(Rational.of(1, 2).pow(k));
    for (let i = 2; i <= k; i++) factor = factor.mul(Rational.of(i));
    sum.constant({ name: 'zeta', order: k + 1 }, weight.scale(factor).mul(Form.pi.pow(-k)));
  }
}
