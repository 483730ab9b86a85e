import type { TokenReader } from './token-reader';

/**
 * Options after commas, to the end of the line, none of a name twice; one that cannot be read leaves the others.
 * `begins` tells whether an option begins here, so that only its comma is missing.
 */
export function readOptions<T>(
  reader: TokenReader,
  read: () => T | null,
  begins: () => boolean,
  nameOf: (option: T) => string,
  expected: string,
): T[] {
  const options = new Map<string, T>();
  while (!reader.atEnd) {
    const start = reader.peek();
    if (!start) break;
    if (!reader.take(',')) {
      if (!begins()) {
        reader.unexpected(start, expected);
        reader.skipToComma();
        continue;
      }
      reader.report('comma-missing', start, { word: start.text });
    }
    const word = reader.here;
    const option = read();
    if (!option) reader.skipToComma();
    else if (options.has(nameOf(option))) reader.report('option-twice', word, { word: nameOf(option) });
    else options.set(nameOf(option), option);
  }
  return [...options.values()];
}
