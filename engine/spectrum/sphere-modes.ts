import { Form } from '../exact/form';
import { LEVEL, levelTower } from './level-tower';
import type { Spectrum } from './tower';

const n = Form.symbol(LEVEL);

/**
 * Modes of three-dimensional multiplets on the round unit S^3, before bosons and fermions are paired (Kapustin, Willett
 * and Yaakov 2009, arXiv:0909.4559; Jafferis 2010, arXiv:1012.3210; the scalar operator includes the D-term).
 * Fermions with eigenvalues -(n + ...) are entered without the sign, as usual.
 */

/**
 * A chiral multiplet of R-charge `charge` whose weights pair with scalars and masses to w: with z = charge - i w the
 * scalar (n + z)(n + 2 - z), (n+1)^2 each, and spinors n + 2 - z and n + 1 + z, (n+1)(n+2) each.
 */
export function chiralModes(charge: Form, weights: readonly Form[]): Spectrum {
  const towers = weights.flatMap((weight) => {
    const z = charge.sub(Form.i.mul(weight));
    const opposite = Form.number(2).sub(z);
    const level = n.add(Form.one);
    const spinors = level.mul(n.add(Form.number(2)));
    return [
      levelTower('complex boson', [n.add(z), n.add(opposite)], level.mul(level), 0, 'scalar'),
      levelTower('fermion', [n.add(opposite)], spinors, 0, 'spinor, positive eigenvalues'),
      levelTower('fermion', [n.add(Form.one).add(z)], spinors, 0, 'spinor, negative eigenvalues'),
    ];
  });
  return { name: 'chiral', towers, parameters: new Map() };
}

/**
 * A vector multiplet: for each pair of roots +-alpha, x = alpha(sigma), coexact one-forms (n+1)^2 + x^2, 2n(n+2) each,
 * and gaugini n +- ix and n + 1 +- ix, n(n+1) each, n >= 1. Ghosts, longitudinal modes and the scalar cancel level by
 * level. The Vandermonde factor x^2 of the integral over the Cartan algebra is not in it.
 */
export function vectorModes(positiveRoots: readonly Form[]): Spectrum {
  const towers = positiveRoots.flatMap((x) => {
    const turned = Form.i.mul(x);
    const next = n.add(Form.one);
    const gaugini = n.mul(next);
    return [
      levelTower(
        'complex boson',
        [next.add(turned), next.sub(turned)],
        n.mul(n.add(Form.number(2))).scale(2),
        1,
        'one-form',
      ),
      levelTower('fermion', [n.add(turned)], gaugini, 1, 'gaugino, positive eigenvalues'),
      levelTower('fermion', [next.sub(turned)], gaugini, 1, 'gaugino, negative eigenvalues'),
      levelTower('fermion', [n.sub(turned)], gaugini, 1, 'gaugino of the opposite root, positive eigenvalues'),
      levelTower('fermion', [next.add(turned)], gaugini, 1, 'gaugino of the opposite root, negative eigenvalues'),
    ];
  });
  return { name: 'vector', towers, parameters: new Map() };
}
