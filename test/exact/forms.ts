import fc from 'fast-check';
import { Form } from '../../engine/exact/form';
import { Gaussian } from '../../engine/exact/gaussian';
import { Rational } from '../../engine/exact/rational';

/** Small rationals of either sign, and now and then a long one. */
export const anyRational: fc.Arbitrary<Rational> = fc.oneof(
  { weight: 6, arbitrary: fraction(20n, 12n) },
  { weight: 1, arbitrary: fraction(10n ** 30n, 10n ** 25n) },
);

function fraction(numerator: bigint, denominator: bigint): fc.Arbitrary<Rational> {
  return fc
    .tuple(fc.bigInt({ min: -numerator, max: numerator }), fc.bigInt({ min: 1n, max: denominator }))
    .map(([n, d]) => Rational.of(n, d));
}

export const anyGaussian: fc.Arbitrary<Gaussian> = fc
  .tuple(fraction(9n, 6n), fc.oneof(fc.constant(Rational.zero), fraction(9n, 6n)))
  .map(([re, im]) => Gaussian.of(re, im));

/** Roots of one quadratic field only: forms over several are not promised to be compared exactly. */
const root = Form.call('sqrt', Form.number(2));

/** Atoms whose integer powers have one normal form. */
const anyAtom: fc.Arbitrary<Form> = fc.constantFrom(
  Form.symbol('a'),
  Form.symbol('b'),
  Form.symbol('c'),
  Form.pi,
  root,
  Form.call('exp', Form.symbol('a')),
);

/** One term: a non-zero coefficient and up to three atoms with powers from -2 to 2. */
export const anyMonomial: fc.Arbitrary<Form> = fc
  .tuple(
    anyGaussian.filter((g) => !g.isZero()),
    fc.array(fc.tuple(anyAtom, fc.integer({ min: -2, max: 2 })), { maxLength: 3 }),
  )
  .map(([coefficient, factors]) =>
    factors.reduce((product, [atom, power]) => product.mul(atom.pow(power)), Form.gaussian(coefficient)),
  );

/** A Laurent polynomial of up to four terms, zero included. */
export const anyForm: fc.Arbitrary<Form> = fc.array(anyMonomial, { maxLength: 4 }).map((terms) => Form.sum(terms));

/** A polynomial: no negative powers, so that any value may be put in. */
export const anyPolynomial: fc.Arbitrary<Form> = fc
  .array(
    fc
      .tuple(anyGaussian, fc.array(fc.constantFrom('a', 'b', 'c'), { maxLength: 3 }))
      .map(([coefficient, names]) =>
        names.reduce((product, name) => product.mul(Form.symbol(name)), Form.gaussian(coefficient)),
      ),
    { maxLength: 4 },
  )
  .map((terms) => Form.sum(terms));
