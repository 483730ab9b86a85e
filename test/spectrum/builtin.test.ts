// Degeneracies: the sources stand with each entry of the fixture. Torsion: Ray 1970; Weng and You 1996 (from memory).
// zeta(0): Cappelli and D'Appollonio 2000, hep-th/0005115; Giombi and Klebanov 2014, arXiv:1409.1937.
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { Form } from '../../engine/exact/form';
import { type BuiltinRequest, type BuiltinSpectrum, builtinSpectrum } from '../../engine/spectrum/builtin';
import { determinant } from '../../engine/spectrum/regularised';
import type { Prescription } from '../../engine/spectrum/rootless-sum';
import fixture from '../fixtures/spectra/builtin.json';
import { parseForm } from './parse-form';

function made(request: BuiltinRequest): BuiltinSpectrum {
  const found = builtinSpectrum(request);
  if (found === null) throw new Error('not offered');
  return found;
}

function requestFor(id: string): BuiltinRequest {
  const dimension = Number(id[1]);
  const q = Form.symbol('q');
  if (id.includes('monopole-scalar')) return { field: 'charged scalar', q, coupling: Form.zero };
  if (id.includes('monopole-spinor')) return { field: 'charged spinor', q };
  if (id.includes('dirac')) return { field: 'spinor', dimension, mass: Form.zero };
  const degree = /coexact-(\d)/.exec(id);
  if (degree) return { field: 'form', dimension, degree: Number(degree[1]) };
  return { field: 'scalar', dimension, coupling: id.includes('conformal') ? 'conformal' : Form.zero, complex: false };
}

const product = (texts: readonly string[]) => texts.map(parseForm).reduce((a, b) => a.mul(b));

describe('towers of the spheres', () => {
  test.each(fixture.spectra.map((entry) => [entry.id, entry] as const))('%s', (id, entry) => {
    const [tower] = made(requestFor(id)).spectrum.towers;
    if (!tower) throw new Error('no tower');
    const eigenvalue = tower.eigenvalue.map(({ form }) => form).reduce((a, b) => a.mul(b));
    expect(eigenvalue.key).toBe(product(entry.eigenvalue).key);
    const degeneracy = 'degeneracy' in entry ? entry.degeneracy : entry.degeneracyEachSign;
    expect(tower.degeneracy.key).toBe(parseForm(degeneracy ?? '').key);
  });

  test('on S^3 degeneracies are dimensions of the labels', () => {
    const requests: BuiltinRequest[] = [
      { field: 'scalar', dimension: 3, coupling: 'conformal', complex: true },
      { field: 'spinor', dimension: 3, mass: Form.zero },
      { field: 'form', dimension: 3, degree: 1 },
    ];
    for (const request of requests) {
      const { spectrum, labels } = made(request);
      const dimension = Form.sum(
        labels.map(({ left, right }) => left.scale(2).add(Form.one).mul(right.scale(2).add(Form.one))),
      );
      const total = Form.sum(spectrum.towers.map(({ degeneracy }) => degeneracy));
      expect(labels.length).toBeGreaterThan(0);
      expect(dimension.key).toBe(total.key);
    }
  });

  test('outside S^2 ... S^7 and for top forms there is nothing', () => {
    expect(builtinSpectrum({ field: 'scalar', dimension: 8, coupling: Form.zero, complex: false })).toBeNull();
    expect(builtinSpectrum({ field: 'form', dimension: 3, degree: 3 })).toBeNull();
  });
});

function logDeterminant(request: BuiltinRequest, prescription: Prescription) {
  const found = determinant(made(request).spectrum, prescription, new Map(), 30);
  if (found.kind !== 'value') throw new Error(found.remark.code);
  return found;
}

describe('determinants of the spheres', () => {
  test.each([
    [3, 2 * Math.PI ** 2],
    [5, Math.PI ** 3],
    [7, Math.PI ** 4 / 3],
  ])('the analytic torsion of S^%s is its volume', (dimension, volume) => {
    // log T = (1/2) sum_p (-1)^p log det(coexact p-forms); a boson stands for det^(-1/2).
    const logs = Array.from({ length: dimension }, (_, degree) => {
      const { log } = logDeterminant({ field: 'form', dimension, degree }, 'operator');
      return (degree % 2 === 0 ? -1 : 1) * numberFromFixed(log.re, log.bits);
    });
    expect(logs.reduce((a, b) => a + b)).toBeCloseTo(Math.log(volume), 12);
  });

  test.each([
    [2, '-2/3', '-1/3'],
    [3, '0', '0'],
    [4, '-1/90', '11/90'],
    [5, '0', '0'],
    [6, '1/756', '-191/3780'],
  ])('zeta(0) on S^%s: conformal scalar %s, square of the Dirac operator %s', (dimension, scalar, spinor) => {
    const boson = logDeterminant({ field: 'scalar', dimension, coupling: 'conformal', complex: false }, 'operator');
    expect(boson.exact.zeta0.scale(-2).key).toBe(scalar);
    // The square has half the zeta(0) of |D|, both signs together.
    const fermion = logDeterminant({ field: 'spinor', dimension, mass: Form.zero }, 'factors');
    expect(fermion.exact.zeta0.key).toBe(spinor);
  });

  test('a scalar with the conformal coupling written out is the conformal scalar', () => {
    const written = logDeterminant(
      { field: 'scalar', dimension: 4, coupling: Form.number(2), complex: false },
      'operator',
    );
    const named = logDeterminant({ field: 'scalar', dimension: 4, coupling: 'conformal', complex: false }, 'operator');
    expect(written.log.re).toBe(named.log.re);
  });
});
