import type { Card } from '../../engine/requests/result';

export interface KnownName {
  readonly name: string;
  /** What it is, in a word or two. */
  readonly what: string;
}

/** Names the outline knows: parameters, theories, spectra, multiplets, groups. */
export function knownNames(cards: readonly Card[]): readonly KnownName[] {
  const names = cards.flatMap((card): KnownName[] => {
    switch (card.kind) {
      case 'let':
        return [{ name: card.name, what: 'parameter' }];
      case 'spectrum':
        return [{ name: card.name, what: 'spectrum' }];
      case 'theory':
        return [
          { name: card.name, what: 'theory' },
          ...card.rows.map(({ name, kind }) => ({ name, what: `${kind} of ${card.name}` })),
          ...card.columns
            .filter(({ group }) => group !== null)
            .map(({ name, group }) => ({ name, what: `group ${group ?? ''}` })),
        ];
      default:
        return [];
    }
  });
  return [...new Map(names.map((entry) => [entry.name, entry])).values()];
}

/** Symbols a theory's lines introduce: Coulomb parameters, masses, and what its options are set to. */
export function symbolsIn(text: string): readonly KnownName[] {
  const found = new Map<string, string>();
  const words = { coulomb: 'Coulomb parameter', mass: 'mass', fi: 'FI parameter', theta: 'theta angle' } as const;
  for (const [kind, what] of Object.entries(words)) {
    for (const [, name] of text.matchAll(new RegExp(`^[ \\t].*\\b${kind}[ \\t]+([\\p{L}][\\w']*)`, 'gmu'))) {
      if (name !== undefined) found.set(name, what);
    }
  }
  // Used with numbers behind them where the rank is higher: they are offered as they were typed elsewhere.
  for (const [name] of text.matchAll(/\b(?:sigma|flux)\d+\b/g)) found.set(name, 'Coulomb parameter');
  return [...found].map(([name, what]) => ({ name, what }));
}
