import { readExpression } from './expression-form';
import { nearest } from './near-words';
import { readOptions } from './read-options';
import type { TokenReader } from './token-reader';
import type { Token } from './tokens';
import type { GroupLine, GroupOption, Word } from './tree';
import { GROUP_OPTIONS, type GroupOptionWord } from './words';

/** `gauge G = U(2), coulomb sigma, level 1`; null when there is no name or no group. A bad option leaves the others. */
export function readGroupLine(reader: TokenReader, word: Token): GroupLine | null {
  const role = word.text === 'gauge' ? 'gauge' : 'flavor';
  const name = reader.name('group-name-missing', 'the name of the group');
  if (!name) return null;
  if (name.name === 'R') return reader.report('group-named-r', name.span);
  if (!reader.expect('=', '`=` and a group such as `U(2)`')) return null;
  const group = readGroupWord(reader);
  if (!group) return null;
  const options = readOptions(
    reader,
    () => readOption(reader, role),
    () => GROUP_OPTIONS.some((option) => reader.at(option)),
    (option) => option.kind,
    'a comma and an option',
  );
  return { span: { from: word.from, to: reader.last.to }, role, name, group, options };
}

/**
 * `U(2)`, `E8`, `SU(4)/Z2`: a name and, in parentheses, a whole number, perhaps divided by a cyclic group. Which groups
 * there are is decided later.
 */
export function readGroupWord(reader: TokenReader): Word | null {
  const name = reader.peek();
  if (!name) return reader.report('group-missing', reader.last);
  if (name.text === '(') return reader.report('group-product', name);
  if (name.kind !== 'name') return reader.unexpected(name, 'a group such as `U(2)`');
  reader.next();
  const whole = readCover(reader, name);
  if (whole === null || !reader.take('/')) return whole;
  const divisor = reader.peek();
  if (!divisor || !/^Z_?[1-9]\d*$/.test(divisor.text)) {
    return reader.report('group-divisor', divisor ?? reader.last, { group: whole.text, word: divisor?.text ?? '' });
  }
  reader.next();
  return { text: `${whole.text}/${divisor.text}`, span: { from: name.from, to: divisor.to } };
}

function readCover(reader: TokenReader, name: Token): Word | null {
  if (!reader.take('(')) return { text: name.text, span: { from: name.from, to: name.to } };
  const rank = reader.peek();
  if (!rank || !/^\d+$/.test(rank.text)) {
    return reader.report('group-rank', rank ?? reader.last, { group: name.text, word: rank?.text ?? '' });
  }
  reader.next();
  const closing = reader.expect(')', '`)`');
  return closing && { text: `${name.text}(${rank.text})`, span: { from: name.from, to: closing.to } };
}

function readOption(reader: TokenReader, role: GroupLine['role']): GroupOption | null {
  const word = reader.peek();
  if (!word) return reader.report('option-missing', reader.last);
  const kind = GROUP_OPTIONS.find((option) => option === word.text);
  if (!kind) {
    if (word.kind === 'junk') return reader.unexpected(word, 'an option');
    return reader.report('option-unknown', word, { word: word.text, meant: nearest(word.text, GROUP_OPTIONS) ?? '' });
  }
  reader.next();
  const option = readOptionValue(reader, kind, word);
  if (!option) return null;
  if ((kind === 'coulomb' && role === 'flavor') || (kind === 'mass' && role === 'gauge')) {
    return reader.report('option-role', word, { word: kind, role, instead: kind === 'mass' ? 'coulomb' : 'mass' });
  }
  return option;
}

function readOptionValue(reader: TokenReader, kind: GroupOptionWord, word: Token): GroupOption | null {
  if (kind === 'coulomb' || kind === 'mass') {
    const symbol = reader.symbol('option-value-missing', 'the name of the coordinates');
    return symbol && { kind, symbol, span: { from: word.from, to: symbol.span.to } };
  }
  if (reader.atEnd || reader.at(',')) return reader.report('option-value-missing', word, { after: kind });
  const value = readExpression(reader);
  return value && { kind, value, span: { from: word.from, to: value.span.to } };
}
