import { Rational } from '../../exact/rational';
import type { Representation } from '../../lie/representation';
import { gaugeGroups, type Theory } from '../theory';
import type { Condition, Finding } from './condition';
import type { Field } from './f-terms';
import { dimensionWithout, rChargeValue, tracesOf } from './matter';
import { fieldsOf } from './operators';
import { addR, compareR, type RValue, rLatex, timesR } from './r-values';
import { groupLatex, listWords, nameLatex, rationalLatex } from './words';

const chirals = (theory: Theory) => theory.multiplets.filter(({ kind }) => kind === 'chiral');

/**
 * The sum c of all charges under each U(1): the FI parameter runs with it, mu d xi/d mu = c/(2 pi) in the convention
 * exp(-4 pi i xi Tr sigma), and the axial R-symmetry is anomalous unless it vanishes.
 */
export const fiRunning: Condition = {
  id: 'axial-anomaly',
  title: 'Axial anomaly and running of the FI parameter',
  examine: (theory, print) =>
    gaugeGroups(theory).flatMap(({ group, index }): Finding[] => {
      if (group.group.abelianRank === 0) return [];
      const c = chargeSum(theory, index);
      const lead = `The charges under $${groupLatex(group, print)}$ add up to $c=${rationalLatex(c)}$`;
      const running = `$\\xi$ runs by $\\mu\\,d\\xi/d\\mu=c/2\\pi$, and $\\theta$ can be rotated away by the axial R-symmetry`;
      return [
        {
          detail: group.name,
          verdict: 'holds',
          says: c.isZero()
            ? `${lead}: $\\xi$ and $\\theta$ are marginal, and the axial R-symmetry is not anomalous.`
            : `${lead}: ${running}.`,
          formula: 'c=\\sum_{\\text{chirals}}\\sum_w w,\\qquad\\mu\\frac{d\\xi}{d\\mu}=\\frac{c}{2\\pi}',
          source: 'E. Witten, hep-th/9301042 (1993)',
        },
      ];
    }),
};

/** The coefficient of Tr sigma in the sum of all weights; charges of U(n) count boxes, so that they come n-fold. */
function chargeSum(theory: Theory, index: number): Rational {
  const size = Rational.of(theory.groups[index]?.group.coordinateCount ?? 1);
  return chirals(theory).reduce((sum, { representations }) => {
    const { charge } = tracesOf(representations[index] as Representation);
    return sum.add(charge.mul(Rational.of(dimensionWithout(representations, index))).div(size));
  }, Rational.zero);
}

/** The central charge of the infrared fixed point, where the axial R-symmetry is not anomalous. */
export const centralCharge: Condition = {
  id: 'central-charge',
  title: 'Central charge',
  examine: (theory) => {
    const gauge = gaugeGroups(theory);
    const matter = chirals(theory);
    if (matter.length === 0 || matter.length < theory.multiplets.length) return [];
    if (gauge.some(({ group, index }) => group.group.abelianRank > 0 && !chargeSum(theory, index).isZero())) return [];
    const dimension = gauge.reduce((sum, { group }) => sum + group.group.dimension, 0);
    const total = matter.reduce<RValue>((sum, { representations, rCharge }) => {
      const size = Rational.of(dimensionWithout(representations));
      return addR(sum, addR(size, timesR(rChargeValue(theory, rCharge), size.neg())));
    }, Rational.of(-dimension));
    const sign = compareR(total, Rational.zero);
    const says = `With these R-charges $c/3=\\sum\\dim R\\,(1-R)-\\dim G=${rLatex(total)}$`;
    return [
      {
        verdict: sign < 0 ? 'fails' : 'holds',
        says: sign < 0 ? `${says} is negative: no unitary fixed point has it.` : `${says}.`,
        formula: '\\frac{c}{3}=\\sum_{\\text{chirals}}(1-R)-\\dim G\\geq0',
        source: 'E. Witten, hep-th/9301042 (1993); F. Benini, S. Cremonesi, arXiv:1206.2356 (2012)',
      },
    ];
  },
};

/** Twisted chirals are neutral under gauge groups of vector multiplets. */
export const twistedChirals: Condition = {
  id: 'twisted',
  title: 'Twisted chirals',
  examine: (theory, print) =>
    theory.multiplets
      .filter(({ kind }) => kind === 'twisted')
      .map(({ name, representations }): Finding => {
        const charged = gaugeGroups(theory).filter(({ index }) => representations[index]?.isTrivial === false);
        const field = nameLatex(name, print);
        const groups = listWords(charged.map(({ group }) => `$${groupLatex(group, print)}$`));
        return {
          detail: name,
          verdict: charged.length === 0 ? 'holds' : 'fails',
          says:
            charged.length === 0
              ? `The twisted chiral $${field}$ is neutral under the gauge groups.`
              : `The twisted chiral $${field}$ is charged under ${groups}; a vector multiplet couples to chirals only.`,
          formula: '\\text{twisted chirals: }R_G=\\mathbf{1}',
          source: 'E. Witten, hep-th/9301042 (1993)',
        };
      }),
};

/** The R-charges for which the poles of charged chirals keep to their sides of the real contour. */
export const contourInTwo: Condition = {
  id: 'contour',
  title: 'R-charges and the contour',
  examine: (theory, print) => {
    const charged = fieldsOf(theory, print).filter((field) => !field.representations.every((one) => one.isTrivial));
    const outside = charged.filter(({ rCharge }) => !(compareR(rCharge, Rational.zero) >= 0));
    const touching = charged.filter(({ rCharge }) => compareR(rCharge, Rational.zero) === 0);
    if (charged.length === 0) return [];
    const common = { formula: '0<R', source: 'F. Benini, S. Cremonesi, arXiv:1206.2356 (2012)' };
    if (outside.length > 0) {
      const says = `${listed(outside)} below $0$: poles cross the real contour, and the integral has to be continued in $R$.`;
      return [{ ...common, verdict: 'fails', says }];
    }
    if (touching.length > 0) {
      const says = `${listed(touching)} at the border $0$: poles meet the real contour where their masses vanish, and it is to pass them as for small $R>0$.`;
      return [{ ...common, verdict: 'holds', says }];
    }
    return [
      {
        ...common,
        verdict: 'holds',
        says: 'All charged chirals have $R>0$: no pole lies on the wrong side of the real contour.',
      },
    ];
  },
};

function listed(fields: readonly Field[]): string {
  const words = fields.map(({ latex, rCharge }) => `$R(${latex})=${rLatex(rCharge)}$`);
  return `${listWords(words)} ${words.length === 1 ? 'lies' : 'lie'}`;
}
