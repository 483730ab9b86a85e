/** Reads a double written in C99 hexadecimal notation, as Python's float.hex() writes it: `-0x1.8p+3`. Exact. */
export function hexadecimalDouble(text: string): number {
  const match = /^(-?)0x([01])\.([0-9a-f]*)p([+-]\d+)$/.exec(text);
  if (!match) throw new Error(`Not a hexadecimal double: ${text}`);
  const fraction = match[3] as string;
  const mantissa = Number.parseInt(`${match[2]}${fraction}` || '0', 16);
  const value = mantissa * 2 ** (Number(match[4]) - 4 * fraction.length);
  return match[1] === '-' ? -value : value;
}
