import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';

/** Forms of the fixtures: numbers, names, i, + - * / ^, parentheses, sqrt, log, pi. */
export function parseForm(text: string): Form {
  const tokens = text.match(/\d+|[A-Za-z]\w*|[-+*/^()]/g) ?? [];
  let at = 0;
  const take = (token: string): boolean => tokens[at] === token && ++at > 0;
  const sum = (): Form => {
    let value = take('-') ? product().neg() : product();
    while (tokens[at] === '+' || tokens[at] === '-') value = take('+') ? value.add(product()) : minus(value);
    return value;
  };
  const minus = (value: Form): Form => {
    at++;
    return value.sub(product());
  };
  const over = (value: Form): Form => {
    at++;
    return value.div(power());
  };
  const product = (): Form => {
    let value = power();
    while (tokens[at] === '*' || tokens[at] === '/') value = take('*') ? value.mul(power()) : over(value);
    return value;
  };
  const power = (): Form => {
    const base = atom();
    return take('^') ? base.pow(Number(atom().toRational()?.numerator)) : base;
  };
  const atom = (): Form => {
    const token = tokens[at++] ?? '';
    if (token === '-') return atom().neg();
    if (token === '(') {
      const inside = sum();
      at++;
      return inside;
    }
    if (/^\d/.test(token)) return Form.number(Rational.of(BigInt(token)));
    if (token === 'i') return Form.i;
    if (token === 'pi') return Form.pi;
    if (token === 'sqrt' || token === 'log') return Form.call(token, atom());
    return Form.symbol(token);
  };
  const result = sum();
  if (at !== tokens.length) throw new Error(`cannot read ${text}`);
  return result;
}
