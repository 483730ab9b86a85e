import { expect, test } from 'vitest';
import type { Form } from '../../engine/exact/form';
import { evaluateCoefficient } from '../../engine/numeric/coefficient';
import { type InstantonData, nekrasovTerms } from '../../engine/spheres/nekrasov';
import { answer, failureOf } from '../requests/answers';
import { exact } from './evaluate';
import { reference, row } from './fixture';

/** Digits of a decimal text without sign, point and leading zeros. */
const digits = (text: string) => text.replace('-', '').replace('.', '').replace(/^0+/, '');

function value(request: string): readonly [string, string] {
  const result = answer(request);
  if (result.kind !== 'value') throw new Error(failureOf(result));
  return [result.value.re, result.value.im];
}

// Sources of the rows: test/fixtures/spheres/spheres.json.
test.each([
  ['upsilon-round', 'value upsilon(3/10, 1), 30 digits', 28],
  ['upsilon-root', 'value upsilon(3/10, sqrt(2)), 30 digits', 22],
  ['triple-sine-round', 'value triplesine(0.7 + 0.3i; 1, 1, 1), 34 digits', 30],
])('%s', (id, request, count) => {
  const wanted = row(id).value ?? ['', ''];
  value(request).forEach((found, k) => {
    expect(digits(found).slice(0, count)).toBe(wanted[k] === '0.0' ? '' : digits(wanted[k] ?? '').slice(0, count));
  });
});

// What the formulas leave out: the constants of zeta regularisation.
test('Upsilon(Q/2) and S_3 prime (0) in zeta regularisation, on round spheres', () => {
  const [gamma] = value('value barnesgamma(1; 1, 1), 30 digits');
  expect(Number(gamma) ** -2).toBeCloseTo(reference('upsilon-center').re, 14);
  // S_3(x + 1) = S_3(x)/S_2(x), S_2(x) = 2 pi x + ..: S_3'(0) = 2 pi S_3(1).
  const [sine] = value('value triplesine(1; 1, 1, 1), 30 digits');
  expect(2 * Math.PI * Number(sine)).toBeCloseTo(reference('s5-cartan').re, 13);
});

test('log G(1 + iy) G(1 - iy) at y = 40', () => {
  const result = answer('value log upsilon(1 + 40i, 1), 30 digits');
  if (result.kind !== 'value') throw new Error(failureOf(result));
  expect(digits(result.value.re).slice(0, 22)).toBe(digits((row('log-H').value ?? [''])[0]).slice(0, 22));
});

test('instantons in two directions whose product is not 1', () => {
  const at = (colours: readonly Form[], order: number) => {
    const [epsilon1, epsilon2] = [exact('3/5'), exact('7/4')];
    const nodes = [{ colours, fundamental: [], adjoint: [] }];
    const data: InstantonData = { nodes, bifundamental: [], epsilon1, epsilon2 };
    const found = evaluateCoefficient(nekrasovTerms(data, [[order]]) ?? [], () => null, 20);
    return found.kind === 'value' ? `${found.exact}` : found.kind;
  };
  expect(at([exact('1/9')], 2)).toBe(row('nekrasov-U1-2-general').exact);
  expect(at([exact('2/7'), exact('-2/7')], 1)).toBe(row('nekrasov-SU2-1-general').exact);
});
