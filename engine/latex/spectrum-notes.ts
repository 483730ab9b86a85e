import { Form } from '../exact/form';
import { functions } from '../functions/table';
import { isRemark } from '../spectrum/analyse';
import type { ClosedForm } from '../spectrum/closed-form';
import type { SpectrumView } from '../spectrum/view';
import { formLatex } from './form';
import { sumLatex } from './polynomial';
import { printer } from './product';
import { unpairedPieces } from './spectrum';
import { symbolLatex } from './symbol';

/** A statement about the determinant that holds or does not. */
export interface SpectrumCheck {
  readonly id: 'scale' | 'anomaly' | 'closed-form';
  readonly verdict: 'holds' | 'fails' | 'unknown';
  readonly says: string;
  readonly formula: string;
  readonly source: string;
}

/** Definitions of the functions in a closed form, and the letters they use. */
export function closedNotes({ functions: special, exponent, numbers }: ClosedForm): string[] {
  const notes = new Set<string>();
  for (const { of } of special) {
    if (of.name === 'doubleSine' || of.name === 'upsilon') {
      notes.add(`$${functions[of.name].notations[0]?.definition([of.b], printer) ?? ''}$`);
    } else if (of.name === 'multipleSine' && of.periods.length === 3) {
      notes.add(`$${functions.tripleSine.notations[0]?.definition(of.periods, printer) ?? ''}$`);
    } else if (of.name === 'multipleSine') {
      notes.add(
        `$S_N(x\\,|\\,\\omega)=\\Gamma_N(x\\,|\\,\\omega)^{-1}\\,\\Gamma_N(|\\omega|-x\\,|\\,\\omega)^{(-1)^N}$`,
      );
    } else if (of.name === 'barnesG') notes.add('$G(x+1)=\\Gamma(x)\\,G(x)$, $G(1)=1$ (Barnes).');
    if (of.name === 'overRoots') notes.add('The product runs over the roots $\\rho$, each as often as it occurs.');
    if (
      of.name === 'multipleGamma' ||
      (of.name === 'overRoots' && of.order > 1) ||
      (of.name === 'multipleSine' && of.periods.length !== 3)
    ) {
      notes.add(
        '$\\log\\Gamma_N(x\\,|\\,\\omega)=\\partial_s\\sum_{n\\ge0}(x+n\\cdot\\omega)^{-s}\\big|_{s=0}$ (Barnes).',
      );
    }
  }
  for (const { of } of exponent) {
    if (of.name === 'clausen') {
      const series = of.order % 2 === 0 ? '\\sin' : '\\cos';
      notes.add(`$\\mathrm{Cl}_{${of.order}}(\\theta)=\\sum_{n\\ge1}${series}(n\\theta)/n^{${of.order}}$`);
    }
    if (of.name === 'polylogarithm') {
      const real = realPart(of.argument);
      notes.add(`Holds where $${formLatex(real)}$ has a positive real part.`);
    }
  }
  if (numbers.length + special.length + exponent.length === 0) notes.add('Everything cancels.');
  return [...notes];
}

/** -i times the part of x with an i: what decays in e^(2 pi i x). */
function realPart(x: Form): Form {
  return Form.sum(x.split().filter((part) => part.terms[0]?.coefficient.isReal() === false))
    .mul(Form.i)
    .neg();
}

/** What is left at the notebook's values, where more cancels there. */
export function unpairedNotes({ merged, spectrum }: SpectrumView, taken: readonly string[]): string[] {
  if (merged === null) return [];
  const values = [...spectrum.parameters]
    .filter(([name]) => taken.includes(name))
    .map(([name, value]) => `$${symbolLatex(name)}=${formLatex(value)}$`);
  const pieces = unpairedPieces(merged, []).map(({ latex }) => latex);
  return [`At ${values.join(', ')} more cancels: $${pieces.length === 0 ? '1' : pieces.join('\\,')}$.`];
}

export function spectrumChecks({ numbers, closed }: SpectrumView): SpectrumCheck[] {
  const checks: SpectrumCheck[] = [];
  if (numbers !== null) {
    const { scale } = numbers.factors;
    checks.push({
      id: 'scale',
      verdict: scale.isZero() ? 'holds' : 'fails',
      says: scale.isZero()
        ? 'The determinant does not depend on the unit of the eigenvalues.'
        : `Multiplying every linear factor by $c$ multiplies the determinant by $c${scale.equals(Form.one) ? '' : `^{${sumLatex(scale)}}`}$.`,
      formula: '\\sum_j\\zeta_j(0)=0',
      source: 'DLMF 25.11.14 for each linear factor',
    });
    const anomaly = numbers.operator?.anomaly;
    if (anomaly !== undefined) {
      checks.push({
        id: 'anomaly',
        verdict: anomaly.isZero() ? 'holds' : 'fails',
        says: anomaly.isZero()
          ? 'Regularised by operator the determinant is the same as by factors.'
          : `Regularised by operator the logarithm of the determinant is larger by $${sumLatex(anomaly)}$ than by factors.`,
        formula: '\\log\\det\\Bigl(\\prod_j\\lambda_j\\Bigr)=\\sum_j\\log\\det\\lambda_j',
        source: 'residue formula, Wodzicki 1987; Kontsevich and Vishik 1994, hep-th/9406140',
      });
    }
  }
  if (!isRemark(closed)) {
    const { points, worst } = closed.check;
    const digits = worst === 0 ? 15 : Math.min(15, Math.floor(-Math.log10(worst)));
    checks.push({
      id: 'closed-form',
      verdict: 'holds',
      says: `The closed form agrees with the regularised product to ${digits} digits${points > 1 ? ` at ${points} points` : ''}.`,
      formula: '',
      source: 'both sides evaluated, each by its own routine',
    });
  }
  return checks;
}
