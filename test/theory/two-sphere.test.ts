import { describe, expect, test } from 'vitest';
import { s2 } from '../../engine/spheres/s2';
import { superpotential } from '../../engine/theory/checks/superpotential';
import { thetaAngle } from '../../engine/theory/checks/theta-angle';
import { centralCharge, contourInTwo, fiRunning, twistedChirals } from '../../engine/theory/checks/two-dimensional';
import { consistencyRows } from './consistency-rows';
import { says, theoryOf, verdict } from './theory-text';

const theory = (lines: string[], parameters: Record<string, string> = {}) => theoryOf(lines, parameters, s2);

// Sums of weights by GAP: test/fixtures/lie/README.md; E. Witten, hep-th/9301042, for the meaning.
test.each(consistencyRows('2d-FI'))('U($row.N) with $row.chirals runs with $row.coefficient', ({ group, row }) => {
  const cells = (row.chirals ?? []).map((chiral) => {
    const [labels, power, count] = chiral as [number[], number, number];
    if (labels.length === 0) return `${count}*${power}`;
    return `${count}*(${(labels[0] as number) + power},${power})`;
  });
  const [sentence = ''] = says(
    fiRunning,
    theory([`gauge G = ${group}`, 'matter G R', ...cells.map((cell, k) => `chiral q${k} ${cell} 0`)]),
  );
  expect(sentence).toContain(`$c=${row.coefficient}$`);
  expect(sentence.includes('marginal')).toBe(row.calabiYau);
});

// The quintic: E. Witten, hep-th/9301042. c/3 is the complex dimension.
const quintic = (p: string, phi: string) => [
  ...['gauge G = U(1), fi xi, theta t', 'matter G R', `chiral phi 5*1 ${phi}`, `chiral P -5 ${p}`],
  'superpotential P phi^5',
];

describe('central charge', () => {
  test('the quintic threefold, whatever the mixing with the gauge group', () => {
    for (const [p, phi] of [
      ['2', '0'],
      ['0', '2/5'],
      ['2-5r', 'r'],
    ] as const) {
      const at = theory(quintic(p, phi), { r: '1/7' });
      expect(says(centralCharge, at)).toEqual(['holds: With these R-charges $c/3=\\sum\\dim R\\,(1-R)-\\dim G=3$.']);
      expect(verdict(superpotential, at)).toBe('holds');
    }
  });

  // U(2) with seven fundamentals and seven inverse determinants: 14 - 7 - 4 = 3 (K. Hori, D. Tong, hep-th/0609032).
  test('a complete intersection in a Grassmannian', () => {
    const lines = ['gauge G = U(2)', 'matter G R', 'chiral q 7*fund 0', 'chiral p 7*det^-1 2'];
    expect(says(centralCharge, theory(lines))[0]).toMatch(/=3\$\.$/);
  });

  test('negative values are refused, anomalous theories have none', () => {
    expect(verdict(centralCharge, theory(['gauge G = SU(2)', 'matter G R', 'chiral q fund 0']))).toBe('fails');
    expect(says(centralCharge, theory(['gauge G = U(1)', 'matter G R', 'chiral q 2*1 0']))).toEqual([]);
  });
});

// F. Benini, S. Cremonesi, arXiv:1206.2356: poles of Gamma(R/2 - i sigma) lie below the real line for R > 0.
test('poles and the contour', () => {
  const at = (r: string) => says(contourInTwo, theory(['gauge G = U(1)', 'matter G R', `chiral q 3*1 ${r}`]))[0];
  expect(at('1/3')).toMatch(/^holds: All charged chirals/);
  expect(at('0')).toMatch(/^holds: \$R\(q\)=0\$ lies at the border/);
  expect(at('-1/3')).toMatch(/^fails: \$R\(q\)=-\\frac\{1\}\{3\}\$ lies below/);
});

// Vector multiplets couple to chirals, twisted ones to twisted chirals: E. Witten, hep-th/9301042.
test('twisted chirals are neutral', () => {
  const at = (cell: string) =>
    verdict(twistedChirals, theory(['gauge G = U(1)', 'flavor A = U(1)', 'matter G A R', `twisted y ${cell} 1 0`]));
  expect([at('0'), at('1')]).toEqual(['holds', 'fails']);
});

// K. Hori, D. Tong, hep-th/0609032, section 4: theta of U(N) is shifted by (N - 1) pi.
test('W bosons shift theta', () => {
  const at = (group: string) => says(thetaAngle, theory([`gauge G = ${group}`]))[0];
  expect(at('U(2)')).toContain('(-1)^{\\operatorname{tr}n}$: they shift $\\theta$ by $\\pi$');
  expect(at('U(3)')).toContain('(-1)^{2\\operatorname{tr}n}$: they shift $\\theta$ by $2\\pi$, a whole number');
  expect([at('U(1)'), at('SU(2)')]).toEqual([undefined, undefined]);
});
