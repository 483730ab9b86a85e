import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { scaleLogarithm } from './anomaly';
import { barnesResidue } from './barnes-polynomial';
import { barnesTerms } from './barnes-term';
import { exactQuotient } from './form-division';
import type { Tower, TowerFactor } from './tower';

type LinearForm = TowerFactor & { kind: 'linear' };

/**
 * log det by operator minus by factors of a tower in several indices, without the exponent: sum over k of
 * Res_{s=k} zeta_N(s, c) times the coefficient of v^-k in sum_j l_j^2/2 - (sum_j l_j)^2/(2 r), v = w.n + c, as for one
 * index (compare Friedman and Ruijsenaars 2004, Adv. Math. 187, 362). Null where the factors are not multiples of
 * linear forms with the same periods: their product has no asymptotic expansion in one variable.
 */
export function severalAnomaly(tower: Tower): Form | null {
  const forms = tower.factors.filter((factor) => factor.kind === 'linear');
  const first = forms[0];
  if (first === undefined) return null;
  const common: { shift: Form; scale: Form; power: number }[] = [];
  for (const form of forms) {
    const ratio = proportion(form, first);
    if (ratio === null) return null;
    const scale = ratio.equals(Form.one) ? Form.zero : Form.call('log', ratio);
    const shift = exactQuotient(form.constant, ratio);
    if (shift === null) return null;
    common.push({ shift, scale: scale.add(scaleLogarithm(form.scale)), power: form.power });
  }
  const center = first.constant;
  const terms = barnesTerms(tower, first);
  const orders = Math.max(0, ...terms.map(({ periods }) => periods.length));
  const braces = bracesOf(common, center, orders, tower.order);
  return Form.sum(
    terms.flatMap(({ periods, multiplicity }) =>
      braces
        .slice(0, periods.length)
        .map((brace, k) => brace.mul(barnesResidue(center, periods, k + 1)).mul(multiplicity)),
    ),
  );
}

/** f = ratio times g in all periods. */
function proportion(f: LinearForm, g: LinearForm): Form | null {
  const ratio = exactQuotient(f.periods[0] as Form, g.periods[0] as Form);
  if (ratio === null) return null;
  return f.periods.every((w, i) => w.equals(ratio.mul(g.periods[i] as Form))) ? ratio : null;
}

/** Coefficients of v^-1, v^-2, ... of the braces. */
function bracesOf(
  factors: readonly { shift: Form; scale: Form; power: number }[],
  center: Form,
  count: number,
  order: number,
): Form[] {
  // log(1 + (x - c)/v) = sum_k (-1)^(k+1) (x - c)^k/(k v^k); place 0 holds the logarithm of the constant.
  const series = factors.map(({ shift, scale }) => {
    const difference = shift.sub(center);
    return Array.from({ length: count + 1 }, (_, k) =>
      k === 0 ? scale : difference.pow(k).scale(Rational.of(k % 2 === 0 ? -1 : 1, k)),
    );
  });
  const total = Array.from({ length: count + 1 }, (_, k) =>
    Form.sum(series.map((l, j) => (l[k] as Form).scale(factors[j]?.power ?? 1))),
  );
  const half = Rational.of(1, 2);
  return Array.from({ length: count }, (_, k) => {
    const squares = series.map((l, j) => squareCoefficient(l, k + 1).scale(factors[j]?.power ?? 1));
    return Form.sum(squares)
      .scale(half)
      .sub(squareCoefficient(total, k + 1).scale(Rational.of(1, 2 * order)));
  });
}

function squareCoefficient(series: readonly Form[], at: number): Form {
  return Form.sum(series.slice(0, at + 1).map((a, i) => a.mul(series[at - i] as Form)));
}
