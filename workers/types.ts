import type { FormulaForm } from '../engine/language/tree';
import type { BuiltinBlock } from '../engine/requests/builtin-text';
import type { FailureResult, Outline, PlotResult, Progress, Result } from '../engine/requests/result';
import type { WeightPage } from '../engine/requests/weight-page';

/** What the page decides about how the engine prints. */
export interface OutlineOptions {
  /** Theory name to the index of the notation chosen for it; absent: the first. */
  readonly notation: Readonly<Record<string, number>>;
}

/** LaTeX of a theory's formula: to paste into a paper, and as a document of its own. */
export interface LatexOutput {
  readonly snippet: string;
  readonly document: string;
  /** Why there is none, in words; the strings are then empty. */
  readonly refused?: string;
}

/** One line of the representation chooser. */
export interface RepresentationChoice {
  /** What is written into the cell of the charge table. */
  readonly word: string;
  readonly latex: string;
  readonly dimension: string;
  readonly index: string;
  readonly reality: string;
  readonly labels: readonly number[];
  /** Rows of the Young diagram, longest first; null where the representation has none. */
  readonly young: readonly number[] | null;
}

/** Help on the word under the pointer; lines may hold `$...$`. */
export interface HoverHelp {
  readonly title: string;
  readonly lines: readonly string[];
}

/**
 * The page's way to the engine. Every call carries the revision of the text it speaks of; an answer that a later
 * call of the same kind has overtaken arrives as null and is dropped. Promises reject for defects only: what the
 * user can mend comes as problems and failures inside the answers. Aborting the signal of `run` ends its promise
 * with null.
 */
export interface EngineClient {
  outline(text: string, options: OutlineOptions, revision: number): Promise<Outline | null>;
  run(
    text: string,
    requestKey: string,
    revision: number,
    onProgress: (progress: Progress) => void,
    signal: AbortSignal,
  ): Promise<Result | null>;
  /** A curve while a slider moves: parameters take the given values, the text stays; the latest call of a request wins. */
  plotFast(
    text: string,
    requestKey: string,
    overrides: Readonly<Record<string, number>>,
    revision: number,
  ): Promise<PlotResult | FailureResult | null>;
  document(text: string, theoryName: string, form: FormulaForm, options: OutlineOptions): Promise<LatexOutput>;
  /** Weights of a piece of a formula, written out, so many a page; the piece is named by its LaTeX. */
  weightPage(
    text: string,
    theoryName: string,
    latex: string,
    page: number,
    options: OutlineOptions,
  ): Promise<WeightPage>;
  representations(group: string, limit: number): Promise<readonly RepresentationChoice[]>;
  hover(text: string, offset: number): Promise<HoverHelp | null>;
  /** Blocks of text to insert: spectra of the fields on round spheres. */
  builtins(): Promise<readonly BuiltinBlock[]>;
  dispose(): void;
  /** Called when the worker was ended and started anew, so that what was asked of it can be asked again. */
  onRestart(callback: () => void): void;
}
