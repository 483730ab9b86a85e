import type { Form } from '../exact/form';

/** A stretch of the notebook's text, as UTF-16 offsets: from inclusive, to exclusive. */
export interface Span {
  readonly from: number;
  readonly to: number;
}

export type Severity = 'error' | 'warning' | 'hint';

/**
 * A problem in the text. `code` names an entry of the wording table, `data` fills it in; nothing but
 * `language/wording` turns it into a sentence.
 */
export interface Diagnostic {
  readonly code: string;
  readonly span: Span;
  readonly severity: Severity;
  readonly data: Readonly<Record<string, string>>;
}

/** A word as typed, with its place; Greek letters are spelt out in `name` (`σ1` is `sigma1`). */
export interface Name {
  readonly name: string;
  readonly span: Span;
}

/** A cell or a word whose meaning a later stage decides. */
export interface Word {
  readonly text: string;
  readonly span: Span;
}

/** An expression, read exactly; `names` are the symbols in it with their places. */
export interface Expression {
  readonly span: Span;
  readonly text: string;
  readonly form: Form;
  readonly names: readonly Name[];
}

export interface Notebook {
  readonly blocks: readonly Block[];
  readonly diagnostics: readonly Diagnostic[];
}

export type Block = Prose | Parameter | TheoryBlock | SpectrumBlock | Request;

/** CommonMark between pieces of work. */
export interface Prose {
  readonly kind: 'prose';
  readonly span: Span;
  readonly text: string;
}

/** `let r = 1/3` or `let m = 0.2 in -2 .. 2`. */
export interface Parameter {
  readonly kind: 'let';
  readonly span: Span;
  readonly name: Name;
  readonly value: Expression;
  readonly range: { readonly from: Expression; readonly to: Expression } | null;
}

export type SphereName = 'S2' | 'S3' | 'S4' | 'S5';

export interface TheoryBlock {
  readonly kind: 'theory';
  readonly span: Span;
  readonly name: Name;
  readonly sphere: SphereLine | null;
  readonly groups: readonly GroupLine[];
  readonly mixed: readonly MixedLine[];
  readonly supersymmetry: { readonly value: number; readonly span: Span } | null;
  readonly header: MatterHeader | null;
  readonly multiplets: readonly MultipletRow[];
  readonly superpotential: readonly Monomial[];
  /** False when something in it could not be read, which is then a diagnostic: the block lacks what was there. */
  readonly sound: boolean;
}

export interface SphereLine {
  readonly span: Span;
  readonly sphere: { readonly name: SphereName; readonly span: Span };
  /** `b = 5/4`, `w1 = 1`, ... as written; which of them a sphere takes is the sphere's affair. */
  readonly options: readonly { readonly name: Name; readonly value: Expression; readonly span: Span }[];
}

export type GroupOption =
  | { readonly kind: 'coulomb' | 'mass'; readonly symbol: Name; readonly span: Span }
  | {
      readonly kind: 'level' | 'abelian' | 'fi' | 'theta' | 'coupling';
      readonly value: Expression;
      readonly span: Span;
    };

export interface GroupLine {
  readonly span: Span;
  readonly role: 'gauge' | 'flavor';
  readonly name: Name;
  /** As typed: `U(2)`, `SU(3)`, `E8`. */
  readonly group: Word;
  readonly options: readonly GroupOption[];
}

/** `mixed G H = k`. */
export interface MixedLine {
  readonly span: Span;
  readonly groups: readonly [Name, Name];
  readonly level: Expression;
}

export interface MatterHeader {
  readonly span: Span;
  /** Column names in order; the name `R` is the R-charge column. */
  readonly columns: readonly Name[];
}

export type MultipletKind = 'chiral' | 'hyper' | 'halfhyper' | 'twisted';

export interface MultipletRow {
  readonly kind: MultipletKind;
  readonly span: Span;
  readonly name: Name;
  /** As many as were typed; a missing or surplus cell is already a diagnostic. `expression` is set where the cell can be read as one. */
  readonly cells: readonly (Word & { readonly expression: Expression | null })[];
}

/** A product of fields, each to a positive power, in the superpotential. */
export interface Monomial {
  readonly span: Span;
  readonly fields: readonly { readonly field: Name; readonly power: number }[];
}

export interface SpectrumBlock {
  readonly kind: 'spectrum';
  readonly span: Span;
  readonly name: Name;
  readonly indices: readonly IndexRange[];
  readonly towers: readonly TowerRow[];
  /** False when something in it could not be read, which is then a diagnostic: the block lacks what was there. */
  readonly sound: boolean;
}

/** `n >= 0`, or `n = 1 .. 5`. */
export interface IndexRange {
  readonly span: Span;
  readonly name: Name;
  readonly from: Expression;
  readonly to: Expression | null;
}

export type TowerKind = 'boson' | 'complex boson' | 'fermion' | 'real fermion' | 'power';

export interface TowerRow {
  readonly kind: TowerKind;
  readonly span: Span;
  /** The exponent p of `power(p)`. */
  readonly exponent: Expression | null;
  /** The eigenvalue as a product of the factors it was written in, each to a positive power. */
  readonly eigenvalue: readonly { readonly factor: Expression; readonly power: number }[];
  /** `times ...`; absent: 1. */
  readonly degeneracy: Expression | null;
  /** The tower's own ranges, `for n >= 1`. */
  readonly ranges: readonly IndexRange[];
}

export type Request =
  | FormulaRequest
  | ValueRequest
  | PlotRequest
  | RepresentationRequest
  | IntegrateRequest
  | ExtremizeRequest
  | CompareRequest;

interface RequestBase {
  readonly span: Span;
}

export type FormulaForm = 'modes' | 'unpaired' | 'functions' | 'elementary';

/** `formula electric as elementary`; `subject` is a theory or a spectrum. */
export interface FormulaRequest extends RequestBase {
  readonly kind: 'formula';
  readonly subject: Name;
  readonly form: FormulaForm | null;
}

export interface ValueRequest extends RequestBase {
  readonly kind: 'value';
  readonly quantity: Quantity;
  readonly at: readonly Assignment[];
  readonly digits: Digits | null;
}

export type Part = 'abs' | 'arg' | 're' | 'im' | 'log';

export interface PlotRequest extends RequestBase {
  readonly kind: 'plot';
  readonly curves: readonly { readonly part: Part | null; readonly quantity: Quantity }[];
  readonly over: readonly RangeClause[];
  readonly at: readonly Assignment[];
}

/** `representation SU(3): fund x sym2`. The representation's words are read by `lie/`. */
export interface RepresentationRequest extends RequestBase {
  readonly kind: 'representation';
  readonly group: Word;
  readonly representation: Word;
}

export interface IntegrateRequest extends RequestBase {
  readonly kind: 'integrate';
  readonly theory: Name;
  readonly at: readonly Assignment[];
  readonly digits: Digits | null;
}

export interface ExtremizeRequest extends RequestBase {
  readonly kind: 'extremize';
  readonly theory: Name;
  readonly over: readonly Name[];
  readonly at: readonly Assignment[];
  readonly digits: Digits | null;
}

export interface CompareRequest extends RequestBase {
  readonly kind: 'compare';
  readonly theories: readonly [Name, Name];
  readonly over: readonly RangeClause[];
  readonly at: readonly Assignment[];
  readonly digits: Digits | null;
}

export interface Digits {
  readonly value: number;
  readonly span: Span;
}

export interface Assignment {
  readonly name: Name;
  readonly value: Expression;
}

export interface RangeClause {
  readonly name: Name;
  readonly from: Expression;
  readonly to: Expression;
}

/** `log` in front of a quantity asks for its logarithm. */
export type Quantity =
  | {
      /** `one-loop`, `vector`, `classical`, `integrand`, a multiplet's name, or a coefficient of a series, of a theory. */
      readonly kind: 'theory';
      readonly log: boolean;
      readonly what: Name;
      /** Orders of a coefficient, one for each gauge group: `instanton(1, 2)`. */
      readonly orders?: readonly number[];
      readonly theory: Name;
      readonly span: Span;
    }
  | {
      readonly kind: 'determinant';
      readonly log: boolean;
      readonly spectrum: Name;
      readonly prescription: 'factors' | 'operator';
      readonly span: Span;
    }
  | {
      /** A special function of given arguments; arguments are separated by commas or semicolons. */
      readonly kind: 'function';
      readonly log: boolean;
      readonly function: Name;
      readonly arguments: readonly Expression[];
      readonly span: Span;
    };
