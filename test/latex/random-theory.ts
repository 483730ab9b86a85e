import fc from 'fast-check';

/** Lines of a theory on the three-sphere, made at random from groups and cells that fit them. */
export interface RandomTheory {
  readonly lines: readonly string[];
  readonly lets: readonly string[];
}

const CELLS: Readonly<Record<string, readonly string[]>> = {
  'U(1)': ['0', '1', '-1', '2', '1/2'],
  'U(2)': ['1', 'fund', 'anti', 'adj', 'det', 'det^-2', 'sym2', 'fund.det^-1', '(3,1)'],
  'U(3)': ['1', 'fund', 'anti', 'adj', 'alt2', 'det', '(2,1,0)', '(1,0,-1)'],
  'SU(2)': ['1', 'fund', 'adj', '[3]'],
  'SU(3)': ['1', 'fund', 'anti', 'adj', 'sym2', '[2,1]'],
  'SU(4)': ['1', 'fund', 'alt2', 'adj', '[1,1,0]'],
  'USp(4)': ['1', 'fund', 'alt2', 'adj'],
  'SO(3)': ['1', 'vector', '[4]'],
  'SO(4)': ['1', 'vector', 'adj'],
  'SO(5)': ['1', 'vector', 'adj', 'sym2'],
  'Spin(5)': ['1', 'spinor', 'vector'],
  'Spin(7)': ['1', 'spinor', 'vector'],
  'Spin(8)': ['1', '8s', '8c', '8v'],
  G2: ['1', '7', 'adj'],
  F4: ['1', '26'],
};

const SMALL = Object.keys(CELLS).filter((group) => group !== 'F4' && !group.startsWith('Spin'));

function cellOf(group: string): fc.Arbitrary<string> {
  return fc.constantFrom(...(CELLS[group] as readonly string[]));
}

const rCharge = fc.constantFrom('1/3', '1/2', '1', '0', '2/5', 'r', '2-2r', '1-r', 'r/2+1/3');
const geometry = fc.constantFrom('sphere S3', 'sphere S3, b = 5/4', 'sphere S3, b = sqrt(2)', 'sphere S3, b = 13/10');

/** One or two gauge groups, perhaps a flavour group, up to three multiplets, perhaps eight supercharges. */
export const anyTheory: fc.Arbitrary<RandomTheory> = fc
  .record({
    sphere: geometry,
    gauge: fc.oneof(
      fc.constantFrom(...Object.keys(CELLS)).map((group) => [group]),
      fc.tuple(fc.constantFrom(...SMALL), fc.constantFrom(...SMALL)).map((pair) => [...pair]),
    ),
    flavor: fc.constantFrom(null, null, 'U(1)', 'SU(2)', 'SU(3)', 'U(2)', 'SO(5)'),
    four: fc.boolean(),
  })
  .chain(({ sphere, gauge, flavor, four }) => {
    const groups = flavor === null ? gauge : [...gauge, flavor];
    const row = fc.tuple(fc.constantFrom('chiral', 'hyper', 'chiral'), fc.tuple(...groups.map(cellOf)), rCharge);
    return fc.array(row, { minLength: 1, maxLength: 3 }).map((rows): RandomTheory => {
      const names = ['G', 'H'].slice(0, gauge.length);
      return {
        lets: ['let r = 3/7'],
        lines: [
          sphere,
          ...(four ? ['supersymmetry 4'] : []),
          ...gauge.map((group, k) => `gauge ${names[k]} = ${group}`),
          ...(flavor === null ? [] : [`flavor F = ${flavor}, mass mu`]),
          `matter ${[...names, ...(flavor === null ? [] : ['F'])].join(' ')} R`,
          ...rows.map(([kind, cells, r], k) => `${kind} q${k} ${cells.join(' ')} ${kind === 'hyper' ? '1/2' : r}`),
        ],
      };
    });
  });

export function notebook({ lets, lines }: RandomTheory): string {
  return [...lets, 'theory t', ...lines.map((line) => `  ${line}`), ''].join('\n');
}
