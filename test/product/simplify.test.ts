import fc from 'fast-check';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { Form } from '../../engine/exact/form';
import { functions } from '../../engine/functions/table';
import type { PreciseValue } from '../../engine/numeric/precise';
import { inverse, overOpposite } from '../../engine/product/factor';
import { reduceElementary } from '../../engine/product/reduce-elementary';
import { collectEqual, type Depth, simplify } from '../../engine/product/simplify';
import {
  type AnyFactor,
  type AnyProduct,
  anyProduct,
  briefly,
  geometryAt,
  SETS,
  SQUASHINGS,
  sameOutcome,
  valueAt,
} from './random-product';

/*
 * Laws of simplification. The outside reference is the product itself, every factor evaluated one by one in the precise
 * tier: no law of any function takes part in that.
 */
const runs = (n: number) => n * Number(process.env.MORE ?? 1);
const squashing = fc.constantFrom(...SQUASHINGS);

/** Fails unless the rewritten product has the value of the product. Points where factors meet say nothing. */
function checkValue(product: AnyProduct, rewritten: AnyProduct, b: Form): void {
  const value = valueAt(product, b);
  fc.pre(value.kind === 'value' || value.kind === 'zero' || value.kind === 'pole');
  const other = valueAt(rewritten, b);
  const outcome = ({ kind }: PreciseValue) => kind;
  expect(sameOutcome(value, other), `${briefly(rewritten)}: ${outcome(value)}, ${outcome(other)}`).toBe(true);
}

describe('the value stays', () => {
  test.each<Depth>(['functions', 'elementary'])('under simplification to %s', (depth) => {
    fc.assert(
      fc.property(anyProduct, squashing, (product, b) => {
        checkValue(product, simplify(product, depth, geometryAt(b)), b);
      }),
      { numRuns: runs(60) },
    );
  });

  test('when nothing is known of the geometry', () => {
    fc.assert(
      fc.property(anyProduct, squashing, (product, b) => {
        checkValue(product, simplify(product, 'elementary'), b);
      }),
      { numRuns: runs(30) },
    );
  });

  test('when equal factors are collected, or elementary ones reduced', () => {
    fc.assert(
      fc.property(anyProduct, squashing, (product, b) => {
        checkValue(product, collectEqual(product), b);
        checkValue(product, reduceElementary(product), b);
      }),
      { numRuns: runs(30) },
    );
  });

  test('when a factor is written over the opposite weights', () => {
    fc.assert(
      fc.property(anyProduct, squashing, (product, b) => {
        // A half set keeps one of each pair, and which one it keeps is its own affair.
        const whole = product.map((factor) => ({ ...factor, half: false }));
        checkValue(whole, whole.map(overOpposite), b);
      }),
      { numRuns: runs(15) },
    );
  });
});

describe('simplification by itself', () => {
  test('a second time changes nothing', () => {
    fc.assert(
      fc.property(anyProduct, squashing, (product, b) => {
        const once = simplify(product, 'elementary', geometryAt(b));
        const keys = (list: AnyProduct) =>
          list.map((f) => `${f.name} ${f.argument.key} ${f.power} ${f.weights?.key} ${f.half}`).sort();
        expect(keys(simplify(once, 'elementary', geometryAt(b)))).toEqual(keys(once));
      }),
      { numRuns: runs(30) },
    );
  });

  test('a product and its inverse leave 1', () => {
    fc.assert(
      fc.property(anyProduct, squashing, (product, b) => {
        expect(simplify([...product, ...inverse(product)], 'functions', geometryAt(b))).toEqual([]);
      }),
      { numRuns: runs(30) },
    );
  });

  test('never leaves more special functions than there were', () => {
    const special = (list: AnyProduct) =>
      list.reduce((sum, f) => sum + (functions[f.name].elementary ? 0 : Math.abs(f.power) * sizeOf(f)), 0);
    fc.assert(
      fc.property(anyProduct, squashing, (product, b) => {
        expect(special(simplify(product, 'elementary', geometryAt(b)))).toBeLessThanOrEqual(special(product));
      }),
      { numRuns: runs(30) },
    );
  });
});

function sizeOf({ weights, half }: AnyFactor): number {
  return weights === null ? 1 : half ? weights.size / 2 : weights.size;
}

const Q = Form.symbol('@Q');
const bSymbol = Form.symbol('@b');
const w = Form.symbol('@w');

/** s_b(i Q/2 (1 - R) - w) over a set, as a chiral multiplet gives it. */
function chiral(weights: AnyFactor['weights'], rCharge: Form, extra: Form = Form.zero): AnyFactor {
  const argument = Form.i.mul(Q).mul(Form.ratio(1, 2)).mul(Form.one.sub(rCharge)).add(extra);
  return {
    name: 'doubleSine',
    argument: weights === null ? argument : argument.sub(w),
    parameters: [bSymbol],
    power: 1,
    weights,
    half: false,
    from: ['chiral'],
  };
}

describe('cancellations of the field', () => {
  test.each(SETS.map((set) => [set.key, set] as const))('a massive pair over %s: R + R = 2', (_key, set) => {
    const r = Form.symbol('r');
    const m = Form.symbol('m');
    const pair = [chiral(set, r, m.neg()), chiral(set.opposite(), Form.number(2).sub(r), m)];
    expect(simplify(pair, 'functions')).toEqual([]);
  });

  // s_b(i b/2 - x) s_b(i b/2 + x) = 1/(2 cosh pi b x): Hama, Hosomichi, Lee 2011, arXiv:1102.4716; any b.
  test('a pair at i b/2 is a hyperbolic cosine identically in b', () => {
    const at = Form.i.mul(bSymbol).mul(Form.ratio(1, 2));
    const pair = SETS.slice(0, 1).map((set): AnyFactor => ({ ...chiral(set, Form.zero), argument: at.sub(w) }));
    const [factor, ...rest] = simplify(pair, 'elementary');
    expect(rest).toEqual([]);
    expect([factor?.name, factor?.power, factor?.half]).toEqual(['hyperbolicCosine', -1, true]);
    expect(factor?.argument.mul(factor.argument).key).toBe(bSymbol.mul(w).pow(2).key);
  });

  // The same at i Q/4 only on the round sphere: Benvenuti, Pasquetti 2011, arXiv:1105.3551 against section 2 there.
  test('a hypermultiplet is elementary on the round sphere and on no other', () => {
    const half = Form.ratio(1, 2);
    const [set] = SETS;
    const hyper = set ? [chiral(set, half), chiral(set, half)] : [];
    const names = (b: Form) => simplify(hyper, 'elementary', geometryAt(b)).map(({ name }) => name);
    expect(names(Form.one)).toEqual(['hyperbolicCosine']);
    for (const b of SQUASHINGS.slice(1)) expect(new Set(names(b))).toEqual(new Set(['doubleSine']));
  });

  // R = 1 - b/Q makes i Q/2 (1 - R) = i b/2, typed as a number: 1 - 169/269 at b = 13/10.
  test('the special R-charge is recognised in its squashing only', () => {
    const [set] = SETS;
    const pair = set ? [chiral(set, Form.ratio(100, 269)), chiral(set, Form.ratio(100, 269))] : [];
    const names = (b: Form) => simplify(pair, 'elementary', geometryAt(b)).map(({ name }) => name);
    expect(names(Form.ratio(13, 10))).toEqual(['hyperbolicCosine']);
    expect(names(Form.ratio(5, 4))).toEqual(['doubleSine']);
  });

  test.each([SETS[1], SETS[4]])('an adjoint with R = 1 is 1, one with R = 0 cancels the vector multiplet', (roots) => {
    if (!roots) throw new Error('No roots.');
    expect(simplify([chiral(roots, Form.one), chiral(null, Form.one)], 'functions')).toEqual([]);
    const vector = [w.mul(bSymbol), w.div(bSymbol)].map(
      (argument): AnyFactor => ({
        ...chiral(roots, Form.one),
        name: 'hyperbolicSine',
        argument,
        parameters: [],
        half: true,
      }),
    );
    const left = simplify([...vector, chiral(roots, Form.zero)], 'elementary', geometryAt(Form.ratio(5, 4)));
    // Each pair of roots gives s_b(iQ/2 - a) s_b(iQ/2 + a) = 1/(4 sinh(pi b a) sinh(pi a/b)): both shifts of s_b.
    expect(left).toEqual([]);
  });

  /** A chiral without charges on the round sphere, where b is 1 from the start. */
  const roundChiral = (r: Form): AnyProduct => [
    { ...chiral(null, Form.zero), argument: Form.i.mul(Form.one.sub(r)), parameters: [Form.one] },
  ];

  // From i (1/b - b)/2 to its negative the way leads over the pole at i Q/2: found by the random products above.
  test('a quotient over a zero or pole of the function is left alone', () => {
    const middle = Form.i.mul(bSymbol.sub(bSymbol.inverse())).mul(Form.ratio(1, 2));
    const [set] = SETS;
    for (const power of [1, 2, -2]) {
      const product: AnyProduct = [{ ...chiral(null, Form.zero), argument: middle, power }];
      const simple = simplify(product, 'elementary', geometryAt(Form.ratio(13, 10)));
      expect(simple.map(({ name }) => name)).toEqual(['doubleSine']);
      checkValue(product, simple, Form.ratio(13, 10));
    }
    // With a weight in the argument there is no such point.
    const pair = set ? [{ ...chiral(set, Form.zero), argument: middle.add(w) }] : [];
    expect(simplify(pair, 'elementary').every(({ name }) => functions[name].elementary)).toBe(true);
    checkValue(pair, simplify(pair, 'elementary'), Form.ratio(13, 10));
  });

  // l(1/2) = (log 2)/2: Jafferis 2010, arXiv:1012.3210.
  test('a free chiral of R = 1/2 is the root of 1/2 on the round sphere', () => {
    const left = simplify(roundChiral(Form.ratio(1, 2)), 'elementary');
    expect(left.map(({ name, argument, power }) => [name, argument.key, power])).toEqual([
      ['linear', '1/2*sqrt(2)', 1],
    ]);
  });

  // s_1(3i/2) = s_1(i/2)/(2 cosh i pi) = -1/(2 sqrt 2): the root of a square may be the negative one.
  test('the sign of a root is that of the value', () => {
    for (const r of [Form.ratio(3, 2), Form.ratio(-1, 2), Form.ratio(5, 2), Form.ratio(-5, 2), Form.ratio(9, 2)]) {
      const product = roundChiral(r);
      checkValue(product, simplify(product, 'elementary'), Form.one);
      const cubed = product.map((factor) => ({ ...factor, power: 3 }));
      checkValue(cubed, simplify(cubed, 'elementary'), Form.one);
    }
  });
});

describe('a wrong law is caught', () => {
  afterEach(() => vi.restoreAllMocks());

  const [set] = SETS;
  const b = Form.ratio(5, 4);
  const shifted = chiral(set ?? null, Form.ratio(1, 3), Form.i.mul(bSymbol));
  const quotient: AnyProduct = [shifted, { ...chiral(set ?? null, Form.ratio(1, 3)), power: -1 }];
  const checkQuotient = () => checkValue(quotient, simplify(quotient, 'elementary', geometryAt(b)), b);

  test('a shift of the wrong sign', () => {
    checkQuotient();
    const shift = functions.doubleSine.shifts[0];
    if (!shift) throw new Error('No shift.');
    const right = shift.quotient;
    vi.spyOn(shift, 'quotient').mockImplementation((x, parameters) =>
      right(x, parameters).map((factor) => ({ ...factor, power: -factor.power })),
    );
    expect(checkQuotient).toThrow();
  });

  test('a shift by another step', () => {
    const shift = functions.doubleSine.shifts[0];
    if (!shift) throw new Error('No shift.');
    const right = shift.step;
    vi.spyOn(shift, 'step').mockImplementation((parameters) => right(parameters).scale(2));
    const far: AnyProduct = [
      chiral(set ?? null, Form.ratio(1, 3), Form.i.mul(bSymbol).scale(2)),
      { ...chiral(set ?? null, Form.ratio(1, 3)), power: -1 },
    ];
    expect(() => checkValue(far, simplify(far, 'elementary', geometryAt(b)), b)).toThrow();
  });

  test('a reflection about another point', () => {
    const product: AnyProduct = [chiral(set ?? null, Form.ratio(1, 3)), chiral(set ?? null, Form.ratio(5, 3))];
    const check = () => checkValue(product, simplify(product, 'functions'), b);
    check();
    const reflection = functions.doubleSine.reflections[0];
    if (!reflection) throw new Error('No reflection.');
    vi.spyOn(reflection, 'center').mockImplementation(() => Form.i.mul(Q).mul(Form.ratio(1, 6)));
    const other: AnyProduct = [chiral(set ?? null, Form.ratio(1, 3)), chiral(set ?? null, Form.one)];
    expect(() => checkValue(other, simplify(other, 'functions'), b)).toThrow();
  });

  test('an exact value of the wrong sign', () => {
    const constant: AnyProduct = [
      { ...chiral(null, Form.zero), name: 'hyperbolicCosine', argument: Form.i.mul(Form.ratio(1, 3)), parameters: [] },
    ];
    const check = () => checkValue(constant, simplify(constant, 'elementary'), b);
    check();
    vi.spyOn(functions.hyperbolicCosine, 'exactValue').mockImplementation(() => Form.one.neg());
    expect(check).toThrow();
  });
});
