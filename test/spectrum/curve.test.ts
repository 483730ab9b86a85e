// Zeros and poles of the double sine: Ruijsenaars 2000; values are compared with the precise tier.
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { isRemark } from '../../engine/spectrum/analyse';
import { logDeterminantCurve } from '../../engine/spectrum/curve';
import { determinant } from '../../engine/spectrum/regularised';
import { chiralModes } from '../../engine/spectrum/sphere-modes';
import type { Spectrum } from '../../engine/spectrum/tower';

const Delta = Form.symbol('Delta');
const spectrum = chiralModes(Delta, [Form.symbol('sigma')]);
const at = (sigma: Form) => new Map([['sigma', sigma]]);

function curve(xs: readonly number[], sigma: Form, towers: Spectrum = spectrum) {
  const found = logDeterminantCurve(towers, 'factors', 'Delta', Float64Array.from(xs), at(sigma));
  if (isRemark(found)) throw new Error(found.code);
  return found;
}

describe('a determinant along a line', () => {
  test('has the values of the precise tier', () => {
    const sigma = Form.ratio(3, 10);
    const eighths = [1, 3, 6, 9, 13];
    const { re, im } = curve(
      eighths.map((k) => k / 8),
      sigma,
    );
    eighths.forEach((k, i) => {
      const exact = determinant(spectrum, 'factors', at(sigma).set('Delta', Form.ratio(k, 8)), 20);
      if (exact.kind !== 'value') throw new Error(exact.remark.code);
      const { log } = exact;
      expect(re[i]).toBeCloseTo(numberFromFixed(log.re, log.bits), 12);
      const turns = ((im[i] as number) - numberFromFixed(log.im, log.bits)) / (2 * Math.PI);
      expect(turns - Math.round(turns)).toBeCloseTo(0, 12);
    });
  });

  test('marks zeros and poles, and has no phase there', () => {
    const { re, im } = curve([0, 2, 3], Form.zero);
    // s_1(i(1 - Delta)) has its first pole at Delta = 0 and zeros at Delta = 2, 3.
    expect([...re]).toEqual([Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY]);
    expect([...im]).toEqual([0, 0, 0]);
  });

  test('takes the running name from the line, whatever the notebook says', () => {
    const set: Spectrum = { ...spectrum, parameters: new Map([['Delta', Form.number(Rational.of(1, 9))]]) };
    expect(curve([0.4], Form.ratio(1, 5), set).re[0]).toBe(curve([0.4], Form.ratio(1, 5)).re[0]);
  });

  test('names without a value are asked for', () => {
    const found = logDeterminantCurve(spectrum, 'factors', 'Delta', Float64Array.of(1), new Map());
    expect(isRemark(found) && [found.code, found.data.names]).toEqual(['spectrum-names-unset', 'sigma']);
  });
});
