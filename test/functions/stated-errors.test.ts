import { describe, expect, test } from 'vitest';
import type { ValueFunctionWord } from '../../engine/functions/values';
import { type KernelSource, kernelSources } from './random-kernels';
import { seeded, valuePoints } from './random-points';
import { worstOfDouble, worstOfPrecise, worstOfValue } from './worst-ratio';

/**
 * The error stated, at random points, against twice the bits. That the values are right at all is what the fixtures of
 * mpmath are for. More points: `npm run bench -- accuracy`.
 */
describe('errors stated are kept at random points', { timeout: 20_000 }, () => {
  test.each(Object.keys(valuePoints) as ValueFunctionWord[])('%s', (word) => {
    const { ratio, at, held } = worstOfValue(
      word,
      70,
      word === 'barnesgamma' || word === 'qpochhammer' ? 40 : 120,
      seeded(17),
    );
    expect(ratio, at).toBeLessThanOrEqual(1);
    expect(held).toBeGreaterThan(10);
  });

  test.each(Object.keys(kernelSources()))('log of %s', (name) => {
    const heavy = /upsilon|Sine, complex|^tripleSine|^doubleSine/.test(name);
    const { ratio, at, held } = worstOfPrecise(source(name), 70, heavy ? 14 : 120, seeded(17));
    expect(ratio, at).toBeLessThanOrEqual(1);
    expect(held).toBeGreaterThan(10);
  });

  test.each(Object.keys(kernelSources()))('log of %s in doubles', (name) => {
    const heavy = /upsilon|Sine, complex|^tripleSine|^doubleSine/.test(name);
    const { ratio, at, held } = worstOfDouble(source(name), heavy ? 14 : 120, seeded(23));
    expect(ratio, at).toBeLessThanOrEqual(1);
    expect(held).toBeGreaterThan(10);
  });
});

function source(name: string): KernelSource {
  const found = kernelSources()[name];
  if (!found) throw new Error(`No points for ${name}`);
  return found;
}
