// The forms are those of the notebook's text (our own).
import { describe, expect, test } from 'vitest';
import { onlyBlock, outline } from './reading';

describe('a spectrum', () => {
  test('has indices and towers', () => {
    const text = `spectrum dirac
      index    n >= 0
      index    k = 1 .. 5         % several indices are allowed
      fermion  n + 3/2        times 2(n+1)(n+2)
      boson    (n+1)^2 + a^2  times (n+1)^2  for n >= 1   % its own range
`;
    expect(outline(onlyBlock('spectrum', text))).toEqual({
      kind: 'spectrum',
      name: 'dirac',
      sound: true,
      indices: [
        { name: 'n', from: '0', to: null },
        { name: 'k', from: '1', to: '5' },
      ],
      towers: [
        {
          kind: 'fermion',
          exponent: null,
          eigenvalue: [{ factor: 'n + 3/2', power: 1 }],
          degeneracy: '2(n+1)(n+2)',
          ranges: [],
        },
        {
          kind: 'boson',
          exponent: null,
          eigenvalue: [{ factor: '(n+1)^2 + a^2', power: 1 }],
          degeneracy: '(n+1)^2',
          ranges: [{ name: 'n', from: '1', to: null }],
        },
      ],
    });
  });

  const towerOf = (line: string) => onlyBlock('spectrum', `spectrum s\n  ${line}`).towers[0];

  test.each(['boson', 'complex boson', 'fermion', 'real fermion'])('%s', (kind) => {
    expect(towerOf(`${kind} n`)).toMatchObject({ kind, exponent: null, degeneracy: null, ranges: [] });
  });

  test.each([
    ['power(-2)', '-2'],
    ['power(1/3)', '1/3'],
    ['power (p)', '1*p'],
  ])('%s', (kind, exponent) => {
    const tower = towerOf(`${kind}  n + 1  times n`);
    expect(tower?.kind).toBe('power');
    expect(tower?.exponent?.form.key).toBe(exponent);
    expect(outline(tower?.eigenvalue)).toEqual([{ factor: 'n + 1', power: 1 }]);
  });

  test.each([
    ['for n = 1 .. 5', ['n 1 5']],
    ['for m >= 0, n >= 1', ['m 0 -', 'n 1 -']],
    ['for n ≥ 2 times n', ['n 2 -']],
    ['for n = 2 .. 2', ['n 2 2']],
  ])('%s', (clause, ranges) => {
    expect(
      towerOf(`boson n + m ${clause}`)?.ranges.map(
        ({ name, from, to }) => `${name.name} ${from.text} ${to?.text ?? '-'}`,
      ),
    ).toEqual(ranges);
  });
});

describe('an eigenvalue written as a product keeps its factors', () => {
  const factorsOf = (eigenvalue: string) =>
    onlyBlock('spectrum', `spectrum s\n  boson ${eigenvalue} times 2`).towers[0]?.eigenvalue.map(
      ({ factor, power }) => `${factor.form.key} ^${power}`,
    );

  test.each([
    ['n(n+1)', ['1*n ^1', '1 + 1*n ^1']],
    ['(n+1)^2', ['1 + 1*n ^2']],
    ['3(n+1)^2(n+2)', ['3 ^1', '1 + 1*n ^2', '2 + 1*n ^1']],
    ['(n+1)*(n+2)^3', ['1 + 1*n ^1', '2 + 1*n ^3']],
    ['((n+1)(n+2)^2)^2', ['1 + 1*n ^2', '2 + 1*n ^4']],
    ['1/6 (n+1)', ['1/6 ^1', '1 + 1*n ^1']],
    ['(n+1)(n+2)/4', ['1 + 1*n ^1', '2 + 1*n ^1', '1/4 ^1']],
    ['n/ell', ['1*n ^1', '1*ell^-1 ^1']],
    ['-(n+1)(n+2)', ['-1 + -1*n ^1', '2 + 1*n ^1']],
    ['(n+1)(n+2) + 1', ['3 + 3*n + 1*n^2 ^1']],
    ['(n)', ['1*n ^1']],
    ['(n+1)^0', ['1 ^1']],
    ['3/2', ['3/2 ^1']],
  ])('%s', (eigenvalue, factors) => {
    expect(factorsOf(eigenvalue)).toEqual(factors);
  });
});
