import { Rational } from '../../exact/rational';
import type { Condition, Finding } from './condition';
import { monopoleOperators } from './monopole-operators';
import { fieldsOf, HALF, type Operator, operatorsOf } from './operators';
import { compareR, plainR, rLatex } from './r-values';
import { listWords } from './words';

/** Charged chirals with 0 < R < 2: no pole of the integrand crosses the real Coulomb parameters. */
export const contour: Condition = {
  id: 'contour',
  title: 'R-charges and the contour',
  examine: (theory, print) => {
    const charged = fieldsOf(theory, print).filter((field) => !field.representations.every((one) => one.isTrivial));
    // Hypers have R = 1/2 by definition.
    if (charged.length === 0 || !theory.multiplets.some(({ kind }) => kind === 'chiral')) return [];
    const outside = charged.filter(
      ({ rCharge }) => !(compareR(rCharge, Rational.zero) > 0 && compareR(rCharge, Rational.of(2)) < 0),
    );
    const common = {
      formula: '0<R<2',
      source: 'D. L. Jafferis, arXiv:1012.3210 (2010); B. Willett, I. Yaakov, arXiv:1104.0487 (2011)',
    };
    if (outside.length === 0) {
      const says = 'All charged chirals have $0<R<2$: no pole lies on the wrong side of the real contour.';
      return [{ ...common, verdict: 'holds', says }];
    }
    const words = outside.map(({ latex, rCharge }) => `$R(${latex})=${rLatex(rCharge)}$`);
    const says =
      `${listWords(words)} ${outside.length === 1 ? 'lies' : 'lie'} outside $0<R<2$: poles cross the real contour, and the ` +
      'integral has to be continued in $R$.';
    return [{ ...common, verdict: 'fails', says }];
  },
};

/**
 * The unitarity bound on gauge-invariant chiral operators: 1/2, where they are free. It is a statement about the
 * R-charge at the superconformal point; below the bound an operator decouples and the R-symmetry mixes with a new one.
 */
export const unitarity: Condition = {
  id: 'unitarity',
  title: 'Unitarity bound of chiral operators',
  examine: (theory, print) => {
    if (theory.supersymmetry === 4) return [];
    const { found, searched } = monopoleOperators(theory, print);
    const operators = [...operatorsOf(theory, print), ...found].filter(({ fTerm }) => fTerm !== 'vanishes');
    const low = operators.filter(({ rCharge }) => !(compareR(rCharge, HALF) > 0));
    if (low.length > 0) return low.map(lowFinding);
    const [first, ...others] = operators;
    if (first === undefined) return [];
    const least = others.reduce((best, one) => (plainR(one.rCharge) < plainR(best.rCharge) ? one : best), first);
    return [
      {
        verdict: 'holds',
        says:
          `All gauge-invariant chiral operators found have $R>\\frac{1}{2}$, the smallest $R(${least.latex})=` +
          `${rLatex(least.rCharge)}$; searched: fields, products of two and three, traces, baryons${searched}.`,
        ...GROUNDS,
      },
    ];
  },
};

const GROUNDS = {
  formula: 'R(\\mathcal{O})\\geq\\tfrac{1}{2}',
  source:
    'D. L. Jafferis, I. R. Klebanov, S. S. Pufu, B. R. Safdi, arXiv:1103.1181 (2011); S. Safdi, I. Klebanov, J. Lee, ' +
    'arXiv:1212.4502 (2012)',
};

function lowFinding({ latex, rCharge, fTerm }: Operator): Finding {
  const below = compareR(rCharge, HALF) < 0;
  const lead = `The chiral operator $${latex}$ has $R=${rLatex(rCharge)}$`;
  if (!below && Number.isFinite(plainR(rCharge))) {
    return { detail: latex, verdict: 'holds', says: `${lead}, the bound itself: it is free.`, ...GROUNDS };
  }
  const words =
    fTerm === 'related'
      ? `${lead}, below $\\frac{1}{2}$; the superpotential relates it to others, which was not worked out.`
      : `${lead}, below $\\frac{1}{2}$: at a superconformal point with these R-charges it would decouple.`;
  return { detail: latex, verdict: below && fTerm === 'none' ? 'fails' : 'unknown', says: words, ...GROUNDS };
}
