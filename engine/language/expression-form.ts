import { Form } from '../exact/form';
import { BoundedForms, EULER, type FormRefusal, MAXIMAL_EXPONENT } from './bounded-form';
import { type ExpressionNode, type Factor, parseExpression } from './expression-syntax';
import type { Reading } from './reading';
import type { TokenReader } from './token-reader';
import type { Expression, Name } from './tree';

/** Reads an expression and its exact value; null when something is wrong, which is then reported. */
export function readExpression(reader: TokenReader): Expression | null {
  const node = parseExpression(reader);
  return node && expressionOf(node, reader.reading);
}

/** The exact value of an expression that was read; null when it has none, which is then reported. */
export function expressionOf(node: ExpressionNode, reading: Reading): Expression | null {
  const { from, to } = node;
  const text = reading.text.slice(from, to);
  const form = reading.forms.get(text) ?? new Evaluator(reading).form(node);
  if (!form) return null;
  reading.forms.set(text, form);
  const names: Name[] = [];
  collectNames(node, names);
  return { span: { from, to }, text, form, names };
}

const CONSTANT_FORMS: ReadonlyMap<string, Form> = new Map([
  ['pi', Form.pi],
  ['i', Form.i],
  ['e', EULER],
]);

function collectNames(node: ExpressionNode, into: Name[]): void {
  switch (node.kind) {
    case 'number':
      return;
    case 'name':
      if (!CONSTANT_FORMS.has(node.name)) into.push({ name: node.name, span: { from: node.from, to: node.to } });
      return;
    case 'parentheses':
      collectNames(node.inside, into);
      return;
    case 'negation':
      collectNames(node.operand, into);
      return;
    case 'sum':
      for (const term of node.terms) collectNames(term, into);
      return;
    case 'product':
      for (const factor of node.factors) collectNames(factor.node, into);
      return;
    case 'power':
      collectNames(node.base, into);
      collectNames(node.exponent, into);
      return;
    case 'call':
      collectNames(node.argument, into);
      return;
  }
}

class Evaluator {
  readonly #reading: Reading;
  readonly #forms = new BoundedForms();

  constructor(reading: Reading) {
    this.#reading = reading;
  }

  form(node: ExpressionNode): Form | null {
    switch (node.kind) {
      case 'number':
        return this.#remembered(node, () => this.#forms.sum([Form.number(node.value)]));
      case 'name':
        return this.#remembered(node, () => CONSTANT_FORMS.get(node.name) ?? Form.symbol(node.name));
      case 'parentheses':
        return this.form(node.inside);
      case 'negation':
        return this.form(node.operand)?.neg() ?? null;
      case 'sum':
        return this.#sum(node.terms, node);
      case 'product':
        return this.#product(node.factors);
      case 'power': {
        const base = this.form(node.base);
        const exponent = base && this.form(node.exponent);
        return exponent && this.#accept(this.#forms.power(base, exponent), node);
      }
      case 'call': {
        const argument = this.form(node.argument);
        return argument && this.#accept(this.#forms.call(node.function, argument), node);
      }
    }
  }

  #remembered(node: ExpressionNode, compute: () => Form | FormRefusal): Form | null {
    const text = this.#reading.text.slice(node.from, node.to);
    const known = this.#reading.forms.get(text);
    if (known) return known;
    const form = this.#accept(compute(), node);
    if (form) this.#reading.forms.set(text, form);
    return form;
  }

  #sum(terms: readonly ExpressionNode[], node: ExpressionNode): Form | null {
    const forms: Form[] = [];
    for (const term of terms) {
      const form = this.form(term);
      if (!form) return null;
      forms.push(form);
    }
    return this.#accept(this.#forms.sum(forms), node);
  }

  #product(factors: readonly Factor[]): Form | null {
    let product: Form | null = null;
    for (const { node, divides } of factors) {
      const factor = this.form(node);
      if (!factor) return null;
      if (product === null) product = factor;
      else product = this.#accept(this.#forms[divides ? 'divide' : 'multiply'](product, factor), node);
      if (product === null) return null;
    }
    return product;
  }

  #accept(form: Form | FormRefusal, node: ExpressionNode): Form | null {
    if (typeof form !== 'string') return form;
    return this.#reading.report(form, node, { limit: `${MAXIMAL_EXPONENT}` });
  }
}
