// Spins and numbers of harmonics on S^3: Camporesi and Higuchi 1996, gr-qc/9505009; Rubin and Ordonez 1984, J. Math.
// Phys. 25, 2888. One-loop factors: Kapustin, Willett, Yaakov 2009, arXiv:0909.4559; Jafferis 2010, arXiv:1012.3210.
import { describe, expect, test } from 'vitest';
import { type Ball, expBall } from '../../engine/arithmetic/ball';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { analyse } from '../../engine/requests/analysis';
import { latexOut } from '../../engine/requests/document';
import { isRemark } from '../../engine/spectrum/analyse';
import { multiplicityTower } from '../../engine/spectrum/level-tower';
import { leftOfPairs } from '../../engine/spectrum/mode-pairs';
import { prepare } from '../../engine/spectrum/prepare';
import { recognise } from '../../engine/spectrum/recognise';
import { determinant } from '../../engine/spectrum/regularised';
import type { Spectrum } from '../../engine/spectrum/tower';
import { chiralPairs, vectorPairs } from '../../engine/spheres/s3-mode-pairs';
import { chiralModes, vectorModes } from '../../engine/spheres/s3-modes';
import type { ModeFactor, ModePair } from '../../engine/spheres/sphere';
import { answer } from '../requests/answers';

const x = Form.symbol('x');
const charge = Form.symbol('Delta');
const same = (form: Form): Form => form;

const CASES: readonly (readonly [string, readonly ModePair[], readonly ModeFactor[], number])[] = [
  ['chiral', chiralPairs(charge, x), chiralModes(charge, x), 0],
  ['vector', vectorPairs(x), vectorModes(x), 1],
];

function pairingOf(spectrum: Spectrum) {
  const prepared = prepare(spectrum.towers);
  if (isRemark(prepared)) throw new Error(prepared.code);
  return prepared.pairing;
}

describe.each(CASES)('%s multiplet', (_, pairs, factors, start) => {
  test('the pairs are all of its modes', () => {
    const modes = factors.map(({ eigenvalue, multiplicity }) => multiplicityTower(eigenvalue, multiplicity, start, ''));
    const paired = pairs.flatMap(({ eigenvalue, start: from, boson, fermion }) => [
      multiplicityTower(eigenvalue, fermion.multiplicity.neg(), from, ''),
      multiplicityTower(eigenvalue, boson.multiplicity, from, ''),
    ]);
    const { classes, constants } = pairingOf({ name: '', towers: [...modes, ...paired], parameters: new Map() });
    expect(classes.length).toBeGreaterThan(0);
    expect([classes.filter(({ left }) => left.length > 0), constants]).toEqual([[], []]);
  });

  test('fields fill representations of SU(2) x SU(2), and pairs share the spin of the first', () => {
    for (const { boson, fermion } of pairs) {
      expect(boson.left.equals(fermion.left)).toBe(true);
      expect(boson.right.sub(fermion.right).scale(2).toRational()?.abs().toNumber()).toBe(1);
      for (const { left, right, multiplicity } of [boson, fermion]) {
        const dimension = left.scale(2).add(Form.one).mul(right.scale(2).add(Form.one));
        expect(dimension.equals(multiplicity)).toBe(true);
      }
    }
  });
});

test('what a chiral leaves is the double sine of its R-charge and weight', () => {
  const form = recognise(pairingOf(leftOfPairs(chiralPairs(charge, x), same)));
  const argument = Form.i.mul(Form.one.sub(charge)).sub(x);
  expect(form?.functions.map(({ of, power }) => [of.name, of.argument.key, power.key])).toEqual([
    ['doubleSine', argument.key, '1'],
  ]);
  expect([form?.numbers, form?.exponent]).toEqual([[], []]);
});

test('what a vector leaves is (2 sinh(pi x)/x)^2', () => {
  const form = recognise(pairingOf(leftOfPairs(vectorPairs(x), same)));
  expect(form?.functions.map(({ of, power }) => [of.name, of.argument.key, power.key])).toEqual([
    ['hyperbolicSine', '1*x', '2'],
  ]);
  expect(form?.numbers.map(({ base, power }) => [base.key, power.key])).toEqual([['1*x', '-2']]);
});

const THEORY = [
  'theory lamp',
  '  sphere   S3',
  '  gauge    G = SU(2)',
  '  flavor   F = U(1), mass m',
  '  matter       G     F   R',
  '  chiral   q   fund  1   2/5',
];
const POINT = 'sigma = 3/10, m = 1/7';

/** |a - b| of a notebook's value and a ball, in doubles. */
function gap(what: string, other: Ball): number {
  const result = answer(...THEORY, '', `value ${what} of lamp at ${POINT}, 45 digits`);
  if (result.kind !== 'value') throw new Error(result.kind);
  const part = (text: string, fixed: bigint): number => {
    const value = Rational.parse(text) as Rational;
    return numberFromFixed((value.numerator << BigInt(other.bits)) / value.denominator - fixed, other.bits);
  };
  return Math.hypot(part(result.value.re, other.re), part(result.value.im, other.im));
}

function leftValue(pairs: readonly ModePair[]): Ball {
  const found = determinant(leftOfPairs(pairs, same), 'factors', new Map(), 45);
  const value = found.kind === 'value' ? expBall(found.log, 200) : null;
  if (value === null) throw new Error('no value');
  return value;
}

test('pairs of modes give the values of the sphere to 40 digits', () => {
  const [up, down] = [Form.ratio(31, 70), Form.ratio(-11, 70)];
  const chirals = leftValue([up, down].flatMap((weight) => chiralPairs(Form.ratio(2, 5), weight)));
  expect(gap('q', chirals)).toBeLessThan(1e-40);
  const root = Rational.of(3, 5);
  const bare = leftValue(vectorPairs(Form.number(root)));
  // The Vandermonde factor x^2 stands beside the modes.
  const square = root.mul(root);
  const vector = { ...bare, re: (bare.re * square.numerator) / square.denominator };
  expect(gap('vector', vector)).toBeLessThan(1e-40);
});

describe('the table', () => {
  const result = answer(...THEORY, '', 'formula lamp as modes');
  const view = result.kind === 'formula' ? result.formula : null;
  const pairing = view?.kind === 'formula' ? view.pairing : undefined;

  test('stands beside the formula of all modes, multiplet by multiplet', () => {
    expect(pairing?.tables.map(({ from, weights }) => [from, weights])).toEqual([
      ['vector', ''],
      ['q', '\\prod_{\\pm}'],
    ]);
    expect(pairing?.tables[1]?.rows.map(({ bosons, fermions, left, spin }) => [bosons, fermions, left, spin])).toEqual([
      [
        { field: 'scalar', spins: '\\left(\\tfrac{n}{2},\\tfrac{n}{2}\\right)', multiplicity: '(n+1)^{2}' },
        { field: 'spinor', spins: '\\left(\\tfrac{n}{2},\\tfrac{n+1}{2}\\right)', multiplicity: '(n+1)(n+2)' },
        'n+1',
        '\\tfrac{n}{2}',
      ],
      [
        { field: 'scalar', spins: '\\left(\\tfrac{n}{2},\\tfrac{n}{2}\\right)', multiplicity: '(n+1)^{2}' },
        { field: 'spinor', spins: '\\left(\\tfrac{n}{2},\\tfrac{n-1}{2}\\right)', multiplicity: 'n(n+1)' },
        '-(n+1)',
        '\\tfrac{n}{2}',
      ],
    ]);
  });

  test('is a LaTeX array whose lines have as many cells as its head', () => {
    const body = /^\\begin\{array\}\{(l+)\}(.*)\\end\{array\}$/.exec(pairing?.latex ?? '');
    const lines = (body?.[2] ?? '').split('\\\\');
    expect(lines).toHaveLength(1 + 5 + 3);
    expect(lines.map((line) => line.split('&').length)).toEqual(lines.map(() => body?.[1]?.length));
  });

  test('is absent from the other forms', () => {
    const other = answer(...THEORY, '', 'formula lamp as unpaired');
    expect(other.kind === 'formula' && other.formula.kind === 'formula' && 'pairing' in other.formula).toBe(false);
  });
});

test('a document of all modes holds the table, one of another form does not', () => {
  const analysis = analyse(THEORY.join('\n'));
  const documents = (['modes', 'functions'] as const).map((form) => latexOut(analysis, 'lamp', form, 0));
  const holds = documents.map((out) => out.kind === 'latex' && out.document.includes('\\begin{array}{llllllllll}'));
  expect(holds).toEqual([true, false]);
});
