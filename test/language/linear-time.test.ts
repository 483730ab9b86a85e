// Work is counted, not timed: characters the tokenizers look at, and exact numbers the expressions make.
import { InputStream } from '@lezer/lr';
import { describe, expect, test } from 'vitest';
import { Rational } from '../../engine/exact/rational';
import { parseNotebook } from '../../engine/language/parse';

/** Characters looked at, and rational numbers made, while the text is read. */
function workOf(text: string): { readonly looks: number; readonly numbers: number } {
  const { peek, advance } = InputStream.prototype;
  const { of } = Rational;
  const work = { looks: 0, numbers: 0 };
  InputStream.prototype.peek = function (offset) {
    work.looks++;
    return peek.call(this, offset);
  };
  InputStream.prototype.advance = function (count) {
    work.looks++;
    return advance.call(this, count);
  };
  Rational.of = (numerator, denominator) => {
    work.numbers++;
    return of(numerator, denominator);
  };
  try {
    parseNotebook(text);
  } finally {
    Object.assign(InputStream.prototype, { peek, advance });
    Rational.of = of;
  }
  return work;
}

const SIZE = 800;

/** Texts that grow with n, each a trap for some reader. */
const families: Record<string, (n: number) => string> = {
  parameters: (n) => Array.from({ length: n }, (_, k) => `let r${k} = ${k}/7`).join('\n'),
  'rows of a table': (n) =>
    `theory A\n  sphere S3\n  gauge G = U(1)\n  matter G R\n${Array.from({ length: n }, (_, k) => `  chiral q${k} 1 ${k}/7`).join('\n')}`,
  'blank lines': (n) => `let r = 1${'\n'.repeat(n)}let s = 2`,
  blanks: (n) => `let r = 1${' '.repeat(n)}\n${' '.repeat(n)}`,
  'blank lines inside a block': (n) => `theory A${'\n  sphere S3\n\n'.repeat(n)}`,
  prose: (n) => 'A line of text with $x^2$ and `code`.\n'.repeat(n),
  dollars: (n) => '$a '.repeat(n),
  'double dollars': (n) => '$$a$ '.repeat(n),
  'dollars without an end': (n) => `$${'a '.repeat(n)}\n\n`.repeat(3),
  backticks: (n) => '` `` '.repeat(n),
  'backticks, ever more': (n) =>
    Array.from({ length: Math.floor(Math.sqrt(2 * n)) }, (_, k) => '`'.repeat(k + 1)).join(' '),
  hashes: (n) => '#'.repeat(n),
  'lines of hashes': (n) => '####### no heading\n'.repeat(n),
  dashes: (n) => '- '.repeat(n).concat('x\n').repeat(3),
  'fences never closed': (n) => '```\n'.concat('text\n'.repeat(n)),
  fences: (n) => '```\n```\n'.repeat(n),
  underlines: (n) => 'a\n===\n'.repeat(n),
  'paragraphs with indented lines': (n) => `Plot over ${'over '.repeat(n)}\n  x\n`,
  'characters without meaning': (n) => `let r = ${'?'.repeat(n)}`,
  parentheses: (n) => `let r = ${'('.repeat(n)}`,
  'a long sum': (n) => `let r = ${'1/3+'.repeat(n)}1`,
  'a long product': (n) => `let r = ${'2*'.repeat(n)}1`,
  'a long list': (n) => `value one-loop of A at ${Array.from({ length: n }, (_, k) => `s${k} = 1`).join(', ')}`,
  options: (n) => `theory A\n  sphere S3${Array.from({ length: n }, (_, k) => `, w${k} = 1`).join('')}`,
  comments: (n) => `theory A % ${'%'.repeat(n)}\n${'  % comment\n'.repeat(n)}`,
};

describe('twice the text is twice the work', () => {
  test.each(Object.entries(families))('%s', (_, family) => {
    const once = workOf(family(SIZE));
    const twice = workOf(family(2 * SIZE));
    // A constant for what does not grow; quadratic work would give a factor of four.
    expect(twice.looks).toBeLessThan(2.3 * once.looks + 500);
    expect(twice.numbers).toBeLessThan(2.3 * once.numbers + 500);
  });

  test('the count would notice quadratic work', () => {
    const quadratic = (n: number) => families.parameters?.(n * n) ?? '';
    expect(workOf(quadratic(40)).looks).toBeGreaterThan(3 * workOf(quadratic(20)).looks);
  });
});

describe('no expression of one line takes long', () => {
  /** More numbers than this would take longer than some ten milliseconds. */
  const MOST = 150_000;

  const bombs: Record<string, string> = {
    'powers of sums': '(a+b+c+d)^256',
    'nested powers': '((((a+b)^2+c)^2+d)^2+f)^2',
    'products of sums': Array.from({ length: 40 }, (_, k) => `(a${k}+b${k})`).join(''),
    'powers of numbers': '(((7^256)^256)^256)^256',
    'long fractions': Array.from({ length: 3000 }, (_, k) => `1/${2 * k + 1}`).join('+'),
    'many names': Array.from({ length: 20_000 }, (_, k) => `x${k}`).join('+'),
    'many factors': Array.from({ length: 20_000 }, (_, k) => `x${k}`).join('*'),
    'many divisions': Array.from({ length: 5000 }, (_, k) => `(x+${k})`).join('/'),
    roots: Array.from({ length: 2000 }, (_, k) => `sqrt(${k}1)`).join('*'),
    'functions of functions': `${'exp('.repeat(60)}a+b${')'.repeat(60)}^30`,
    'large numbers': '1e999*'.repeat(500).concat('1'),
  };
  test.each(Object.entries(bombs))('%s', (_, text) => {
    expect(workOf(`let r = ${text}`).numbers).toBeLessThan(MOST);
  });
});
