/** Names that are Greek letters when spelt out. */
const GREEK = new Set(
  (
    'alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi pi rho sigma tau upsilon phi chi psi omega ' +
    'Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega'
  ).split(' '),
);

/** Geometry symbols and placeholders of the engine, as they are printed. */
const OWN: Readonly<Record<string, string>> = {
  '@b': 'b',
  '@Q': 'Q',
  '@w1': '\\omega_1',
  '@w2': '\\omega_2',
  '@w3': '\\omega_3',
  '@W': '|\\omega|',
};

/**
 * A name that sorts by the place of its group, so that forms print gauge coordinates before masses: `0:sigma_a`.
 */
export function placedName(place: number, name: string): string {
  return `${place}:${name}`;
}

/** Stem of the name that stands for the sum of all coordinates of a group. */
export const TRACE = '@tr:';

/**
 * A name in LaTeX: `sigma1` is \sigma_1, `m'2` is m'_2, `m_q` is m_q, a word of several letters is upright.
 */
export function symbolLatex(name: string): string {
  const own = OWN[name];
  if (own !== undefined) return own;
  const placed = /^\d+:(.*)$/.exec(name);
  if (placed) return symbolLatex(placed[1] as string);
  if (name.startsWith(TRACE)) return `\\operatorname{tr}${symbolLatex(name.slice(TRACE.length))}`;
  const parts = /^([A-Za-z]+)('*)([0-9]*)('*)(?:_([A-Za-z0-9']+))?$/.exec(name);
  if (!parts) return `\\mathrm{${escapeText(name)}}`;
  const [, letters = '', primesBefore = '', digits = '', primesAfter = '', tail = ''] = parts;
  const base = GREEK.has(letters) ? `\\${letters}` : letters.length === 1 ? letters : `\\mathrm{${letters}}`;
  const tailLatex = GREEK.has(tail)
    ? `\\${tail}`
    : tail.length > 1 && /[A-Za-z]/.test(tail)
      ? `\\mathrm{${tail}}`
      : tail;
  const subscript = [digits, tailLatex].filter((part) => part !== '').join(',');
  return `${base}${primesBefore}${primesAfter}${subscript === '' ? '' : subscript.length === 1 ? `_${subscript}` : `_{${subscript}}`}`;
}

/** Text that is safe inside \text{} or \mathrm{}. */
export function escapeText(text: string): string {
  return text.replace(/[\\{}$&#^_%~]/g, (c) =>
    c === '\\' ? '\\backslash ' : c === '~' || c === '^' ? `\\${c}{}` : `\\${c}`,
  );
}
