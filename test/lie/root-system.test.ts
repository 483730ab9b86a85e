import { describe, expect, test } from 'vitest';
import { Rational } from '../../engine/exact/rational';
import { rootSystem, rootSystemSum } from '../../engine/lie/root-system';
import { allSimpleTypes, isSimpleType, typeName } from '../../engine/lie/simple-type';
import { scaledInnerProduct } from '../../engine/lie/weyl';
import { fixture, typeOf } from './fixture';

describe('the 32 simple types of rank up to 8', () => {
  test('are exactly those of the reference list', () => {
    expect(allSimpleTypes().map(typeName).sort()).toEqual(fixture.groups.map((row) => `${row.type}${row.rank}`).sort());
    expect(isSimpleType({ series: 'D', rank: 3 })).toBe(false);
    expect(isSimpleType({ series: 'A', rank: 9 })).toBe(false);
  });

  test.each(fixture.groups)('$type $rank: Cartan matrix, roots, numbers', (row) => {
    const system = rootSystem(typeOf(row));
    expect(system.cartan).toEqual(row.cartan);
    expect(system.scaledHalfNorms.map((norm) => Rational.of(norm, system.scale).toString())).toEqual(row.halfRootNorms);
    expect(system.highestRoot).toEqual(row.highestRoot);
    expect(system.marks).toEqual(row.marks);
    expect(system.coxeter).toBe(row.coxeter);
    expect(system.dualCoxeter).toBe(row.dualCoxeter);
    expect(system.weylOrder).toBe(BigInt(row.weylOrder));
    expect(system.exponents).toEqual(row.exponents);
    expect(system.detCartan).toBe(row.detCartan);
    expect(system.positiveRoots).toHaveLength(row.positiveRoots);
    expect(system.dimension).toBe(row.dim);
    expect(system.centre.map((c) => [c.modulus, c.coefficients])).toEqual(row.centreClass);
  });

  // Freudenthal, de Vries, Linear Lie Groups (1969): (rho, rho) = h_dual dim G / 12.
  test.each(fixture.groups)('$type $rank: strange formula', (row) => {
    const system = rootSystem(typeOf(row));
    const norm = Rational.of(scaledInnerProduct(system, system.rho, system.rho), system.gramDenominator);
    expect(norm.toString()).toBe(Rational.of(row.dualCoxeter * row.dim, 12).toString());
  });

  test.each(fixture.groups)('$type $rank: centre characters vanish on roots', (row) => {
    const system = rootSystem(typeOf(row));
    for (const root of system.positiveRoots) {
      for (const { modulus, coefficients } of system.centre) {
        const value = coefficients.reduce((sum, c, i) => sum + c * (root.labels[i] as number), 0);
        expect(Math.abs(value % modulus)).toBe(0);
      }
    }
  });
});

test('a sum of root systems is block diagonal and shares one scale', () => {
  const system = rootSystemSum([
    { series: 'G', rank: 2 },
    { series: 'B', rank: 2 },
  ]);
  expect(system.positiveRoots).toHaveLength(10);
  expect(system.weylOrder).toBe(96n);
  expect(system.scale).toBe(6);
  expect(system.scaledHalfNorms).toEqual([2, 6, 6, 3]);
});
