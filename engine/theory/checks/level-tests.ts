import { Rational } from '../../exact/rational';
import type { Representation } from '../../lie/representation';
import type { Theory, TheoryGroup } from '../theory';
import { dimensionWithout, indexSum, levelValue, sumOverMatter, tracesOf } from './matter';
import { half } from './words';

/**
 * One number that has to be an integer. With K the level's form on the cocharacter lattice L and w the weights of all
 * chirals, K_eff(x, y) = K(x, y) + (1/2) sum_w w(x) w(y) has to be an integer for all x, y in L, and half of
 * K_eff(c, c) for every simple coroot c. By Weyl symmetry this comes down to the values listed here for each group.
 */
export interface LevelTest {
  /** In words, which part of the group; empty for the group as a whole. */
  readonly part: string;
  /** What the bare level and what matter contributes; their sum is to be an integer. */
  readonly bare: Rational;
  readonly matter: Rational;
  /** The sum in general, LaTeX: `k+\frac{1}{2}\sum I_2`. */
  readonly general: string;
  /** The same without matter. */
  readonly pure: string;
  /** The level that the sum can be mended with, and how the sum depends on it; null where no level helps. */
  readonly level: { readonly symbol: string; readonly value: Rational; readonly slope: Rational } | null;
}

export function levelTests(theory: Theory, index: number): readonly LevelTest[] {
  const { group } = theory.groups[index] as TheoryGroup;
  if (group.isAbelian) return [abelianTest(theory, index)];
  if (group.family === 'U') return [simpleTest(theory, index, 0, ''), ...traceTest(theory, index)];
  if (group.system.name === 'A1' && group.family !== 'SU' && group.family !== 'USp') {
    return [threeTest(theory, index, group.family === 'SO')];
  }
  if (group.simple.length === 2) return fourTests(theory, index, group.family === 'SO');
  return [simpleTest(theory, index, 0, ''), ...quotientTest(theory, index)];
}

/** U(1): cocharacter 1. */
function abelianTest(theory: Theory, index: number): LevelTest {
  const matter = sumOverMatter(theory, ({ representations }) =>
    tracesOf(representations[index] as Representation).chargeSquared.mul(
      Rational.of(dimensionWithout(representations, index)),
    ),
  ).mul(half);
  return { ...levelOf(theory, index), matter, part: '', general: 'k+\\frac{1}{2}\\sum q^2', pure: 'k' };
}

/** A coroot of a long root of one simple part. */
function simpleTest(theory: Theory, index: number, part: number, name: string): LevelTest {
  const matter = indexSum(theory, index, part).mul(half);
  return { ...levelOf(theory, index), matter, part: name, general: 'k+\\frac{1}{2}\\sum I_2', pure: 'k' };
}

function levelOf(theory: Theory, index: number): Pick<LevelTest, 'bare' | 'level'> {
  const value = levelValue(theory, (theory.groups[index] as TheoryGroup).level);
  return { bare: value, level: { symbol: 'k', value, slope: Rational.one } };
}

/**
 * Two different unit cocharacters of U(n), n > 1; the coroot test then covers equal ones. Nothing to say where it can
 * only hold: without charges of the determinant and without a level k' of its own.
 */
function traceTest(theory: Theory, index: number): LevelTest[] {
  const { group, level, abelianLevel } = theory.groups[index] as TheoryGroup;
  const n = Rational.of(group.size as number);
  const matter = sumOverMatter(theory, ({ representations }) => {
    const { indices, chargeSquared } = tracesOf(representations[index] as Representation);
    const one = chargeSquared
      .div(n)
      .sub(Rational.of(indices[0] as bigint))
      .div(n);
    return one.mul(Rational.of(dimensionWithout(representations, index)));
  }).mul(half);
  if (abelianLevel === null && matter.isInteger()) return [];
  const k = levelValue(theory, level);
  const own = abelianLevel === null ? k : levelValue(theory, abelianLevel);
  const pure = `\\frac{k'-k}{${n}}`;
  return [
    {
      part: 'abelian part',
      bare: own.sub(k).div(n),
      matter,
      general: `${pure}+\\frac{1}{2}\\sum\\left(\\frac{c^2\\dim R}{${n.mul(n)}}-\\frac{I_2}{${n}}\\right)`,
      pure,
      level: { symbol: "k'", value: own, slope: Rational.one.div(n) },
    },
  ];
}

/**
 * A quotient adds a cocharacter x: with one simple part K_eff = k_eff (., .), so that k_eff (x, y) has to be an integer
 * for all cocharacters y, too. With k_eff an integer that means that their common denominator M divides it.
 */
function quotientTest(theory: Theory, index: number): LevelTest[] {
  const { group } = theory.groups[index] as TheoryGroup;
  const denominator = group.quotient?.levelDivisor ?? 1n;
  if (group.quotient === null || denominator === 1n) return [];
  const share = Rational.of(1, denominator);
  const { bare, matter, level, general, pure } = simpleTest(theory, index, 0, '');
  return [
    {
      part: `quotient by Z${group.quotient.order}`,
      bare: bare.mul(share),
      matter: matter.mul(share),
      general: `\\frac{1}{${denominator}}\\left(${general}\\right)`,
      pure: `\\frac{1}{${denominator}}${pure}`,
      level: level && { ...level, slope: share },
    },
  ];
}

/** SO(3) with the cocharacter (1), and Spin(3) with the coroot (2), both in units where SO(3)_k = SU(2)_{2k}. */
function threeTest(theory: Theory, index: number, special: boolean): LevelTest {
  const sum = indexSum(theory, index, 0);
  const { bare } = levelOf(theory, index);
  const slope = Rational.of(special ? 1 : 2);
  return {
    part: '',
    bare: bare.mul(slope),
    matter: sum.mul(Rational.of(1, special ? 4 : 2)),
    general: special ? 'k+\\frac{1}{4}\\sum I_2' : '2k+\\frac{1}{2}\\sum I_2',
    pure: special ? 'k' : '2k',
    level: { symbol: 'k', value: bare, slope },
  };
}

/** The coroots of both halves of Spin(4); for SO(4) the unit cocharacters, equal and different ones. */
function fourTests(theory: Theory, index: number, special: boolean): LevelTest[] {
  const [left, right] = [indexSum(theory, index, 0), indexSum(theory, index, 1)];
  const level = levelOf(theory, index);
  const parts = ['first SU(2)', 'second SU(2)'];
  if (!special) return parts.map((part, k) => simpleTest(theory, index, k, part));
  const quarter = Rational.of(1, 4);
  const sum = left.add(right).mul(quarter);
  const difference = left.sub(right).mul(quarter);
  return [
    { ...level, part: '', matter: sum, general: "k+\\frac{1}{4}\\sum(I_2+I_2')", pure: 'k' },
    // The coroot tests follow from these two.
    ...(difference.isZero()
      ? []
      : [
          {
            part: 'difference of the two SU(2)',
            bare: Rational.zero,
            matter: difference,
            general: "\\frac{1}{4}\\sum(I_2-I_2')",
            pure: '0',
            level: null,
          },
        ]),
  ];
}

/** The test for unit cocharacters of two different groups with a U(1) each: the level between them and the matter. */
export function mixedTest(theory: Theory, i: number, j: number): LevelTest | null {
  const scale = [i, j].reduce((product, index) => product * unitSize(theory.groups[index] as TheoryGroup), 1);
  const matter = sumOverMatter(theory, ({ representations }) => {
    const [left, right] = [i, j].map((index) => tracesOf(representations[index] as Representation).charge);
    if (left === undefined || right === undefined || left.isZero() || right.isZero()) return Rational.zero;
    return left.mul(right).mul(Rational.of(dimensionWithout(representations, i, j)));
  }).mul(Rational.of(1, 2 * scale));
  const bare = theory.mixed
    .filter(({ groups }) => groups.includes(i) && groups.includes(j))
    .reduce((sum, { level }) => sum.add(levelValue(theory, level)), Rational.zero);
  if (matter.isZero() && bare.isZero()) return null;
  const level = { symbol: "k_{GG'}", value: bare, slope: Rational.one };
  return { part: '', bare, matter, general: "k_{GG'}+\\frac{1}{2}\\sum qq'", pure: "k_{GG'}", level };
}

/** The trace of the identity: a weight of U(n) of charge c takes the value c/n on a unit cocharacter on average. */
function unitSize({ group }: TheoryGroup): number {
  return group.family === 'U' ? (group.size as number) : 1;
}
