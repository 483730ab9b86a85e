import { LineIndex } from './lines';
import type { Reading } from './reading';
import type { Block, Name } from './tree';

/** Reports names given twice: theories and spectra share one set of names, parameters have another. */
export function reportSecondNames(blocks: readonly Block[], reading: Reading): void {
  const firstOf = { block: new Map<string, Name>(), parameter: new Map<string, Name>() };
  let lines: LineIndex | null = null;
  for (const block of blocks) {
    if (block.kind !== 'let' && block.kind !== 'theory' && block.kind !== 'spectrum') continue;
    const known = block.kind === 'let' ? firstOf.parameter : firstOf.block;
    const { name, span } = block.name;
    const first = known.get(name);
    if (!first) {
      known.set(name, block.name);
      continue;
    }
    lines ??= new LineIndex(reading.text);
    const code = block.kind === 'let' ? 'parameter-twice' : 'block-twice';
    reading.report(code, span, { name, line: `${lines.place(first.span.from).line}` });
  }
}
