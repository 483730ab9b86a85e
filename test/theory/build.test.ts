import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { analyse } from '../../engine/requests/analysis';
import { problems } from '../../engine/requests/outline';
import type { Theory } from '../../engine/theory/theory';

/*
 * A notebook's text against the theory it means, or against the problem and its place. The rules are our own language's:
 * there is no outside source but the representation theory, which other tests compare with GAP.
 */
const text = (lines: readonly string[], lets: readonly string[] = []) =>
  [...lets, 'theory t', ...lines.map((line) => `  ${line}`), ''].join('\n');

function theoryIn(lines: readonly string[], lets: readonly string[] = []): Theory {
  const analysis = analyse(text(lines, lets));
  const theory = analysis.theories.get('t')?.built?.theory;
  if (!theory) throw new Error(JSON.stringify(problems(analysis)));
  return theory;
}

/** Finds the place of `«` in the text, which is then taken out. */
function marked(source: string): { text: string; line: number; column: number } {
  const at = source.indexOf('«');
  const before = source.slice(0, at).split('\n');
  const column = (before.at(-1) as string).length + 1;
  return { text: source.replace('«', ''), line: before.length, column };
}

/** The errors of a text, and whether the theory was built all the same. */
function errorsIn(source: string) {
  const analysis = analyse(source);
  const errors = problems(analysis).filter(({ severity }) => severity === 'error');
  return { errors, theory: analysis.theories.get('t')?.built?.theory ?? null };
}

/** Lines with `«` before the faulty word, and what the message has to say. */
type Case = readonly [name: string, lines: readonly string[], says: RegExp, lets?: readonly string[]];

const u1 = ['sphere S3', 'gauge G = U(1)', 'matter G R'];
const su3 = ['sphere S3', 'gauge G = SU(3)', 'matter G R'];

const groups: readonly Case[] = [
  ['an unknown group', ['sphere S3', 'gauge G = «SX(3)'], /SX\(3\).*not a group.*U\(n\), SU\(n\)/],
  ['a group that does not exist', ['sphere S3', 'gauge G = «USp(3)'], /USp\(3\) does not exist.*USp\(4\)/],
  [
    'a group authors read in two ways',
    ['sphere S3', 'gauge G = «Sp(4)'],
    /Which group is Sp\(4\)\?.*USp\(4\) or USp\(8\)/,
  ],
  ['a trivial group', ['sphere S3', 'gauge G = «SU(1)'], /SU\(1\).*U\(1\), SU\(2\) or larger/],
  ['a group that is not connected', ['sphere S3', 'flavor F = «O(4)'], /O\(4\).*SO\(4\)/],
  ['a huge rank', ['sphere S3', 'gauge G = «SU(400)'], /SU\(400\).*rank 399.*limited to rank/],
  [
    'a level that is a name without value',
    [...u1.slice(0, 1), 'gauge G = U(1), level «k'],
    /level `k` is no exact number/,
  ],
  ['a level that is irrational', ['sphere S3', 'gauge G = U(1), level «sqrt(2)'], /no exact number/],
  ['a level that is imaginary', ['sphere S3', 'gauge G = U(1), level «i'], /no exact number/],
  ['an FI term of SU(n)', ['sphere S3', 'gauge G = SU(3), «fi zeta'], /SU\(3\) has no U\(1\) factor.*no FI term/],
  ['a theta angle', ['sphere S3', 'gauge G = U(1), «theta 1'], /`theta` is no option.*no theta angle in three/],
  ['a coupling', ['sphere S3', 'gauge G = SU(2), «coupling 1'], /coupling drops out/],
  ['a U(1) level of SU(n)', ['sphere S3', 'gauge G = SU(2), «abelian 1'], /SU\(2\) has no such part/],
  ['a mass of a gauge group', ['sphere S3', 'gauge G = SU(2), «mass m'], /no option of a gauge group.*`coulomb`/],
  ['an FI term of a flavour group', ['sphere S3', 'flavor F = U(1), «fi 1'], /`fi` is no option of a flavor group/],
  [
    'a mixed level with a group that is not there',
    ['sphere S3', 'gauge G = U(1)', 'mixed G «H = 1'],
    /No group is called `H`/,
  ],
  [
    'a mixed level of SU(2)',
    ['sphere S3', 'gauge G = U(1)', 'gauge H = SU(2)', 'mixed G «H = 1'],
    /`H` is SU\(2\).*two groups with a U\(1\)/,
  ],
  ['a mixed level of a group with itself', ['sphere S3', 'gauge G = U(1)', '«mixed G G = 1'], /two different groups/],
  [
    'a mixed level without value',
    ['sphere S3', 'gauge G = U(1)', 'gauge H = U(1)', 'mixed G H = «k'],
    /level `k` is no exact number/,
  ],
  ['two groups of one name', ['sphere S3', 'gauge G = U(1)', 'gauge «G = SU(2)'], /`G` is already there/],
  [
    'coordinates of one name',
    ['sphere S3', 'gauge G = U(1), coulomb x', '«gauge H = SU(2), coulomb x'],
    /would be called `x`, a name already in use.*`coulomb NAME`/,
  ],
  [
    'a mass named as a Coulomb parameter',
    ['sphere S3', 'gauge G = U(2), coulomb x', '«flavor H = SU(3), mass x'],
    /would be called `x1`.*`mass NAME`/,
  ],
  [
    'coordinates named as a parameter',
    ['sphere S3', '«gauge G = U(2)'],
    /would be called `sigma2`/,
    ['let sigma2 = 1'],
  ],
];

const matter: readonly Case[] = [
  ['a representation without a name', [...su3, 'chiral q «foo 1/2'], /'foo'|`foo`/],
  ['a spinor of SU(3)', [...su3, 'chiral q «spinor 1/2'], /spinor/],
  ['too few labels', [...su3, 'chiral q «[1] 1/2'], /label/],
  ['a dimension that no representation has', [...su3, 'chiral q «7 1/2'], /7/],
  ['a spinor of SO(5)', ['sphere S3', 'gauge G = SO(5)', 'matter G R', 'chiral q «spinor 1/2'], /SO\(5\)|Spin\(5\)/],
  ['a charge that is no number', [...u1, 'chiral q «x 1/2'], /charge|number/],
  ['an irrational charge', [...u1, 'chiral q «sqrt(2) 1/2'], /charge|number|sqrt/],
  [
    'a representation too large to be listed',
    ['sphere S3', 'gauge G = E8', 'matter G R', 'chiral q «[9,9,9,9,9,9,9,9] 1/2'],
    /large|label|weights/,
  ],
  ['a cell missing', [...u1, 'chiral q «1'], /`q` has no cell for R/],
  ['a cell too many', [...u1, 'chiral q 1 1/2 «3'], /`q` has more cells than the 2 columns/],
  ['an unknown column', ['sphere S3', 'gauge G = U(1)', 'matter G «K R', 'chiral q 1 1 1/2'], /`K`/],
  ['a column twice', ['sphere S3', 'gauge G = U(1)', 'matter G «G R', 'chiral q 1 1/2'], /`G` stands twice/],
  ['an R-charge with a name without value', [...u1, 'chiral q 1 1-«r'], /uses `r`, which has no value.*`let r = 1\/2`/],
  ['an R-charge that cannot be read', [...u1, 'chiral q 1 «27*'], /R-charge `27\*` cannot be read/],
  ['an R-charge of a hyper', [...u1, 'hyper q 1 «1/3'], /R-charge `1\/3` is not possible.*R = 1\/2/],
  ['a multiplet of another dimension', [...u1, '«twisted q 1 1/2'], /`twisted` does not exist on S3/],
  ['two multiplets of one name', [...u1, 'chiral q 1 1/2', 'chiral «q 1 1/2'], /`q` is already there/],
  ['a field that is not there', [...u1, 'chiral q 1 1/2', 'superpotential q «p'], /`p`.*`q`/],
  ['a supersymmetry the sphere has not', ['sphere S3', '«supersymmetry 3', ...u1.slice(1)], /2 or 4.*`3`/],
  [
    'division by zero at the values of the parameters',
    [...u1, 'chiral q 1 «1/r'],
    /`1\/r` is undefined/,
    ['let r = 0'],
  ],
];

const spheres: readonly Case[] = [
  ['b = 0', ['sphere S3, b = «0'], /`b` is zero: the squashing has to be a positive number/],
  ['b negative', ['sphere S3, b = «-5/4'], /`b = -5\/4` is negative/],
  ['b imaginary', ['sphere S3, b = «i'], /`b = i` is complex/],
  ['b complex', ['sphere S3, b = «1+i/10'], /is complex/],
  ['b out of reach', ['sphere S3, b = «1/1000'], /between 1\/100 and 100/],
  ['b beyond the doubles', ['sphere S3, b = «exp(1000)'], /between 1\/100 and 100/],
  ['b with a name without value', ['sphere S3, b = 1+«beta'], /`beta` has no value/],
  ['a squashing of another sphere', ['sphere S3, «w1 = 1'], /`w1` is no parameter of S3; it takes `b`/],
  ['b with a division by zero', ['sphere S3, b = «1/r'], /undefined/, ['let r = 0']],
  ['an unknown sphere', ['sphere «S7'], /no sphere `S7`/],
];

describe.each<[string, readonly Case[]]>([
  ['groups', groups],
  ['matter', matter],
  ['spheres', spheres],
])('a problem of %s is said in its place', (_what, cases) => {
  const named = cases.map(([name, lines, says, lets]) => ({ name, lines, says, lets }));
  test.each(named)('$name', ({ lines, says, lets }) => {
    const { text: source, line, column } = marked(text(lines, lets));
    const { errors, theory } = errorsIn(source);
    expect(errors.map(({ message }) => message)).toEqual([expect.stringMatching(says)]);
    expect({ line: errors[0]?.line, column: errors[0]?.column }).toEqual({ line, column });
    expect(theory).toBeNull();
  });
});

describe('several problems at once', () => {
  test('are all said, in the order of the text', () => {
    const { errors, theory } = errorsIn(
      text([
        'sphere S3, b = 0',
        'gauge G = SX(2)',
        'gauge H = SU(3), fi 1',
        'matter H R',
        'chiral q spinor s',
        'hyper p fund 1/3',
      ]),
    );
    expect(errors.map(({ line }) => line)).toEqual([2, 3, 4, 6, 6, 7]);
    expect(theory).toBeNull();
  });

  test('a theory without sphere says so at its name', () => {
    const { errors } = errorsIn(text(['gauge G = U(1)']));
    expect(errors.map(({ line, column }) => [line, column])).toEqual([[1, 8]]);
  });
});

describe('what a theory holds', () => {
  const theory = theoryIn([
    'sphere S3, b = 5/4',
    'gauge G = U(2), coulomb s, level 1, fi zeta',
    'gauge H = SU(3)',
    'flavor F = SU(2), mass mu',
    'flavor A = U(1)',
    'mixed G A = 1/2',
    'matter R A F H G',
    'chiral q 1/3 -1 fund anti fund',
    'hyper p 1/2 3/2 1 8 det^-1',
    'superpotential q^3 p',
  ]);

  test('columns in any order', () => {
    const [q, p] = theory.multiplets;
    expect(q?.representations.map(({ dimension }) => dimension)).toEqual([2n, 3n, 2n, 1n]);
    expect(p?.representations.map(({ dimension }) => dimension)).toEqual([1n, 8n, 1n, 1n]);
    expect(p?.representations[3]?.irreps[0]?.charge.toString()).toBe('3/2');
    expect([q?.rCharge.key, p?.rCharge.key]).toEqual(['1/3', '1/2']);
    expect(theory.superpotential.map(({ fields }) => fields.map(({ field, power }) => [field.name, power]))).toEqual([
      [
        ['q', 3],
        ['p', 1],
      ],
    ]);
  });

  test('names of coordinates, given and by default, the dependent ones expressed by the others', () => {
    const [g, h, f, a] = theory.groups;
    expect(g?.coordinates).toEqual(['s1', 's2']);
    expect(h?.coordinates).toEqual(["sigma'1", "sigma'2", "sigma'3"]);
    expect(f?.coordinates).toEqual(['mu']);
    expect(a?.coordinates).toEqual(["m'"]);
    expect([...(h?.dependent ?? [])].map(([name, form]) => [name, form.key])).toEqual([
      ["sigma'3", "-1*sigma'1 + -1*sigma'2"],
    ]);
    expect(theory.backgrounds).toEqual(['zeta']);
  });

  test('levels, mixed levels and geometry', () => {
    expect(theory.groups.map(({ level }) => level?.key ?? null)).toEqual(['1', null, null, null]);
    expect(theory.mixed.map(({ groups: pair, level }) => [pair, level.key])).toEqual([[[0, 3], '1/2']]);
    expect([theory.geometry.get('@b')?.key, theory.round]).toEqual(['5/4', false]);
    expect(theoryIn(['sphere S3']).round).toBe(true);
    expect(theoryIn(['sphere S3, b = 1']).round).toBe(true);
  });

  test('a missing column leaves multiplets neutral, and R canonical', () => {
    const plain = theoryIn(['sphere S3', 'gauge G = U(2)', 'flavor F = U(1)', 'matter G', 'chiral q fund']);
    expect(plain.multiplets[0]?.rCharge.key).toBe('1/2');
    expect(plain.multiplets[0]?.representations.map(({ isTrivial }) => isTrivial)).toEqual([false, true]);
  });

  test('parameters keep their names in R-charges, and their values in squashings', () => {
    const with_ = theoryIn(
      ['sphere S3, b = 1+r', 'matter R', 'chiral q 2-2r'],
      ['let r = 1/4 in 0 .. 1', 'let s = r+1'],
    );
    expect(with_.multiplets[0]?.rCharge.key).toBe('2 + -2*r');
    expect(with_.geometry.get('@b')?.key).toBe('5/4');
    expect(with_.parameters.get('s')?.key).toBe('5/4');
  });

  test('an R-charge of a hyper may be typed in any way that is 1/2', () => {
    const lines = ['sphere S3', 'gauge G = U(1)', 'matter G R', 'hyper q 1 1-r'];
    expect(theoryIn(lines, ['let r = 1/2']).multiplets.length).toBe(1);
    expect(errorsIn(text(lines, ['let r = 1/3'])).errors.length).toBe(1);
  });

  test('a level by a parameter, an abelian level alone', () => {
    const theory_ = theoryIn(
      ['sphere S3', 'gauge G = U(2), level k-1', 'gauge H = U(3), coulomb y, abelian 2'],
      ['let k = 3/2'],
    );
    expect(theory_.groups.map(({ level, abelianLevel }) => [level?.key, abelianLevel?.key])).toEqual([
      ['-1 + 1*k', undefined],
      ['0', '2'],
    ]);
  });
});

describe('any text at all', () => {
  const words = fc.constantFrom(
    ...'sphere gauge flavor mixed supersymmetry matter chiral hyper halfhyper twisted superpotential S3 S4 G H R = , U(1) U(2) SU(3) SO(5) G2 level fi coulomb mass abelian 1 1/2 0 -1 r 1/r sqrt(2) i b fund anti adj 27 det ^ * ( ) q p'.split(
      ' ',
    ),
  );
  const line = fc.array(words, { minLength: 1, maxLength: 8 }).map((list) => list.join(' '));

  test('is answered with problems in their places, never with an exception', () => {
    fc.assert(
      fc.property(fc.array(line, { maxLength: 6 }), fc.constantFrom('0', '1/2', 'sqrt(2)', '1/s'), (lines, r) => {
        const source = text(['sphere S3, b = 1+r', ...lines], [`let r = ${r}`]);
        const analysis = analyse(source);
        const count = source.split('\n').length;
        for (const { line: at, column, message, span } of problems(analysis)) {
          expect(at >= 1 && at <= count && column >= 1).toBe(true);
          expect(span.from <= span.to && span.to <= source.length).toBe(true);
          expect(message).not.toMatch(/undefined\b(?! at)|Problem `|\[object/);
        }
        const built = analysis.theories.get('t')?.built;
        const failed = built?.diagnostics.some(({ severity }) => severity === 'error') ?? true;
        if (failed) expect(built?.theory ?? null).toBeNull();
      }),
      { numRuns: 100 },
    );
  });
});
