import type { RepresentationRequest } from '../language/tree';
import { representationLatex } from '../latex/representation';
import { dominantCharacter } from '../lie/character';
import { parseGroup } from '../lie/group';
import { dimension } from '../lie/invariants';
import type { Refusal } from '../lie/refusal';
import { parseRepresentation, type Representation } from '../lie/representation';
import { type Answer, failure } from './answer';
import type { RepresentationResult } from './result';

/** Distinct weights are counted orbit by orbit, not listed; beyond this the dominant ones alone are too many to show. */
const MAXIMAL_WEIGHTS = 50_000_000;

/** `representation SU(3): fund x sym2`. */
export function runRepresentation(request: RepresentationRequest): Answer {
  const group = parseGroup(request.group.text);
  if (group.kind === 'refusal') return failure(request.group.text, refusalText(group));
  const read = parseRepresentation(group.group, request.representation.text, Number.POSITIVE_INFINITY);
  if (read.kind === 'refusal') return failure(group.group.name, refusalText(read));
  const { representation } = read;
  if (!representation.hasWeightsWithin(MAXIMAL_WEIGHTS)) {
    return failure(
      group.group.name,
      `This representation has more than ${MAXIMAL_WEIGHTS} distinct weights, the limit here.`,
    );
  }
  return {
    kind: 'representation',
    of: group.group.name,
    notes: [],
    latex: representationLatex(representation),
    dimension: `${representation.dimension}`,
    index: representation.index?.toString() ?? representation.indices.join(', '),
    cubic: `${representation.cubic ?? 0n}`,
    reality: representation.reality,
    weights: representation.weightCount,
    parts: representation.irreps.map(({ labels, multiplicity }) => ({
      labels,
      dimension: `${dimension(group.group.system, labels)}`,
      multiplicity,
    })),
    ...dominantWeights(representation),
  } satisfies Answer<RepresentationResult>;
}

export function refusalText({ what, why, remedy }: Refusal): string {
  return `${what} ${why} ${remedy}`;
}

/** Dominant weights with multiplicities, of an irreducible representation only. */
function dominantWeights(representation: Representation): Pick<RepresentationResult, 'dominant'> {
  const [irrep] = representation.irreps;
  if (!representation.isIrreducible || !irrep) return {};
  const { system } = representation.group;
  const character = dominantCharacter(system, irrep.labels);
  if (!character) return {};
  return {
    dominant: Array.from({ length: character.count }, (_, k) => ({
      labels: [...character.labels.subarray(k * system.rank, (k + 1) * system.rank)],
      multiplicity: character.multiplicities[k] as number,
    })),
  };
}
