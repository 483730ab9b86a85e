import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { affineProduct } from '../../engine/numeric/affine';
import { asymptote } from '../../engine/numeric/growth';
import { marksOnLine } from '../../engine/numeric/marks';
import { evaluatePrecise } from '../../engine/numeric/precise';
import { compile, compileAffine } from '../../engine/numeric/program';
import { simplify } from '../../engine/product/simplify';
import { s3 } from '../../engine/spheres/s3';
import type { TheoryProduct } from '../../engine/spheres/sphere';
import { type Ready, ready, THEORIES } from './theories';

/** Values of geometry symbols, and of the names that are set. */
function valuesOf({ theory }: Ready, set: ReadonlyMap<string, Form>): (name: string) => Form | null {
  const geometry = s3.geometry(theory);
  return (name) => {
    const own = set.get(name);
    if (own) return own;
    return name.startsWith('@') ? geometry.reduce((form, stage) => form.substitute(stage), Form.symbol(name)) : null;
  };
}

/** Coordinates as exact doubles, away from the walls. */
function points(names: readonly string[]): fc.Arbitrary<ReadonlyMap<string, Form>> {
  return fc
    .tuple(
      ...names.map((_, k) => fc.integer({ min: 1, max: 200 }).map((n) => Form.number(Rational.of(2 * n + k, 128)))),
    )
    .chain((forms) => fc.tuple(...forms.map((form) => fc.boolean().map((minus) => (minus ? form.neg() : form)))))
    .map((forms) => new Map(names.map((name, k) => [name, forms[k] as Form])));
}

function logInDoubles(
  product: TheoryProduct,
  variables: readonly string[],
  at: readonly number[],
  values: (name: string) => Form | null,
): { re: number; im: number } {
  const program = compile(product, variables, values);
  expect(program.unset).toEqual([]);
  const re = new Float64Array(1);
  const im = new Float64Array(1);
  program.addLog(
    at.map((x) => Float64Array.of(x)),
    re,
    im,
  );
  return { re: re[0] as number, im: im[0] as number };
}

const number = (form: Form | undefined) => form?.toRational()?.toNumber() ?? Number.NaN;

describe.each(Object.entries(THEORIES))('%s', (_name, lines) => {
  const one = ready(lines);
  const elementary = simplify(one.integrand, 'elementary', s3.geometry(one.theory));

  // The outside reference of the program is the precise tier, which other tests compare with mpmath.
  test('the program has the values of the precise tier', () => {
    fc.assert(
      fc.property(points(one.names), fc.boolean(), (set, simple) => {
        const product = simple ? elementary : one.integrand;
        const exact = evaluatePrecise(product, valuesOf(one, set), 20);
        fc.pre(exact.kind === 'value');
        if (exact.kind !== 'value') return;
        const { log } = exact;
        const open = new Map([...set].filter(([name]) => !one.coulomb.includes(name)));
        const at = one.coulomb.map((name) => number(set.get(name)));
        const double = logInDoubles(product, one.coulomb, at, valuesOf(one, open));
        const [re, im] = [Number(log.re) / 2 ** log.bits, Number(log.im) / 2 ** log.bits];
        const phase = (double.im - im) / (2 * Math.PI);
        // Phases up to 2 pi k sigma^2 are a few thousand here, and every one of some twenty factors rounds.
        const scale = 1e-12 * (1 + Math.abs(re) + at.reduce((sum, x) => sum + x * x, 0));
        expect(Math.abs(double.re - re)).toBeLessThanOrEqual(scale);
        expect(Math.abs(phase - Math.round(phase))).toBeLessThanOrEqual(scale);
      }),
      { numRuns: 8 },
    );
  });

  test('one point or many, one variable or all: the same numbers', () => {
    fc.assert(
      fc.property(points(one.names), (set) => {
        const variables = one.names;
        const at = variables.map((name) => number(set.get(name)));
        const together = logInDoubles(one.integrand, variables, at, valuesOf(one, new Map()));
        const alone = logInDoubles(one.integrand, [], [], valuesOf(one, set));
        fc.pre(Number.isFinite(together.re));
        expect(Math.abs(together.re - alone.re)).toBeLessThanOrEqual(1e-11 * (1 + Math.abs(together.re)));
        const turn = (together.im - alone.im) / (2 * Math.PI);
        expect(Math.abs(turn - Math.round(turn))).toBeLessThanOrEqual(1e-10);
        const program = compile(one.integrand, variables, valuesOf(one, new Map()));
        const re = new Float64Array(3);
        program.addLog(
          at.map((x) => Float64Array.of(x, 0.37, x)),
          re,
          new Float64Array(3),
        );
        expect([re[0], re[2]]).toEqual([together.re, together.re]);
      }),
      { numRuns: 8 },
    );
  });

  test('on the walls, where the vector multiplet vanishes, there is no NaN', () => {
    const zeros = new Map(one.names.map((name) => [name, Form.zero] as const));
    const { re, im } = logInDoubles(one.integrand, [], [], valuesOf(one, zeros));
    expect(im).not.toBeNaN();
    expect(re).toBe(one.theory.groups.every(({ group }) => group.isAbelian) ? re : Number.NEGATIVE_INFINITY);
    const [first] = one.coulomb;
    const rest = new Map([...zeros].filter(([name]) => name !== first));
    const program = compile(one.integrand, [first as string], valuesOf(one, rest));
    const grid = Float64Array.from({ length: 81 }, (_, k) => (k - 40) / 10);
    const logs = new Float64Array(81);
    program.addLog([grid], logs, new Float64Array(81));
    expect([...logs].filter(Number.isNaN)).toEqual([]);
  });

  test('a name without a value is said to be unset', () => {
    const program = compile(one.integrand, one.coulomb.slice(1), valuesOf(one, new Map()));
    expect([...program.unset].sort()).toEqual(
      [...one.names].filter((name) => !one.coulomb.slice(1).includes(name)).sort(),
    );
  });

  test('the curve comes to its growth at both ends', () => {
    const [first, ...others] = one.names as [string, ...string[]];
    const set = new Map(others.map((name, k) => [name, Form.ratio(k + 1, 9)] as const));
    const entries = affineProduct(one.integrand, [first], valuesOf(one, set));
    const program = compileAffine(entries, [first]);
    for (const end of [1, -1] as const) {
      const x = Float64Array.of(4 * end, 8 * end, 12 * end);
      const re = new Float64Array(3);
      program.addLog([x], re, new Float64Array(3));
      const growth = asymptote(entries, first, end, x);
      const off = [...re].map((log, k) => Math.abs(log - (growth?.[k] ?? Number.NaN)));
      expect(off[2]).toBeLessThanOrEqual(1e-9);
      expect(off[1]).toBeLessThanOrEqual(Math.max(off[0] as number, 1e-9));
    }
  });
});

describe('marks', () => {
  // A chiral of charge 1 has poles at sigma = -i(Q R/2 + j b + l/b) and zeros at sigma = i(Q - Q R/2 + ...):
  // Benini, Peelaers 2014, arXiv:1312.6078, section 2. Over R they lie at R = -2(j b + l/b)/Q and 2 + 2(j b + l/b)/Q.
  test('zeros and poles of a neutral chiral over its R-charge', () => {
    const q = ready(['sphere S3, b = 4/3', 'matter R', 'chiral q r'].map((line) => line.replace(' r', ' 0')));
    const r = Form.symbol('r');
    const product = q.integrand.map((factor) => ({
      ...factor,
      argument: Form.i.mul(Form.symbol('@Q')).mul(Form.ratio(1, 2)).mul(Form.one.sub(r)),
    }));
    const marks = marksOnLine(affineProduct(product, ['r'], valuesOf(q, new Map())), -3, 5);
    const Q = 4 / 3 + 3 / 4;
    const offsets = [0, 1, 2, 3, 4, 5]
      .flatMap((j) => [0, 1, 2, 3, 4, 5].map((l) => (2 * ((j * 4) / 3 + (l * 3) / 4)) / Q))
      .filter((x) => x <= 3)
      .sort((a, b) => a - b);
    const poles = marks.filter(({ order }) => order < 0).map(({ at }) => -at);
    const zeros = marks.filter(({ order }) => order > 0).map(({ at }) => at - 2);
    const close = (found: number[]) => {
      expect(found.length).toBe(offsets.length);
      for (const [k, x] of found.sort((a, b) => a - b).entries()) expect(x).toBeCloseTo(offsets[k] as number, 9);
    };
    close(poles);
    close(zeros);
  });

  test('where the vector multiplet vanishes, and nowhere else', () => {
    const lines = THEORIES['USp(4) with an antisymmetric'] ?? [];
    const one = ready(lines);
    const set = new Map([
      ['sigma2', Form.ratio(7, 10)],
      ['m', Form.ratio(1, 5)],
    ]);
    const marks = marksOnLine(affineProduct(one.integrand, ['sigma1'], valuesOf(one, set)), -2, 2);
    // sinh(pi b a.sigma) sinh(pi a.sigma/b) for a = 2 sigma1, sigma1 + sigma2, sigma1 - sigma2.
    expect(marks.map(({ at, order }) => [Number(at.toFixed(9)), order])).toEqual([
      [-0.7, 2],
      [0, 2],
      [0.7, 2],
    ]);
  });

  test('marks are where the program is infinite', () => {
    const one = ready(THEORIES['U(2) with an adjoint'] ?? []);
    const set = new Map([
      ['sigma2', Form.ratio(3, 8)],
      ['m1', Form.ratio(1, 8)],
    ]);
    const entries = affineProduct(one.integrand, ['sigma1'], valuesOf(one, set));
    const marks = marksOnLine(entries, -3, 3);
    expect(marks.map(({ at, order }) => [at, order])).toEqual([[0.375, 2]]);
    const re = new Float64Array(2);
    compileAffine(entries, ['sigma1']).addLog([Float64Array.of(0.375, 0.376)], re, new Float64Array(2));
    expect(re[0]).toBe(Number.NEGATIVE_INFINITY);
    expect(Number.isFinite(re[1])).toBe(true);
  });
});
