import { readExpression } from './expression-form';
import { readOptions } from './read-options';
import type { TokenReader } from './token-reader';
import type { Token } from './tokens';
import type { MixedLine, SphereLine, TheoryBlock } from './tree';
import { SPHERES } from './words';

/** `sphere S3, b = 5/4`. An unknown sphere leaves no line; a bad option leaves the others. */
export function readSphere(reader: TokenReader, word: Token): SphereLine | null {
  const token = reader.next();
  if (!token) return reader.report('sphere-word-missing', word);
  const name = SPHERES.find((sphere) => sphere === token.text);
  if (!name) return reader.report('sphere-unknown', token, { word: token.text });
  const options = readOptions(
    reader,
    () => readSphereOption(reader),
    () => reader.peek()?.kind === 'name' && reader.peek(1)?.text === '=',
    (option) => option.name.name,
    'a comma and a squashing such as `b = 5/4`',
  );
  return {
    span: { from: word.from, to: reader.last.to },
    sphere: { name, span: { from: token.from, to: token.to } },
    options,
  };
}

function readSphereOption(reader: TokenReader): SphereLine['options'][number] | null {
  const name = reader.name('sphere-option-missing', 'a squashing such as `b = 5/4`');
  if (!name || !reader.expect('=', '`=` and a value')) return null;
  const value = readExpression(reader);
  return value && { name, value, span: { from: name.span.from, to: value.span.to } };
}

/** `mixed G H = k`. */
export function readMixed(reader: TokenReader, word: Token): MixedLine | null {
  const first = reader.name('mixed-incomplete', 'the name of a group');
  const second = first && reader.name('mixed-incomplete', 'the name of a second group');
  if (!first || !second || !reader.expect('=', '`=` and a level')) return null;
  const level = readExpression(reader);
  if (!level || !reader.expectEnd('the end of the line')) return null;
  return { span: { from: word.from, to: level.span.to }, groups: [first, second], level };
}

/** `supersymmetry 4`. Which values a sphere has is the theory's affair. */
export function readSupersymmetry(reader: TokenReader, word: Token): TheoryBlock['supersymmetry'] {
  const token = reader.next();
  if (!token || !/^\d{1,2}$/.test(token.text)) return reader.report('supersymmetry-value', token ?? word);
  if (!reader.expectEnd('the end of the line')) return null;
  return { value: Number(token.text), span: { from: word.from, to: token.to } };
}
