import { expect, test } from 'vitest';
import { rootSystem } from '../../engine/lie/root-system';
import { allSimpleTypes } from '../../engine/lie/simple-type';
import { scaledInnerProduct } from '../../engine/lie/weyl';
import { pureChernSimons } from '../../engine/theory/checks/pure-chern-simons';
import { simplyConnected } from '../lie/named';
import { says, theoryOf, verdict } from './theory-text';

// |Z| is proportional to prod_{a > 0} 2 sin(pi (a, rho) / k), the S-matrix element S_00 of V. Kac, D. Peterson, Adv. Math.
// 53 (1984) 125 at level k - h: A. Kapustin, B. Willett, I. Yaakov, arXiv:0909.4559, section 5.
test('supersymmetry is broken exactly where the partition function vanishes', () => {
  for (const type of allSimpleTypes()) {
    const system = rootSystem(type);
    const h = system.dualCoxeter;
    for (const k of new Set([1, 2, h - 2, h - 1, h, h + 1].filter((level) => level > 0))) {
      const sines = system.positiveRoots.map(({ labels }) => {
        const pairing = scaledInnerProduct(system, labels, system.rho) / system.gramDenominator;
        return Math.abs(Math.sin((Math.PI * pairing) / k));
      });
      const name = simplyConnected(type);
      for (const level of [k, -k]) {
        const theory = theoryOf([`gauge G = ${name}, level ${level}`, 'matter G R']);
        const expected = Math.min(...sines) < 1e-9 ? 'fails' : 'holds';
        expect([name, level, verdict(pureChernSimons, theory)]).toEqual([name, level, expected]);
      }
    }
  }
});

test('the SU(n) of U(n), SO(3) in its own units, and what is not pure', () => {
  const at = (group: string, level: string, row = 'chiral s 1 1/2') =>
    says(pureChernSimons, theoryOf([`gauge G = ${group}, level ${level}`, 'matter G R', row]))[0];
  expect(at('U(3)', '2')).toBe(
    'fails: No matter is charged under the simple part of $G=\\mathrm{U}(3)$ and $|k|=2<h=3$: supersymmetry is broken ' +
      'and $Z=0$.',
  );
  expect(at('U(3)', '4')).toMatch(/^holds: .*4-3=1/);
  // SO(3)_1 = SU(2)_2, at h = 2.
  expect(at('SO(3)', '1')).toMatch(/^holds: .*2-2=0/);
  expect(at('U(3)', '2', 'chiral d det 1/2')).toMatch(/^fails/);
  expect(at('U(3)', '5/2', 'chiral q fund 1/2')).toBeUndefined();
  expect(at('SU(3)', '0')).toBeUndefined();
  expect(at('U(1)', '1', 'chiral s 0 1/2')).toBeUndefined();
});
