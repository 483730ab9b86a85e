import type { TokenReader } from './token-reader';
import type { Monomial } from './tree';

/** `phi q qt + q^2 qt`: monomials after commas or plus signs. One that cannot be read is reported and left out. */
export function readSuperpotential(reader: TokenReader): Monomial[] {
  const monomials: Monomial[] = [];
  if (reader.atEnd) reader.report('superpotential-empty', reader.last);
  while (!reader.atEnd) {
    const monomial = readMonomial(reader);
    if (monomial) monomials.push(monomial);
    else skipMonomial(reader);
    const separator = reader.next();
    if (separator && reader.atEnd) reader.report('monomial-missing', separator, { word: separator.text });
  }
  return monomials;
}

function readMonomial(reader: TokenReader): Monomial | null {
  const fields: Monomial['fields'][number][] = [];
  const from = reader.here.from;
  while (!reader.atEnd && !reader.at('+') && !reader.at(',')) {
    const token = reader.peek();
    if (token && (token.kind === 'number' || token.text === '-')) {
      return reader.report('superpotential-coefficient', token, { word: token.text });
    }
    const field = reader.name('field-missing', 'the name of a multiplet');
    if (!field) return null;
    const power = reader.take('^') ? readPower(reader) : 1;
    if (power === null) return null;
    fields.push({ field, power });
    if (reader.take('*') && (reader.atEnd || reader.at('+') || reader.at(','))) {
      return reader.report('field-missing', reader.last);
    }
  }
  if (fields.length === 0) {
    return reader.report('monomial-missing', reader.here, { word: reader.peek()?.text ?? '' });
  }
  return { span: { from, to: reader.last.to }, fields };
}

function readPower(reader: TokenReader): number | null {
  const token = reader.next();
  if (token && /^[1-9]\d{0,2}$/.test(token.text)) return Number(token.text);
  return reader.report('field-power', token ?? reader.last);
}

function skipMonomial(reader: TokenReader): void {
  while (!reader.atEnd && !reader.at('+') && !reader.at(',')) reader.next();
}
