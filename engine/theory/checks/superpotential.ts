import { formDouble } from '../../arithmetic/form-double';
import { Form } from '../../exact/form';
import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import type { SuperpotentialTerm, Theory, TheoryGroup } from '../theory';
import type { Condition, Finding } from './condition';
import { containsSinglet } from './singlet';
import { decimal, groupLatex, listWords, nameLatex, rationalLatex } from './words';

const SOURCE =
  'E. Witten, hep-th/9301042 (1993); O. Aharony, A. Hanany, K. Intriligator, N. Seiberg, M. J. Strassler, hep-th/9703110 (1997)';

/** Two numbers closer than this are taken as equal as far as doubles can tell. */
const RESOLUTION = 1e-11;

/** Every monomial of the superpotential is neutral under all gauge and flavour groups and has R-charge 2. */
export const superpotential: Condition = {
  id: 'superpotential',
  title: 'Superpotential',
  examine: (theory, print) =>
    theory.superpotential.flatMap((term) => [neutrality(theory, term, print), rCharge(theory, term, print)]),
};

function monomialLatex(term: SuperpotentialTerm, print: Printer): string {
  return term.fields
    .map(({ field, power }) => nameLatex(field.name, print) + (power === 1 ? '' : `^{${power}}`))
    .join('\\,');
}

function monomialName(term: SuperpotentialTerm): string {
  return term.fields.map(({ field, power }) => (power === 1 ? field.name : `${field.name}^${power}`)).join(' ');
}

function neutrality(theory: Theory, term: SuperpotentialTerm, print: Printer): Finding {
  const monomial = monomialLatex(term, print);
  const { answer, missing } = containsSinglet(
    theory.groups.map(({ group }) => group),
    term.fields.map(({ multiplet, power }) => ({
      representations: multiplet.representations,
      power,
      withDual: multiplet.kind === 'hyper',
    })),
  );
  const says = {
    yes: `$${monomial}$ is neutral under every group.`,
    no: `$${monomial}$ is not neutral: ${listWords(missing.map((index) => chargeWords(theory, term, index, print)))}.`,
    'symmetry unknown': `$${monomial}$ has singlets of every group; whether one is left when equal fields are symmetrised was not worked out.`,
    'too large': `$${monomial}$: the product of the representations is too large to search for a singlet.`,
  }[answer];
  return {
    detail: `${monomialName(term)} neutral`,
    verdict: answer === 'yes' ? 'holds' : answer === 'no' ? 'fails' : 'unknown',
    says,
    formula: '\\mathbf{1}\\subset\\bigotimes_i R_i,\\qquad\\sum_i q_i=0',
    source: SOURCE,
  };
}

/** `its charge under $A$ is $1+1-1=1$`, or that there is no singlet of the group. */
function chargeWords(theory: Theory, term: SuperpotentialTerm, index: number, print: Printer): string {
  const group = theory.groups[index] as TheoryGroup;
  const charges = term.fields.map(({ multiplet, power }) => {
    const [only, ...others] = multiplet.representations[index]?.irreps ?? [];
    const known = only !== undefined && others.length === 0 && multiplet.kind !== 'hyper';
    return known ? { charge: only.charge, power } : null;
  });
  if (group.group.abelianRank > 0 && !charges.includes(null)) {
    const known = charges as { charge: Rational; power: number }[];
    const sum = known.reduce((total, { charge, power }) => total.add(charge.mul(Rational.of(power))), Rational.zero);
    if (!sum.isZero()) {
      const terms = known
        .filter(({ charge }) => !charge.isZero())
        .map(({ charge, power }, k) => {
          const size = rationalLatex(charge);
          const sign = k > 0 && charge.sign() > 0 ? '+' : '';
          if (power === 1) return sign + size;
          return `${k > 0 ? '+' : ''}${power}\\cdot ${charge.sign() < 0 ? `(${size})` : size}`;
        });
      return `its charge under $${groupLatex(group, print)}$ is $${terms.join('')}=${rationalLatex(sum)}$`;
    }
  }
  return `it has no singlet of $${groupLatex(group, print)}$`;
}

function rCharge(theory: Theory, term: SuperpotentialTerm, print: Printer): Finding {
  const sum = Form.sum(term.fields.map(({ multiplet, power }) => multiplet.rCharge.scale(power)));
  const excess = sum.sub(Form.number(2));
  const shown = `$${monomialLatex(term, print)}$ has $R=${rSumLatex(term, print)}`;
  const common = {
    detail: `${monomialName(term)} R`,
    formula: 'R(W)=\\sum_i R_i=2',
    source: SOURCE,
  };
  if (excess.isZero()) return { ...common, verdict: 'holds', says: `${shown}=2$.` };
  const value = excess.substitute((name) => theory.parameters.get(name) ?? null);
  const simplified = print.form(sum);
  const through = simplified === rSumLatex(term, print) ? shown : `${shown}=${simplified}`;
  if (value.isZero()) return { ...common, verdict: 'holds', says: `${through}$, which is $2$ at the given values.` };
  const numeric = formDouble(value, () => null);
  const size = numeric === null ? Number.NaN : Math.hypot(numeric.re, numeric.im);
  if (numeric === null || !(size > RESOLUTION)) {
    return {
      ...common,
      verdict: 'unknown',
      says: `${through}$; numbers alone do not tell whether that is exactly $2$.`,
    };
  }
  return { ...common, verdict: 'fails', says: `${through}$, ${excessWords(value, numeric)}${atValues(sum)}.` };
}

function atValues(sum: Form): string {
  return sum.symbols().length > 0 ? ' at the given values' : '';
}

function excessWords(value: Form, numeric: { re: number; im: number }): string {
  if (Math.abs(numeric.im) > RESOLUTION) return 'not $2$ but complex';
  const rational = value.toRational();
  const size = rational ? rationalLatex(rational.abs()) : `\\approx ${decimal(Math.abs(numeric.re))}`;
  return `$${size}$ too ${numeric.re > 0 ? 'much' : 'little'}`;
}

/** `(2-2r)+r+r`, one summand a field. */
function rSumLatex(term: SuperpotentialTerm, print: Printer): string {
  return term.fields
    .map(({ multiplet, power }, k) => {
      const text = print.form(multiplet.rCharge);
      const compound = /[+-]/.test(text.slice(1)) || (text.startsWith('-') && (k > 0 || power > 1));
      const wrapped = compound ? `(${text})` : text;
      if (power === 1) return wrapped;
      return /^[0-9\\]/.test(wrapped) ? `${power}\\cdot ${wrapped}` : `${power}${wrapped}`;
    })
    .join('+');
}
