import { shiftRounded } from '../../engine/arithmetic/fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { determinant } from '../../engine/spectrum/regularised';
import { chiralModes } from '../../engine/spectrum/sphere-modes';
import type { Spectrum, WrittenTower } from '../../engine/spectrum/tower';
import { spectrumView } from '../../engine/spectrum/view';
import { type ComparisonRow, log10Difference, runPython, timeInTurns } from './timing';

const DIGITS = [15, 50, 200] as const;
const ROUNDS = 9;
const WARM_UP = 100;
const PYTHON_PATIENCE = 240_000;
/** Bits by which references are finer. */
const EXTRA = 40;

const nowhere = { from: 0, to: 0 };
const n = Form.symbol('n');

function tower(eigenvalue: Form, degeneracy: Form, exponent: number): WrittenTower {
  return {
    kind: 'power',
    exponent: Form.number(exponent),
    eigenvalue: [{ form: eigenvalue, power: 1 }],
    degeneracy,
    ranges: [{ name: 'n', from: Form.zero, to: null, span: nowhere }],
    spans: { row: nowhere, eigenvalue: nowhere, degeneracy: nowhere },
    label: '',
  };
}

/** z = 7/10 - 3/10 i. */
const z = Form.ratio(7, 10).sub(Form.i.scale(Rational.of(3, 10)));
const level = n.add(Form.one);

interface Case {
  readonly name: string;
  readonly spectrum: Spectrum;
  /** The logarithm in mpmath: a sum of derivatives of Hurwitz zeta functions, written out. */
  readonly python: string;
}

const CASES: readonly Case[] = [
  {
    name: 'two towers of a chiral multiplet on S^3, pairing and value',
    spectrum: {
      name: 'chiral',
      towers: [tower(n.add(Form.number(2)).sub(z), level, 1), tower(n.add(z), level, -1)],
      parameters: new Map(),
    },
    python: '-(D(1, 2-z) + (z-1)*D(0, 2-z)) + D(1, z) + (1-z)*D(0, z)',
  },
  {
    name: 'massive scalar on S^3, pairing and value',
    spectrum: {
      name: 'massive',
      towers: [tower(n.mul(n.add(Form.number(2))).add(Form.number(3)), level.mul(level), 1)],
      parameters: new Map(),
    },
    // Roots 1 +- i sqrt 2: n + 1 = u -+ i sqrt 2.
    python: 'sum(-(D(2, 1+c) - 2*c*D(1, 1+c) + c*c*D(0, 1+c)) for c in (1j*mp.sqrt(2), -1j*mp.sqrt(2)))',
  },
];

interface PythonTime {
  readonly microseconds: number;
  readonly value: bigint;
  /** What mpmath computes with: its own integers in Python, or gmpy. */
  readonly backend: string;
}

function askMpmath(bits: readonly number[]): PythonTime[] | null {
  const program = `
import time, mpmath as mp
print(mp.libmp.BACKEND)
for bits in ${JSON.stringify(bits)}:
    for text in ${JSON.stringify(CASES.map(({ python }) => python))}:
        def value(extra):
            mp.mp.prec = bits + extra
            return eval(text, {'mp': mp, 'z': mp.mpc(mp.mpf(7)/10, -mp.mpf(3)/10), 'D': lambda k, a: mp.zeta(-k, a, 1)})
        # The first call fills mpmath's tables.
        value(0)
        times = []
        for _ in range(5):
            start = time.process_time()
            value(0)
            times.append(time.process_time() - start)
        passed = sorted(times)[2] * 1e6
        print(passed, int(mp.nint(mp.ldexp(mp.re(value(${EXTRA})), bits + ${EXTRA}))))
`;
  const output = runPython(program, PYTHON_PATIENCE);
  if (output === null) return null;
  const [backend = '', ...lines] = output.trim().split('\n');
  return lines.map((line) => {
    const [time = '0', value = '0'] = line.split(' ');
    return { microseconds: Number(time), value: BigInt(value), backend };
  });
}

/**
 * Determinants beside mpmath (its Hurwitz zeta derivatives, roots and expansions given by hand; ours finds them), the
 * value by itself and with the second way that confirms it, and what a keystroke in a spectrum costs.
 */
export function run(): readonly ComparisonRow[] {
  const values = DIGITS.map((digits) => CASES.map(({ spectrum }) => logarithm(spectrum, digits)));
  const bits = values.map((row) => row[0]?.bits ?? 0);
  const python = askMpmath(bits);
  const rows = DIGITS.flatMap((digits, i) =>
    CASES.flatMap(({ name, spectrum }, k): ComparisonRow[] => {
      // As mpmath's tables are filled before, the runtime has compiled ours.
      for (let call = 0; call < WARM_UP; call++) logarithm(spectrum, digits);
      const times = timeInTurns([() => logarithm(spectrum, digits, false), () => logarithm(spectrum, digits)], ROUNDS);
      const peer = python?.[i * CASES.length + k];
      const exact = peer && shiftRounded(peer.value, EXTRA);
      const own = values[i]?.[k];
      return times.map((microseconds, way) => ({
        name: way === 0 ? name : `${name}, second way`,
        digits,
        microseconds,
        peer: peer ? `mpmath (${peer.backend})` : 'mpmath',
        peerMicroseconds: peer?.microseconds ?? null,
        ratio: peer ? peer.microseconds / microseconds : null,
        log10Error: own && exact !== undefined ? log10Difference(own.re, exact, own.bits) : null,
        peerLog10Error: null,
      }));
    }),
  );
  const symbolic = chiralModes(Form.symbol('Delta'), [Form.symbol('sigma').add(Form.symbol('m'))]);
  const [view = 0] = timeInTurns([() => spectrumView(symbolic)], ROUNDS);
  return [...rows, { ...silent, name: 'pairing and closed form of a chiral multiplet in symbols', microseconds: view }];
}

const silent = {
  digits: 0,
  peer: '',
  peerMicroseconds: null,
  ratio: null,
  log10Error: null,
  peerLog10Error: null,
} as const;

function logarithm(spectrum: Spectrum, digits: number, confirm = true): { re: bigint; bits: number } {
  const found = determinant(spectrum, 'factors', new Map(), digits, confirm);
  if (found.kind !== 'value') throw new Error(found.remark.code);
  return found.log;
}
