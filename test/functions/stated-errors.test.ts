import { describe, expect, test } from 'vitest';
import type { ValueFunctionWord } from '../../engine/functions/values';
import { type KernelSource, kernelSources } from './random-kernels';
import { complexOfDoubles, seeded, valuePoints } from './random-points';
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

/** The worst points of runs of 20,000, where errors stated earlier were exceeded. */
describe('worst points found by the accuracy run, in doubles', () => {
  test.each([
    ['gamma', 0.771219279110238, -0.12630167078092008, []],
    ['fluxGamma', -0.15088183513688647, 0.9150223704982313, [{ re: 1, im: 0 }]],
    // x next to 0 had been rounded at the size of 1/b, 4.5e-14.
    ['upsilon', -0.00015076592055070337, 0.00021524212031001608, [{ re: 16.386750939741965, im: 0 }]],
    ['upsilon', 0.00002116244074242792, -0.000007450925956089301, [{ re: 17.253740649277102, im: 0 }]],
    ['doubleSine', -1.03708279107357, -0.3148052251272396, [{ re: 0.11543098705917051, im: -0.16916682084427295 }]],
  ] as const)('log of %s at %d + %d i', (name, re, im, parameters) => {
    const exact = parameters.map((value) => complexOfDoubles(value.re, value.im));
    const { ratio } = worstOfDouble({ name, next: () => ({ re, im, parameters: exact }) }, 1, seeded(1));
    expect(ratio).toBeGreaterThan(0);
    expect(ratio).toBeLessThanOrEqual(1);
  });
});

function source(name: string): KernelSource {
  const found = kernelSources()[name];
  if (!found) throw new Error(`No points for ${name}`);
  return found;
}
