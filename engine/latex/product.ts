import type { Form } from '../exact/form';
import { parenthesised } from '../functions/notation';
import type { FunctionAt, Notation, Printer } from '../functions/special-function';
import { functions } from '../functions/table';
import { atWeight, type Factor, FLUX, WEIGHT, type Weight } from '../product/factor';
import type { TheoryGroup } from '../theory/theory';
import type { TheoryWeights } from '../theory/weights';
import { formLatex } from './form';
import { sumOfSquaresLatex, sumsOfSquares } from './sum-of-squares';
import { NO_WEIGHT, type PrintedWeights, printWeights } from './weights';

/** A stretch of a formula and the multiplets it stems from. */
export interface Piece {
  readonly latex: string;
  readonly from: readonly string[];
  /** The same with every weight written out; null where there is one weight, or too many to send along. */
  readonly expanded: string | null;
  /** The number of weights where there are too many: they can be had in parts, see `weightsLatex`. */
  readonly weights?: number;
}

/** More weights than this are not written out. */
const MAXIMAL_EXPANDED = 300;

export const printer: Printer = { form: formLatex };

/**
 * A product in LaTeX, a piece for each set of weights and origin. `style` is `function` for special functions in a
 * notation, `modes` for the infinite products that they regularise.
 */
export function productLatex(
  groups: readonly TheoryGroup[],
  product: readonly Factor<TheoryWeights>[],
  style: { readonly kind: 'function'; readonly notation: number } | { readonly kind: 'modes' },
): Piece[] {
  return gatherPieces(product).flatMap((factors) => pieceLatex(groups, factors, style));
}

type Style = Parameters<typeof productLatex>[2];

/** Factors over the same weights and from the same multiplets are printed under one product sign. */
function gatherPieces(product: readonly Factor<TheoryWeights>[]): Factor<TheoryWeights>[][] {
  const found = new Map<string, Factor<TheoryWeights>[]>();
  for (const factor of product) {
    const key = `${factor.weights?.key ?? ''}|${factor.half}|${factor.from.join(',')}`;
    const present = found.get(key);
    if (present) present.push(factor);
    else found.set(key, [factor]);
  }
  return [...found.values()];
}

function pieceLatex(groups: readonly TheoryGroup[], factors: readonly Factor<TheoryWeights>[], style: Style): Piece[] {
  const first = factors[0] as Factor<TheoryWeights>;
  const printed = first.weights === null ? [NO_WEIGHT] : printWeights(groups, first.weights, first.half);
  return printed.map((weight) => ({
    latex: weight.indices + weight.choices + factorsLatex(factors, (form) => atPrinted(form, weight), style),
    from: first.from,
    expanded: style.kind === 'modes' ? null : expandedLatex(factors, weight, style),
    ...(style.kind !== 'modes' && weight.size > MAXIMAL_EXPANDED ? { weights: weight.size } : {}),
  }));
}

/** A piece of a product that is printed as `latex`, some of its weights written out; null where there is none. */
export function weightsLatex(
  groups: readonly TheoryGroup[],
  product: readonly Factor<TheoryWeights>[],
  notation: number,
  latex: string,
  [from, to]: readonly [number, number],
): { readonly latex: string; readonly size: number } | null {
  const style: Style = { kind: 'function', notation };
  for (const factors of gatherPieces(product)) {
    const { weights, half } = factors[0] as Factor<TheoryWeights>;
    if (weights === null) continue;
    for (const printed of printWeights(groups, weights, half)) {
      const own = printed.indices + printed.choices + factorsLatex(factors, (form) => atPrinted(form, printed), style);
      if (own === latex) return { latex: listed(factors, printed.weights(from, to), style), size: printed.size };
    }
  }
  return null;
}

function listed(factors: readonly Factor[], weights: readonly Weight[], style: Style): string {
  return weights.map((weight) => factorsLatex(factors, (argument) => atWeight(argument, weight), style)).join('\\;');
}

function atPrinted(form: Form, { weight, flux }: PrintedWeights): Form {
  return form.substitute((name) => (name === WEIGHT ? weight : name === FLUX ? flux : null));
}

function factorsLatex(factors: readonly Factor[], at: (argument: Form) => Form, style: Style): string {
  const above: Single[] = [];
  const below: Single[] = [];
  const { squares, others } = sumsOfSquares(factors);
  for (const factor of others) {
    const { additive } = functions[factor.name];
    const argument = at(factor.argument);
    const shortest = additive === undefined ? argument : additive(argument);
    if (additive !== undefined && shortest.isZero()) continue;
    const latex = functionLatex({ ...factor, argument: shortest, parameters: factor.parameters.map(at) }, style);
    (factor.power < 0 ? below : above).push({ latex, power: Math.abs(factor.power) });
  }
  for (const { re, im, power } of squares) {
    (power < 0 ? below : above).push({ latex: sumOfSquaresLatex(at(re), at(im)), power: Math.abs(power) });
  }
  return quotient(above, below);
}

function expandedLatex(factors: readonly Factor[], { size, weights }: PrintedWeights, style: Style): string | null {
  if (size < 2 || size > MAXIMAL_EXPANDED) return null;
  return listed(factors, weights(), style);
}

interface Single {
  readonly latex: string;
  readonly power: number;
}

function functionLatex(factor: FunctionAt, style: Style): string {
  const { argument } = factor;
  const declared = functions[factor.name];
  if (style.kind === 'modes' && declared.modes !== null) return declared.modes(argument, factor.parameters, printer);
  const index = style.kind === 'function' && !declared.elementary ? style.notation : 0;
  const notation = (declared.notations[index] ?? declared.notations[0]) as Notation;
  return notation.latex(argument, factor.parameters, printer);
}

function quotient(above: readonly Single[], below: readonly Single[]): string {
  const top = juxtaposed(above);
  if (below.length === 0) return top;
  return `\\frac{${top === '' ? '1' : top}}{${juxtaposed(below)}}`;
}

/** Leading integers of factors to the first power are multiplied together: 2 sinh x 2 sinh y is 4 sinh x sinh y. */
function juxtaposed(factors: readonly Single[]): string {
  let coefficient = 1;
  const parts = factors.map(({ latex, power }) => {
    if (power !== 1) return raised(latex, power);
    const leading = /^(\d+)(?![\d.])\s*(?=\\)/.exec(latex);
    if (!leading) return latex;
    coefficient *= Number(leading[1]);
    return latex.slice(leading[0].length);
  });
  const rest = parts.join('\\,');
  return coefficient === 1 ? rest : `${coefficient}${rest}`;
}

function raised(latex: string, power: number): string {
  if (/^[A-Za-z0-9]$/.test(latex) || isBracketed(latex)) return `${latex}^{${power}}`;
  return `${/[([]/.test(latex) ? `\\left[${latex}\\right]` : parenthesised(latex)}^{${power}}`;
}

/** True when one pair of parentheses or brackets encloses the whole. */
function isBracketed(latex: string): boolean {
  if (!/^(\\left)?[([]/.test(latex)) return false;
  let depth = 0;
  for (let k = 0; k < latex.length; k++) {
    const character = latex.charAt(k);
    if ('([{'.includes(character)) depth++;
    else if (')]}'.includes(character) && --depth === 0) return k === latex.length - 1;
  }
  return false;
}

/** Two pieces stay on one line up to so many characters of LaTeX, which is about a line of print. */
const LINE_LENGTH = 150;

/** The whole formula as one display: short ones on a line, long ones aligned with a piece a line. */
export function displayLatex(lead: string, pieces: readonly Piece[]): string {
  if (pieces.length === 0) return `${lead}1`;
  const line = lead + pieces.map(({ latex }) => latex).join('\\;');
  if (pieces.length === 1 || (pieces.length === 2 && line.length <= LINE_LENGTH)) return line;
  const [first, ...rest] = pieces.map(({ latex }) => latex);
  const lines = [`${lead.replace(/=$/, '={}&')}${first}`, ...rest.map((latex) => `&\\times ${latex}`)];
  return `\\begin{aligned}\n${lines.join(' \\\\\n')}\n\\end{aligned}`;
}
