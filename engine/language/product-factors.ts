import { MAXIMAL_EXPONENT } from './bounded-form';
import { expressionOf } from './expression-form';
import type { ExpressionNode } from './expression-syntax';
import type { Reading } from './reading';
import type { Expression, TowerRow } from './tree';

type PowerOf = TowerRow['eigenvalue'][number];

/**
 * The factors a product was written in. A positive whole power of a product is that power of each of its factors; a
 * divisor is a factor of its own, inverted. Null when a factor has no exact value, which is then reported.
 */
export function factorsOf(node: ExpressionNode, reading: Reading): readonly PowerOf[] | null {
  const factors: PowerOf[] = [];

  const add = (factor: Expression | null, power: number): boolean => {
    if (factor) factors.push({ factor, power });
    return factor !== null;
  };

  const visit = (part: ExpressionNode, power: number): boolean => {
    if (part.kind === 'product') {
      return part.factors.every(({ node: factor, divides }) =>
        divides ? add(inverseOf(factor, reading), power) : visit(factor, power),
      );
    }
    const exponent = part.kind === 'power' ? positiveWhole(part.exponent) : null;
    if (part.kind !== 'power' || exponent === null) return add(expressionOf(part, reading), power);
    if (power * exponent <= MAXIMAL_EXPONENT) return visit(part.base, power * exponent);
    return reading.report('exponent-too-large', part, { limit: `${MAXIMAL_EXPONENT}` }) !== null;
  };

  return visit(node, 1) ? factors : null;
}

function inverseOf(divisor: ExpressionNode, reading: Reading): Expression | null {
  const expression = expressionOf(divisor, reading);
  if (!expression) return null;
  if (expression.form.isZero()) return reading.report('division-by-zero', divisor);
  return { ...expression, text: `1/${expression.text}`, form: expression.form.inverse() };
}

function positiveWhole(exponent: ExpressionNode): number | null {
  if (exponent.kind !== 'number' || !exponent.value.isInteger() || exponent.value.sign() <= 0) return null;
  return Number(exponent.value.numerator);
}
