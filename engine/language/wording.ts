import type { Diagnostic } from './tree';
import { spectrumWording } from './wording-spectrum';
import { syntaxWording, type Wording } from './wording-syntax';
import { theoryWording } from './wording-theory';

/** Every problem's sentence, by code. */
export const wording: Readonly<Record<string, Wording>> = { ...syntaxWording, ...theoryWording, ...spectrumWording };

/** The sentence for a problem. A code without an entry, which is a mistake of ours, is said as it is. */
export function say({ code, data }: Diagnostic): string {
  return Object.hasOwn(wording, code) ? (wording[code]?.(data) ?? code) : `Problem \`${code}\`.`;
}
