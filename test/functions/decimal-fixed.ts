/** Decimal text as fixed point with `bits` fraction bits, cut off. */
export function decimalFixed(text: string, bits: number): bigint {
  const [digits = '0', exponent = '0'] = text.toLowerCase().split('e');
  const negative = digits.startsWith('-');
  const [whole = '0', part = ''] = digits.replace('-', '').split('.');
  const power = Number(exponent) - part.length;
  const value = BigInt(`${whole}${part}`) << BigInt(bits);
  const scaled = power >= 0 ? value * 10n ** BigInt(power) : value / 10n ** BigInt(-power);
  return negative ? -scaled : scaled;
}
