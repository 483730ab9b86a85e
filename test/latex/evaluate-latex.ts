import { functions } from '../../engine/functions/table';

/**
 * Reads the printed LaTeX of a formula as a reader does, and gives its value in doubles: products over indices and
 * signs, fractions, powers, sinh and cosh, the double sine in all its notations. It shares nothing with the printer but
 * the meaning of the symbols, so that a wrong sign, bracket, range or index shows.
 */
export interface Meaning {
  /** Values by printed stem: a number, or the coordinates 1..n of an indexed symbol. */
  readonly values: Readonly<Record<string, number | readonly number[]>>;
  /** The squashing. */
  readonly b: number;
}

export function evaluateLatex(latex: string, meaning: Meaning): Complex {
  const reader = new Reader(tokens(latex), meaning);
  const value = reader.product(new Map());
  if (!reader.atEnd) throw new Error(`Not read to the end: ${reader.rest}`);
  return value;
}

export interface Complex {
  readonly re: number;
  readonly im: number;
}

const ONE: Complex = { re: 1, im: 0 };
const I: Complex = { re: 0, im: 1 };
const real = (re: number): Complex => ({ re, im: 0 });
const add = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });
const times = (a: Complex, b: Complex): Complex => ({ re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re });
const over = (a: Complex, b: Complex): Complex => {
  const norm = b.re * b.re + b.im * b.im;
  return { re: (a.re * b.re + a.im * b.im) / norm, im: (a.im * b.re - a.re * b.im) / norm };
};
const scale = (a: Complex, factor: number): Complex => ({ re: a.re * factor, im: a.im * factor });
const exp = (a: Complex): Complex => ({ re: Math.exp(a.re) * Math.cos(a.im), im: Math.exp(a.re) * Math.sin(a.im) });

function power(base: Complex, exponent: Complex): Complex {
  if (exponent.im !== 0 || !Number.isInteger(exponent.re)) {
    return exp(times(exponent, { re: Math.log(Math.hypot(base.re, base.im)), im: Math.atan2(base.im, base.re) }));
  }
  let result = ONE;
  for (let k = 0; k < Math.abs(exponent.re); k++) result = times(result, base);
  return exponent.re < 0 ? over(ONE, result) : result;
}

/** Commands, numbers, single letters and signs; spacing and the marks of alignment are dropped, `\,` separates factors. */
function tokens(latex: string): string[] {
  const found = latex.match(/\\[A-Za-z]+|\\.|\d+|[^\s]/g) ?? [];
  const dropped = new Set(['&', '\\\\', '\\!', '\\left', '\\right', '\\ ']);
  return found.filter((token) => !dropped.has(token));
}

const SEPARATORS = new Set(['\\,', '\\;', '\\times']);
const CLOSING = new Set([')', ']', '}', '|', ';', ',', '\\end']);
const OPENING: Readonly<Record<string, string>> = { '(': ')', '[': ']', '{': '}' };

/** Indices and the signs of a product: k-th sign of an argument is + where the k-th bit is 0. */
type Scope = ReadonlyMap<string, number>;
const SIGNS = '+-';

class Reader {
  readonly #tokens: readonly string[];
  readonly #meaning: Meaning;
  #at = 0;
  /** Signs met so far in the argument that is being read. */
  #signs = 0;

  constructor(list: readonly string[], meaning: Meaning) {
    this.#tokens = list;
    this.#meaning = meaning;
  }

  get atEnd(): boolean {
    return this.#at >= this.#tokens.length;
  }

  get rest(): string {
    return this.#tokens.slice(this.#at).join(' ');
  }

  #peek(): string {
    return this.#tokens[this.#at] ?? '';
  }

  #take(expected?: string): string {
    const token = this.#peek();
    if (expected !== undefined && token !== expected) throw new Error(`${expected} expected at ${this.rest}`);
    this.#at++;
    return token;
  }

  /** Factors one after the other; a product sign takes all factors up to the next `\;` or `\times`. */
  product(scope: Scope): Complex {
    let result = ONE;
    while (!this.atEnd && !CLOSING.has(this.#peek())) {
      if (SEPARATORS.has(this.#peek())) this.#take();
      else if (this.#peek() === '\\begin') this.#environment();
      else if (this.#peek() === '\\prod') result = times(result, this.#range(scope));
      else result = times(result, this.#factor(scope));
    }
    if (this.#peek() === '\\end') this.#environment();
    return result;
  }

  #environment(): void {
    this.#take();
    while (this.#take() !== '}');
  }

  /** One piece of the formula: everything under a product sign. */
  #piece(scope: Scope): Complex {
    let result = ONE;
    while (!this.atEnd && !CLOSING.has(this.#peek()) && this.#peek() !== '\\;' && this.#peek() !== '\\times') {
      if (this.#peek() === '\\,') this.#take();
      else if (this.#peek() === '\\prod') result = times(result, this.#range(scope));
      else result = times(result, this.#factor(scope));
    }
    return result;
  }

  #range(scope: Scope): Complex {
    this.#take('\\prod');
    this.#take('_');
    const below = this.#group();
    const above = this.#peek() === '^' && this.#take() ? this.#group() : null;
    const start = this.#at;
    let result = ONE;
    for (const choice of this.#choices(below, above, start)) {
      this.#at = start;
      result = times(result, this.#piece(new Map([...scope, ...choice])));
    }
    return result;
  }

  /** The tokens of `{...}`. */
  #group(): string[] {
    this.#take('{');
    const found: string[] = [];
    for (let depth = 1; ; ) {
      const token = this.#take();
      if (token === '{') depth++;
      if (token === '}' && --depth === 0) return found;
      found.push(token);
    }
  }

  #choices(below: readonly string[], above: readonly string[] | null, start: number): Map<string, number>[] {
    if (below[0] === '\\pm') return this.#signChoices(below, start);
    if (below[3] === '=' && below[4] === '\\pm') return namedSigns(below);
    if (above !== null) {
      const [index = '', , from] = below;
      return span(Number(from), Number(above.join(''))).map((value) => new Map([[index, value]]));
    }
    return this.#related(below, start);
  }

  /** `\pm`, `\pm,\text{ even}`: signs of the first argument below, counted there. */
  #signChoices(below: readonly string[], start: number): Map<string, number>[] {
    const body = this.#tokens.slice(start);
    const first = body.findIndex((token) => token === '\\pm' || token === '\\mp');
    let count = 0;
    for (let depth = 0, k = first; k < body.length && depth >= 0; k++) {
      const token = body[k] as string;
      if (token === '\\pm' || token === '\\mp') count++;
      if (token === '(' || token === '[') depth++;
      if (token === ')' || token === ']') depth--;
      if (depth === 0 && SEPARATORS.has(token)) break;
    }
    const words = below.join('');
    return span(0, 2 ** count - 1).flatMap((bits) => {
      const minus = bits.toString(2).replaceAll('0', '').length;
      const wanted = words.includes('even') ? 0 : words.includes('odd') ? 1 : minus % 2;
      return minus % 2 === wanted ? [new Map([[SIGNS, bits]])] : [];
    });
  }

  /** `a<c`, `a\neq c`, `a<c;\,f\neq a,c`, `1\le a<c\le 3`: the range is that of the symbol which carries the index. */
  #related(below: readonly string[], start: number): Map<string, number>[] {
    const parts = below.join(' ').split('; \\,');
    const names = [...new Set(below.filter((token) => /^[A-Za-z]$/.test(token)))];
    const bounds = below.join('').match(/^(\d+)\\le.*\\le(\d+)/);
    const size = this.#rangeOf(names[0] as string, start);
    const [from, to] = bounds ? [Number(bounds[1]), Number(bounds[2])] : [1, size];
    let choices: Map<string, number>[] = [new Map()];
    for (const name of names) choices = choices.flatMap((c) => span(from, to).map((v) => new Map([...c, [name, v]])));
    return choices.filter((choice) => parts.every((part) => holds(part, choice)));
  }

  #rangeOf(index: string, start: number): number {
    const body = this.#tokens.slice(start);
    const at = body.findIndex((token, k) => token === '_' && body[k + 1] === index);
    let name = at - 1;
    while (body[name] === "'") name--;
    const stem = body.slice(name, at).join('');
    const values = this.#meaning.values[stem];
    if (values === undefined || typeof values === 'number') throw new Error(`No coordinates ${stem}`);
    return values.length;
  }

  /** A sum of products, up to a closing mark. */
  #sum(scope: Scope): Complex {
    let result: Complex = { re: 0, im: 0 };
    let sign = this.#sign(scope) ?? 1;
    for (;;) {
      let term = ONE;
      let empty = true;
      while (!this.atEnd && !CLOSING.has(this.#peek()) && !isSign(this.#peek())) {
        if (this.#peek() === '\\,') this.#take();
        else term = times(term, this.#factor(scope));
        empty = false;
      }
      if (empty) throw new Error(`An empty term at ${this.rest}`);
      result = add(result, scale(term, sign));
      const next = this.#sign(scope);
      if (next === null) return result;
      sign = next;
    }
  }

  #sign(scope: Scope): number | null {
    if (!isSign(this.#peek())) return null;
    const token = this.#take();
    if (token === '+') return 1;
    if (token === '-') return -1;
    const bits = scope.get(SIGNS);
    if (bits === undefined) throw new Error('A double sign without a product over signs.');
    const minus = (bits >> this.#signs++) & 1;
    return (token === '\\pm') === (minus === 0) ? 1 : -1;
  }

  /** The argument of a function: its double signs are counted anew. */
  #argument(read: () => Complex): Complex {
    this.#signs = 0;
    return read();
  }

  #bracketed(scope: Scope): Complex {
    const closing = OPENING[this.#take()];
    if (closing === undefined) throw new Error(`A bracket expected before ${this.rest}`);
    const value = this.#peek() === '\\prod' ? this.product(scope) : this.#sum(scope);
    this.#take(closing);
    return value;
  }

  #factor(scope: Scope): Complex {
    const base = this.#base(scope);
    if (this.#peek() !== '^') return base;
    this.#take();
    const exponent = this.#peek() === '{' ? this.#bracketed(scope) : real(Number(this.#take()));
    return power(base, exponent);
  }

  #base(scope: Scope): Complex {
    const token = this.#peek();
    if (token in OPENING) return this.#bracketed(scope);
    this.#take();
    if (/^\d+$/.test(token)) return real(Number(token));
    switch (token) {
      case '\\pi':
        return real(Math.PI);
      case 'i':
        return I;
      case '\\frac':
        return over(this.#bracketed(scope), this.#bracketed(scope));
      case '\\tfrac':
        return over(this.#bracketed(scope), this.#bracketed(scope));
      case '\\sqrt': {
        return power(this.#bracketed(scope), real(0.5));
      }
      case '\\sinh':
        return hyperbolic(this.#hyperbolicArgument(scope), -1);
      case '\\cosh':
        return hyperbolic(this.#hyperbolicArgument(scope), 1);
      case 'e':
        return this.#peek() === '_' ? this.#faddeev(scope) : this.#exponential(scope);
      case '\\Phi':
        return this.#faddeev(scope);
      case 's':
        return this.#doubleSine(scope);
      case 'S':
        return this.#kurokawa(scope);
      case '\\Gamma':
        return this.#hyperbolicGamma(scope);
      case '\\operatorname':
        return this.#trace();
      default:
        return this.#symbol(token, scope);
    }
  }

  /** In brackets, or `\pi(...)`. */
  #hyperbolicArgument(scope: Scope): Complex {
    return this.#argument(() => {
      if (this.#peek() in OPENING) return this.#bracketed(scope);
      this.#take('\\pi');
      return times(real(Math.PI), this.#bracketed(scope));
    });
  }

  #s(x: Complex): Complex {
    const re = new Float64Array(1);
    const im = new Float64Array(1);
    functions.doubleSine
      .double([{ re: this.#meaning.b, im: 0 }])
      .addLog(Float64Array.of(x.re), Float64Array.of(x.im), 1, re, im);
    return exp({ re: re[0] as number, im: im[0] as number });
  }

  get #halfQ(): number {
    return (this.#meaning.b + 1 / this.#meaning.b) / 2;
  }

  #skipSubscript(): void {
    this.#take('_');
    if (this.#peek() === '{') this.#group();
    else this.#take();
  }

  #doubleSine(scope: Scope): Complex {
    this.#skipSubscript();
    return this.#s(this.#argument(() => this.#bracketed(scope)));
  }

  /** Brackets that hold an argument, a separator, and periods that are read past. */
  #withPeriods(scope: Scope, separator: string): Complex {
    this.#skipSubscript();
    this.#take('(');
    const value = this.#argument(() => this.#sum(scope));
    if (this.#peek() === '\\,') this.#take();
    this.#take(separator);
    for (let depth = 1; depth > 0; ) {
      const token = this.#take();
      if (token === '(') depth++;
      if (token === ')') depth--;
    }
    return value;
  }

  /** S_2(z | b, 1/b) = s_b(i (z - Q/2)). */
  #kurokawa(scope: Scope): Complex {
    const z = this.#withPeriods(scope, '|');
    return this.#s(times(I, add(z, real(-this.#halfQ))));
  }

  /** Gamma_h(z; ib, i/b) = s_b(i Q/2 - z). */
  #hyperbolicGamma(scope: Scope): Complex {
    const z = this.#withPeriods(scope, ';');
    return this.#s(add(times(I, real(this.#halfQ)), scale(z, -1)));
  }

  /** e_b(x) = e^{i pi x^2/2 + i pi (b^2 + b^-2)/24} s_b(x). */
  #faddeev(scope: Scope): Complex {
    this.#skipSubscript();
    const x = this.#argument(() => this.#bracketed(scope));
    const { b } = this.#meaning;
    const phase = add(scale(times(x, x), 0.5), real((b * b + 1 / (b * b)) / 24));
    return times(exp(times(I, scale(phase, Math.PI))), this.#s(x));
  }

  /** e^{...}, or e^{l(z)} = s_b(i z). */
  #exponential(scope: Scope): Complex {
    this.#take('^');
    this.#take('{');
    let value: Complex;
    if (this.#peek() === '\\ell') {
      this.#take();
      if (this.#peek() === '_') this.#skipSubscript();
      value = this.#s(
        times(
          I,
          this.#argument(() => this.#bracketed(scope)),
        ),
      );
    } else value = exp(this.#argument(() => this.#exponent(scope)));
    this.#take('}');
    return value;
  }

  /** In an exponent each bracket starts its signs anew: -x^2/2 repeats the argument. */
  #exponent(scope: Scope): Complex {
    return this.#sum(scope);
  }

  #trace(): Complex {
    this.#take('{');
    while (this.#take() !== '}');
    let stem = this.#take();
    while (this.#peek() === "'") stem += this.#take();
    const values = this.#meaning.values[stem];
    if (values === undefined || typeof values === 'number') throw new Error(`A trace of no coordinates ${stem}.`);
    return real(values.reduce((sum, value) => sum + value, 0));
  }

  /** A letter with primes and a subscript, which may be an index. */
  #symbol(token: string, scope: Scope): Complex {
    let stem = token;
    if (token === '\\mathrm') stem = this.#group().join('');
    while (this.#peek() === "'") stem += this.#take();
    if (stem === 'Q') return real(2 * this.#halfQ);
    const sign = scope.get(`${stem}${this.#tokens[this.#at + 1] ?? ''}`);
    if (this.#peek() === '_' && sign !== undefined) {
      this.#at += 2;
      return real(sign);
    }
    const values = this.#meaning.values[stem] ?? (stem === 'b' ? this.#meaning.b : undefined);
    if (values === undefined) throw new Error(`No value of ${stem} at ${this.rest}`);
    if (this.#peek() !== '_') {
      if (typeof values !== 'number') throw new Error(`${stem} without an index`);
      return real(values);
    }
    this.#take();
    const index = this.#peek() === '{' ? this.#group().join('') : this.#take();
    const place = scope.get(index) ?? Number(index);
    const value = typeof values === 'number' ? undefined : values[place - 1];
    if (value === undefined) throw new Error(`${stem} has no component ${index}`);
    return real(value);
  }
}

function hyperbolic(x: Complex, sign: 1 | -1): Complex {
  return scale(add(exp(x), scale(exp(scale(x, -1)), sign)), 0.5);
}

/** `\epsilon_k=\pm1,\,\epsilon_1\epsilon_2=-1`: all signs with that product, under the names `\epsilon1`, .... */
function namedSigns(below: readonly string[]): Map<string, number>[] {
  const letter = below[0] as string;
  const bound = below.slice(below.indexOf('\\,') + 1);
  const names = bound.flatMap((token, k) => (token === letter ? [`${letter}${bound[k + 2]}`] : []));
  const product = bound.includes('-') ? -1 : 1;
  return span(0, 2 ** names.length - 1).flatMap((bits) => {
    const signs = names.map((_, k): number => ((bits >> k) & 1 ? -1 : 1));
    if (signs.reduce((all, sign) => all * sign, 1) !== product) return [];
    return [new Map(names.map((name, k) => [name, signs[k] as number]))];
  });
}

function isSign(token: string): boolean {
  return token === '+' || token === '-' || token === '\\pm' || token === '\\mp';
}

function span(from: number, to: number): number[] {
  return Array.from({ length: to - from + 1 }, (_, k) => from + k);
}

/** One relation of indices, tokens apart by blanks. */
function holds(part: string, choice: ReadonlyMap<string, number>): boolean {
  const bare = part.replace(/\d+ \\le|\\le \d+/g, '').replaceAll(' ', '');
  const groups = bare.split('\\neq').map((group) => group.split(/[<,]/).map((name) => choice.get(name) as number));
  if (!bare.includes('\\neq'))
    return (groups[0] ?? []).every((value, k, all) => k === 0 || (all[k - 1] as number) < value);
  return groups.every((group, k) =>
    groups.every((other, l) => k === l || group.every((value) => !other.includes(value))),
  );
}
