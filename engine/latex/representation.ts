import type { Group } from '../lie/group';
import { nameOfIrrep } from '../lie/naming';
import type { Representation } from '../lie/representation';
import type { Term } from '../lie/terms';

/** A representation as papers print it in a charge table: bold dimensions, charges as numbers, sums with +. */
export function representationLatex(representation: Representation): string {
  const { group, irreps } = representation;
  const parts = irreps.map((irrep) => {
    const name = irrepLatex(group, irrep);
    return irrep.multiplicity === 1 ? name : `${irrep.multiplicity}\\,${name}`;
  });
  if (isWholeAdjoint(representation)) return '\\mathbf{adj}';
  return parts.length === 0 ? '0' : parts.join('+');
}

/** The adjoint of U(n): the traceless part and the trace. */
function isWholeAdjoint({ group, irreps }: Representation): boolean {
  if (group.family !== 'U' || group.isAbelian || irreps.length !== 2) return false;
  const words = irreps.map((irrep) => nameOfIrrep(group, irrep).word);
  const traceless = irreps.some(({ labels, charge }) => charge.isZero() && isAdjointOfSu(labels));
  return traceless && words.includes('1') && irreps.every(({ multiplicity }) => multiplicity === 1);
}

function isAdjointOfSu(labels: readonly number[]): boolean {
  if (labels.length === 1) return labels[0] === 2;
  return labels.every((label, k) => label === (k === 0 || k === labels.length - 1 ? 1 : 0));
}

export function irrepLatex(group: Group, irrep: Term): string {
  const { word, dimension } = nameOfIrrep(group, irrep);
  if (group.isAbelian) return chargeLatex(word ?? '0');
  if (word === 'adj') return '\\mathbf{adj}';
  const tensor = /^(sym|alt)(\d+)$/.exec(word ?? '');
  if (group.family === 'U') {
    if (word === '1') return '\\mathbf{1}';
    if (word === 'fund') return `\\mathbf{${group.size}}`;
    if (word === 'anti') return `\\overline{\\mathbf{${group.size}}}`;
    if (tensor) return `${tensor[1] === 'sym' ? '\\mathrm{Sym}' : '\\Lambda'}^{${tensor[2]}}`;
    const power = /^det(?:\^(-?\d+))?$/.exec(word ?? '');
    if (power) return power[1] === undefined ? '\\det' : `\\det^{${power[1]}}`;
    return nameOfIrrep(group, irrep).cell;
  }
  if (dimension) {
    const parts = /^(\d+)('*)([vsc]?)$/.exec(dimension.base);
    const bold = `\\mathbf{${parts?.[1] ?? dimension.base}}${parts?.[2] ?? ''}${parts?.[3] ? `_${parts[3]}` : ''}`;
    return dimension.bar ? `\\overline{${bold}}` : bold;
  }
  return `[${irrep.labels.join(',')}]`;
}

function chargeLatex(charge: string): string {
  const parts = /^(-?)(\d+)\/(\d+)$/.exec(charge);
  return parts ? `${parts[1]}\\tfrac{${parts[2]}}{${parts[3]}}` : charge;
}
