import { expect, test } from 'vitest';
import { row } from '../spheres/fixture';
import { answer, failureOf } from './answers';

const theory = (...lines: string[]) => ['theory t', ...lines.map((line) => `  ${line}`), ''];

// The Virasoro algebra gives the value: test/fixtures/spheres/spheres.py.
test('an instanton coefficient to 40 digits, exactly, and by other terms', () => {
  const result = answer(
    ...theory('sphere S4, b = 3/5', 'gauge G = SU(2)'),
    'value instanton2 of t at sigma = 2i/7, 40 digits',
  );
  if (result.kind !== 'value') throw new Error(failureOf(result));
  const [numerator, denominator] = (row('nekrasov-SU2-2').exact ?? '').split('/').map(BigInt) as [bigint, bigint];
  expect(result.notes[0]).toBe(`Exactly $\\frac{${numerator}}{${denominator}}$.`);
  const digits = `${(numerator * 10n ** 45n) / denominator}`;
  expect(result.value.re.replace(/^0\.0*/, '').slice(0, 39)).toBe(digits.slice(0, 39));
  expect(result.value.im).toBe('0');
  expect(result.crossCheck).toEqual({ route: 'the sum with b and 1/b exchanged', agrees: '40 digits' });
});

// S^3 and the others have no such series; orders run from 1.
test('what cannot be had is said', () => {
  const at = (request: string, lines: string[] = theory('sphere S4', 'gauge G = SU(2)')) =>
    failureOf(answer(...lines, request));
  expect(at('value instanton1 of t')).toBe('Without a value: sigma. Add `at sigma = 0.3`.');
  expect(at('value instanton1 of t at sigma = i')).toBe(
    'The point is a pole of this coefficient. Move it off the pole.',
  );
  expect(at('value log instanton1 of t at sigma = 1')).toBe('A coefficient is given by itself; leave out `log`.');
  expect(at('value instanton0 of t at sigma = 1')).toContain('`instanton0` is no quantity of `t`; there are');
  expect(at('plot instanton1 of t over sigma = 0 .. 1')).toContain('is a coefficient, which has no curve here');
  const three = theory('sphere S3', 'gauge G = SU(2)');
  expect(at('value instanton1 of t at sigma = 1', three)).toContain('`instanton1` is no quantity of `t`');
  expect(at('value instanton60 of t at sigma = 1')).toContain('too many Young diagrams with 60 boxes');
  expect(at('value instanton(1, 2) of t at sigma = 1')).toBe(
    '`instanton` takes one order for each gauge group, here 1 (G); 2 are given.',
  );
  expect(at('value vector(1) of t at sigma = 1')).toContain('`vector(1)` is no quantity of `t`; there are');
  expect(at('plot instanton(1) of t over sigma = 0 .. 1')).toContain('`instanton(1)` is a coefficient');
});

const QUIVER = [
  ...['sphere S4, b = 3/4', 'gauge G = SU(2)', 'gauge H = SU(2), coulomb tau', 'flavor A = U(1)'],
  ...['matter G H A', 'hyper y fund fund 1'],
];

// A contour integral gives the value: test/fixtures/spheres/quivers.py.
test('coefficients of a quiver by the order of each group, and of all together', () => {
  const at = 'at sigma = -2i/7, tau = -i/5, m = -i/3, 30 digits';
  const value = (what: string) => {
    const result = answer(...theory(...QUIVER), `value ${what} of t ${at}`);
    if (result.kind !== 'value') throw new Error(failureOf(result));
    return result;
  };
  const both = value('instanton(1, 1)');
  const [numerator, denominator] = (row('quiver-SU2-SU2-11').exact ?? '').split('/');
  expect(both.notes[0]).toBe(`Exactly $\\frac{${numerator}}{${denominator}}$.`);
  expect(both.crossCheck?.agrees).toBe('30 digits');
  expect(both.notes.join(' ')).toContain('Coefficient of $q_1^{k_1}q_2^{k_2}\\cdots$ at one pole');
  expect(both.notes.join(' ')).toContain('A bifundamental of mass $m$ gives');
  expect(both.notes.join(' ')).toContain('traceless $a$ for G, H: the factor of the $U(1)$ is not divided out');
  const parts = ['instanton(2, 0)', 'instanton(1, 1)', 'instanton(0, 2)'].map((what) => Number(value(what).value.re));
  const whole = Number(value('instanton2').value.re);
  expect(Math.abs(whole - parts.reduce((sum, part) => sum + part, 0))).toBeLessThan(1e-13 * Math.abs(whole));
});

// L. F. Alday, D. Gaiotto, Y. Tachikawa, arXiv:0906.3219: test/spheres/quiver-instantons.test.ts works it out.
test('the factor of the U(1) is named where it is known', () => {
  const notes = (group: string, flavours: number) =>
    answer(
      ...theory(`gauge G = ${group}`, `flavor F = U(${flavours})`, 'matter G F', 'hyper q fund fund', 'sphere S4'),
      `value instanton1 of t at ${group.startsWith('U(') ? 'sigma1 = 1, sigma2 = 2' : 'sigma = 1'}`,
    ).notes.join(' ');
  expect(notes('SU(2)', 4)).toContain('it is $(1-q)^{(M_1+M_2)(M_3+M_4)/2}$');
  expect(notes('SU(2)', 3)).not.toContain('(1-q)');
  expect(notes('SU(2)', 3)).toContain('is not divided out');
  expect(notes('U(2)', 4)).not.toContain('divided out');
  const star = ['sphere S4', 'gauge G = SU(2)', 'flavor A = U(1)', 'matter G A', 'hyper a adj 1'];
  const adjoint = answer(...theory(...star), 'value instanton1 of t at sigma = 1').notes.join(' ');
  expect(adjoint).toContain('it is $\\prod_{n\\ge1}(1-q^n)^{2M(Q-M)-1}$');
});
