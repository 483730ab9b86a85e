// The forms are those of the notebook's text (our own); the theories are invented here.
import { describe, expect, test } from 'vitest';
import { onlyBlock, outline, problemsOf } from './reading';

const ELECTRIC = `theory electric
  sphere   S3, b = 5/4
  gauge    G = U(2), coulomb sigma, level 1, fi zeta
  flavor   F = SU(3), mass m
  flavor   A = U(1), mass μ
  matter         G      F      A    R
  chiral   q     fund   anti   1    r
  chiral   qt    anti   1      1    r
  chiral   phi   adj    1     -2    2-2r     % neutral with q qt
  superpotential  phi q qt
`;

describe('a theory', () => {
  test('has all its lines', () => {
    expect(outline(onlyBlock('theory', ELECTRIC))).toEqual({
      kind: 'theory',
      name: 'electric',
      sphere: { sphere: 'S3', options: [{ name: 'b', value: '5/4' }] },
      groups: [
        {
          role: 'gauge',
          name: 'G',
          group: 'U(2)',
          options: [
            { kind: 'coulomb', symbol: 'sigma' },
            { kind: 'level', value: '1' },
            { kind: 'fi', value: 'zeta' },
          ],
        },
        { role: 'flavor', name: 'F', group: 'SU(3)', options: [{ kind: 'mass', symbol: 'm' }] },
        { role: 'flavor', name: 'A', group: 'U(1)', options: [{ kind: 'mass', symbol: 'mu' }] },
      ],
      mixed: [],
      supersymmetry: null,
      header: { columns: ['G', 'F', 'A', 'R'] },
      multiplets: [
        { kind: 'chiral', name: 'q', cells: cells('fund', 'anti', '1', 'r') },
        { kind: 'chiral', name: 'qt', cells: cells('anti', '1', '1', 'r') },
        { kind: 'chiral', name: 'phi', cells: cells('adj', '1', '-2', '2-2r') },
      ],
      sound: true,
      superpotential: [
        {
          fields: [
            { field: 'phi', power: 1 },
            { field: 'q', power: 1 },
            { field: 'qt', power: 1 },
          ],
        },
      ],
    });
  });

  test('may be almost empty', () => {
    expect(onlyBlock('theory', 'theory A\n  sphere S2')).toMatchObject({ groups: [], header: null, multiplets: [] });
  });

  const cells = (...texts: string[]) => texts.map((text) => ({ text, expression: text }));
});

/** One line in a theory that is otherwise in order. */
const withLine = (line: string) => `theory A\n  sphere S3\n  gauge G = U(2)\n  flavor H = U(1)\n  ${line}`;

describe('the sphere', () => {
  test.each(['S2', 'S3', 'S4', 'S5'])('%s', (sphere) => {
    expect(onlyBlock('theory', `theory A\n  sphere ${sphere}`).sphere?.sphere.name).toBe(sphere);
  });

  test('takes its squashing after commas', () => {
    const { sphere } = onlyBlock('theory', 'theory A\n  sphere S5, w1 = 1,w2 = 3/2 , w3=ω');
    expect(outline(sphere?.options)).toEqual([
      { name: 'w1', value: '1' },
      { name: 'w2', value: '3/2' },
      { name: 'w3', value: 'ω' },
    ]);
    expect(sphere?.options[2]?.value.form.symbols()).toEqual(['omega']);
  });
});

describe('groups', () => {
  test.each(['U(1)', 'U(12)', 'SU(3)', 'SO(7)', 'Spin(10)', 'USp(4)', 'G2', 'F4', 'E6', 'E7', 'E8'])('%s', (group) => {
    expect(onlyBlock('theory', `theory A\n  sphere S3\n  gauge G = ${group}`).groups[0]?.group.text).toBe(group);
  });

  test('blanks inside a group do not count', () => {
    expect(onlyBlock('theory', 'theory A\n  sphere S3\n  gauge G = SU ( 3 )').groups[0]?.group.text).toBe('SU(3)');
  });

  test('take options in any order', () => {
    const options = 'theta θ, fi 2ζ-1, abelian 2k, level k, coupling g/2, coulomb s';
    const block = onlyBlock('theory', `theory A\n  sphere S3\n  gauge G = U(2), ${options}`);
    expect(outline(block.groups[0]?.options)).toEqual([
      { kind: 'theta', value: 'θ' },
      { kind: 'fi', value: '2ζ-1' },
      { kind: 'abelian', value: '2k' },
      { kind: 'level', value: 'k' },
      { kind: 'coupling', value: 'g/2' },
      { kind: 'coulomb', symbol: 's' },
    ]);
  });

  test('words of the language are names where they mean nothing', () => {
    const text =
      'theory matter\n  sphere S3, level = 2\n  gauge chiral = U(1), fi theta, theta fi\n  matter chiral\n  chiral chiral 1';
    const block = onlyBlock('theory', text);
    expect(block.name.name).toBe('matter');
    expect(block.groups[0]?.options).toMatchObject([{ value: { text: 'theta' } }, { value: { text: 'fi' } }]);
    expect(block.multiplets[0]?.name.name).toBe('chiral');
  });

  test('mixed levels and supersymmetry', () => {
    const block = onlyBlock('theory', `${withLine('mixed G H = -k/2')}\n  mixed H G = 1\n  supersymmetry 4`);
    expect(outline(block.mixed)).toEqual([
      { groups: ['G', 'H'], level: '-k/2' },
      { groups: ['H', 'G'], level: '1' },
    ]);
    expect(block.supersymmetry?.value).toBe(4);
  });
});

describe('the charge table', () => {
  const cellsOf = (row: string) =>
    onlyBlock('theory', `theory A\n  sphere S3\n  gauge G = U(2)\n  flavor H = U(1)\n  matter G H R\n  ${row}`)
      .multiplets[0];

  test.each(['chiral', 'hyper', 'halfhyper', 'twisted'])('%s', (kind) => {
    expect(cellsOf(`${kind} q 1 0 r`)?.kind).toBe(kind);
  });

  const words = [
    ...['1', 'fund', 'anti', 'adj', 'sym2', 'sym3', 'alt2', 'sym2*', 'alt3*', 'spinor', 'cospinor', 'vector'],
    ...['8s', '27', '27*', '3bar', '[1,0,1]', '[1,0,1]*', 'det', 'det^-2', 'fund.det^-1', '(2,1,0)', '(0,-1)'],
    ...['fund+anti', 'fund+[1,1]+3*'],
  ];
  test.each(words)('the cell %s is one word', (word) => {
    const row = cellsOf(`chiral q ${word} 0 r`);
    expect(row?.cells.map(({ text }) => text)).toEqual([word, '0', 'r']);
  });

  test('cells that are expressions have their value', () => {
    const row = cellsOf('chiral q 2-2r -1/2 (1+b)/2');
    expect(row?.cells.map(({ expression }) => expression?.form.key)).toEqual(['2 + -2*r', '-1/2', '1/2 + 1/2*b']);
    expect(cellsOf('chiral q (2,1,0) 27* [1,0]')?.cells.map(({ expression }) => expression)).toEqual([
      null,
      null,
      null,
    ]);
  });

  test('columns stand in any order, with or without R', () => {
    const columns = (header: string) =>
      onlyBlock('theory', withLine(`matter ${header}`)).header?.columns.map(({ name }) => name);
    expect(columns('R H G')).toEqual(['R', 'H', 'G']);
    expect(columns('H G')).toEqual(['H', 'G']);
  });

  test('the groups may come after the table', () => {
    expect(problemsOf('theory A\n  matter G\n  chiral q fund\n  gauge G = U(2)\n  sphere S3')).toEqual([]);
  });
});

describe('the superpotential', () => {
  const fields = (line: string) => {
    const rows = ['phi', 'q', "qt'"].map((name) => `  chiral ${name} 0`).join('\n');
    const block = onlyBlock('theory', `theory A\n  sphere S3\n  gauge G = U(1)\n  matter G\n${rows}\n  ${line}`);
    return block.superpotential.map((monomial) => monomial.fields.map(({ field, power }) => `${field.name}^${power}`));
  };

  test('sums monomials', () => {
    expect(fields("superpotential phi q qt'")).toEqual([['phi^1', 'q^1', "qt'^1"]]);
    expect(fields("superpotential φ^3 + q^2 qt', phi*q")).toEqual([['phi^3'], ['q^2', "qt'^1"], ['phi^1', 'q^1']]);
    expect(fields('superpotential q q\n  superpotential phi')).toEqual([['q^1', 'q^1'], ['phi^1']]);
  });
});
