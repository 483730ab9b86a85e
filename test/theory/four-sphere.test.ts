import { describe, expect, test } from 'vitest';
import { s4 } from '../../engine/spheres/s4';
import { betaFunction } from '../../engine/theory/checks/beta-function';
import { conformalAnomaly } from '../../engine/theory/checks/conformal-anomaly';
import { globalAnomaly } from '../../engine/theory/checks/global-anomaly';
import { consistencyRows } from './consistency-rows';
import { says, theoryOf, verdict } from './theory-text';

const theory = (...lines: string[]) => theoryOf(lines, {}, s4);

// Indices summed over weights with GAP: test/fixtures/lie/README.md. The conformal ones are on the list of L. Bhardwaj,
// Y. Tachikawa, arXiv:1309.5160.
describe('N = 2 theories', () => {
  test.each(consistencyRows('4d-N2'))('$group with $row.hypers and $row.halfHypers', ({ group, row }) => {
    const cells = (counts: [number[], number][] = []) => counts.map(([labels, count]) => `${count}*[${labels.join()}]`);
    const lines = [
      ...[`gauge G = ${group}`, 'matter G'],
      ...cells(row.hypers).map((cell, k) => `hyper q${k} ${cell}`),
      ...cells(row.halfHypers).map((cell, k) => `halfhyper h${k} ${cell}`),
    ];
    const b = row.b ?? Number.NaN;
    expect(verdict(betaFunction, theory(...lines))).toBe(b >= 0 ? 'holds' : 'fails');
    const [sentence = ''] = says(betaFunction, theory(...lines));
    const printed = Number.isInteger(b) ? `=${b}$:` : `=\\frac{${2 * b}}{2}$:`;
    expect(sentence).toContain(printed);
    expect(sentence.includes('conformal')).toBe(row.conformal);
    const anomaly = verdict(globalAnomaly, theory(...lines));
    expect(anomaly === 'fails').toBe(row.wittenAnomaly);
  });
});

test('the coupling decides where the beta function vanishes', () => {
  const lines = (options: string) => [`gauge G = SU(2)${options}`, 'matter G', 'hyper q 4*fund'];
  expect(says(betaFunction, theory(...lines('')))[0]).toMatch(/^holds: .*=4-4=0\$: conformal; .* none is written\.$/);
  expect(says(betaFunction, theory(...lines(', coupling g')))[0]).toMatch(/Gaussian of the coupling makes/);
});

// V. Pestun, arXiv:0712.2824: N = 4 is the theory with an adjoint hyper.
test('N = 4 is conformal', () => {
  expect(says(betaFunction, theory('supersymmetry 4', 'gauge G = E7', 'matter G'))[0]).toMatch(/=36-36=0\$: conformal/);
  expect(says(betaFunction, theory('gauge G = E7', 'matter G', 'hyper a adj'))[0]).toMatch(/=36-36=0\$: conformal/);
});

// b of U(1) is minus the sum of q^2; the fundamental of U(2) has charge 1/2 under the U(1) of unit trace.
test('a U(1) is never asymptotically free', () => {
  const one = theory('gauge G = U(1)', 'flavor F = SU(3)', 'matter G F', 'hyper q 2 fund');
  expect(says(betaFunction, one)).toEqual([
    'fails: $G=\\mathrm{U}(1)$ has $b=-\\sum q^2=-12$: its coupling grows with the energy, and the integral diverges.',
  ]);
  const two = says(betaFunction, theory('gauge G = U(2)', 'matter G', 'hyper q 4*fund'));
  expect(two[0]).toMatch(/^holds: The simple part of/);
  expect(two[1]).toMatch(/^fails: The \$\\mathrm\{U\}\(1\)\$ of .*=-2\$/);
  expect(verdict(betaFunction, theory('gauge G = U(1)', 'matter G'))).toBe('holds');
});

// E. Witten, Phys. Lett. B 117 (1982) 324: an odd number of doublets; bifundamental half-hypers count the other group.
describe('global anomaly', () => {
  test.each([
    ['USp(4)', 'fund', 'fails'],
    ['USp(4)', '3*fund', 'fails'],
    ['USp(4)', '2*fund', 'holds'],
    ['USp(6)', 'alt3', 'fails'],
    ['SU(2)', '[3]', 'holds'],
    ['Spin(5)', 'spinor', 'fails'],
    ['Spin(3)', '[1]', 'fails'],
  ])('%s with a half-hyper in %s', (group, cell, expected) => {
    expect(verdict(globalAnomaly, theory(`gauge G = ${group}`, 'matter G', `halfhyper h ${cell}`))).toBe(expected);
  });

  test('other groups have none', () => {
    expect(says(globalAnomaly, theory('gauge G = SU(6)', 'matter G', 'halfhyper h alt3'))).toEqual([]);
  });

  test('USp(4) times SO(7): seven half-hypers, USp(4) times SO(8): eight', () => {
    const at = (n: number) =>
      verdict(
        globalAnomaly,
        theory('gauge G = USp(4)', `flavor F = SO(${n})`, 'matter G F', 'halfhyper h fund vector'),
      );
    expect([at(7), at(8)]).toEqual(['fails', 'holds']);
  });
});

// D. Anselmi, D. Z. Freedman, M. T. Grisaru, A. A. Johansen, hep-th/9708042: (a, c) = (5/24, 1/6) of a vector multiplet,
// (1/24, 1/12) of a hyper; N = 4 has a = c = dim G/4; SU(2) with four flavours (23/24, 7/6).
describe('conformal anomalies', () => {
  test.each([
    [['matter', 'hyper q'], '\\frac{1}{24}', '\\frac{1}{12}'],
    [['gauge G = U(1)'], '\\frac{5}{24}', '\\frac{1}{6}'],
    [['supersymmetry 4', 'gauge G = SU(3)'], '2', '2'],
    [['gauge G = SU(3)', 'matter G', 'hyper a adj'], '2', '2'],
    [['gauge G = SU(2)', 'matter G', 'hyper q 4*fund'], '\\frac{23}{24}', '\\frac{7}{6}'],
    [
      ['gauge G = SU(2)', 'flavor F = SO(8)', 'matter G F', 'halfhyper q fund vector'],
      '\\frac{23}{24}',
      '\\frac{7}{6}',
    ],
  ])('%j', (lines, a, c) => {
    expect(says(conformalAnomaly, theory(...lines))[0]).toContain(`$a=${a}$ and $c=${c}$`);
  });

  test('running theories have none', () => {
    expect(says(conformalAnomaly, theory('gauge G = SU(2)', 'matter G', 'hyper q 3*fund'))).toEqual([]);
    expect(says(conformalAnomaly, theory('gauge G = U(1)', 'matter G', 'hyper q 1'))).toEqual([]);
  });
});
