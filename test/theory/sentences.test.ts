import katex from 'katex';
import { describe, expect, test } from 'vitest';
import { printer } from '../../engine/latex/product';
import { s2 } from '../../engine/spheres/s2';
import { s3 } from '../../engine/spheres/s3';
import { s4 } from '../../engine/spheres/s4';
import { s5 } from '../../engine/spheres/s5';
import type { Condition } from '../../engine/theory/checks/condition';
import { fiveSphereConditions } from '../../engine/theory/checks/five-sphere';
import { fourSphereConditions } from '../../engine/theory/checks/four-sphere';
import { threeSphereConditions } from '../../engine/theory/checks/three-sphere';
import { twoSphereConditions } from '../../engine/theory/checks/two-sphere';
import type { SphereRules } from '../../engine/theory/rules';
import { theoryOf } from './theory-text';

// KaTeX (npm) is the judge of what typesets; the rest are rules of this project.

const spheres: [string, SphereRules, readonly Condition[], string[][]][] = [
  [
    'S2',
    s2,
    twoSphereConditions,
    [
      ['gauge G = U(1)', 'matter G R', 'chiral q 1/2 -1/2', 'twisted y 1 0'],
      ['gauge G = U(2)', 'matter G R', 'chiral q 2*fund 0', 'chiral p 2*anti 0.123', 'superpotential q p'],
      ['gauge G = U(2)', 'matter G R', 'chiral q fund 1/3', 'twisted y 1 0'],
      ['gauge G = SU(2)', 'matter G R', 'chiral q fund 0'],
    ],
  ],
  [
    'S3',
    s3,
    threeSphereConditions,
    [
      [
        ...['sphere S3, b = 5/4', 'gauge G = U(2), level 1, abelian 2, fi i/9', 'gauge H = Spin(4), level 1'],
        ...['gauge K = U(1), level 1/2', 'flavor A = U(1)', 'mixed G K = 1', 'matter G H K A R'],
        ...['chiral q fund vector 1 1 1/5', 'chiral p anti vector -1 1/2 0.123', 'chiral d det 1 1/2 0 5/2'],
        ...['halfhyper h 1 [1,0] 0 0 1/2', 'chiral f adj 1 0 -2 2/5', 'superpotential f q p + d^2 p'],
      ],
      ['gauge G = SU(3), level 1', 'matter G R', 'chiral s 1 1/3'],
      ['gauge G = SU(3), level 4', 'matter G R', 'chiral s 1 1/2'],
      ['gauge G = U(1), level 1', 'matter G R', 'chiral q 2*1 13/10'],
      ['supersymmetry 4', 'gauge G = U(2)', 'matter G R', 'hyper q 3*fund 1/2'],
      ['supersymmetry 4', 'gauge G = U(2)', 'matter G R', 'hyper q 2*fund 1/2'],
    ],
  ],
  [
    'S4',
    s4,
    fourSphereConditions,
    [
      [
        'gauge G = USp(4)',
        'gauge H = U(2)',
        'gauge K = Spin(4)',
        'matter G H K',
        'halfhyper h fund 1 1',
        'hyper q fund fund [1,0]',
      ],
      [
        'gauge G = U(1)',
        'gauge H = SU(2), coupling g',
        'gauge K = SO(8)',
        'matter G H K',
        'hyper q 1/2 1 1',
        'hyper p 0 4*fund 1',
        'halfhyper h 0 1 vector',
      ],
      ['gauge G = SU(2), coupling g', 'matter G', 'hyper q 4*fund'],
    ],
  ],
  [
    'S5',
    s5,
    fiveSphereConditions,
    [
      ['gauge G = SU(3), level 1', 'matter G', 'hyper q 3*fund'],
      ['sphere S5, w1 = 2', 'gauge G = SU(3), level 19/2', 'matter G'],
      ['sphere S5, w1 = 2', 'gauge G = USp(4), level 1', 'matter G', 'halfhyper h fund'],
      ['gauge G = U(1)', 'matter G', 'hyper q 1/2'],
      ['gauge G = SO(8)', 'matter G', 'halfhyper h vector'],
      ['gauge G = SU(2)', 'matter G', 'hyper q 8*fund'],
      ['gauge G = SU(2), coupling g', 'matter G', 'hyper q 8*fund'],
    ],
  ],
];

describe.each(spheres)('%s', (_name, rules, conditions, theories) => {
  const findings = theories.flatMap((lines) => {
    const theory = theoryOf(lines, {}, rules);
    return conditions.flatMap(({ id, examine }) => examine(theory, printer).map((finding) => ({ id, ...finding })));
  });

  test('every condition has something to say of these theories', () => {
    expect(new Set(findings.map(({ id }) => id))).toEqual(new Set(conditions.map(({ id }) => id)));
    expect(new Set(findings.map(({ verdict }) => verdict)).size).toBeGreaterThan(1);
  });

  test('it is a sentence with figures, a rule and a source, and all of it typesets', () => {
    for (const { says, formula, source } of findings) {
      expect(says).toMatch(/^[A-Z$][^`]*[^.]\.$/s);
      const pieces = says.split('$');
      expect([says, pieces.length % 2]).toEqual([says, 1]);
      expect(pieces.length).toBeGreaterThan(1);
      for (const tex of [formula, ...pieces.filter((_, k) => k % 2 === 1)]) {
        expect(katex.renderToString(tex, { throwOnError: true, strict: 'error' })).toContain('katex');
      }
      expect(source).toMatch(/\((?:19|20)\d\d\)/);
    }
  });
});
