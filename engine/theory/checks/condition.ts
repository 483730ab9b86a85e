import type { Printer } from '../../functions/special-function';
import type { Theory } from '../theory';

/** What one condition has to say about one part of a theory. */
export interface Finding {
  /** Which part, where a condition looks at several: `G`, `phi q qt`. */
  readonly detail?: string;
  readonly verdict: 'holds' | 'fails' | 'unknown';
  /** One sentence with the figures: plain words, formulas in `$...$`. */
  readonly says: string;
  /** The rule, LaTeX. */
  readonly formula: string;
  readonly source: string;
}

/** A condition that a referee would check. Conditions are independent of each other, and of the sphere's name. */
export interface Condition {
  readonly id: string;
  readonly title: string;
  /** Empty where the condition does not apply. `print` sets names and forms, as `latex/` does. */
  readonly examine: (theory: Theory, print: Printer) => readonly Finding[];
}
