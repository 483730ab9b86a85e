import { FormError } from '../exact/form';
import { weightsLatex } from '../latex/product';
import type { Analysis } from './analysis';
import { formProduct } from './formula';
import { printableTheory } from './formula-request';

/** Weights on a page: as many as are typeset without a pause. */
export const PAGE_SIZE = 200;

/** Some of the weights of a piece of a formula, numbered from 1, written out. */
export type WeightPage =
  | { readonly kind: 'page'; readonly latex: string; readonly from: number; readonly to: number; readonly of: number }
  | { readonly kind: 'none' };

/** Page `page`, from 0, of the piece that a theory's formula prints as `latex`, in whichever form it does. */
export function weightPage(
  analysis: Analysis,
  name: string,
  latex: string,
  page: number,
  notation: number,
): WeightPage {
  const printable = printableTheory(analysis, name, notation);
  if (printable === null) return { kind: 'none' };
  const range = [page * PAGE_SIZE, (page + 1) * PAGE_SIZE] as const;
  try {
    for (const form of ['elementary', 'functions'] as const) {
      const product = formProduct(printable, form)?.product ?? [];
      const found = weightsLatex(printable.theory.groups, product, notation, latex, range);
      if (found === null) continue;
      return {
        kind: 'page',
        latex: found.latex,
        from: range[0] + 1,
        to: Math.min(range[1], found.size),
        of: found.size,
      };
    }
  } catch (error) {
    if (!(error instanceof FormError)) throw error;
  }
  return { kind: 'none' };
}
