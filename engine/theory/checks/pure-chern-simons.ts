import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import { rootSystem } from '../../lie/root-system';
import type { SimpleType } from '../../lie/simple-type';
import { gaugeGroups, type Theory, type TheoryGroup } from '../theory';
import type { Condition, Finding } from './condition';
import { indexSum, levelValue } from './matter';
import { groupLatex, rationalLatex } from './words';

/**
 * N = 2 Chern-Simons theory without matter: integrating out the gaugini leaves the bosonic theory at level
 * |k| - h; below h supersymmetry is broken, and the partition function on the three-sphere vanishes.
 */
export const pureChernSimons: Condition = {
  id: 'pure-chern-simons',
  title: 'Chern-Simons factors without matter',
  examine: (theory, print) =>
    gaugeGroups(theory).flatMap(({ group, index }) =>
      group.group.simple.flatMap((type, part) => {
        const finding = partFinding(theory, group, index, part, type, print);
        return finding === null ? [] : [finding];
      }),
    ),
};

function partFinding(
  theory: Theory,
  owner: TheoryGroup,
  index: number,
  part: number,
  type: SimpleType,
  print: Printer,
): Finding | null {
  if (!indexSum(theory, index, part).isZero()) return null;
  const { group } = owner;
  // In units of the basic form: SO(3)_k and Spin(3)_k are SU(2)_{2k}.
  const level = levelValue(theory, owner.level).mul(group.levelScale.div(group.basicScale));
  if (level.isZero() || !level.isInteger()) return null;
  const number = rootSystem(type).dualCoxeter;
  const size = level.abs();
  const left = size.sub(Rational.of(number));
  const common = {
    detail: group.simple.length > 1 ? `${owner.name} ${part + 1}` : owner.name,
    formula: '|k|\\geq h\\quad\\text{or}\\quad Z=0',
    source:
      'O. Bergman, A. Hanany, A. Karch, B. Kol, hep-th/9908075 (1999); K. Ohta, hep-th/9908120 (1999); ' +
      'A. Kapustin, B. Willett, I. Yaakov, arXiv:0909.4559 (2009)',
  };
  const lead = `No matter is charged under ${group.abelianRank > 0 ? 'the simple part of ' : ''}$${groupLatex(owner, print)}$`;
  if (left.sign() < 0) {
    return {
      ...common,
      verdict: 'fails',
      says: `${lead} and $|k|=${rationalLatex(size)}<h=${number}$: supersymmetry is broken and $Z=0$.`,
    };
  }
  return {
    ...common,
    verdict: 'holds',
    says:
      `${lead}: its bosonic level is $|k|-h=${rationalLatex(size)}-${number}=${rationalLatex(left)}$, not negative, ` +
      'so that supersymmetry is unbroken.',
  };
}
