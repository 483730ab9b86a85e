import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { FunctionName } from '../../engine/functions/special-function';
import { evaluatePrecise } from '../../engine/numeric/precise';
import { compile } from '../../engine/numeric/program';
import type { Factor } from '../../engine/product/factor';

/*
 * Values far out are reached by one shift a period; arguments that would take minutes are refused before the work
 * starts. What is tested is that an answer comes at all: the time limit of a test is five seconds.
 */
const at = (name: FunctionName, argument: Form, ...parameters: Form[]): Factor<never>[] => [
  { name, argument, parameters, power: 1, weights: null, half: false, from: [] },
];
const power = (n: number) => Form.number(Rational.of(10n ** BigInt(n)));
const third = Form.ratio(1, 3);
const one = Form.one;

describe('in the precise tier', () => {
  test.each<[FunctionName, Form, Form[]]>([
    ['doubleSine', third.add(Form.i.mul(power(7))), [one]],
    ['doubleSine', third.add(Form.i.mul(power(30))), [Form.ratio(5, 4)]],
    ['doubleSine', Form.i.mul(power(12)), [Form.ratio(5, 4)]],
    ['doubleSine', Form.i.add(power(30)), [Form.ratio(5, 4)]],
    ['tripleSine', third.add(power(3)), [one, one, one]],
    ['tripleSine', power(12), [one, one, one]],
    ['upsilon', third.add(power(30)), [one]],
    ['gamma', third.sub(power(30)), []],
    ['gamma', third.add(Form.i.mul(power(30))), []],
    ['hyperbolicSine', power(30).add(Form.i.mul(third)), []],
    ['hyperbolicCosine', power(100), []],
  ])('%s(%s) is out of reach', (name, argument, parameters) => {
    expect(evaluatePrecise(at(name, argument, ...parameters), () => null, 20).kind).toBe('unreachable');
  });

  test('what is near enough is not refused', () => {
    const far = evaluatePrecise(at('doubleSine', third.add(Form.i.mul(power(3))), one), () => null, 20);
    expect(far.kind).toBe('value');
    expect(evaluatePrecise(at('hyperbolicSine', power(4)), () => null, 20).kind).toBe('value');
    expect(evaluatePrecise(at('linear', power(60)), () => null, 20).kind).toBe('value');
    expect(evaluatePrecise(at('exponential', Form.i.mul(power(3))), () => null, 20).kind).toBe('value');
  });
});

describe('in doubles', () => {
  const x = Form.symbol('x');
  const logs = (name: FunctionName, argument: Form, parameters: Form[], points: number[]): number[] => {
    const program = compile(at(name, argument, ...parameters), ['x'], () => null);
    const re = new Float64Array(points.length);
    program.addLog([Float64Array.from(points)], re, new Float64Array(points.length));
    return [...re];
  };

  test.each<[FunctionName, Form, Form[]]>([
    ['doubleSine', Form.i.mul(x).add(third), [one]],
    // 1/x at x = 0: an R-charge typed as 1/r, plotted from r = 0.
    ['doubleSine', Form.i.mul(Form.one.sub(x.inverse())), [one]],
    ['tripleSine', x.add(third), [one, one, one]],
    ['upsilon', x.add(third), [one]],
    ['doubleSine', third, [x]],
  ])('%s of %s is left out where it is out of reach, and only there', (name, argument, parameters) => {
    const far = name === 'doubleSine' && !argument.symbols().includes('x') ? 0 : 1e9;
    const inverse = argument.key.includes('x^-1');
    const [near, outside] = logs(name, argument, parameters, [0.7, inverse ? 0 : far]);
    expect(near).not.toBeNaN();
    expect(outside).toBeNaN();
  });

  test('a real argument of the double sine may be as large as it likes', () => {
    expect(logs('doubleSine', x, [one], [1e12, -1e9])).toEqual([0, 0]);
  });
});
