import fc from 'fast-check';

/** Pieces that tempt a parser: words of the language, markup, ends of lines, characters nobody types. */
export const junk: fc.Arbitrary<string> = fc
  .array(
    fc.oneof(
      fc.constantFrom(
        ...['let ', 'theory ', 'spectrum ', 'value ', 'plot ', 'formula ', 'compare ', 'representation ', 'extremize '],
        ...[
          'integrate ',
          'sphere ',
          'gauge ',
          'matter ',
          'chiral ',
          'superpotential ',
          'index ',
          'boson ',
          'power(2) ',
        ],
        ...[
          'one-loop',
          ' of ',
          ' at ',
          ' over ',
          ' digits',
          ' times ',
          ' for ',
          ' in ',
          'level ',
          'coulomb ',
          'x',
          'σ',
        ],
        ...[
          '\n',
          '\n\n',
          '\r\n',
          '\r',
          '\n  ',
          '\n\t',
          ' ',
          '  ',
          '\u00a0',
          '\ufeff',
          '%',
          '$',
          '$$',
          '`',
          '```',
          '~~~\n',
        ],
        ...[
          '# ',
          '---',
          '===',
          '- ',
          '> ',
          '=',
          '>=',
          '..',
          ',',
          ';',
          ':',
          '.',
          '(',
          ')',
          '[',
          ']',
          '+',
          '-',
          '*',
          '/',
          '^',
        ],
        ...[
          '0',
          '1',
          '10',
          '2.5',
          '1e9',
          '9999999999',
          'pi',
          'sqrt(',
          'gamma(',
          "'",
          '_',
          '\\',
          '<b>',
          '\u0000',
          '\u0007',
        ],
        ...['\ud800', '\udfff', '\ud835\udd3e', '\u2028', '\u2212', '\u202e', 'é', '漢', '\u0301'],
      ),
      fc.string({ unit: 'binary', maxLength: 4 }),
    ),
    { maxLength: 30 },
  )
  .map((pieces) => pieces.join(''));

/** What a generated notebook says, to be found again in its tree. */
export interface Facts {
  readonly parameters: readonly { readonly name: string; readonly value: number }[];
  readonly theories: readonly {
    readonly name: string;
    readonly sphere: string;
    readonly groups: readonly string[];
    readonly rows: readonly { readonly name: string; readonly cells: readonly string[] }[];
  }[];
  readonly spectra: readonly {
    readonly name: string;
    readonly towers: readonly { readonly shift: number; readonly power: number }[];
  }[];
  readonly values: readonly { readonly of: string; readonly at: readonly number[]; readonly digits: number }[];
  readonly paragraphs: readonly string[];
}

/** Eighths: exact as doubles and as decimals. */
const eighths = fc.integer({ min: -400, max: 400 }).map((k) => k / 8);
const names = (prefix: string, least: number, most: number) =>
  fc.integer({ min: least, max: most }).map((count) => Array.from({ length: count }, (_, k) => `${prefix}${k}`));
const blanks = fc.constantFrom(' ', '  ', '\t', '     ');
const cell = fc.constantFrom(
  'fund',
  'anti',
  'adj',
  '1',
  '27*',
  '[1,0]',
  '(2,1,0)',
  'fund.det^-1',
  '2-2r',
  '-1/2',
  '3bar',
);
const paragraph = fc.constantFrom('Some text.', 'Text that\nlet go on', 'A $x$ and\n`code`.', '- a\n- b', '# Title');

interface Part {
  readonly text: string;
  readonly facts: Partial<Facts>;
}

const parameter = (name: string): fc.Arbitrary<Part> =>
  fc.tuple(eighths, blanks, fc.boolean()).map(([value, blank, ranged]) => ({
    text: `let${blank}${name}${blank}=${blank}${value}${ranged ? `${blank}in -100 .. 100` : ''}`,
    facts: { parameters: [{ name, value }] },
  }));

const theory = (name: string): fc.Arbitrary<Part> =>
  fc
    .tuple(fc.constantFrom('S2', 'S3', 'S4', 'S5'), names('G', 1, 3), names('q', 0, 5), blanks, fc.boolean())
    .chain(([sphere, groups, rows, blank, spaced]) =>
      fc
        .array(fc.array(cell, { minLength: groups.length + 1, maxLength: groups.length + 1 }), {
          minLength: rows.length,
          maxLength: rows.length,
        })
        .map((cells) => {
          const table = rows.map((row, k) => ({ name: row, cells: cells[k] ?? [] }));
          const lines = [
            `sphere${blank}${sphere} % where`,
            ...groups.map((group) => `gauge${blank}${group}${blank}=${blank}U(2), level 1`),
            `matter${blank}${[...groups, 'R'].join(blank)}`,
            ...table.map((row) => `chiral${blank}${row.name}${blank}${row.cells.join(blank)}`),
          ];
          return {
            text: [`theory${blank}${name}`, ...lines.map((line) => `${blank}${line}`)].join(spaced ? '\n\n' : '\n'),
            facts: { theories: [{ name, sphere, groups, rows: table }] },
          };
        }),
    );

const tower = fc.record({ shift: fc.integer({ min: 0, max: 9 }), power: fc.integer({ min: 1, max: 4 }) });

const spectrum = (name: string): fc.Arbitrary<Part> =>
  fc.tuple(fc.array(tower, { maxLength: 4 }), blanks).map(([towers, blank]) => ({
    text: [
      `spectrum ${name}`,
      'index n >= 0',
      ...towers.map(({ shift, power }) => `boson (n+${shift})^${power}${blank}times 2(n+1)`),
    ].join(`\n${blank}`),
    facts: { spectra: [{ name, towers }] },
  }));

const value = (of: string): fc.Arbitrary<Part> =>
  fc
    .tuple(
      fc.array(eighths, { minLength: 1, maxLength: 4 }),
      fc.integer({ min: 1, max: 500 }),
      fc.constantFrom(' ', '\n  '),
    )
    .map(([at, digits, blank]) => ({
      text: `value one-loop of ${of} at${blank}${at.map((x, k) => `s${k} = ${x}`).join(`,${blank}`)}, ${digits} digits`,
      facts: { values: [{ of, at, digits }] },
    }));

const prose = paragraph.map((text): Part => ({ text, facts: { paragraphs: [text] } }));

/** A notebook without mistakes, and what it says. */
export const notebookText: fc.Arbitrary<{ readonly text: string; readonly facts: Facts }> = fc
  .array(fc.constantFrom('parameter', 'theory', 'spectrum', 'value', 'prose'), { maxLength: 8 })
  .chain((kinds) =>
    fc.tuple(
      ...kinds.map((kind, k) => {
        const made = { parameter, theory, spectrum, value, prose: () => prose }[kind];
        return made(`n${k}`);
      }),
    ),
  )
  .map((parts) => ({
    text: parts.map(({ text }) => `${text}\n\n`).join(''),
    facts: {
      parameters: parts.flatMap(({ facts }) => facts.parameters ?? []),
      theories: parts.flatMap(({ facts }) => facts.theories ?? []),
      spectra: parts.flatMap(({ facts }) => facts.spectra ?? []),
      values: parts.flatMap(({ facts }) => facts.values ?? []),
      paragraphs: parts.flatMap(({ facts }) => facts.paragraphs ?? []),
    },
  }));
