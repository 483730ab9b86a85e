import type { FixedComplex } from '../arithmetic/fixed-complex';
import type { Form } from '../exact/form';
import type { Rational } from '../exact/rational';

/** The functions a product of factors is made of. The table in `functions/table.ts` has one entry for each. */
export type FunctionName =
  | 'hyperbolicSine'
  | 'hyperbolicCosine'
  | 'doubleSine'
  | 'gamma'
  | 'upsilon'
  | 'tripleSine'
  | 'fluxGamma'
  | 'sign'
  | 'linear'
  | 'exponential';

/** A function of an argument and parameters (periods), as one entry of a product. */
export interface FunctionAt {
  readonly name: FunctionName;
  readonly argument: Form;
  readonly parameters: readonly Form[];
  readonly power: number;
}

/** Values of forms in the double tier. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

/**
 * A parameter (a period) in the precise tier: its value to any number of bits, and, where it is known, its exact
 * rational square, so that resonance (rational b^2) is decided with integers.
 */
export interface ExactParameter {
  readonly square: Rational | null;
  /** The parameter over pi where that is known to be rational. */
  readonly overPi?: Rational | null;
  /** Value with `bits` fraction bits, within one unit in the last place. */
  readonly value: (bits: number) => FixedComplex;
  readonly approx: Complex;
}

/**
 * A logarithm in the precise tier: a value within `error` units of 2^-bits (an upper bound that includes one unit of
 * error in the argument); or an exact zero or pole; or a refusal where the precision cannot tell the argument from one, or
 * where no number of bits helps, with the reason in words.
 */
export type PreciseLog =
  | { readonly kind: 'value'; readonly re: bigint; readonly im: bigint; readonly error: bigint }
  | { readonly kind: 'zero' | 'pole'; readonly order: number }
  | { readonly kind: 'indistinct' }
  | { readonly kind: 'unreachable'; readonly says: string };

/** Evaluates log f on arrays in doubles for fixed parameters; tables are built when it is made. */
export interface DoubleKernel {
  /**
   * Adds power * log f(x_k) to out[k]. At a zero of f^power the real part becomes -Infinity, at a pole +Infinity;
   * never NaN. `xIm` may be null when every argument is real.
   */
  readonly addLog: (
    xRe: Float64Array,
    xIm: Float64Array | null,
    power: number,
    outRe: Float64Array,
    outIm: Float64Array,
  ) => void;
}

/** Reflection about `center`: f(2 center - x) = sign * f(x)^power. */
export interface Reflection {
  readonly center: (parameters: readonly Form[]) => Form;
  readonly power: 1 | -1;
  readonly sign: 1 | -1;
}

/** f(x + step) = f(x) * product of `quotient(x)`; holds identically in x. */
export interface Shift {
  readonly step: (parameters: readonly Form[]) => Form;
  readonly quotient: (x: Form, parameters: readonly Form[]) => readonly FunctionAt[];
}

/** Zeros (power > 0) or poles (power < 0) of f: all points start + sum of k_j steps_j with integers k_j >= 0. */
export interface Lattice {
  readonly kind: 'zero' | 'pole';
  readonly start: (parameters: readonly Form[]) => Form;
  readonly steps: (parameters: readonly Form[]) => readonly Form[];
}

/**
 * Leading growth: log f(x) -> polynomial in x as Re (direction * x) -> +infinity, up to exponentially small or
 * vanishing terms. Null where the function has no such simple growth.
 */
export interface Growth {
  readonly direction: Form;
  /** The polynomial in the argument x. */
  readonly logarithm: (x: Form, parameters: readonly Form[]) => Form;
}

/**
 * Leading growth with a logarithm, as Stirling's: with z = x - about,
 * log f(x) = polynomial(z) + logarithm(z) log z + constant + O(1/z) as Re (direction * x) -> +infinity.
 */
export interface LogarithmicGrowth {
  readonly direction: Form;
  readonly about: (parameters: readonly Form[]) => Form;
  readonly polynomial: (z: Form, parameters: readonly Form[]) => Form;
  /** A polynomial too; the logarithm beside it is the principal one. */
  readonly logarithm: (z: Form, parameters: readonly Form[]) => Form;
  /** A constant without closed form, in doubles; zero where it is absent. */
  readonly constant?: (parameters: readonly Complex[]) => Complex;
}

/** How a function is printed. Strings are LaTeX; `argument` comes typeset. */
export interface Notation {
  /** Short word shown in the chooser of notations, itself LaTeX: `s_b`. */
  readonly label: string;
  readonly latex: (argument: Form, parameters: readonly Form[], print: Printer) => string;
  /** The definition as a displayed equation, with the conventions it fixes. */
  readonly definition: (parameters: readonly Form[], print: Printer) => string;
}

/** Prints forms and products in LaTeX; supplied by `latex/`. */
export interface Printer {
  readonly form: (form: Form) => string;
}

/** A source that a formula or a convention is taken from. */
export interface Source {
  /** Stable key for bibliographies: `Faddeev-Kashaev-Volkov-2000`. */
  readonly key: string;
  /** Authors, journal or arXiv number, equation. */
  readonly text: string;
}

/** All that concerns one special function. */
export interface SpecialFunction {
  readonly name: FunctionName;
  /** Words used in the text for `value name(...)`; empty when it cannot be asked for by itself. */
  readonly spelling: string;
  readonly parameters: readonly string[];
  readonly reflections: readonly Reflection[];
  readonly shifts: readonly Shift[];
  /**
   * The point at which log f is the complex conjugate of log f(x), for real parameters: x conjugated, or minus that. Absent:
   * none is declared.
   */
  readonly mirror?: (x: Form) => Form;
  /**
   * Where f(x) f(y) = f(x + y) and f(0) = 1: brings a sum of arguments to its shortest form with the same value.
   * Factors of such a function are collected into one.
   */
  readonly additive?: (sum: Form) => Form;
  /** Why there is no value at an exactly known argument, in words; null where there is one. Absent: there always is. */
  readonly outside?: (argument: Form) => string | null;
  /** Why there is no function at these parameters, in words. Absent: every parameter needs a positive real part. */
  readonly outsideParameters?: (parameters: readonly Complex[]) => string | null;
  /** Powers of closed forms that can be taken out: f(x) = f(rest) times the product of base^exponent. */
  readonly powers?: (argument: Form) => {
    readonly rest: Form;
    readonly bases: readonly { readonly base: Form; readonly exponent: number }[];
  };
  /** The exact value at special arguments; null where there is none to give. */
  readonly exactValue?: (argument: Form, parameters: readonly Form[]) => Form | null;
  readonly zeros: readonly Lattice[];
  readonly growth: readonly Growth[];
  /** For functions whose growth is no polynomial. */
  readonly logarithmicGrowth?: readonly LogarithmicGrowth[];
  readonly notations: readonly Notation[];
  /** The infinite product it regularises, in LaTeX, at an argument; null for an elementary function. */
  readonly modes: ((argument: Form, parameters: readonly Form[], print: Printer) => string) | null;
  /** True for functions counted as elementary: they are the target of simplification. */
  readonly elementary: boolean;
  readonly double: (parameters: readonly Complex[]) => DoubleKernel;
  /**
   * Largest error of the double tier in units of max(1, |log f|, |x d log f/dx|), the last being what a rounding of x does;
   * held at random points by `test/functions/stated-errors.test.ts`.
   */
  readonly doubleError: (parameters: readonly Complex[]) => number;
  readonly precise: (argument: FixedComplex, parameters: readonly ExactParameter[], bits: number) => PreciseLog;
  /** An independent second route, for cross-checks; `route` says in words what it is. Null when there is none here. */
  readonly crossCheck:
    | ((
        argument: FixedComplex,
        parameters: readonly ExactParameter[],
        bits: number,
      ) => {
        readonly route: string;
        readonly log: PreciseLog;
      } | null)
    | null;
  readonly sources: readonly Source[];
}
