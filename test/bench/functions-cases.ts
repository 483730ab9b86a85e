import { fixedFromRatio, integerSqrt } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { expFixed } from '../../engine/arithmetic/fixed-exp';
import { Rational } from '../../engine/exact/rational';
import type { DoubleKernel, ExactParameter } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { valueFunctions } from '../../engine/functions/values';
import { arbPeer, mpmathPeer, type Peer, pariPeer } from './peers';

/** Values in one call of a kernel in doubles. */
export const ARRAY = 10_000;

/** A rational argument; its digits are made once, outside the clock, as those of the peers are. */
function rational(numerator: number, denominator = 1): ExactParameter {
  const value = Rational.of(numerator, denominator);
  const digits = new Map<number, FixedComplex>();
  return {
    square: value.mul(value),
    value: (bits) => {
      const known = digits.get(bits);
      if (known) return known;
      const made = { re: fixedFromRatio(value.numerator, value.denominator, bits), im: 0n };
      digits.set(bits, made);
      return made;
    },
    approx: { re: value.toNumber(), im: 0 },
  };
}

/** re + i im as an argument known to any number of bits. */
function complexArgument(re: ExactParameter, im: ExactParameter): ExactParameter {
  return {
    square: null,
    value: (bits) => ({ re: re.value(bits).re, im: im.value(bits).re }),
    approx: { re: re.approx.re, im: im.approx.re },
  };
}

/** b = 2^(1/4): irrational, no double poles. */
const GENERIC: ExactParameter = {
  square: null,
  value: (bits) => ({ re: integerSqrt(integerSqrt(2n << BigInt(4 * bits))), im: 0n }),
  approx: { re: 2 ** 0.25, im: 0 },
};

/** sqrt(2) as a period. */
const ROOT: ExactParameter = {
  square: Rational.of(2),
  value: (bits) => ({ re: integerSqrt(2n << BigInt(2 * bits)), im: 0n }),
  approx: { re: Math.SQRT2, im: 0 },
};

/**
 * mpmath's side: defining integrals by quad, moved off the poles at 0 so that nothing cancels; Upsilon from its own integral.
 * log s_b(x) = -log s_b(-x) brings Re x below 0.
 */
export const PRELUDE = `
import mpmath as mp
def double_sine(x, b):
    i, a = mp.mpc(0, 1), mp.pi * min(b, 1 / b) / 2
    def integrand(u):
        w = mp.mpc(u, a)
        return mp.exp(2 * i * x * w) / (4 * w * mp.sinh(b * w) * mp.sinh(w / b))
    return i * mp.pi * x ** 2 / 2 + i * mp.pi * (b ** 2 + b ** -2) / 24 - mp.quad(integrand, [-mp.inf, 0, mp.inf])
def upsilon(z, b):
    mp.mp.prec += 60
    f = lambda t: (z ** 2 * mp.exp(-2 * t) - mp.sinh(z * t) ** 2 / (mp.sinh(b * t) * mp.sinh(t / b))) / t
    v = mp.quad(f, [0, 1, 4, 16, mp.inf])
    mp.mp.prec -= 60
    return v
def triple_sine(z, w):
    a = mp.pi / max(w) / 2
    def integrand(u):
        t = mp.mpc(u, a)
        return mp.exp(2 * z * t) / (8 * t * mp.sinh(w[0] * t) * mp.sinh(w[1] * t) * mp.sinh(w[2] * t))
    cubic = (z ** 3 - sum(v * v for v in w) * z / 4) / (w[0] * w[1] * w[2])
    return -mp.mpc(0, 1) * mp.pi * cubic / 6 - mp.quad(integrand, [-mp.inf, -4, 0, 4, mp.inf])
`;

/** A function to any number of digits, and the same elsewhere. */
export interface PreciseCase {
  readonly name: string;
  readonly compute: (bits: number) => FixedComplex & { readonly kind: string };
  readonly peers: readonly CasePeer[];
}

/** A peer, and the digits up to which it is asked; it needs many seconds beyond. */
export interface CasePeer {
  readonly peer: Peer;
  readonly most: number;
}

function mpmath(what: string, expression: string, most = 200, setup = ''): CasePeer {
  return { peer: mpmathPeer(`mpmath ${what}`, PRELUDE, expression, setup), most };
}

function pari(what: string, expression: string, most = 200): CasePeer {
  return { peer: pariPeer(`PARI ${what}`, '', expression), most };
}

function arb(word: string, re: ExactParameter, im: ExactParameter = rational(0)): CasePeer {
  const argument = (bits: number): FixedComplex => ({ re: re.value(bits).re, im: im.value(bits).re });
  return { peer: arbPeer('Arb', word, argument), most: 1000 };
}

const THIRTEEN = rational(13, 10);
const TWENTY_ONE = rational(21, 10);
const POINT = complexArgument(THIRTEEN, TWENTY_ONE);
const SEVEN_THIRDS = rational(7, 3);

export const PRECISE: readonly PreciseCase[] = [
  {
    name: 'log Gamma, complex z',
    compute: (bits) => log('gamma', [POINT], bits),
    peers: [
      mpmath('loggamma', 'mp.loggamma(z)', 200, 'z = mp.mpc(mp.mpf(13)/10, mp.mpf(21)/10)'),
      arb('log-gamma', THIRTEEN, TWENTY_ONE),
      pari('lngamma', 'lngamma(13/10 + 21/10*I)'),
    ],
  },
  {
    name: 'log Gamma, real z',
    compute: (bits) => log('gamma', [SEVEN_THIRDS], bits),
    peers: [
      mpmath('loggamma', 'mp.loggamma(z)', 200, 'z = mp.mpf(7)/3'),
      arb('log-gamma', SEVEN_THIRDS),
      pari('lngamma', 'lngamma(7/3)'),
    ],
  },
  {
    name: 'dilogarithm',
    compute: (bits) => value('dilog', [complexArgument(rational(2, 5), rational(7, 10))], bits),
    peers: [
      mpmath('polylog', 'mp.polylog(2, mp.mpc(mp.mpf(2)/5, mp.mpf(7)/10))'),
      arb('dilogarithm', rational(2, 5), rational(7, 10)),
      pari('dilog', 'dilog(2/5 + 7/10*I)'),
    ],
  },
  ...[0, 1, 2].map(
    (k): PreciseCase => ({
      name: `zeta'(${k === 0 ? '' : '-'}${k}, 7/10)`,
      compute: (bits) => value('zetaprime', [rational(k), rational(7, 10)], bits),
      peers: [
        mpmath('zeta', `mp.zeta(-${k}, mp.mpf(7)/10, 1)`),
        arb(`zeta-derivative-${k}`, rational(7, 10)),
        pari('zetahurwitz', `zetahurwitz(-${k}, 7/10, 1)`),
      ],
    }),
  ),
  {
    name: 'zeta(s, a), complex s',
    compute: (bits) => value('hurwitz', [complexArgument(rational(1, 2), rational(3)), rational(7, 10)], bits),
    peers: [
      mpmath('zeta', 'mp.zeta(mp.mpc(mp.mpf(1)/2, 3), mp.mpf(7)/10)'),
      pari('zetahurwitz', 'zetahurwitz(1/2 + 3*I, 7/10)'),
    ],
  },
  {
    name: 'log Gamma_2(z | 1, 1)',
    compute: (bits) => value('barnesgamma', [SEVEN_THIRDS, rational(1), rational(1)], bits),
    peers: [
      mpmath('barnesg', 'mp.zeta(-1, 1, 1) + (mp.mpf(7)/3 - 1)/2*mp.log(2*mp.pi) - mp.log(mp.barnesg(mp.mpf(7)/3))'),
      arb('double-gamma', rational(7, 3)),
    ],
  },
  {
    name: 'log s_b, real x',
    compute: (bits) => log('doubleSine', [rational(3, 10), GENERIC], bits),
    peers: [mpmath('quad', 'double_sine(mp.mpf(3)/10, mp.root(2, 4))', 50)],
  },
  {
    name: 'log Upsilon_b, on the axis',
    compute: (bits) => log('upsilon', [complexArgument(rational(41, 40), rational(1)), rational(4, 5)], bits),
    peers: [mpmath('quad', 'upsilon(mp.mpc(0, 1), mp.mpf(4)/5)', 50)],
  },
  {
    name: 'log S_3, round, on the axis',
    compute: (bits) =>
      log('tripleSine', [complexArgument(rational(3, 2), rational(1)), rational(1), rational(1), rational(1)], bits),
    peers: [mpmath('quad', 'triple_sine(mp.mpc(0, 1), [mp.mpf(1)] * 3)', 50)],
  },
  {
    name: 'log S_3, periods 1, sqrt 2, 2',
    compute: (bits) => log('tripleSine', [halfTotal(), rational(1), ROOT, rational(2)], bits),
    peers: [mpmath('quad', 'triple_sine(mp.mpc(0, 1), [mp.mpf(1), mp.sqrt(2), mp.mpf(2)])', 50)],
  },
];

/** What the table of growth with the digits shows. */
export const GROWTH: readonly (readonly [string, (bits: number) => unknown])[] = [
  ['exp', (bits) => expFixed(fixedFromRatio(1234567n, 987654n, bits), bits)],
  ['log Gamma, complex z', (bits) => log('gamma', [POINT], bits)],
  ['dilogarithm', (bits) => value('dilog', [complexArgument(rational(2, 5), rational(7, 10))], bits)],
  ["zeta'(-1, 7/10)", (bits) => value('zetaprime', [rational(1), rational(7, 10)], bits)],
  ['log Gamma_2(7/3 | 1, 1)', (bits) => value('barnesgamma', [SEVEN_THIRDS, rational(1), rational(1)], bits)],
  [
    'log s_b, complex x',
    (bits) => log('doubleSine', [complexArgument(rational(3, 10), rational(1, 5)), GENERIC], bits),
  ],
  [
    'log Upsilon_b, b = 4/5',
    (bits) => log('upsilon', [complexArgument(rational(41, 40), rational(1)), rational(4, 5)], bits),
  ],
  [
    'log S_3, round',
    (bits) =>
      log('tripleSine', [complexArgument(rational(3, 2), rational(1)), rational(1), rational(1), rational(1)], bits),
  ],
  ['log S_3, periods 1, sqrt 2, 2', (bits) => log('tripleSine', [halfTotal(), rational(1), ROOT, rational(2)], bits)],
];

/** (1 + sqrt 2 + 2)/2 + i. */
function halfTotal(): ExactParameter {
  return {
    square: null,
    value: (bits) => ({ re: ((3n << BigInt(bits + 1)) + 2n * ROOT.value(bits).re) >> 2n, im: 1n << BigInt(bits) }),
    approx: { re: (3 + Math.SQRT2) / 2, im: 1 },
  };
}

function log(name: keyof typeof functions, args: readonly ExactParameter[], bits: number) {
  const [x, ...parameters] = args as readonly [ExactParameter, ...ExactParameter[]];
  const result = functions[name].precise(x.value(bits), parameters, bits);
  if (result.kind !== 'value') throw new Error(`${name}: ${result.kind}`);
  return result;
}

function value(word: keyof typeof valueFunctions, args: readonly ExactParameter[], bits: number) {
  const result = valueFunctions[word].evaluate(args, bits);
  if (result.kind !== 'value') throw new Error(`${word}: ${result.kind}`);
  return result;
}

/** A kernel in doubles on an array, and one value in mpmath at 15 digits. */
export interface ArrayCase {
  readonly name: string;
  readonly python: string;
  readonly kernel: () => DoubleKernel;
  /** Argument k of the array; the last is the one that mpmath computes. */
  readonly re: (k: number) => number;
  readonly im: ((k: number) => number) | null;
}

export const ARRAYS: readonly ArrayCase[] = [
  {
    name: 'log s_b, 10,000 real x, b = 2^(1/4)',
    python: 'double_sine(mp.mpf(3), mp.root(2, 4))',
    kernel: () => functions.doubleSine.double([{ re: 2 ** 0.25, im: 0 }]),
    re: (k) => -3 + (6 * (k + 1)) / ARRAY,
    im: null,
  },
  {
    name: 'log s_b, 10,000 real x, b = 1',
    python: 'double_sine(mp.mpf(3), mp.mpf(1))',
    kernel: () => functions.doubleSine.double([{ re: 1, im: 0 }]),
    re: (k) => -3 + (6 * (k + 1)) / ARRAY,
    im: null,
  },
  {
    name: 'log s_b, 10,000 complex x, b = 2^(1/4)',
    python: 'double_sine(mp.mpc(0.25, 0.25), mp.root(2, 4))',
    kernel: () => functions.doubleSine.double([{ re: 2 ** 0.25, im: 0 }]),
    re: (k) => -3 + (3.25 * (k + 1)) / ARRAY,
    im: () => 0.25,
  },
  {
    name: 'log Gamma, 10,000 complex z',
    python: 'mp.loggamma(mp.mpc(0.75, 3))',
    kernel: () => functions.gamma.double([]),
    re: () => 0.75,
    im: (k) => -3 + (6 * (k + 1)) / ARRAY,
  },
  {
    name: 'log Upsilon_b, 10,000 x on the axis, b = 1',
    python: 'upsilon(mp.mpc(0, 3), mp.mpf(1))',
    kernel: () => functions.upsilon.double([{ re: 1, im: 0 }]),
    re: () => 1,
    im: (k) => -3 + (6 * (k + 1)) / ARRAY,
  },
  {
    name: 'log S_3, 10,000 x on the axis, round',
    python: 'triple_sine(mp.mpc(0, 3), [mp.mpf(1)] * 3)',
    kernel: () => functions.tripleSine.double([1, 1, 1].map((re) => ({ re, im: 0 }))),
    re: () => 1.5,
    im: (k) => -3 + (6 * (k + 1)) / ARRAY,
  },
];
