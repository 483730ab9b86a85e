/** Words that begin a line of work at column 0. */
export const WORK_WORDS = [
  'let',
  'theory',
  'spectrum',
  'formula',
  'value',
  'plot',
  'representation',
  'integrate',
  'extremize',
  'compare',
] as const;
export type WorkWord = (typeof WORK_WORDS)[number];

export const SPHERES = ['S2', 'S3', 'S4', 'S5'] as const;

export const MULTIPLETS = ['chiral', 'hyper', 'halfhyper', 'twisted'] as const;
export const ROLES = ['gauge', 'flavor'] as const;

/** Words that begin a line of a theory. */
export const THEORY_LINE_WORDS = [
  'sphere',
  ...ROLES,
  'mixed',
  'supersymmetry',
  'matter',
  ...MULTIPLETS,
  'superpotential',
] as const;
export type TheoryLineWord = (typeof THEORY_LINE_WORDS)[number];

/** Options of a `gauge` or `flavor` line. */
export const GROUP_OPTIONS = ['coulomb', 'mass', 'level', 'abelian', 'fi', 'theta', 'coupling'] as const;
export type GroupOptionWord = (typeof GROUP_OPTIONS)[number];

/** Words for representations in the charge table; dimensions, Dynkin labels and highest weights come besides them. */
export const REPRESENTATIONS = [
  'fund',
  'anti',
  'adj',
  'sym2',
  'sym3',
  'alt2',
  'alt3',
  'vector',
  'spinor',
  'cospinor',
  'det',
] as const;

/** Groups as they are typed after `=`. */
export const GROUPS = ['U(n)', 'SU(n)', 'SO(n)', 'Spin(n)', 'USp(2n)', 'G2', 'F4', 'E6', 'E7', 'E8'] as const;

/** Kinds of towers in a spectrum; `power` is followed by its exponent in parentheses. */
export const TOWERS = ['boson', 'complex boson', 'fermion', 'real fermion', 'power'] as const;

/** Words that begin a line of a spectrum. */
export const SPECTRUM_LINE_WORDS = ['index', 'boson', 'complex', 'fermion', 'real', 'power'] as const;

/** Words inside the line of a tower. */
export const TOWER_CLAUSES = ['times', 'for'] as const;

/** Words between the parts of a request. */
export const CLAUSES = ['of', 'at', 'over', 'by', 'as', 'with', 'digits'] as const;

/** What can be asked of a theory, besides the name of a multiplet. */
export const THEORY_QUANTITIES = ['one-loop', 'vector', 'classical', 'integrand'] as const;

/** What can be asked of a spectrum. */
export const SPECTRUM_QUANTITIES = ['determinant'] as const;

/** What a curve can show of a complex quantity. */
export const PARTS = ['abs', 'arg', 're', 'im', 'log'] as const;

/** Ways to print a formula, after `as`. */
export const FORMULA_FORMS = ['modes', 'unpaired', 'functions', 'elementary'] as const;

/** Ways to regularise a determinant, after `by`. */
export const PRESCRIPTIONS = ['factors', 'operator'] as const;

/** Functions that may stand in an expression. */
export const EXPRESSION_FUNCTIONS = ['sqrt', 'exp', 'log', 'sin', 'cos', 'tan', 'sinh', 'cosh', 'tanh', 'abs'] as const;

/** Numbers that have a name. */
export const CONSTANTS = ['pi', 'i', 'e'] as const;

/** Special functions that can be asked for by `value` and `plot`: how arguments are written, and how many there are. */
export const SPECIAL_FUNCTIONS = {
  doublesine: { signature: 'doublesine(x, b)', least: 2, most: 2 },
  gamma: { signature: 'gamma(z)', least: 1, most: 1 },
  barnesgamma: { signature: 'barnesgamma(z; w1, w2)', least: 2, most: Number.POSITIVE_INFINITY },
  upsilon: { signature: 'upsilon(x, b)', least: 2, most: 2 },
  triplesine: { signature: 'triplesine(z; w1, w2, w3)', least: 4, most: 4 },
  dilog: { signature: 'dilog(z)', least: 1, most: 1 },
  hurwitz: { signature: 'hurwitz(s, a)', least: 2, most: 2 },
  riemannzeta: { signature: 'riemannzeta(s)', least: 1, most: 1 },
  zetaprime: { signature: 'zetaprime(k, a)', least: 2, most: 2 },
  polylog: { signature: 'polylog(n, z)', least: 2, most: 2 },
  clausen: { signature: 'clausen(n, theta)', least: 2, most: 2 },
  digamma: { signature: 'digamma(z)', least: 1, most: 1 },
  polygamma: { signature: 'polygamma(n, z)', least: 2, most: 2 },
  barnesg: { signature: 'barnesg(z)', least: 1, most: 1 },
  qpochhammer: { signature: 'qpochhammer(x, q)', least: 2, most: 2 },
} as const;
export type SpecialFunctionWord = keyof typeof SPECIAL_FUNCTIONS;

export type ExpressionFunction = (typeof EXPRESSION_FUNCTIONS)[number];

/** Words that end an expression and begin the next part of a line. */
export const CLAUSE_WORDS: ReadonlySet<string> = new Set([...CLAUSES, ...TOWER_CLAUSES, 'in']);

/** Words that cannot be the name of anything that stands in expressions: they would be read as something else. */
export const RESERVED: ReadonlySet<string> = new Set([...CONSTANTS, ...EXPRESSION_FUNCTIONS, ...CLAUSE_WORDS]);
