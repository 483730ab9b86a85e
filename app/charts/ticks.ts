/** Ticks at 1, 2 or 5 times a power of ten inside a range, about as many as asked for. */
export function niceTicks(from: number, to: number, about: number): { ticks: readonly number[]; step: number } {
  const rough = (to - from) / Math.max(1, about);
  if (!(rough > 0) || !Number.isFinite(rough)) return { ticks: [from], step: 1 };
  const power = 10 ** Math.floor(Math.log10(rough));
  const factor = [1, 2, 5, 10].find((candidate) => candidate * power >= rough) ?? 10;
  const step = factor * power;
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  const ticks = Array.from({ length: Math.max(0, last - first + 1) }, (_, at) => (first + at) * step);
  return { ticks, step };
}

const raised: Readonly<Record<string, string>> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
};

/** An integer as an exponent. */
export function superscript(exponent: number | string): string {
  return [...String(exponent)].map((letter) => raised[letter] ?? '').join('');
}

/** Power of ten taken out of an axis whose numbers would be long; 0 where they are short. */
export function axisPower(from: number, to: number): number {
  const largest = Math.max(Math.abs(from), Math.abs(to));
  if (!(largest > 0) || !Number.isFinite(largest)) return 0;
  const power = Math.floor(Math.log10(largest));
  return power >= 5 || power <= -3 ? power : 0;
}

/** A tick's number with the decimals its step needs and a typographic minus. */
export function tickText(value: number, step: number): string {
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const text = value.toFixed(Math.min(12, decimals));
  return (Number(text) === 0 ? text.replace('-', '') : text).replace('-', '−');
}

/** A number read off a drawing: six significant digits, which is more than the drawing shows. */
export function readoutText(value: number | null): string {
  if (value === null) return 'not finite';
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e-4 && size < 1e6) return String(Number(value.toPrecision(6))).replace('-', '−');
  const [digits = '', exponent = '0'] = value.toExponential(5).split('e');
  return `${String(Number(digits)).replace('-', '−')}·10${superscript(Number(exponent))}`;
}
