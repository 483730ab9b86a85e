import { doubleSine } from './double-sine';
import { exponential } from './exponential';
import { fluxGamma } from './flux-gamma';
import { gamma } from './gamma';
import { hyperbolicCosine } from './hyperbolic-cosine';
import { hyperbolicSine } from './hyperbolic-sine';
import { linear } from './linear';
import { sign } from './sign';
import type { FunctionName, SpecialFunction } from './special-function';
import { tripleSine } from './triple-sine';
import { upsilon } from './upsilon';

/** Every function that a product can be made of. The compiler finds a missing one. */
export const functions = {
  hyperbolicSine,
  hyperbolicCosine,
  doubleSine,
  gamma,
  upsilon,
  tripleSine,
  fluxGamma,
  sign,
  linear,
  exponential,
} satisfies Record<FunctionName, SpecialFunction> as Record<FunctionName, SpecialFunction>;
