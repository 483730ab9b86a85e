import type { Printer } from '../../functions/special-function';
import type { Theory, TheoryGroup } from '../theory';
import type { CoulombBranch } from './coulomb-branch';
import { cocharacterLattice, printedVector } from './lattice';
import { nameLatex, rationalLatex } from './words';

/** `(\sigma_1,\sigma_2)=(1,0)\,r`: a direction in printed coordinates; groups that stand still are left out. */
export function directionLatex(
  theory: Theory,
  branch: CoulombBranch,
  point: readonly number[],
  print: Printer,
): string {
  return join(parts(theory, branch, point, print), '\\,r');
}

/** `(\sigma_1,\sigma_2)=(1,0)`: a flux, in the coordinates it shifts. */
export function fluxLatex(theory: Theory, branch: CoulombBranch, point: readonly number[], print: Printer): string {
  const entries = parts(theory, branch, point, print).map(({ values }) => tuple(values));
  return entries.join('\\times');
}

interface Part {
  readonly names: readonly string[];
  readonly values: readonly string[];
}

function parts(theory: Theory, { groups }: CoulombBranch, point: readonly number[], print: Printer): Part[] {
  let offset = 0;
  return groups.flatMap(({ group, index }) => {
    const { rank } = cocharacterLattice(group);
    const own = point.slice(offset, offset + rank);
    offset += rank;
    if (own.every((entry) => entry === 0) && groups.length > 1) return [];
    const { coordinates } = theory.groups[index] as TheoryGroup;
    return [
      {
        names: coordinates.map((name) => nameLatex(name, print)),
        values: printedVector(group, own).map(rationalLatex),
      },
    ];
  });
}

function join(list: readonly Part[], factor: string): string {
  return list.map(({ names, values }) => `${tuple(names)}=${multiple(values, factor)}`).join(',\\ ');
}

function multiple(values: readonly string[], factor: string): string {
  const [only = '', ...others] = values;
  if (others.length > 0) return `${tuple(values)}${factor}`;
  const bare = factor.replace(/^\\,/, '');
  return only === '1' ? bare : only === '-1' ? `-${bare}` : `${only}${factor}`;
}

function tuple(entries: readonly string[]): string {
  return entries.length === 1 ? (entries[0] as string) : `(${entries.join(',')})`;
}
