import { Form } from '../exact/form';
import type { ModeClass, Pairing, Stretch } from '../spectrum/pairing';
import {
  constantPolynomial,
  evaluatePolynomial,
  multiplyPolynomials,
  type Polynomial,
  polynomialIn,
  samePolynomial,
  scalePolynomial,
  shiftPolynomial,
} from '../spectrum/polynomial';
import type { WrittenTower } from '../spectrum/tower';
import { formLatex } from './form';
import {
  completedLatex,
  eigenvalueLatex,
  indexPolynomialLatex,
  multiplicityLatex,
  signOf,
  sumLatex,
} from './polynomial';
import type { Piece } from './product';
import { symbolLatex } from './symbol';

/** Letters for indices, in the order they are taken; letters of parameters are passed over. */
const LETTERS = ['n', 'm', 'k', 'l', 'p', 'j', 'r', 's', 't'];

/** `count` letters that no parameter uses, in the order of the alphabet. */
export function indexLetters(taken: readonly string[], count: number): string[] {
  const free = LETTERS.filter((letter) => !taken.includes(letter));
  return Array.from({ length: count }, (_, k) => free[k] ?? `n_{${k + 1}}`).sort();
}

/** A tower as it was written: eigenvalue, degeneracy, ranges. */
export function towerLatex(tower: WrittenTower): string {
  const parts = [eigenvalueOf(tower)];
  const degeneracy = degeneracyLatex(tower);
  if (degeneracy !== '1') parts.push(`\\text{times}\\;${degeneracy}`);
  return [...parts, ...tower.ranges.map(rangeLatex)].join(',\\quad ');
}

function rangeLatex({ name, from, to }: WrittenTower['ranges'][number]): string {
  const letter = symbolLatex(name);
  if (to === null) return `${letter}\\ge ${formLatex(from)}`;
  if (from.equals(to)) return `${letter}=${formLatex(from)}`;
  return `${letter}=${formLatex(from)},\\ldots,${formLatex(to)}`;
}

function eigenvalueOf({ eigenvalue, ranges }: WrittenTower): string {
  const names = ranges.map(({ name }) => name);
  const factors = eigenvalue.map(({ form, power }) => ({ text: eigenvalueLatex(form, names), power }));
  if (factors.length === 1 && factors[0]?.power === 1) return factors[0].text;
  return factors.map(({ text, power }) => raised(parenthesised(text), power === 1 ? '' : `${power}`)).join('');
}

function degeneracyLatex({ degeneracy, ranges }: WrittenTower): string {
  const name = ranges[0]?.name ?? 'n';
  const p = ranges.length === 1 ? polynomialIn(degeneracy, name) : null;
  return p === null ? sumLatex(degeneracy) : multiplicityLatex(p, symbolLatex(name));
}

/** The determinant as a product over all modes, tower by tower. */
export function productPieces(towers: readonly WrittenTower[]): Piece[] {
  return towers.map((tower, place) => {
    const name = tower.ranges[0]?.name ?? 'n';
    const power = tower.degeneracy.mul(tower.exponent);
    const p = tower.ranges.length === 1 ? polynomialIn(power, name) : null;
    const exponent = p === null ? sumLatex(power) : multiplicityLatex(p, symbolLatex(name));
    const body = raised(parenthesised(eigenvalueOf(tower), true), exponent === '1' ? '' : exponent);
    return { latex: `${tower.ranges.map(productSign).join('')}${body}`, from: [`${place}`], expanded: null };
  });
}

function productSign({ name, from, to }: WrittenTower['ranges'][number]): string {
  const letter = symbolLatex(name);
  if (to?.equals(from)) return '';
  return to === null
    ? `\\prod_{${letter}\\ge ${formLatex(from)}}`
    : `\\prod_{${letter}=${formLatex(from)}}^{${formLatex(to)}}`;
}

function parenthesised(text: string, always = false): string {
  return always || /[+\-\\^]/.test(text) ? `\\left(${text}\\right)` : text;
}

function raised(base: string, power: string): string {
  return power === '' ? base : `${base}^{${power}}`;
}

/** One factor under a product sign. */
interface Printed {
  readonly factor: Polynomial;
  readonly from: readonly string[];
}

interface Group {
  readonly first: number;
  readonly last: number | null;
  readonly multiplicity: string;
  /** The same with a minus sign. */
  readonly negative: string;
  readonly above: Printed[];
  readonly below: Printed[];
}

/** What pairing leaves: equal runs and multiplicities under one product sign. */
export function unpairedPieces(pairing: Pairing, taken: readonly string[]): Piece[] {
  const [letter = 'n'] = indexLetters(taken, 1);
  const groups = new Map<string, Group>();
  const single: Piece[] = [];
  for (const found of pairing.classes) {
    const from = [...new Set(found.rows.map(({ place }) => `${place}`))];
    for (const stretch of found.left) {
      if (stretch.from === stretch.to) {
        const latex = modeLatex(found, stretch);
        if (latex !== '1') single.push({ latex, from, expanded: null });
      } else insert(groups, found.polynomial, stretch, from, letter);
    }
  }
  const pieces = [...groups.values()].map((group) => groupPiece(group, letter));
  const constants = pairing.constants.map(({ base, exponent }) => ({
    latex: raised(parenthesised(sumLatex(base)), sumLatex(exponent)),
    from: [],
    expanded: null,
  }));
  return [...constants, ...single, ...pieces, ...severalPieces(pairing, taken)];
}

function modeLatex({ polynomial }: ModeClass, { from, multiplicity }: Stretch): string {
  const mode = evaluatePolynomial(polynomial, Form.number(from));
  if (mode.equals(Form.one)) return '1';
  const value = parenthesised(sumLatex(mode));
  const power = sumLatex(evaluatePolynomial(multiplicity, Form.number(from)));
  return raised(value, power === '1' ? '' : power);
}

function insert(
  groups: Map<string, Group>,
  q: Polynomial,
  stretch: Stretch,
  from: readonly string[],
  letter: string,
): void {
  const { first, factor, multiplicity } = niceStart(q, stretch, letter);
  const last = stretch.to === null ? null : stretch.to - stretch.from + first;
  const sign = signOf(multiplicity);
  const text = multiplicityLatex(scalePolynomial(multiplicity, sign), letter);
  const negative = multiplicityLatex(scalePolynomial(multiplicity, -sign), letter);
  const key = `${first} ${last} ${text}`;
  const group = groups.get(key) ?? { first, last, multiplicity: text, negative, above: [], below: [] };
  groups.set(key, group);
  (sign > 0 ? group.above : group.below).push({ factor, from });
}

/** Counts from 1, 0 or 2, whichever makes factor and multiplicity shortest. */
export function niceStart(
  q: Polynomial,
  { from, multiplicity }: Stretch,
  letter: string,
): { readonly first: number; readonly factor: Polynomial; readonly multiplicity: Polynomial } {
  const choices = [1, 0, 2].map((first) => {
    const by = Form.number(from - first);
    const factor = shiftPolynomial(q, by);
    const shifted = shiftPolynomial(multiplicity, by);
    const size = indexPolynomialLatex(factor, letter).length + multiplicityLatex(shifted, letter).length;
    return { first, factor, multiplicity: shifted, size };
  });
  return choices.reduce((best, choice) => (choice.size < best.size ? choice : best));
}

function groupPiece({ first, last, multiplicity, negative, above, below }: Group, letter: string): Piece {
  const sign = last === null ? `\\prod_{${letter}\\ge ${first}}` : `\\prod_{${letter}=${first}}^{${last}}`;
  const numerator = factorsLatex(above, letter);
  const denominator = factorsLatex(below, letter);
  const power = multiplicity === '1' ? '' : multiplicity;
  const from = [...new Set([...above, ...below].flatMap((printed) => printed.from))];
  let latex: string;
  if (denominator === '') latex = raised(wrapped(numerator), power);
  else if (numerator === '' && power !== '') latex = raised(wrapped(denominator), negative);
  else {
    const fraction = `\\frac{${numerator || '1'}}{${denominator}}`;
    latex = power === '' ? fraction : raised(`\\left(${fraction}\\right)`, power);
  }
  return { latex: sign + latex, from, expanded: null };
}

/** A letter needs no parentheses. */
function wrapped(text: string): string {
  return /^[a-z]$/.test(text) ? text : `\\left(${text}\\right)`;
}

/** Factors side by side; conjugate ones multiplied out: (n + ix)(n - ix) is n^2 + x^2. */
function factorsLatex(factors: readonly Printed[], letter: string): string {
  const rest = factors.map(({ factor }) => factor);
  const texts: string[] = [];
  for (let one = rest.shift(); one !== undefined; one = rest.shift()) {
    const own = one;
    const conjugate = own.map((c) => c.conjugate());
    const place = samePolynomial(conjugate, own) ? -1 : rest.findIndex((other) => samePolynomial(other, conjugate));
    const [partner] = place < 0 ? [] : rest.splice(place, 1);
    texts.push(completedLatex(partner === undefined ? own : multiplyPolynomials(own, partner), letter));
  }
  return texts.length === 1 ? (texts[0] as string) : texts.map((text) => `(${text})`).join('');
}

/** Towers in several indices, equal periods and powers under one product sign. */
function severalPieces(pairing: Pairing, taken: readonly string[]): Piece[] {
  const groups = new Map<
    string,
    { periods: readonly Form[]; power: string; above: string[]; below: string[]; from: Set<string> }
  >();
  for (const { periods, rows, left } of pairing.several) {
    const letters = indexLetters(taken, periods.length);
    for (const { shift, multiplicity } of left) {
      const sign = signOf(constantPolynomial(multiplicity));
      const power = sumLatex(multiplicity.scale(sign));
      const key = `${periods.map(({ key: k }) => k).join(';')} ${power}`;
      const group = groups.get(key) ?? { periods, power, above: [], below: [], from: new Set<string>() };
      groups.set(key, group);
      (sign > 0 ? group.above : group.below).push(severalFactorLatex(shift, periods, letters));
      for (const { place } of rows) group.from.add(`${place}`);
    }
  }
  return [...groups.values()].map(({ periods, power, above, below, from }) => {
    const letters = indexLetters(taken, periods.length).join(',');
    const join = (texts: readonly string[]): string =>
      texts.length === 1 ? (texts[0] as string) : texts.map((t) => `(${t})`).join('');
    const body =
      below.length === 0
        ? `\\left(${join(above)}\\right)`
        : `\\frac{${above.length === 0 ? '1' : join(above)}}{${join(below)}}`;
    const wrapped = power === '1' ? body : raised(below.length === 0 ? body : `\\left(${body}\\right)`, power);
    return { latex: `\\prod_{${letters}\\ge 0}${wrapped}`, from: [...from], expanded: null };
  });
}

/** m b + n/b + x. */
export function severalFactorLatex(shift: Form, periods: readonly Form[], letters: readonly string[]): string {
  const terms = periods.map((w, i) => {
    const letter = letters[i] ?? 'n';
    return w.terms.length === 1 ? formLatex(w.mul(Form.symbol(letter))) : `${letter}(${formLatex(w)})`;
  });
  const rest = shift.isZero() ? '' : sumLatex(shift);
  const lead = terms.reduce(
    (text, term) => (text === '' || term.startsWith('-') ? text + term : `${text}+${term}`),
    '',
  );
  return rest === '' ? lead : rest.startsWith('-') ? lead + rest : `${lead}+${rest}`;
}
