// Sources stand with each row of the fixture; generate.py recomputes the one-index determinants with mpmath.
import { describe, expect, test } from 'vitest';
import { formDouble } from '../../engine/arithmetic/form-double';
import { Form } from '../../engine/exact/form';
import { isRemark } from '../../engine/spectrum/analyse';
import { towerAnomaly } from '../../engine/spectrum/anomaly';
import { closedValue } from '../../engine/spectrum/closed-value';
import { logDeterminantCurve, pairingDouble } from '../../engine/spectrum/curve';
import { pairTowers } from '../../engine/spectrum/pairing';
import { partialProducts } from '../../engine/spectrum/partial-product';
import { noValues, prepare, substituteTowers } from '../../engine/spectrum/prepare';
import { recognise } from '../../engine/spectrum/recognise';
import { determinant, type SpectrumValue } from '../../engine/spectrum/regularised';
import { zeroModes } from '../../engine/spectrum/zero-modes';
import { distanceFrom, type Row, rows, spectrumOf, valuesOf } from './rows';

const DIGITS = 40;
/** The rows are printed with 40 digits. */
const PRINTED = 3e-39;

function valueOfRow(row: Row): SpectrumValue {
  const operator = row.prescription === 'operator' || row.quantity === 'anomaly';
  const found = determinant(spectrumOf(row.towers), operator ? 'operator' : 'factors', valuesOf(row), DIGITS);
  if (found.kind !== 'value') throw new Error(`${row.id} is refused: ${found.remark.code}`);
  return found;
}

const negative = ({ re, im, bits, error }: SpectrumValue['log']) => ({ re: -re, im: -im, bits, error });
const numbers = rows.filter(({ value }) => value !== null);
const logarithms = numbers.filter(({ quantity }) => ['logdet', 'logZ', 'F'].includes(quantity));
const named = (list: readonly Row[]) => list.map((row) => [row.id, row] as const);

describe('determinants to 40 digits', () => {
  test.each(named(logarithms))('%s', (_id, row) => {
    const found = valueOfRow(row);
    const sign = row.quantity === 'F';
    const log = sign ? negative(found.log) : found.log;
    // Half-integer powers leave a sign open, so imaginary parts are compared modulo pi.
    expect(distanceFrom(log, row.value ?? {}, 2)).toBeLessThan(PRINTED);
    if (row.scale) expect(distanceFrom(sign ? negative(found.scale) : found.scale, row.scale, 0)).toBeLessThan(PRINTED);
    if (row.operatorMinusFactor) {
      const anomaly = sign ? negative(found.anomaly) : found.anomaly;
      expect(distanceFrom(anomaly, row.operatorMinusFactor, 0)).toBeLessThan(PRINTED);
    }
    expect(found.crossCheck?.agreedDigits).toBe(DIGITS);
  });

  test.each(named(numbers.filter(({ quantity }) => quantity === 'zeta0')))('%s', (_id, row) => {
    expect(distanceFrom(valueOfRow(row).zeta0, row.value ?? {}, 0)).toBeLessThan(PRINTED);
  });

  test.each(named(numbers.filter((r) => r.quantity === 'anomaly' && r.prescription === 'operator-minus-factor')))(
    '%s',
    (_id, row) => {
      expect(distanceFrom(valueOfRow(row).anomaly, row.value ?? {}, 0)).toBeLessThan(PRINTED);
    },
  );

  test.each(named(numbers.filter(({ prescription }) => prescription === 'operator-minus-grouped')))(
    '%s',
    (_id, row) => {
      const prepared = prepare(substituteTowers(spectrumOf(row.towers), valuesOf(row), false));
      if (isRemark(prepared)) throw new Error(prepared.code);
      const [tower] = prepared.towers;
      if (!tower) throw new Error('no tower');
      // Each polynomial by itself, with the same degeneracy.
      const parts = tower.factors.map((factor) => towerAnomaly({ ...tower, factors: [factor], order: 2 }));
      const value = towerAnomaly(tower).sub(Form.sum(parts)).toRational();
      expect(value?.toNumber()).toBeCloseTo(Number(row.value?.re), 13);
      expect(parts.length).toBe(2);
    },
  );

  test.each(named(numbers.filter(({ quantity }) => quantity === 'partial')))('%s', (_id, row) => {
    const prescription = row.prescription === 'operator' ? 'operator' : 'factors';
    const found = partialProducts(spectrumOf(row.towers), prescription, valuesOf(row), [row.cutoff ?? 0], DIGITS);
    if (isRemark(found)) throw new Error(found.code);
    const [product] = found;
    expect(product && distanceFrom(product.regulated, row.value ?? {}, 0)).toBeLessThan(PRINTED);
  });
});

describe('determinants in doubles', () => {
  test.each(named(logarithms))('%s', (_id, row) => {
    const prescription = row.prescription === 'operator' ? 'operator' : 'factors';
    const curve = logDeterminantCurve(spectrumOf(row.towers), prescription, '@x', Float64Array.of(0), valuesOf(row));
    if (isRemark(curve)) throw new Error(curve.code);
    const sign = row.quantity === 'F' ? -1 : 1;
    expect(sign * (curve.re[0] ?? Number.NaN)).toBeCloseTo(Number(row.value?.re), 11);
  });
});

describe('closed forms', () => {
  // The word of the row, and what stands in the form with symbols for the parameters.
  const expected: Record<string, RegExp> = {
    Gamma: /gamma|2\^1\/2/,
    sinh: /hyperbolicSine/,
    cosh: /hyperbolicCosine/,
    Glaisher: /zetaPrime/,
    zeta: /zeta/,
    Clausen: /clausen/,
    BarnesG: /barnesG|overRoots/,
    polylog: /polylogarithm/,
    S2: /doubleSine|multipleSine|^.*w2\^1\/2/,
    S3: /multipleSine|zeta/,
    s_b: /doubleSine/,
    Upsilon: /upsilon/,
    Gamma2: /multipleGamma/,
    elementary: /^(?!.*(?:gamma|Sine|barnes|multiple))/,
    trivial: /^$/,
  };
  test.each(named(logarithms))('%s', (_id, row) => {
    const values = valuesOf(row);
    const lookup = (name: string) => formDouble(values.get(name) ?? Form.zero, () => null);
    for (const substituted of [noValues, values]) {
      const prepared = prepare(substituteTowers(spectrumOf(row.towers), substituted, false));
      if (isRemark(prepared)) throw new Error(prepared.code);
      const closed = recognise(prepared.pairing);
      if (closed === null) throw new Error('no closed form');
      const series = pairingDouble(prepared.pairing, lookup);
      const value = closedValue(closed, lookup);
      expect(value.re).toBeCloseTo(series.re, 10);
      const turns = (value.im - series.im) / Math.PI;
      expect(turns - Math.round(2 * turns) / 2).toBeCloseTo(0, 10);
      const text = [
        ...closed.numbers.map(({ base, power }) => `${base.key}^${power.key}`),
        ...closed.functions.map(({ of }) => of.name),
        ...closed.exponent.map(({ of }) => of.name),
      ].join(' ');
      if (substituted === noValues && row.recognise) expect(text).toMatch(expected[row.recognise] ?? /^$/);
    }
  });
});

describe('refusals and warnings', () => {
  // The condition of the row, and the code it has here.
  const codes: Record<string, readonly string[]> = {
    'diag-zero-mode': ['determinant-zero'],
    'diag-chiral-zero': ['determinant-zero'],
    'diag-raw-zero-cancels': ['determinant-infinite'],
    'diag-no-half-plane': ['tower-half-plane'],
    'diag-all-negative': ['negative-axis'],
    'diag-real-field-negative': ['square-root-sign'],
    'diag-mixed-periods-operator': ['operator-periods'],
    'diag-mixed-order-operator': ['mixed-order'],
  };
  test.each(named(rows.filter(({ quantity }) => quantity === 'diagnosis')))('%s', (id, row) => {
    const prescription = row.prescription === 'operator' ? 'operator' : 'factors';
    const found = determinant(spectrumOf(row.towers), prescription, valuesOf(row), 20);
    const all = found.kind === 'refusal' ? [found.remark.code] : found.remarks.map(({ code }) => code);
    expect(codes[id]?.length).toBeGreaterThan(0);
    expect(all).toEqual(expect.arrayContaining([...(codes[id] ?? [])]));
  });

  test('orders of zeros and poles are net', () => {
    const order = (id: string) => {
      const row = rows.find((r) => r.id === id) as Row;
      const prepared = prepare(substituteTowers(spectrumOf(row.towers), valuesOf(row), false));
      if (isRemark(prepared)) throw new Error(prepared.code);
      return zeroModes(prepared.pairing).map((mode) => mode.order.key);
    };
    expect(order('diag-zero-mode')).toEqual(['1']);
    expect(order('diag-raw-zero-cancels')).toEqual(['-2']);
  });
});

describe('pairing', () => {
  test.each(named(rows.filter((row) => row.reduced !== undefined)))('%s leaves the reduced towers', (_id, row) => {
    const [raw, reduced] = [row.towers, row.reduced ?? []].map((towers) =>
      prepare(substituteTowers(spectrumOf(towers), row.id.endsWith('components') ? valuesOf(row) : noValues, false)),
    );
    if (!raw || !reduced || isRemark(raw) || isRemark(reduced)) throw new Error('refused');
    const left = (prepared: typeof raw) =>
      pairTowers(prepared.towers)
        .classes.filter((found) => found.left.length > 0)
        .map(({ polynomial, left: stretches }) => [
          polynomial.map((c) => c.key),
          stretches.map(({ from, to, multiplicity }) => [from, to, multiplicity.map((c) => c.key)]),
        ]);
    expect(left(raw)).toHaveLength(reduced.pairing.classes.length);
    expect(left(raw)).toEqual(expect.arrayContaining(left(reduced)));
  });
});
