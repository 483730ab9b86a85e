import { MAXIMAL_EXPONENT } from './bounded-form';
import { expressionOf } from './expression-form';
import type { ExpressionNode, Factor } from './expression-syntax';
import type { Reading } from './reading';
import type { Expression, TowerRow } from './tree';

type PowerOf = TowerRow['eigenvalue'][number];

/**
 * The factors a product was written in. A positive whole power of a product is that power of each of its factors; a
 * divisor is a factor of its own, inverted. Null when a factor has no exact value, which is then reported.
 */
export function factorsOf(node: ExpressionNode, reading: Reading): readonly PowerOf[] | null {
  const found: PowerOf[] = [];

  const add = (factor: Expression | null, power: number): boolean => {
    if (factor) found.push({ factor, power });
    return factor !== null;
  };

  const visit = (part: ExpressionNode, power: number): boolean => {
    if (part.kind === 'parentheses' && splits(part.inside)) return visit(part.inside, power);
    if (part.kind === 'product' && !isFraction(part)) {
      return withFractions(part.factors).every(({ node: factor, divides }) =>
        divides ? add(inverseOf(factor, reading), power) : visit(factor, power),
      );
    }
    const exponent = part.kind === 'power' ? positiveWhole(part.exponent) : null;
    if (part.kind !== 'power' || exponent === null) return add(expressionOf(part, reading), power);
    if (power * exponent <= MAXIMAL_EXPONENT) return visit(part.base, power * exponent);
    return reading.report('exponent-too-large', part, { limit: `${MAXIMAL_EXPONENT}` }) !== null;
  };

  return visit(node, 1) ? found : null;
}

/** A number divided by a number, which is one factor. */
function isFraction(node: ExpressionNode): boolean {
  if (node.kind !== 'product' || node.factors.length !== 2) return false;
  return node.factors.every((factor, k) => factor.node.kind === 'number' && factor.divides === (k === 1));
}

/** Joins the numbers of fractions in a longer product: `1/6 (n+1)` has the factors 1/6 and n+1. */
function withFractions(factors: readonly Factor[]): readonly Factor[] {
  const joined: Factor[] = [];
  for (const factor of factors) {
    const before = joined.at(-1);
    const { from, to } = { from: before?.node.from ?? 0, to: factor.node.to };
    const pair: ExpressionNode = { kind: 'product', factors: before ? [before, factor] : [], from, to };
    if (isFraction(pair)) joined[joined.length - 1] = { node: pair, divides: false };
    else joined.push(factor);
  }
  return joined;
}

function inverseOf(divisor: ExpressionNode, reading: Reading): Expression | null {
  const expression = expressionOf(divisor, reading);
  if (!expression) return null;
  if (expression.form.isZero()) return reading.report('division-by-zero', divisor);
  return { ...expression, text: `1/${expression.text}`, form: expression.form.inverse() };
}

/** Whether something in parentheses is itself a product. */
function splits(node: ExpressionNode): boolean {
  return node.kind === 'product' || node.kind === 'power' || (node.kind === 'parentheses' && splits(node.inside));
}

function positiveWhole(exponent: ExpressionNode): number | null {
  if (exponent.kind !== 'number' || !exponent.value.isInteger() || exponent.value.sign() <= 0) return null;
  return Number(exponent.value.numerator);
}
