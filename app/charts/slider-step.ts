interface Range {
  readonly from: number;
  readonly to: number;
}

/** About so many positions on a slider: finer than a pointer on a short slider, coarse enough for short numbers. */
const POSITIONS = 200;

/** Step of a slider: 1, 2 or 5 times a power of ten. */
export function sliderStep({ from, to }: Range): number {
  const rough = (to - from) / POSITIONS;
  if (!(rough > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(rough));
  const factor = [1, 2, 5, 10].find((candidate) => candidate * power >= rough * (1 - 1e-9)) ?? 10;
  return factor * power;
}

/** A slider's value as it is written into the text, with no more digits than its steps have. */
export function sliderText(value: number, range: Range): string {
  const decimals = Math.max(0, Math.ceil(-Math.log10(sliderStep(range)) - 1e-9));
  const text = value.toFixed(Math.min(decimals, 20));
  const short = text.includes('.') ? text.replace(/\.?0+$/, '') : text;
  return short === '-0' ? '0' : short;
}
