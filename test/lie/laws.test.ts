import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Rational } from '../../engine/exact/rational';
import { dominantCharacter } from '../../engine/lie/character';
import { dot } from '../../engine/lie/coordinates';
import { centreClass, cubicAnomaly, dimension, dynkinIndices } from '../../engine/lie/invariants';
import { type RootSystem, rootSystem } from '../../engine/lie/root-system';
import { allSimpleTypes, type SimpleType, typeName } from '../../engine/lie/simple-type';
import { newBudget, tensorPower, tensorProduct } from '../../engine/lie/tensor-product';
import { type Term, term } from '../../engine/lie/terms';
import { conjugateLabels } from '../../engine/lie/weyl';
import { groupNamed, representationNamed, simplyConnected } from './named';

/** Random tests take a second on an idle machine; a busy one gets this many milliseconds. */
const PATIENCE = 60_000;

const smallTypes = allSimpleTypes().filter(({ rank }) => rank <= 4);

/** A simple type and labels of small sum, so that products stay small. */
const irrep = (type: SimpleType): fc.Arbitrary<number[]> =>
  fc.array(fc.nat({ max: 2 }), { minLength: type.rank, maxLength: type.rank }).map((labels) => {
    let left = type.rank > 2 ? 2 : 4;
    return labels.map((label) => {
      const kept = Math.min(label, left);
      left -= kept;
      return kept;
    });
  });

const pair = fc.constantFrom(...smallTypes).chain((type) => fc.tuple(fc.constant(type), irrep(type), irrep(type)));

function product(type: SimpleType, a: readonly number[], b: readonly number[]): readonly Term[] {
  const terms = tensorProduct(groupNamed(simplyConnected(type)), [term(a)], [term(b)], newBudget());
  if ('kind' in terms) throw new Error(terms.what);
  return terms;
}

function total(terms: readonly Term[], value: (labels: readonly number[]) => bigint): bigint {
  return terms.reduce((sum, { labels, multiplicity }) => sum + BigInt(multiplicity) * value(labels), 0n);
}

describe('sum rules of tensor products', () => {
  // Dynkin, Amer. Math. Soc. Transl. (2) 6 (1957) 111: dimensions multiply, the second index obeys the product rule;
  // Okubo, Phys. Rev. D16 (1977) 3528 for the third. 1000 random products of rank at most 4.
  test(
    'dimensions, indices, cubic anomalies, centre classes',
    () => {
      fc.assert(
        fc.property(pair, ([type, a, b]) => {
          const system = rootSystem(type);
          const terms = product(type, a, b);
          const [da, db] = [dimension(system, a), dimension(system, b)];
          expect(total(terms, (labels) => dimension(system, labels))).toBe(da * db);
          const index = (labels: readonly number[]): bigint => dynkinIndices(system, labels)[0] as bigint;
          expect(total(terms, index)).toBe(da * index(b) + index(a) * db);
          const cubic = (labels: readonly number[]): bigint => cubicAnomaly(system, labels) ?? 0n;
          expect(total(terms, cubic)).toBe(da * cubic(b) + cubic(a) * db);
          const sum = centreClass(
            system,
            a.map((label, i) => label + (b[i] as number)),
          );
          for (const { labels, multiplicity } of terms) {
            expect(multiplicity).toBeGreaterThan(0);
            expect(centreClass(system, labels)).toEqual(sum);
          }
        }),
        { numRuns: 1000 },
      );
    },
    PATIENCE,
  );

  // Schur's lemma: the trivial representation occurs in a x b once if b is dual to a, else never.
  test(
    'the trivial representation occurs exactly in products with the dual',
    () => {
      fc.assert(
        fc.property(pair, ([type, a, b]) => {
          const system = rootSystem(type);
          const dual = conjugateLabels(system, a);
          const trivial = (terms: readonly Term[]): number =>
            terms.find(({ labels }) => labels.every((label) => label === 0))?.multiplicity ?? 0;
          expect(trivial(product(type, a, dual))).toBe(1);
          expect(trivial(product(type, a, b))).toBe(b.join() === dual.join() ? 1 : 0);
        }),
        { numRuns: 100 },
      );
    },
    PATIENCE,
  );

  test(
    'symmetric and antisymmetric square add up to the square',
    () => {
      fc.assert(
        fc.property(pair, ([type, a]) => {
          const group = groupNamed(simplyConnected(type));
          const both = (['sym', 'alt'] as const).flatMap((kind) => {
            const terms = tensorPower(group, kind, 2, [term(a)], newBudget());
            if ('kind' in terms) throw new Error(terms.what);
            return terms;
          });
          const counts = new Map<string, number>();
          for (const { labels, multiplicity } of both) {
            counts.set(labels.join(), (counts.get(labels.join()) ?? 0) + multiplicity);
          }
          const square = product(type, a, a).map(({ labels, multiplicity }) => [labels.join(), multiplicity] as const);
          expect(new Map([...counts].sort())).toEqual(new Map([...square].sort()));
        }),
        { numRuns: 100 },
      );
    },
    PATIENCE,
  );
});

// Weyl's dimension formula against the multiplicities of Freudenthal's recursion: two independent routes.
test(
  'multiplicities times orbit sizes add up to the dimension',
  () => {
    const any = fc.constantFrom(...allSimpleTypes()).chain((type) => fc.tuple(fc.constant(type), irrep(type)));
    fc.assert(
      fc.property(any, ([type, labels]) => {
        const system = rootSystem(type);
        const character = dominantCharacter(system, labels, 200_000);
        if (!character) return;
        let sum = 0n;
        for (let k = 0; k < character.count; k++) {
          sum += BigInt(character.multiplicities[k] as number) * BigInt(character.orbitSizes[k] as number);
        }
        expect(sum).toBe(dimension(system, labels));
      }),
      { numRuns: 150 },
    );
  },
  PATIENCE,
);

/** All labels with sum of comark times label at most the level: the integrable weights of the affine algebra. */
function integrable(system: RootSystem & { marks: readonly number[] }, level: number): number[][] {
  const longest = Math.max(...system.scaledHalfNorms);
  const comarks = system.marks.map((mark, i) => (mark * (system.scaledHalfNorms[i] as number)) / longest);
  return comarks
    .reduce<{ labels: number[]; left: number }[]>(
      (list, comark) =>
        list.flatMap(({ labels, left }) =>
          Array.from({ length: Math.floor(left / comark) + 1 }, (_, a) => ({
            labels: [...labels, a],
            left: left - a * comark,
          })),
        ),
      [{ labels: [], left: level }],
    )
    .map(({ labels }) => labels);
}

function numericDeterminant(matrix: number[][]): number {
  const rows = matrix.map((row) => [...row]);
  let result = 1;
  for (let k = 0; k < rows.length; k++) {
    const top = rows[k] as number[];
    result *= top[k] as number;
    for (let i = k + 1; i < rows.length; i++) {
      const row = rows[i] as number[];
      const factor = (row[k] as number) / (top[k] as number);
      for (let j = k; j < rows.length; j++) row[j] = (row[j] as number) - factor * (top[j] as number);
    }
  }
  return result;
}

// Kac, Peterson, Adv. Math. 53 (1984) 125: the modular matrix is unitary, S_0w = (D (k+h)^r)^(-1/2) prod 2 sin(pi (a, w +
// rho)/(k+h)) with D the determinant of the coroots' Gram matrix. It fixes D, the measure and the form together.
describe('the first row of the modular matrix has norm one', () => {
  test.each(allSimpleTypes().map((type) => [typeName(type), type] as const))('%s', (_, type) => {
    const system = rootSystem(type);
    const group = groupNamed(simplyConnected(type));
    const gram = group.cocharacters.map((x) =>
      group.cocharacters.map((y) => dot(x, y).mul(group.basicScale).toNumber()),
    );
    const d = numericDeterminant(gram);
    // The same determinant from the printed form and the measure.
    const form = group.quadraticForm.map((row) => row.map((entry) => entry.toNumber()));
    const scale = group.basicScale.div(group.levelScale).toNumber() ** group.rank;
    expect((numericDeterminant(form) * scale) / group.unitMeasure.toNumber() ** 2).toBeCloseTo(d, 8);
    for (const level of [1, 2, 3]) {
      const k = level + system.dualCoxeter;
      const sum = integrable(system, level).reduce((norm, labels) => {
        const sines = system.positiveRoots.reduce((product, { coordinates }) => {
          const pairing = coordinates.reduce(
            (s, c, i) => s + c * (system.scaledHalfNorms[i] as number) * ((labels[i] as number) + 1),
            0,
          );
          return product * 2 * Math.sin((Math.PI * pairing) / (system.scale * k));
        }, 1);
        return norm + sines ** 2 / (d * k ** system.rank);
      }, 0);
      expect(sum).toBeCloseTo(1, 10);
    }
  });
});

// Macdonald, Invent. Math. 56 (1980) 93: with the basic form the volume is (2 pi)^(r+|Phi+|) sqrt(D) / prod (a, rho).
// SU(2) is a three-sphere of radius sqrt 2; USp(4) fibres over the seven-sphere.
test('volumes of SU(2) and USp(4)', () => {
  const volume = (name: string): number => {
    const { system, cocharacters, basicScale } = groupNamed(name);
    const d = numericDeterminant(
      cocharacters.map((x) => cocharacters.map((y) => dot(x, y).mul(basicScale).toNumber())),
    );
    const roots = system.positiveRoots.reduce(
      (product, { coordinates }) =>
        product * coordinates.reduce((s, c, i) => s + (c * (system.scaledHalfNorms[i] as number)) / system.scale, 0),
      1,
    );
    return ((2 * Math.PI) ** (system.rank + system.positiveRoots.length) * Math.sqrt(d)) / roots;
  };
  expect(volume('SU(2)')).toBeCloseTo(4 * Math.SQRT2 * Math.PI ** 2, 9);
  expect(volume('USp(4)')).toBeCloseTo((256 * Math.PI ** 6) / 3, 6);
});

// Freudenthal's theorem on traces: sum over weights of w(x)w(y) = I2 times the basic form, here in printed coordinates.
test.each(['SU(2)', 'SU(4)', 'SO(3)', 'SO(7)', 'Spin(6)', 'USp(6)', 'G2', 'F4', 'E6', 'E7', 'E8'])(
  'traces of the adjoint of %s in printed coordinates',
  (name) => {
    const group = groupNamed(name);
    const adjoint = representationNamed(name, 'adj')
      .orbits()
      .filter((orbit) => !orbit.isZero)
      .flatMap((orbit) => {
        const { denominator, vectors, width } = orbit.vectors();
        return Array.from({ length: orbit.size }, (_, k) =>
          Array.from(vectors.subarray(k * width, (k + 1) * width), (entry) => Rational.of(entry, denominator)),
        );
      });
    for (const x of group.cocharacters) {
      for (const y of group.cocharacters) {
        const trace = adjoint.reduce((sum, w) => sum.add(dot(w, x).mul(dot(w, y))), Rational.zero);
        const form = dot(x, y).mul(group.basicScale);
        const dual = group.simple.map((type) => rootSystem(type).dualCoxeter)[0] as number;
        expect(trace.toString()).toBe(form.mul(Rational.of(2 * dual)).toString());
      }
    }
  },
);
