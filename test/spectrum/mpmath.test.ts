// Source: mpmath, continuation of zeta(s) at finite s from the coefficients; test/fixtures/spectra/generate.py.
import { describe, expect, test } from 'vitest';
import { determinant } from '../../engine/spectrum/regularised';
import fixture from '../fixtures/spectra/mpmath.json';
import { distanceFrom, spectrumOf } from './rows';

describe('determinants of further spectra', () => {
  const rows = fixture.spectra.map(
    (row) => [row.tower.eigenvalue.join(', '), row.tower.degeneracy, row.prescription, row] as const,
  );
  test.each(rows)('%s times %s, by %s', (_eigenvalue, _degeneracy, prescription, row) => {
    const { tower } = row;
    const found = determinant(spectrumOf([tower]), prescription === 'operator' ? 'operator' : 'factors', new Map(), 30);
    if (found.kind !== 'value') throw new Error(found.remark.code);
    // 30 digits are printed, values are below 200.
    expect(distanceFrom(found.log, row.value, 1)).toBeLessThan(3e-28);
    expect(found.crossCheck?.agreedDigits).toBe(30);
  });
});
