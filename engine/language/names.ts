/** Greek letters as names; letters that look Latin are spelt as well, so that `Α` never passes for `A`. */
const CAPITALS =
  'Alpha Beta Gamma Delta Epsilon Zeta Eta Theta Iota Kappa Lambda Mu Nu Xi Omicron Pi Rho  Sigma Tau Upsilon Phi Chi Psi Omega';
const SMALL =
  'alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi omicron pi rho sigma sigma tau upsilon phi chi psi omega';

const FIRST_CAPITAL = 0x391;
const FIRST_SMALL = 0x3b1;

/** Second forms of letters, the micro sign and the ohm sign. */
const VARIANTS: readonly (readonly [string, string])[] = [
  ['\u00b5', 'mu'],
  ['\u03d1', 'theta'],
  ['\u03d5', 'phi'],
  ['\u03d6', 'pi'],
  ['\u03f0', 'kappa'],
  ['\u03f1', 'rho'],
  ['\u03f5', 'epsilon'],
  ['\u2126', 'Omega'],
];

const SPELLING: ReadonlyMap<string, string> = new Map([
  ...spelt(CAPITALS, FIRST_CAPITAL),
  ...spelt(SMALL, FIRST_SMALL),
  ...VARIANTS,
]);

function spelt(words: string, first: number): (readonly [string, string])[] {
  return words
    .split(' ')
    .map((word, k) => [String.fromCharCode(first + k), word] as const)
    .filter(([, word]) => word !== '');
}

const NOT_ASCII = /\P{ASCII}/u;

/** The name a typed word stands for: Greek letters are spelt out (`σ1` is `sigma1`). */
export function spellName(word: string): string {
  return NOT_ASCII.test(word) ? word.replace(/\P{ASCII}/gu, (letter) => SPELLING.get(letter) ?? letter) : word;
}

/** As many names as a sentence takes. */
const MOST_LISTED = 12;

/** Names as a list in a sentence. */
export function listed(names: readonly string[]): string {
  const shown = names.slice(0, MOST_LISTED).join(', ');
  return names.length > MOST_LISTED ? `${shown}, ...` : shown;
}
