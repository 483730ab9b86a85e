import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import type { Form } from '../exact/form';
import type { DoubleKernel, FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';

/**
 * Most periods that an argument may lie from the zeros and poles of its function, by the number of its periods. Values
 * there are reached by one shift a period, each of which costs a logarithm, or a double sine where there are three.
 */
const MOST_IN_DOUBLES: readonly number[] = [1e6, 1e6, 1e4, 1e3];
const MOST_PRECISE: readonly number[] = [1e6, 1e6, 2e4, 200];

type Distance = (re: number, im: number) => number;
type Values = (name: string) => DoubleValue | null;
const closed: Values = () => null;

/** Beyond this size of an argument exponentials in it have no exponent that could be written down. */
const LARGEST = 2 ** 36;

/** Distance of a point along the periods of a function, in periods; null where the function has none to be shifted by. */
function distance(
  name: FunctionName,
  parameters: readonly Form[],
  values: Values,
): { along: Distance; kinds: number } | null {
  if (functions[name].elementary) return null;
  const rows = functions[name].zeros.flatMap((lattice) => {
    const start = formDouble(lattice.start(parameters), values);
    const steps = lattice.steps(parameters).map((step) => formDouble(step, values));
    return steps.map((step) => ({ start, step, kinds: steps.length }));
  });
  if (rows.length === 0) return null;
  return {
    kinds: Math.max(...rows.map(({ kinds }) => kinds)),
    along: (re, im) => {
      let most = 0;
      for (const { start, step } of rows) {
        if (start === null || step === null) return Number.POSITIVE_INFINITY;
        const size = step.re * step.re + step.im * step.im;
        const steps = Math.abs(((re - start.re) * step.re + (im - start.im) * step.im) / size);
        // Not `Math.max`, so that a distance that is no number counts as too far.
        if (!(steps <= most)) most = steps;
      }
      return most;
    },
  };
}

/** True where the precise tier would shift for longer than anybody waits, or its numbers would leave all bounds. */
export function isTooFar(name: FunctionName, argument: DoubleValue, parameters: readonly Form[]): boolean {
  const periodic = functions[name].zeros.some((lattice) => lattice.steps(parameters).length > 0);
  if (periodic && !(Math.hypot(argument.re, argument.im) <= LARGEST)) return true;
  const from = distance(name, parameters, closed);
  return from !== null && !(from.along(argument.re, argument.im) <= (MOST_PRECISE[from.kinds] ?? 0));
}

/** The same kernel with NaN at arguments out of reach. Overwrites the arguments it gets. */
export function withinReach(
  kernel: DoubleKernel,
  name: FunctionName,
  parameters: readonly Form[],
  values: Values = closed,
): DoubleKernel {
  const from = distance(name, parameters, values);
  if (from === null) return kernel;
  const most = MOST_IN_DOUBLES[from.kinds] ?? 0;
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        if (from.along(xRe[k] as number, xIm === null ? 0 : (xIm[k] as number)) <= most) continue;
        xRe[k] = Number.NaN;
        if (xIm !== null) xIm[k] = Number.NaN;
      }
      kernel.addLog(xRe, xIm, power, outRe, outIm);
    },
  };
}
