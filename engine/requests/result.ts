import type { FormulaForm, Severity, Span } from '../language/tree';
import type { PairingTable } from '../latex/mode-pairing';

/**
 * What the engine answers with: plain data that crosses to the page, to the batch command and into files unchanged.
 * Numbers are decimal strings with every printed digit right; LaTeX is a string; failures are values.
 */

/** A problem as shown: offsets for the editor, line and column (both from 1) for people and the batch output. */
export interface Problem {
  readonly span: Span;
  readonly line: number;
  readonly column: number;
  readonly severity: Severity;
  readonly message: string;
}

/** The notebook as cards in the order of the text; everything here is cheap enough to follow a keystroke. */
export interface Outline {
  readonly title: string;
  readonly cards: readonly Card[];
  readonly problems: readonly Problem[];
}

export type Card = ProseCard | ParameterCard | TheoryCard | SpectrumCard | RequestCard;

interface CardBase {
  /** Stable while the text around it changes: kind, name and occurrence. */
  readonly id: string;
  readonly span: Span;
  readonly line: number;
}

export interface ProseCard extends CardBase {
  readonly kind: 'prose';
  readonly text: string;
}

/** A `let`; with a range the page gives it a slider that edits `valueSpan`. */
export interface ParameterCard extends CardBase {
  readonly kind: 'let';
  readonly name: string;
  readonly latex: string;
  readonly valueText: string;
  readonly valueSpan: Span;
  readonly value: number | null;
  readonly range: { readonly from: number; readonly to: number } | null;
}

export interface TheoryCard extends CardBase {
  readonly kind: 'theory';
  readonly name: string;
  readonly nameSpan: Span;
  /** Caption after the name, LaTeX: sphere, squashing; and in words the supersymmetry. */
  readonly sphereLatex: string;
  readonly supersymmetry: string;
  readonly columns: readonly TheoryColumn[];
  readonly rows: readonly TheoryRow[];
  /** Kinds of multiplet that this sphere takes, for the button that adds one. */
  readonly multipletKinds: readonly string[];
  /** Where a new row goes (offset of the end of the last row or of the header), and the indentation to use. */
  readonly insertRowAt: number | null;
  /** Where a line for a new group goes. */
  readonly insertGroupAt: number | null;
  readonly indent: string;
  readonly checks: readonly Check[];
  readonly formulas: Readonly<Record<FormulaForm, FormulaView>>;
  /** The form to show first: elementary where nothing else is left, else special functions. */
  readonly preferredForm: FormulaForm;
  /** Notations to choose from, LaTeX labels; the index is passed back in `OutlineOptions`. */
  readonly notations: readonly string[];
  /** Names of the `let` parameters this theory uses. */
  readonly parameters: readonly string[];
}

export interface TheoryColumn {
  readonly name: string;
  /** Header in LaTeX: `U(2)_1`, `SU(3)`, `R`. */
  readonly latex: string;
  readonly role: 'gauge' | 'flavor' | 'R';
  /** Normalised group name (`SU(3)`), for the representation chooser; null for R. */
  readonly group: string | null;
  /** Where the column's name stands in the header of the table. */
  readonly headSpan: Span;
  /** The group as typed, and where; null for R and for names of no group. */
  readonly typed: { readonly text: string; readonly span: Span } | null;
}

export interface TheoryRow {
  readonly kind: string;
  readonly name: string;
  readonly latex: string;
  readonly span: Span;
  /** The whole line including its line break, for removing, copying and moving. */
  readonly lineSpan: Span;
  readonly nameSpan: Span;
  readonly cells: readonly {
    readonly text: string;
    /** Null where the cell could not be read; the text is then shown as it is. */
    readonly latex: string | null;
    readonly span: Span;
  }[];
}

export type Verdict = 'holds' | 'fails' | 'unknown';

export interface Check {
  readonly id: string;
  readonly verdict: Verdict;
  /** One sentence with the figures, plain words with `$...$` formulas. */
  readonly says: string;
  /** The formula checked, LaTeX, and where it is from. */
  readonly formula: string;
  readonly source: string;
}

export type FormulaView =
  | {
      readonly kind: 'formula';
      /** Left-hand side with the equals sign, LaTeX. */
      readonly lead: string;
      /** One element a factor, so that one changed factor is one re-rendered element. */
      readonly pieces: readonly FormulaPiece[];
      /** The whole as one LaTeX display, for copying. */
      readonly latex: string;
      /** Remarks in words below the formula (`$...$` allowed). */
      readonly notes: readonly string[];
      /** Of all modes, where it is known: which bosons and fermions pair; and the tables as one LaTeX array. */
      readonly pairing?: { readonly tables: readonly PairingTable[]; readonly latex: string };
    }
  | { readonly kind: 'refused'; readonly message: string };

export interface FormulaPiece {
  readonly latex: string;
  /** Multiplets it stems from (row names; `vector` for the vector multiplet), to light up together. */
  readonly from: readonly string[];
  /** Expanded form of the piece (all weights), shown on demand; null when it is the same. */
  readonly expanded: string | null;
  /** Number of weights where they are too many to be sent along; they are asked for page by page. */
  readonly weights?: number;
}

export interface SpectrumCard extends CardBase {
  readonly kind: 'spectrum';
  readonly name: string;
  readonly towers: readonly {
    readonly kind: string;
    readonly latex: string;
    readonly span: Span;
    /** Spins of SU(2) x SU(2), LaTeX, where the modes are those of a field on S^3. */
    readonly spins: string | null;
  }[];
  readonly pairing: readonly {
    /** Class of linear factors, LaTeX, and the net multiplicity left, LaTeX. */
    readonly factor: string;
    readonly rows: readonly { readonly tower: string; readonly multiplicity: string }[];
    readonly left: string;
  }[];
  readonly formulas: { readonly product: FormulaView; readonly unpaired: FormulaView; readonly closed: FormulaView };
  readonly checks: readonly Check[];
}

/** A request that is answered separately by `run`; here only how it reads. */
export interface RequestCard extends CardBase {
  readonly kind: 'request';
  readonly request: RequestKind;
  /** Caption: what is asked, in words, and its conditions in LaTeX: `\sigma_1 = 0.3`. */
  readonly caption: string;
  readonly conditions: string;
  /** The request as typed, comments dropped, blanks folded. */
  readonly text: string;
  /** Changes exactly when the answer may change; equal keys may share an answer. */
  readonly key: string;
  /** Names of `let` parameters with ranges that the answer depends on (sliders under a plot). */
  readonly parameters: readonly string[];
}

export type RequestKind = 'formula' | 'value' | 'plot' | 'representation' | 'integrate' | 'extremize' | 'compare';

export interface DecimalComplex {
  readonly re: string;
  readonly im: string;
  /** Upper bound of |true - printed|, same units; `0` for an exact number. */
  readonly error: string;
}

export type Result = FormulaResult | ValueResult | PlotResult | RepresentationResult | FailureResult;

interface ResultBase {
  readonly line: number;
  /** The request as typed (comments dropped, blanks folded). */
  readonly request: string;
  /** Name of the theory, spectrum, group or function asked about. */
  readonly of: string;
  readonly seconds: number;
  /** What was assumed, in words: unset masses taken as zero, ... */
  readonly notes: readonly string[];
}

export interface FailureResult extends ResultBase {
  readonly kind: 'failure';
  readonly failure: { readonly message: string };
}

export interface FormulaResult extends ResultBase {
  readonly kind: 'formula';
  readonly formula: FormulaView;
}

export interface ValueResult extends ResultBase {
  readonly kind: 'value';
  readonly value: DecimalComplex;
  readonly digits: number;
  readonly crossCheck: { readonly route: string; readonly agrees: string } | null;
  /** Only of determinants. */
  readonly zeta0?: DecimalComplex;
  readonly scale?: DecimalComplex;
  readonly anomaly?: DecimalComplex;
  /** Products cut off, local counterterms subtracted: what the regularised value is the limit of. */
  readonly convergence?: readonly {
    readonly cutoff: number;
    /** Logarithm of the product up to the cut-off, and the counterterms added to it. */
    readonly product: DecimalComplex;
    readonly counterterms: DecimalComplex;
    readonly regulated: DecimalComplex;
    /** Distance from the regularised logarithm, to two digits. */
    readonly distance: string;
  }[];
}

export interface PlotResult extends ResultBase {
  readonly kind: 'plot';
  readonly axes: readonly PlotAxis[];
  /** One for each curve; a map has exactly one and `z` row by row (y outer). */
  readonly series: readonly PlotSeries[];
  /** Points on the axis where the plotted quantity vanishes or diverges. */
  readonly marks: readonly PlotMark[];
  /** Asymptotic curves drawn thin, same x as the series. */
  readonly asymptotes: readonly PlotSeries[];
}

export interface PlotAxis {
  readonly name: string;
  readonly latex: string;
  readonly from: number;
  readonly to: number;
}

/** Values that are not finite are null, so that the data survive JSON. */
export interface PlotSeries {
  readonly name: string;
  readonly x: readonly number[];
  readonly y: readonly (number | null)[];
  readonly z?: readonly (readonly (number | null)[])[];
}

export interface PlotMark {
  readonly kind: 'zero' | 'pole';
  readonly x: number;
  readonly order: number;
  readonly series: number;
}

export interface RepresentationResult extends ResultBase {
  readonly kind: 'representation';
  readonly latex: string;
  readonly dimension: string;
  readonly index: string;
  readonly cubic: string;
  readonly reality: string;
  readonly weights: number;
  readonly parts: readonly {
    readonly labels: readonly number[];
    readonly dimension: string;
    readonly multiplicity: number;
  }[];
  readonly dominant?: readonly { readonly labels: readonly number[]; readonly multiplicity: number }[];
}

/** Long work reports how far it is and asks whether to go on. */
export interface Progress {
  readonly done: number;
  readonly of: number;
  readonly says: string;
}
