import { describe, expect, test } from 'vitest';
import { contour, unitarity } from '../../engine/theory/checks/r-charges';
import { says, theoryOf, verdict } from './theory-text';

const rows = (...lines: string[]) => ['matter G R', ...lines];

// D. L. Jafferis, arXiv:1012.3210: poles of s_b(iQ/2 (1 - R) - x) lie below the real line for 0 < R.
test('charged chirals outside 0 < R < 2 are named', () => {
  const at = (r: string) => says(contour, theoryOf(['gauge G = U(1)', ...rows(`chiral q 1 ${r}`, 'chiral p -1 1/2')]));
  expect(at('1/2')).toEqual([
    'holds: All charged chirals have $0<R<2$: no pole lies on the wrong side of the real contour.',
  ]);
  for (const r of ['0', '2', '5/2', '-1/3']) expect(at(r)[0]).toMatch(/^fails: \$R\(q\)=/);
  for (const row of ['chiral s 0 5/2', 'hyper h 1 1/2']) {
    expect(says(contour, theoryOf(['gauge G = U(1)', ...rows(row)]))).toEqual([]);
  }
});

// The bound R >= 1/2 and what happens below it: S. Safdi, I. Klebanov, J. Lee, arXiv:1212.4502.
describe('gauge-invariant chiral operators', () => {
  const low = (lines: string[], parameters: Record<string, string> = {}) =>
    unitarityOf(lines, parameters).flatMap((line) => /^fails: The chiral operator \$(.*?)\$ has/.exec(line)?.[1] ?? []);
  const unitarityOf = (lines: string[], parameters: Record<string, string> = {}) =>
    says(unitarity, theoryOf(lines, parameters));

  test.each<[string, string[], string[]]>([
    ['a free field', ['matter R', 'chiral x 1/3', 'chiral y 2/3'], ['x']],
    ['a meson', ['gauge G = U(1)', ...rows('chiral q 1 1/5', 'chiral p -1 1/5')], ['q\\,p']],
    [
      'charges that do not cancel',
      ['gauge G = U(1), level 2', ...rows('chiral q 1 1/7', 'chiral p -2 1/7')],
      ['q^{2}\\,p'],
    ],
    ['a monopole operator', ['gauge G = U(1)', ...rows('chiral q 1 4/5', 'chiral p -1 4/5')], ['V_{1}']],
    ['no meson of one doublet', ['gauge G = SU(2), level 1/2', ...rows('chiral q fund 1/8')], []],
    ['mesons of two doublets', ['gauge G = SU(2), level 5', ...rows('chiral q 2*fund 1/8')], ['q^{2}']],
    [
      'doublets that differ by flavour',
      ['gauge G = SU(2), level 5', 'flavor F = SU(2)', 'matter G F R', 'chiral q fund fund 1/8'],
      ['q^{2}'],
    ],
    ['traces of an adjoint', ['gauge G = SU(4), level 5', ...rows('chiral f adj 1/9')], ['f^{2}', 'f^{3}', 'f^{4}']],
    ['traces of an adjoint of SU(2)', ['gauge G = SU(2), level 5', ...rows('chiral f adj 1/9')], ['f^{2}']],
    ['the trace of the adjoint of U(2)', ['gauge G = U(2), level 5', ...rows('chiral f adj 1/3')], ['f']],
    ['a baryon', ['gauge G = SU(3), level 5', ...rows('chiral q 4*fund 1/7')], ['q^{3}']],
    ['a baryon of five quarks', ['gauge G = SU(5), level 5', ...rows('chiral q 6*fund 1/12')], ['q^{5}']],
    ['no baryon of too few', ['gauge G = SU(5), level 6', ...rows('chiral q 4*fund 1/12')], []],
    // Kutasov, Schwimmer, Seiberg, hep-th/9510222: q q (f q) of two flavours of SU(3).
    [
      'a baryon dressed with an adjoint',
      ['gauge G = SU(3), level 9', ...rows('chiral q 2*fund 1/9', 'chiral f adj 1/9')],
      ['f^{2}', 'f^{3}', 'q^{3}\\,f'],
    ],
    [
      'a baryon of one flavour takes the powers 0, 1 and 2',
      ['gauge G = SU(3), level 9', ...rows('chiral q fund 1/36', 'chiral f adj 1/9')],
      ['f^{2}', 'f^{3}', 'q^{3}\\,f^{3}'],
    ],
    // V of the flux (-1, 0) has the charges 0 and -1, which p makes up: R = (1 - 9/10)/2 + 1/5.
    [
      'a dressed monopole operator',
      [
        ...['gauge G = U(1), level 1/2', 'gauge H = U(1), level 7/2', 'mixed G H = -1'],
        ...['matter G H R', 'chiral q 1 0 9/10', 'chiral p 0 1 1/5'],
      ],
      ['V_{-1}\\,p'],
    ],
    ['an invariant of E6', ['gauge G = E6, level 20', ...rows('chiral q 27 1/7')], ['q^{3}']],
  ])('%s', (_name, lines, expected) => {
    expect(low(lines).sort()).toEqual([...expected].sort());
  });

  test('a meson that a singlet sets to zero does not count', () => {
    const lines = ['gauge G = U(1)', ...rows('chiral q 1 1/5', 'chiral p -1 1/5', 'chiral x 0 8/5')];
    expect(low(lines)).toEqual(['q\\,p']);
    expect(low([...lines, 'superpotential x q p'])).toEqual([]);
  });

  test('a singlet sets to zero one component of a meson in several flavours', () => {
    const lines = (cell: string) => [
      ...['gauge G = U(1)', 'flavor F = SU(2)', 'matter G F R', 'chiral q 1 fund 1/5', 'chiral p -1 fund 1/5'],
      ...[`chiral x 0 ${cell} 8/5`, 'superpotential x q p'],
    ];
    expect(low(lines('1'))).toEqual(['q\\,p']);
    expect(low(lines('adj+1'))).toEqual([]);
  });

  test('a relation among operators is left open', () => {
    const lines = [
      ...[
        'gauge G = U(1)',
        ...rows('chiral q 1 1/5', 'chiral p -1 1/5', 'chiral r 1 1/5', 'chiral s -1 1/5', 'chiral x 0 8/5'),
      ],
      'superpotential x q p + x r s',
    ];
    expect(low(lines)).toEqual(['q\\,s', 'p\\,r']);
    expect(verdict(unitarity, theoryOf(lines.slice(0, -1)))).toBe('fails');
  });

  test('one half itself is free', () => {
    expect(unitarityOf(['matter R', 'chiral x 1/2'])).toEqual([
      'holds: The chiral operator $x$ has $R=\\frac{1}{2}$, the bound itself: it is free.',
    ]);
  });

  test('the smallest is named where all are above, and what was searched', () => {
    expect(unitarityOf(['gauge G = U(1)', ...rows('chiral q 1 r', 'chiral p -1 r')], { r: '1/3' })[0]).toMatch(
      /^holds: .* the smallest \$R\(q\\,p\)=\\frac\{2\}\{3\}\$; searched: /,
    );
  });

  // A bare monopole operator carries gauge charge where the effective level does not vanish.
  test('charged bare monopole operators do not count', () => {
    const lines = ['gauge G = U(1), level 1', ...rows('chiral q 1 4/5', 'chiral p -1 4/5')];
    expect(low(lines)).toEqual([]);
  });
});
