import { Form } from '../exact/form';
import type { Span, TowerKind } from '../language/tree';
import { isRemark } from '../spectrum/analyse';
import type { ModeClass, Pairing } from '../spectrum/pairing';
import type { SeveralClass } from '../spectrum/pairing-several';
import { addPolynomials, type Polynomial, polynomialIn, shiftPolynomial } from '../spectrum/polynomial';
import { spinsOnThreeSphere } from '../spectrum/sphere-spins';
import type { Remark, WrittenTower } from '../spectrum/tower';
import type { SpectrumView } from '../spectrum/view';
import { closedPieces } from './closed-form';
import { indexPolynomialLatex, multiplicityLatex, sumLatex } from './polynomial';
import { displayLatex, type Piece } from './product';
import { indexLetters, niceStart, productPieces, severalFactorLatex, towerLatex, unpairedPieces } from './spectrum';
import { closedNotes, type SpectrumCheck, spectrumChecks, unpairedNotes } from './spectrum-notes';
import { symbolLatex } from './symbol';

/** A formula to show, or why there is none (worded by `language/`). */
export type SpectrumFormula =
  | {
      readonly kind: 'formula';
      readonly lead: string;
      readonly pieces: readonly Piece[];
      readonly latex: string;
      readonly notes: readonly string[];
    }
  | { readonly kind: 'refused'; readonly remark: Remark };

/** One class of factors in the table of pairing. */
export interface PairingLine {
  readonly factor: string;
  readonly rows: readonly { readonly tower: string; readonly multiplicity: string }[];
  readonly left: string;
}

export interface SpectrumPieces {
  readonly towers: readonly {
    readonly kind: TowerKind;
    readonly latex: string;
    readonly span: Span;
    /** Spins of its modes where they are those of a field on S^3; else null. */
    readonly spins: string | null;
  }[];
  readonly pairing: readonly PairingLine[];
  readonly formulas: {
    readonly product: SpectrumFormula;
    readonly unpaired: SpectrumFormula;
    readonly closed: SpectrumFormula;
  };
  readonly checks: readonly SpectrumCheck[];
}

const LEAD = 'Z=';

/** Everything a spectrum's card shows, in LaTeX. */
export function spectrumPieces(view: SpectrumView): SpectrumPieces {
  const { spectrum, prepared, closed } = view;
  const { towers } = spectrum;
  const shown = towers.map((tower, place) => ({
    kind: tower.kind,
    latex: towerLatex(tower),
    span: tower.spans.row,
    spins: spinsLatex(towers, place),
  }));
  const product = formula(productPieces(towers), []);
  if (isRemark(prepared)) {
    const refused: SpectrumFormula = { kind: 'refused', remark: prepared };
    return { towers: shown, pairing: [], formulas: { product, unpaired: refused, closed: refused }, checks: [] };
  }
  const { pairing } = prepared;
  const taken = lettersOf(towers);
  return {
    towers: shown,
    pairing: pairingLines(pairing, towers, taken),
    formulas: {
      product,
      unpaired: formula(unpairedPieces(pairing, taken), unpairedNotes(view, taken)),
      closed: isRemark(closed)
        ? { kind: 'refused', remark: closed }
        : formula(closedPieces(closed.form), closedNotes(closed.form)),
    },
    checks: spectrumChecks(view),
  };
}

/** Of two equal towers of spinors the second is taken to be that of the other sign. */
function spinsLatex(towers: readonly WrittenTower[], place: number): string | null {
  const tower = towers[place] as WrittenTower;
  const text = towerLatex(tower);
  const before = towers.slice(0, place).filter((other) => towerLatex(other) === text).length;
  const letter = symbolLatex(tower.ranges[0]?.name ?? 'n');
  const half = (spin: Form): string => {
    const twice = polynomialIn(spin.scale(2), tower.ranges[0]?.name ?? 'n') ?? [];
    return `\\tfrac{${indexPolynomialLatex(twice, letter)}}{2}`;
  };
  const labels = spinsOnThreeSphere(tower, before % 2 === 1);
  return labels?.map(({ left, right }) => `\\left(${half(left)},${half(right)}\\right)`).join('\\oplus') ?? null;
}

function formula(pieces: readonly Piece[], notes: readonly string[]): SpectrumFormula {
  const shown = pieces.length === 0 ? [{ latex: '1', from: [], expanded: null }] : pieces;
  return { kind: 'formula', lead: LEAD, pieces: shown, latex: displayLatex(LEAD, shown), notes };
}

/** Names of parameters, which indices may not be called. */
export function lettersOf(towers: readonly WrittenTower[]): string[] {
  const names = new Set<string>();
  for (const { eigenvalue, degeneracy, ranges } of towers) {
    const own = new Set(ranges.map(({ name }) => name));
    const forms = [degeneracy, ...eigenvalue.map(({ form }) => form), ...ranges.map(({ from }) => from)];
    for (const form of forms) for (const name of form.symbols()) if (!own.has(name)) names.add(name);
  }
  return [...names];
}

function pairingLines(pairing: Pairing, towers: readonly WrittenTower[], taken: readonly string[]): PairingLine[] {
  const name = (place: number): string => `${towers[place]?.kind ?? 'tower'} ${place + 1}`;
  return [
    ...pairing.classes.map((found) => classLine(found, name, taken)),
    ...pairing.several.map((found) => severalLine(found, name, taken)),
  ];
}

function classLine(
  { polynomial, rows, left }: ModeClass,
  name: (place: number) => string,
  taken: readonly string[],
): PairingLine {
  const [letter = 'n'] = indexLetters(taken, 1);
  // Counted like what is left, or like the longest row where nothing is.
  const guide = left.at(-1) ?? [...rows].sort((a, b) => a.from - b.from)[0];
  if (guide === undefined) return { factor: indexPolynomialLatex(polynomial, letter), rows: [], left: '0' };
  const { first, factor } = niceStart(polynomial, guide, letter);
  const offset = guide.from - first;
  const text = (p: Polynomial, from: number, to: number | null): string => {
    const multiplicity = multiplicityLatex(shiftPolynomial(p, Form.number(offset)), letter);
    const range =
      to === null
        ? `${letter}\\ge ${from - offset}`
        : from === to
          ? `${letter}=${from - offset}`
          : `${from - offset}\\le ${letter}\\le ${to - offset}`;
    return `${multiplicity}\\;\\;(${range})`;
  };
  const cells = mergeRows(rows).map((row) => ({
    tower: name(row.place),
    multiplicity: text(row.multiplicity, row.from, row.to),
  }));
  return {
    factor: indexPolynomialLatex(factor, letter),
    rows: oneEach(cells),
    left: left.length === 0 ? '0' : left.map(({ from, to, multiplicity }) => text(multiplicity, from, to)).join(',\\;'),
  };
}

/** A tower may bring a class several times over the same run. */
function mergeRows(rows: ModeClass['rows']): ModeClass['rows'] {
  const found = new Map<string, ModeClass['rows'][number]>();
  for (const row of rows) {
    const key = `${row.place} ${row.from} ${row.to}`;
    const known = found.get(key);
    found.set(key, known ? { ...row, multiplicity: addPolynomials(known.multiplicity, row.multiplicity) } : row);
  }
  return [...found.values()];
}

/** One cell for each tower. */
function oneEach(cells: PairingLine['rows']): PairingLine['rows'] {
  const found = new Map<string, string>();
  for (const { tower, multiplicity } of cells) {
    const known = found.get(tower);
    found.set(tower, known === undefined ? multiplicity : `${known},\\;${multiplicity}`);
  }
  return [...found].map(([tower, multiplicity]) => ({ tower, multiplicity }));
}

function severalLine(
  { periods, rows, left }: SeveralClass,
  name: (place: number) => string,
  taken: readonly string[],
): PairingLine {
  const letters = indexLetters(taken, periods.length);
  const base = rows[0]?.shift ?? Form.zero;
  const at = (shift: Form, multiplicity: Form): string =>
    shift.equals(base)
      ? sumLatex(multiplicity)
      : `${sumLatex(multiplicity)}\\;\\;(${severalFactorLatex(shift, periods, letters)})`;
  return {
    factor: severalFactorLatex(base, periods, letters),
    rows: oneEach(
      rows.map(({ place, shift, multiplicity }) => ({ tower: name(place), multiplicity: at(shift, multiplicity) })),
    ),
    left: left.length === 0 ? '0' : left.map(({ shift, multiplicity }) => at(shift, multiplicity)).join(',\\;'),
  };
}
