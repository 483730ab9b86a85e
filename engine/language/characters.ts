import type { InputStream } from '@lezer/lr';

/** What `InputStream` answers past the end of the text. */
export const END = -1;

export const LINE_FEED = 0x0a;
export const CARRIAGE_RETURN = 0x0d;
export const BYTE_ORDER_MARK = 0xfeff;
export const SPACE = 0x20;
export const PERCENT = 0x25;

/** A line ends at LF, CR or CR LF, as in the editor. */
export function isNewline(code: number): boolean {
  return code === LINE_FEED || code === CARRIAGE_RETURN;
}

/** Blanks inside a line; the same set as `space` in the grammar. */
export function isBlank(code: number): boolean {
  if (code < 0x80) return code === SPACE || code === 0x09 || code === 0x0b || code === 0x0c;
  return (
    code === 0xa0 ||
    code === 0x1680 ||
    (code >= 0x2000 && code <= 0x200a) ||
    code === 0x2028 ||
    code === 0x2029 ||
    code === 0x202f ||
    code === 0x205f ||
    code === 0x3000 ||
    code === BYTE_ORDER_MARK
  );
}

/** Length of the line end at this offset: 2 for CR LF, 1 for LF or CR, 0 for anything else. */
export function newlineLength(input: InputStream, offset: number): 0 | 1 | 2 {
  const code = input.peek(offset);
  if (code === LINE_FEED) return 1;
  if (code !== CARRIAGE_RETURN) return 0;
  return input.peek(offset + 1) === LINE_FEED ? 2 : 1;
}

/** Offset of the first character from `offset` on that is no blank. */
export function skipBlanks(input: InputStream, offset: number): number {
  let at = offset;
  while (isBlank(input.peek(at))) at++;
  return at;
}

/** Offset of the end of the line, before its line end. */
export function lineEnd(input: InputStream, offset: number): number {
  let at = offset;
  for (let code = input.peek(at); code !== END && !isNewline(code); code = input.peek(at)) at++;
  return at;
}
