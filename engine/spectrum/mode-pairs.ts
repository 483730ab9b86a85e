import type { Form } from '../exact/form';
import type { ModePair } from '../spheres/sphere';
import { multiplicityTower } from './level-tower';
import type { Spectrum } from './tower';

/** What pairs of modes leave, fermions above bosons: a tower for each pair, its weight put in by `at`. */
export function leftOfPairs(pairs: readonly ModePair[], at: (form: Form) => Form): Spectrum {
  const towers = pairs.map(({ eigenvalue, start, boson, fermion }) =>
    multiplicityTower(at(eigenvalue), fermion.multiplicity.sub(boson.multiplicity), start, fermion.field),
  );
  return { name: 'unpaired', towers, parameters: new Map() };
}
