import type { Form } from '../exact/form';
import { WEIGHT } from '../product/factor';
import { isRemark } from '../spectrum/analyse';
import { LEVEL } from '../spectrum/level-tower';
import { leftOfPairs } from '../spectrum/mode-pairs';
import { polynomialIn } from '../spectrum/polynomial';
import { prepare } from '../spectrum/prepare';
import type { FieldModes, ModePair, ModeTower } from '../spheres/sphere';
import type { TheoryGroup } from '../theory/theory';
import { formLatex } from './form';
import { levelFirst, prefactorLatex } from './modes';
import { multiplicityLatex } from './polynomial';
import { unpairedPieces } from './spectrum';
import { NO_WEIGHT, printWeights } from './weights';

/** Modes of one field in a table of pairing; LaTeX but for the name of the field. */
export interface PairedField {
  readonly field: string;
  readonly spins: string;
  readonly multiplicity: string;
}

/** Bosons and fermions of one linear factor, and what they leave: fermions positive, bosons negative. */
export interface PairedModes {
  readonly factor: string;
  readonly levels: string;
  readonly bosons: PairedField;
  readonly fermions: PairedField;
  readonly left: string;
  /** Spin of SU(2)_L of what is left. */
  readonly spin: string;
}

/** The pairs of one multiplet, or of the vector multiplet, for each of its weights. */
export interface PairingTable {
  readonly from: string;
  /** Product signs for the weights; empty where there is one. */
  readonly weights: string;
  readonly power: number;
  readonly rows: readonly PairedModes[];
  /** The product that is left of each weight once equal factors are gathered, as it stands in the formula. */
  readonly unpaired: string;
}

/** How bosonic and fermionic modes pair, multiplet by multiplet. */
export function pairingTables(groups: readonly TheoryGroup[], towers: readonly ModeTower[]): PairingTable[] {
  return towers.flatMap((tower) => {
    const printed = tower.weights === null ? [NO_WEIGHT] : printWeights(groups, tower.weights, tower.half);
    return printed.map(({ indices, choices, weight }) => {
      const at = (form: Form): Form => form.substitute((name) => (name === WEIGHT ? weight : null));
      const prefactor = tower.prefactor === null ? '' : `${prefactorLatex(at(tower.prefactor), weight)}\\,`;
      const body = prefactor + leftLatex(tower.pairs, at);
      return {
        from: tower.from[0] ?? '',
        weights: indices + choices,
        power: tower.power,
        rows: tower.pairs.map((pair) => pairedModes(pair, at)),
        unpaired: indices + choices + (tower.power === 1 ? body : `\\left[${body}\\right]^{${tower.power}}`),
      };
    });
  });
}

function leftLatex(pairs: readonly ModePair[], at: (form: Form) => Form): string {
  const prepared = prepare(leftOfPairs(pairs, at).towers);
  // Linear factors with rational multiplicities can always be taken apart.
  if (isRemark(prepared)) throw new Error(prepared.code);
  const pieces = unpairedPieces(prepared.pairing, []);
  return pieces.length === 0 ? '1' : pieces.map(({ latex }) => latex).join('');
}

function pairedModes({ eigenvalue, start, boson, fermion }: ModePair, at: (form: Form) => Form): PairedModes {
  return {
    factor: levelFirst(at(eigenvalue)),
    levels: `n\\ge ${start}`,
    bosons: pairedField(boson),
    fermions: pairedField(fermion),
    left: numberLatex(fermion.multiplicity.sub(boson.multiplicity)),
    spin: halfLatex(fermion.left),
  };
}

function pairedField({ field, left, right, multiplicity }: FieldModes): PairedField {
  return {
    field,
    spins: `\\left(${halfLatex(left)},${halfLatex(right)}\\right)`,
    multiplicity: numberLatex(multiplicity),
  };
}

/** (n + 1)/2 with one bar. */
export function halfLatex(spin: Form): string {
  const twice = spin.scale(2);
  return spin.toRational()?.isInteger() ? formLatex(spin) : `\\tfrac{${levelFirst(twice)}}{2}`;
}

function numberLatex(form: Form): string {
  const p = polynomialIn(form, LEVEL);
  return p === null ? formLatex(form) : multiplicityLatex(p, LEVEL);
}

const HEADER = [
  '\\text{factor}',
  '\\text{levels}',
  '\\text{bosons}',
  '(j_L,j_R)',
  '\\text{number}',
  '\\text{fermions}',
  '(j_L,j_R)',
  '\\text{number}',
  '\\text{left}',
  'j_L',
];

/** The tables as one LaTeX array, a caption line for each multiplet. */
export function pairingLatex(tables: readonly PairingTable[]): string {
  const lines = tables.flatMap(({ from, weights, rows }) => [
    `\\hline\\text{${from}}&${weights}${'&'.repeat(HEADER.length - 2)}`,
    ...rows.map(({ factor, levels, bosons, fermions, left, spin }) =>
      [factor, levels, ...fieldCells(bosons), ...fieldCells(fermions), left, spin].join('&'),
    ),
  ]);
  return `\\begin{array}{${'l'.repeat(HEADER.length)}}${[HEADER.join('&'), ...lines].join('\\\\')}\\end{array}`;
}

function fieldCells({ field, spins, multiplicity }: PairedField): string[] {
  return [`\\text{${field}}`, spins, multiplicity];
}
