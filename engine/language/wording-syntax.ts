import {
  EXPRESSION_FUNCTIONS,
  FORMULA_FORMS,
  GROUP_OPTIONS,
  PRESCRIPTIONS,
  REPRESENTATIONS,
  SPECIAL_FUNCTIONS,
  SPHERES,
  THEORY_LINE_WORDS,
  THEORY_QUANTITIES,
  TOWERS,
} from './words';

export type WordingData = Readonly<Record<string, string>>;
export type Wording = (data: WordingData) => string;

function quoted(words: readonly string[]): string {
  return words.map((word) => `\`${word}\``).join(', ');
}

function meant(word: string | undefined): string {
  return word ? ` Did you mean \`${word}\`?` : '';
}

const SIGNATURES = Object.values(SPECIAL_FUNCTIONS).map(({ signature }) => signature);

const general = {
  'unexpected-character': (d) => `The character \`${d.character}\` means nothing here. Delete it.`,
  'unexpected-text': (d) => `\`${d.word}\` cannot stand here; expected ${d.expected}.`,
  'line-ends': (d) => `The line ends too early; expected ${d.expected}.`,
  'name-missing': (d) => `A name is missing after \`${d.after}\`: a letter, then letters, digits, \`_\` or \`'\`.`,
  'block-name': (d) => `\`${d.word}\` is no name: a letter, then letters, digits, \`_\` or \`'\`.`,
  'reserved-name': (d) =>
    `\`${d.name}\` has a meaning in expressions or requests and cannot be a name. Choose another, such as \`${d.name}1\`.`,
  'comma-missing': (d) => `A comma is missing before \`${d.word}\`.`,
  'comma-last': () => 'Nothing follows this comma. Delete it, or add what it announces.',
  'block-twice': (d) => `\`${d.name}\` is already the name of the block on line ${d.line}. Rename one of them.`,
  'parameter-twice': (d) =>
    `The parameter \`${d.name}\` is already set on line ${d.line}. Delete or rename one of them.`,
  'range-empty': (d) => `The range from ${d.from} to ${d.to} is empty: the lower end comes first.`,
} satisfies Record<string, Wording>;

const expressions = {
  'expression-missing': () => 'An expression is missing at the end of the line, such as `1/3`, `2r` or `sqrt(2)`.',
  'expression-expected': (d) => `Expected an expression such as \`1/3\`, \`2r\` or \`sqrt(2)\`, found \`${d.word}\`.`,
  'missing-operator': (d) => `An operator is missing before \`${d.word}\`; a product is written with \`*\`.`,
  'parenthesis-open': () => 'This parenthesis is never closed; add `)`.',
  'function-without-argument': (d) =>
    `\`${d.name}\` is a function: write its argument in parentheses, \`${d.name}(x)\`.`,
  'function-unknown': (d) =>
    `There is no function \`${d.name}\`. Did you mean \`${d.meant}\`? Known are ${quoted(EXPRESSION_FUNCTIONS)}; a product is written \`${d.name}*(...)\`.`,
  'special-function-inside': (d) =>
    `\`${d.name}\` cannot stand inside an expression; ask for it alone, as in \`value ${d.name}(...)\`. A product is written \`${d.name}*(...)\`.`,
  'expression-too-deep': (d) =>
    `More than ${d.depth} levels of parentheses, exponents or functions; simplify the expression.`,
  'expression-too-large': () => 'This expression multiplies out to too many terms; keep it in smaller factors.',
  'number-too-long': (d) =>
    `This number is too long: up to ${d.digits} characters and exponents of four digits are read.`,
  'number-too-large': () => 'An exact number in this expression has more than 1200 digits; use smaller exponents.',
  'exponent-too-large': (d) => `This exponent is too large: whole exponents go up to ${d.limit}.`,
  'division-by-zero': () => 'This divides by zero; change the denominator.',
  'log-of-zero': () => 'The logarithm of zero has no value; change the argument.',
  'product-after-division': (d) =>
    `Read from left to right, as \`(${d.left})*${d.right}...\`. If the product is the denominator, put it in parentheses.`,
  'product-after-power': (d) =>
    `Read as \`(${d.left})*${d.right}...\`. If the product is the exponent, put it in parentheses.`,
} satisfies Record<string, Wording>;

const theories = {
  'theory-line-unknown': (d) =>
    `\`${d.word}\` begins no line of a theory.${meant(d.meant)} Lines begin with ${quoted(THEORY_LINE_WORDS)}.`,
  'line-twice': (d) => `A theory has one \`${d.word}\` line; delete one of them.`,
  'sphere-missing': (d) =>
    `The theory \`${d.theory}\` lives nowhere: add a line \`sphere\` with one of ${quoted(SPHERES)}.`,
  'sphere-word-missing': () => `The sphere is missing after \`sphere\`: one of ${quoted(SPHERES)}.`,
  'sphere-unknown': (d) => `There is no sphere \`${d.word}\` here; known are ${quoted(SPHERES)}.`,
  'sphere-option-missing': () => 'A squashing is missing after the comma, such as `b = 5/4` or `w1 = 1`.',
  'group-name-missing': (d) => `The name of the group is missing after \`${d.after}\`, as in \`gauge G = U(2)\`.`,
  'group-named-r': () =>
    'No group can be called `R`: that column of the table holds the R-charges. Choose another name.',
  'group-missing': () => 'A group is missing here, such as `U(2)`, `SU(3)`, `USp(4)` or `E6`.',
  'group-product': () =>
    'Quotients of products, such as (SU(2) x U(1))/Z2, are not offered. Write U(n) where that is what is meant, or one ' +
    'line for each simple group, with a quotient of its own as in `SU(4)/Z2`.',
  'group-divisor': (d) =>
    `After \`${d.group}/\` the name of a cyclic group is missing, as in \`SU(4)/Z2\`${d.word ? `; found \`${d.word}\`` : ''}.`,
  'group-rank': (d) =>
    `\`${d.group}(...)\` needs a whole number, as in \`${d.group}(2)\`${d.word ? `; found \`${d.word}\`` : ''}.`,
  'group-twice': (d) => `The group \`${d.name}\` is already there; give this one another name.`,
  'option-missing': () => `An option is missing after the comma: one of ${quoted(GROUP_OPTIONS)}.`,
  'option-unknown': (d) =>
    `\`${d.word}\` is no option of a group.${meant(d.meant)} Known are ${quoted(GROUP_OPTIONS)}.`,
  'option-twice': (d) => `\`${d.word}\` is given twice on this line; delete one of them.`,
  'option-role': (d) => `\`${d.word}\` is no option of a ${d.role} group; there it is \`${d.instead}\`.`,
  'option-value-missing': (d) => `Nothing follows \`${d.after}\`; write its value or name after it.`,
  'mixed-incomplete': (d) => `Something is missing after \`${d.after}\`: the line reads \`mixed G H = 1\`.`,
  'supersymmetry-value': () => 'Write a whole number after `supersymmetry`, as in `supersymmetry 4`.',
  'matter-missing': (d) =>
    `No \`matter\` line stands before \`${d.name}\`: it names the columns of the table, as in \`matter  G  F  R\`.`,
  'column-name': (d) => `\`${d.word}\` is no column: columns are names of groups, and \`R\`.`,
  'column-twice': (d) => `The column \`${d.name}\` stands twice; delete one of them.`,
  'column-missing': (d) =>
    `The table has no column for ${d.names}, so that every multiplet is neutral there. Add one to the \`matter\` line, and a cell to each row.`,
  'multiplet-name': (d) => `\`${d.word}\` is no name for a multiplet: a letter, then letters, digits, \`_\` or \`'\`.`,
  'multiplet-name-missing': (d) => `The name of the multiplet is missing after \`${d.word}\`.`,
  'multiplet-name-taken': (d) => `No multiplet can be called \`${d.name}\`: \`${d.name} of ...\` means something else.`,
  'multiplet-twice': (d) => `The multiplet \`${d.name}\` is already there; give this one another name.`,
  'cell-missing': (d) =>
    `The row \`${d.name}\` has no cell for ${d.columns}. Write \`1\` for the trivial representation, \`0\` for no charge.`,
  'cell-surplus': (d) =>
    `The row \`${d.name}\` has more cells than the ${d.count} columns (${d.columns}). Cells hold no blanks.`,
  'superpotential-empty': () =>
    'No monomial follows `superpotential`; list products of fields, as in `superpotential  phi q qt`.',
  'superpotential-coefficient': (d) =>
    `Coefficients do not matter here: delete \`${d.word}\` and list the monomials, joined by \`+\`.`,
  'monomial-missing': (d) => `A product of fields is missing${d.word ? ` at \`${d.word}\`` : ''}.`,
  'field-missing': () => 'The name of a multiplet is missing here.',
  'field-power': () => 'The power of a field is a whole number from 1 to 999.',
} satisfies Record<string, Wording>;

const spectra = {
  'spectrum-line-unknown': (d) =>
    `\`${d.word}\` begins no line of a spectrum.${meant(d.meant)} Lines begin with \`index\`, ${quoted(TOWERS)}.`,
  'index-range-missing': (d) =>
    `The range of \`${d.name}\` is missing: write \`${d.name} >= 0\` or \`${d.name} = 1 .. 5\`.`,
  'index-relation': (d) =>
    `Found \`${d.word}\` after the index \`${d.name}\`: write \`${d.name} >= 0\` or \`${d.name} = 1 .. 5\`.`,
  'index-twice': (d) => `The index \`${d.name}\` is already there; delete or rename one of them.`,
  'tower-kind': (d) => `After \`${d.word}\` comes \`${d.wanted}\`; towers are ${quoted(TOWERS)}.`,
  'tower-exponent': () => 'After `power` comes its exponent in parentheses, as in `power(-2)`.',
  'eigenvalue-missing': () => 'The eigenvalue is missing: a polynomial in the indices, such as `n + 3/2`.',
} satisfies Record<string, Wording>;

const requests = {
  'quantity-missing': () =>
    `A quantity is missing: ${quoted(THEORY_QUANTITIES)} or a multiplet of a theory, \`determinant\` of a spectrum.`,
  'quantity-expected': (d) =>
    `Expected a quantity, found \`${d.word}\`. Quantities are ${quoted(THEORY_QUANTITIES)} or a multiplet of a theory, \`determinant\` of a spectrum, or a function of numbers: ${quoted(SIGNATURES)}.`,
  'of-missing': (d) => `Say of what: \`${d.name} of NAME\`, with the name of a theory or a spectrum.`,
  'subject-missing': (d) => `A name is missing after \`${d.after}\`: that of a theory or a spectrum of this notebook.`,
  'special-function-unknown': (d) => `There is no function \`${d.name}\` to ask for; known are ${quoted(SIGNATURES)}.`,
  'argument-count': (d) => `\`${d.name}\` is written \`${d.signature}\`; the number of arguments here is ${d.count}.`,
  'order-expected': (d) =>
    `Orders are whole numbers below 100, one for each gauge group, as in \`instanton(1, 2)\`; found \`${d.word}\`.`,
  'prescription-unknown': (d) =>
    `A determinant is regularised ${PRESCRIPTIONS.map((word) => `\`by ${word}\``).join(' or ')}${d.word ? `, not by \`${d.word}\`` : ''}.`,
  'formula-form-unknown': (d) =>
    `A formula is printed \`as\` one of ${quoted(FORMULA_FORMS)}${d.word ? `, not \`${d.word}\`` : ''}.`,
  'clause-twice': (d) => `\`${d.word}\` is given twice; write it once, with commas between what follows it.`,
  'set-twice': (d) => `\`${d.name}\` is given twice; delete one of them.`,
  'digits-value': (d) => `The number of digits is a whole number from 1 on, as in \`40 digits\`; found \`${d.word}\`.`,
  'over-missing': (d) =>
    d.word === 'plot'
      ? 'A plot needs a range: add `over` and, say, `sigma1 = -3 .. 3`.'
      : 'Say what to vary: add `over` and the names of parameters.',
  'ranges-too-many': (d) => `A plot has one range, a map two; set \`${d.name}\` by \`at\` instead.`,
  'representation-missing': () =>
    `A representation is missing after the colon: ${quoted(REPRESENTATIONS)}, a dimension, or Dynkin labels such as \`[1,0,1]\`.`,
  'with-missing': (d) => `Say with what: \`compare ${d.name} with NAME\`, with the name of a second theory.`,
} satisfies Record<string, Wording>;

const hints = {
  'hint-work-word': (d) =>
    `This line is prose. If it is meant as work, its first word is \`${d.meant}\`, not \`${d.word}\`.`,
  'hint-work-indented': (d) =>
    `This line is prose, because it is indented. \`${d.word}\` begins work only at the start of a line.`,
  'hint-line-not-indented': (d) =>
    `This line is prose, and ends the ${d.block}. Indent it if \`${d.word}\` belongs to the ${d.block}.`,
  'hint-paragraph-indented': () =>
    'This paragraph goes on in indented lines. If it is meant as a block, it must begin with a work word such as `theory`, after a blank line.',
  'hint-comment-in-prose': () =>
    'Outside work, `%` begins no comment: this line is shown. Delete it, or indent it into a block.',
} satisfies Record<string, Wording>;

/** What the parser has to say: what is wrong, where it helps the word typed, and what to do. */
export const syntaxWording = { ...general, ...expressions, ...theories, ...spectra, ...requests, ...hints };

export type SyntaxCode = keyof typeof syntaxWording;
