/** Why a text names no group or no representation here; plain data, worded once, in this file. */
export interface Refusal {
  readonly kind: 'refusal';
  readonly code: RefusalCode;
  /** What cannot be done. */
  readonly what: string;
  readonly why: string;
  /** What to write instead. */
  readonly remedy: string;
}

export type RefusalCode =
  | 'group-unknown'
  | 'group-ambiguous'
  | 'group-trivial'
  | 'group-too-large'
  | 'representation-unknown'
  | 'representation-absent'
  | 'representation-reducible'
  | 'representation-ambiguous'
  | 'representation-syntax'
  | 'global-form'
  | 'labels-wrong'
  | 'label-too-large'
  | 'too-many-weights'
  | 'product-too-large';

export function refusal(code: RefusalCode, what: string, why: string, remedy: string): Refusal {
  return { kind: 'refusal', code, what, why, remedy };
}
