import { FormError } from '../exact/form';
import { functions } from '../functions/table';
import type { FormulaForm } from '../language/tree';
import { formLatex } from '../latex/form';
import { pairingLatex, pairingTables } from '../latex/mode-pairing';
import { modesLatex } from '../latex/modes';
import { displayLatex, type Piece, productLatex } from '../latex/product';
import { symbolLatex } from '../latex/symbol';
import { fluxStem, stemOf } from '../latex/weights';
import { collectEqual, simplify } from '../product/simplify';
import { type ElementaryProduct, isOpen } from '../spheres/quantity';
import type { Sphere, TheoryProduct } from '../spheres/sphere';
import { gaugeGroups, type Theory } from '../theory/theory';
import type { FormulaView } from './result';

/** A theory ready to be printed: what all four forms are made from. */
export interface Printable {
  readonly sphere: Sphere;
  readonly theory: Theory;
  readonly notation: number;
  /** The one-loop product as it comes from the multiplets. */
  readonly oneLoop: TheoryProduct;
  /** The same in elementary functions as far as they go, at the values of parameters without a range; worked out once. */
  readonly elementary: () => ElementaryProduct;
  /** Pieces of products already printed, by the product: where nothing reduces, two forms are one. */
  readonly printed: Map<string, readonly Piece[]>;
}

export const FORMS: readonly FormulaForm[] = ['modes', 'unpaired', 'functions', 'elementary'];

/** The product behind a form, and the parameter values it holds at; null for the modes, which are no such product. */
export function formProduct(printable: Printable, form: FormulaForm): ElementaryProduct | null {
  const { oneLoop: raw } = printable;
  switch (form) {
    case 'modes':
      return null;
    case 'unpaired':
      return { product: collectEqual(raw), at: [] };
    case 'functions':
      return { product: simplify(raw, 'functions'), at: [] };
    case 'elementary':
      return printable.elementary();
  }
}

/** One form of a theory's one-loop formula; a refusal where exact values leave it undefined. */
export function formulaView(printable: Printable, form: FormulaForm): FormulaView {
  try {
    return definedView(printable, form);
  } catch (error) {
    if (!(error instanceof FormError)) throw error;
    return { kind: 'refused', message: `${error.message} Change the values that lead to it.` };
  }
}

function definedView(printable: Printable, form: FormulaForm): FormulaView {
  const { sphere, theory, notation } = printable;
  const notes = [...sphere.conventions(theory), ...dependentNotes(theory)];
  const made = formProduct(printable, form);
  if (made === null) {
    const modes = sphere.modes(theory);
    if (modes.kind === 'refused') return { kind: 'refused', message: modes.message };
    const shown = view(printable, modesLatex(theory.groups, modes.towers), notes);
    const tables = pairingTables(theory.groups, modes.towers);
    return shown.kind === 'refused' || tables.length === 0
      ? shown
      : { ...shown, pairing: { tables, latex: pairingLatex(tables) } };
  }
  const style = form === 'unpaired' ? ({ kind: 'modes' } as const) : ({ kind: 'function', notation } as const);
  const key = `${style.kind}|${made.product.map(factorKey).join('|')}`;
  const pieces = printable.printed.get(key) ?? productLatex(theory.groups, made.product, style);
  printable.printed.set(key, pieces);
  return view(printable, pieces, [...remarks(form, made), ...notes]);
}

function factorKey({ name, argument, parameters, power, weights, half, from }: TheoryProduct[number]): string {
  return [name, argument.key, parameters.map((p) => p.key), power, weights?.key, half, from].join(';');
}

/** What the reader of an elementary formula has to know: where it holds, and what could not be reduced. */
function remarks(form: FormulaForm, { product, at }: ElementaryProduct): string[] {
  if (form !== 'elementary') return [];
  const values = at.map(({ name, value }) => `$${symbolLatex(name)}=${formLatex(value)}$`).join(', ');
  const left = [...new Set(product.filter(isOpen).map(({ name }) => functions[name].notations[0]?.label ?? name))];
  return [
    ...(at.length > 0 ? [`Holds at ${values}.`] : []),
    ...(left.length > 0 ? [`What is left in $${left.join(',')}$ has no elementary form at these charges.`] : []),
  ];
}

function view({ sphere, theory }: Printable, pieces: readonly Piece[], notes: readonly string[]): FormulaView {
  const lead = `${leadLatex(sphere, theory)}=`;
  const shown: readonly Piece[] = pieces.length === 0 ? [{ latex: '1', from: [], expanded: null }] : pieces;
  return { kind: 'formula', lead, pieces: shown, latex: displayLatex(lead, shown), notes };
}

/** Z_{1-loop}(sigma), with all Coulomb stems. */
function leadLatex(sphere: Sphere, theory: Theory): string {
  const stems = gaugeGroups(theory).flatMap(({ group }) => [
    symbolLatex(stemOf(group)),
    ...(sphere.fluxes ? [symbolLatex(fluxStem(group))] : []),
  ]);
  return `Z_{\\text{1-loop}}${stems.length === 0 ? '' : `(${stems.join(',')})`}`;
}

/** Relations among printed coordinates that are not independent. */
function dependentNotes(theory: Theory): string[] {
  return theory.groups.flatMap((group) => {
    if (group.dependent.size === 0) return [];
    const stem = symbolLatex(stemOf(group));
    if (group.dependent.size === 1) return [`$\\sum_a ${stem}_a=0$`];
    return [...group.dependent].map(([name, form]) => `$${symbolLatex(name)}=${formLatex(form)}$`);
  });
}
