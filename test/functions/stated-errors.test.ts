import { describe, expect, test } from 'vitest';
import type { FunctionName } from '../../engine/functions/special-function';
import type { ValueFunctionWord } from '../../engine/functions/values';
import { kernelPoints, seeded, valuePoints } from './random-points';
import { worstOfPrecise, worstOfValue } from './worst-ratio';

/**
 * The error stated, at random points, against twice the bits. That the values are right at all is what the fixtures of
 * mpmath are for. More points: `npm run bench -- accuracy`.
 */
describe('errors stated are kept at random points', { timeout: 20_000 }, () => {
  test.each(Object.keys(valuePoints) as ValueFunctionWord[])('%s', (word) => {
    const { ratio, at, held } = worstOfValue(
      word,
      70,
      word === 'barnesgamma' || word === 'qpochhammer' ? 40 : 200,
      seeded(17),
    );
    expect(ratio, at).toBeLessThanOrEqual(1);
    expect(held).toBeGreaterThan(10);
  });

  test.each(Object.keys(kernelPoints) as FunctionName[])('log of %s', (name) => {
    const heavy = name === 'upsilon' || name === 'tripleSine' || name === 'doubleSine';
    const { ratio, at, held } = worstOfPrecise(name, 70, heavy ? 20 : 200, seeded(17));
    expect(ratio, at).toBeLessThanOrEqual(1);
    expect(held).toBeGreaterThan(10);
  });
});
