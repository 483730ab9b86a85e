import { describe, expect, test } from 'vitest';
import { charges } from '../../engine/theory/checks/charges';
import { halfHypers } from '../../engine/theory/checks/half-hypers';
import { fixture } from '../lie/fixture';
import { simplyConnected } from '../lie/named';
import { says, theoryOf, verdict } from './theory-text';

// Frobenius-Schur indicators made with GAP: test/fixtures/lie/README.md.
test('one group: pseudoreal representations and no others', () => {
  const rows = fixture.irreps.filter(({ rank, dim }) => rank <= 4 && dim > 1 && dim < 200);
  expect(rows.length).toBeGreaterThan(40);
  for (const { type, rank, dynkin, fs } of rows) {
    const group = simplyConnected({ series: type, rank });
    const theory = theoryOf([`gauge G = ${group}`, 'matter G R', `halfhyper q [${dynkin.join()}] 1/2`]);
    expect([group, dynkin, verdict(halfHypers, theory)]).toEqual([group, dynkin, fs === -1 ? 'holds' : 'fails']);
  }
});

describe('several groups: the indicators multiply', () => {
  const half = (first: string, second: string) =>
    theoryOf(['gauge G = USp(4)', 'flavor F = SO(7)', 'matter G F R', `halfhyper q ${first} ${second} 1/2`]);
  test.each([
    ['fund', 'vector', 'holds'],
    ['fund', '1', 'holds'],
    ['alt2', 'vector', 'fails'],
    ['fund+1', 'vector', 'fails'],
    ['fund+2*1', 'vector', 'holds'],
    ['2*alt2', 'vector', 'holds'],
  ])('%s of USp(4) times %s of SO(7)', (first, second, expected) => {
    expect(verdict(halfHypers, half(first, second))).toBe(expected);
  });

  test('a charge makes it complex', () => {
    const lines = ['gauge G = SU(2)', 'flavor A = U(1)', 'matter G A R', 'halfhyper q fund 1 1/2'];
    expect(verdict(halfHypers, theoryOf(lines))).toBe('fails');
    expect(says(halfHypers, theoryOf(lines))[0]).toMatch(/is complex/);
  });

  test('the factors are named', () => {
    expect(says(halfHypers, half('fund', 'vector'))).toEqual([
      'holds: The representation of the half-hyper $q$ is pseudoreal: pseudoreal under $G=\\mathrm{USp}(4)$ and real under ' +
        '$F=\\mathrm{SO}(7)$.',
    ]);
  });
});

// Dirac's condition with the cocharacter lattice of U(1) in units of one: arithmetic by hand.
test('fractional charges under a gauged U(1) are named, under a flavour group they are free', () => {
  const lines = (role: string) => [`${role} A = U(1)`, 'matter A R', 'chiral q 1/2 1/2', 'chiral p 1 1/2'];
  expect(says(charges, theoryOf(lines('gauge')))).toEqual([
    'fails: The charge $\\frac{1}{2}$ of $q$ under $A=\\mathrm{U}(1)$ is not an integer; multiply all charges and divide ' +
      'the Coulomb parameter.',
  ]);
  expect(says(charges, theoryOf(lines('flavor')))).toEqual([]);
});
