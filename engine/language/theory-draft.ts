import type { GroupLine, MatterHeader, MixedLine, Monomial, MultipletRow, SphereLine, TheoryBlock } from './tree';

/** What the lines of a theory add up to, while they are read. */
export interface TheoryDraft {
  sphere: SphereLine | null;
  readonly groups: Map<string, GroupLine>;
  readonly mixed: MixedLine[];
  supersymmetry: TheoryBlock['supersymmetry'];
  header: MatterHeader | null;
  readonly multiplets: Map<string, MultipletRow>;
  readonly superpotential: Monomial[];
}
