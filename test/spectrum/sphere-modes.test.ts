// Kapustin, Willett, Yaakov 2009, arXiv:0909.4559; Jafferis 2010, arXiv:1012.3210: the one-loop factors on S^3.
import { describe, expect, test } from 'vitest';
import { rescaleBall } from '../../engine/arithmetic/ball';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { functions } from '../../engine/functions/table';
import { isRemark } from '../../engine/spectrum/analyse';
import { prepare } from '../../engine/spectrum/prepare';
import { recognise } from '../../engine/spectrum/recognise';
import { determinant } from '../../engine/spectrum/regularised';
import { chiralModes, vectorModes } from '../../engine/spectrum/sphere-modes';
import type { Spectrum } from '../../engine/spectrum/tower';

const number = (value: number, over = 1) => Form.ratio(value, over);

function closed(spectrum: Spectrum) {
  const prepared = prepare(spectrum.towers);
  if (isRemark(prepared)) throw new Error(prepared.code);
  const form = recognise(prepared.pairing);
  if (form === null) throw new Error('no closed form');
  return form;
}

describe('chiral multiplets on the round sphere', () => {
  const sigma = [Form.symbol('sigma1'), Form.symbol('sigma2')];
  const weights = [...sigma, (sigma[0] as Form).sub(sigma[1] as Form)].map((w) => w.add(Form.symbol('m')));

  test('every weight leaves one double sine s_1(i(1 - Delta) - w.sigma - m)', () => {
    const { functions: left, numbers, exponent } = closed(chiralModes(Form.symbol('Delta'), weights));
    expect([numbers, exponent]).toEqual([[], []]);
    const expected = weights.map((w) => Form.i.mul(Form.one.sub(Form.symbol('Delta'))).sub(w).key);
    expect(left.map(({ of, power }) => [of.name, of.argument.key, power.key]).sort()).toEqual(
      expected.map((key) => ['doubleSine', key, '1']).sort(),
    );
  });

  test('the value is that of the double sine at b = 1, to 40 digits', () => {
    const charge = number(7, 10);
    const weight = number(3, 10);
    const found = determinant(chiralModes(charge, [weight]), 'factors', new Map(), 40);
    if (found.kind !== 'value') throw new Error(found.remark.code);
    const { bits } = found.log;
    const argument = formFixed(Form.i.mul(Form.one.sub(charge)).sub(weight), bits + 32);
    const one = {
      square: Rational.one,
      value: (n: number) => ({ re: 1n << BigInt(n), im: 0n }),
      approx: { re: 1, im: 0 },
    };
    const exact = argument && functions.doubleSine.precise(argument, [one], bits + 32);
    if (exact?.kind !== 'value') throw new Error('no value');
    const sine = rescaleBall({ re: exact.re, im: exact.im, bits: bits + 32, error: exact.error }, bits);
    const turns = numberFromFixed(sine.im - found.log.im, bits) / (2 * Math.PI);
    expect(Math.abs(numberFromFixed(sine.re - found.log.re, bits))).toBeLessThan(1e-40);
    expect(Math.abs(turns - Math.round(turns))).toBeLessThan(1e-40);
  });
});

test('vector multiplets leave (2 sinh(pi x)/x)^2 for each pair of roots', () => {
  const roots = [Form.symbol('x'), Form.symbol('y')];
  const { functions: left, numbers } = closed(vectorModes(roots));
  expect(left.map(({ of, power }) => [of.name, of.argument.key, power.key])).toEqual([
    ['hyperbolicSine', '1*x', '2'],
    ['hyperbolicSine', '1*y', '2'],
  ]);
  expect(numbers.map(({ base, power }) => [base.key, power.key])).toEqual([
    ['1*x', '-2'],
    ['1*y', '-2'],
  ]);
});

test('a vector multiplet is a pair of adjoint chirals of R-charge 2, up to the Vandermonde factor', () => {
  const x = number(2, 5);
  const vector = determinant(vectorModes([x]), 'factors', new Map(), 30);
  const chirals = determinant(chiralModes(Form.number(2), [x, x.neg()]), 'factors', new Map(), 30);
  if (vector.kind !== 'value' || chirals.kind !== 'value') throw new Error('refused');
  const difference = numberFromFixed(chirals.log.re - vector.log.re, vector.log.bits);
  expect(difference).toBeCloseTo(2 * Math.log(0.4), 14);
});
