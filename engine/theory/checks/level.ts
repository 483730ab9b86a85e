import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import { gaugeGroups, type Theory, type TheoryGroup } from '../theory';
import type { Condition, Finding } from './condition';
import { type LevelTest, levelTests, mixedTest } from './level-tests';
import { groupLatex, nameLatex, rationalLatex, sumLatex } from './words';

const SOURCE =
  'A. N. Redlich, Phys. Rev. D 29 (1984) 2366; A. J. Niemi, G. W. Semenoff, Phys. Rev. Lett. 51 (1983) 2077; ' +
  'O. Aharony, A. Hanany, K. Intriligator, N. Seiberg, M. J. Strassler, hep-th/9703110 (1997)';

const BACKGROUND_SOURCE =
  'C. Closset, T. T. Dumitrescu, G. Festuccia, Z. Komargodski, N. Seiberg, arXiv:1206.5218 (2012), section 2; ' +
  'K. Intriligator, N. Seiberg, arXiv:1305.1633 (2013)';

/**
 * Invariance under large gauge transformations in three dimensions: levels, shifted by half of what the chirals
 * contribute, are integers on the cocharacter lattice. Gaugini contribute integers only. The conditions are necessary
 * ones on spin manifolds.
 */
export const levels: Condition = {
  id: 'level',
  title: 'Levels and the parity anomaly',
  examine: (theory, print) => [
    ...gaugeGroups(theory).flatMap(({ group, index }) =>
      levelTests(theory, index).map((test) => groupFinding(group, test, print)),
    ),
    ...pairs(theory).flatMap(([i, j]) => {
      const test = mixedTest(theory, i, j);
      return test === null ? [] : [pairFinding(theory, i, j, test, print)];
    }),
  ],
};

function groupFinding(group: TheoryGroup, test: LevelTest, print: Printer): Finding {
  const whole = groupLatex(group, print);
  const lead = `Level of $${whole}$${test.part === '' ? '' : `, ${test.part}`}`;
  return {
    detail: test.part === '' ? group.name : `${group.name} ${test.part}`,
    verdict: total(test).isInteger() ? 'holds' : 'fails',
    says: `${lead}: ${verdictWords(test)}`,
    formula: `${test.general}\\in\\mathbb{Z}`,
    source: SOURCE,
  };
}

function pairFinding(theory: Theory, i: number, j: number, test: LevelTest, print: Printer): Finding {
  const groups = [theory.groups[i], theory.groups[j]] as [TheoryGroup, TheoryGroup];
  const [first, second] = groups.map((group) => nameLatex(group.name, print));
  const background = groups.find(({ role }) => role === 'flavor');
  const lead = `Mixed level of $${first}$ and $${second}$`;
  const whole = total(test).isInteger();
  const common = {
    detail: `${groups[0].name} ${groups[1].name}`,
    formula: `${test.general}\\in\\mathbb{Z}`,
    source: SOURCE,
  };
  if (background === undefined || whole) {
    return { ...common, verdict: whole ? 'holds' : 'fails', says: `${lead}: ${verdictWords(test)}` };
  }
  const name = nameLatex(background.name, print);
  return {
    ...common,
    source: BACKGROUND_SOURCE,
    verdict: 'fails',
    says:
      `${lead}: $${equation(test)}$ is not an integer; the integral over the three-sphere does not show it, but where ` +
      `$${name}$ has a flux a large gauge transformation changes the sign: ${remedies(test)} would do. Adding gauge ` +
      `charges to those of $${name}$ does not help, since it shifts the sum by an integer.`,
  };
}

function verdictWords(test: LevelTest): string {
  if (total(test).isInteger()) return `$${equation(test)}$ is an integer.`;
  const remedy = test.level === null ? 'no level mends this, only other matter' : `${remedies(test)} would do`;
  return `$${equation(test)}$ is not an integer; ${remedy}.`;
}

/** `k+\frac{1}{2}\sum I_2=1+\frac{3}{2}=\frac{5}{2}`. */
function equation(test: LevelTest): string {
  const value = rationalLatex(total(test));
  if (test.matter.isZero()) return `${test.pure}=${value}`;
  return `${test.general}=${sumLatex([test.bare, test.matter])}=${value}`;
}

/** `$k=\frac{1}{2}$ or $\frac{3}{2}$`: the nearest levels that make the sum an integer. */
function remedies(test: LevelTest): string {
  if (test.level === null) return '';
  const { symbol, value, slope } = test.level;
  const sum = total(test);
  const below = sum.sub(Rational.of(sum.floor()));
  const [down, up] = [below.neg(), Rational.one.sub(below)].map((step) => rationalLatex(value.add(step.div(slope))));
  return `$${symbol}=${down}$ or $${up}$`;
}

function total({ bare, matter }: LevelTest): Rational {
  return bare.add(matter);
}

/** Pairs of groups with a U(1) each, at least one of them gauged. */
function pairs(theory: Theory): [number, number][] {
  const abelian = theory.groups.flatMap(({ group }, index) => (group.abelianRank > 0 ? [index] : []));
  return abelian.flatMap((i, place) =>
    abelian
      .slice(place + 1)
      .filter((j) => [i, j].some((index) => theory.groups[index]?.role === 'gauge'))
      .map((j): [number, number] => [i, j]),
  );
}
