import { Form } from '../exact/form';
import { BoundedForms, EULER, type FormRefusal, MAXIMAL_EXPONENT } from './bounded-form';
import { type ExpressionNode, type Factor, parseExpression } from './expression-syntax';
import type { Problems } from './problems';
import type { TokenReader } from './token-reader';
import type { Expression, Name } from './tree';

/** Reads an expression and its exact value; null when something is wrong, which is then reported. */
export function readExpression(reader: TokenReader): Expression | null {
  const node = parseExpression(reader);
  return node && expressionOf(node, reader.text, reader.problems);
}

/** The exact value of an expression that was read; null when it has none, which is then reported. */
export function expressionOf(node: ExpressionNode, text: string, problems: Problems): Expression | null {
  const { from, to } = node;
  const evaluator = new Evaluator(problems);
  const form = evaluator.form(node);
  return form && { span: { from, to }, text: text.slice(from, to), form, names: evaluator.names };
}

const CONSTANT_FORMS: ReadonlyMap<string, Form> = new Map([
  ['pi', Form.pi],
  ['i', Form.i],
  ['e', EULER],
]);

class Evaluator {
  readonly names: Name[] = [];
  readonly #problems: Problems;
  readonly #forms = new BoundedForms();

  constructor(problems: Problems) {
    this.#problems = problems;
  }

  form(node: ExpressionNode): Form | null {
    switch (node.kind) {
      case 'number':
        return this.#accept(this.#forms.sum([Form.number(node.value)]), node);
      case 'name':
        return this.#name(node.name, node);
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

  #name(name: string, node: ExpressionNode): Form {
    const constant = CONSTANT_FORMS.get(name);
    if (constant) return constant;
    this.names.push({ name, span: { from: node.from, to: node.to } });
    return Form.symbol(name);
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
    return this.#problems.report(form, node, { limit: `${MAXIMAL_EXPONENT}` });
  }
}
