import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { doubleSineKernel } from '../../engine/functions/double-sine-double';
import { asFactor, hyperbolicArgument, isSum, realFirst } from '../../engine/functions/notation';
import { functions } from '../../engine/functions/table';
import { formLatex } from '../../engine/latex/form';
import { kernelValue } from './kernel-value';

const print = { form: formLatex };
const x = Form.symbol('x');
const b = [Form.symbol('@b')];
const round = [Form.one];

function doubleSineIn(label: string, argument: Form, parameters: readonly Form[]): string {
  const notation = functions.doubleSine.notations.find((candidate) => candidate.label === label);
  if (!notation) throw new Error(label);
  return notation.latex(argument, parameters, print);
}

describe('notations of the double sine', () => {
  test('arguments of the other notations', () => {
    expect(doubleSineIn('s_b', x, b)).toBe('s_{b}(x)');
    expect(doubleSineIn('s_b', x, round)).toBe('s_{b=1}(x)');
    expect(doubleSineIn('S_2', x, b)).toBe('S_2\\left(\\frac{Q}{2}-ix\\,|\\,b,b^{-1}\\right)');
    expect(doubleSineIn('S_2', x, round)).toBe('S_2(1-ix\\,|\\,1,1)');
    expect(doubleSineIn('\\Gamma_h', x, b)).toBe('\\Gamma_h\\left(\\frac{iQ}{2}-x;ib,ib^{-1}\\right)');
    expect(doubleSineIn('e^{\\ell}', Form.i.mul(Form.one.sub(x)), round)).toBe('e^{\\ell(1-x)}');
  });

  test('a chiral multiplet reads as in the papers', () => {
    // s_b(iQ/2 (1 - R) - sigma); e^{l(1 - R + i sigma)} at b = 1: Jafferis 2010, arXiv:1012.3210.
    const chiral = Form.i.mul(Form.one.sub(Form.symbol('r'))).sub(Form.symbol('sigma'));
    expect(doubleSineIn('e^{\\ell}', chiral, round)).toBe('e^{\\ell(1-r+i\\sigma)}');
    expect(doubleSineIn('S_2', chiral, round)).toBe('S_2(2-r+i\\sigma\\,|\\,1,1)');
  });

  test('e_b and Phi_b: s_b(x) = e^{-i pi x^2/2 - i pi (b^2 + b^-2)/24} e_b(x) with e_b from its integral', () => {
    // Source of e_b: Faddeev, Kashaev, Volkov 2001, hep-th/0006156: exp of int_{R+i0} e^{-2ixt} dt/(4t sinh bt sinh t/b).
    for (const [period, at] of [
      [1.3, -0.4],
      [0.7, -1.1],
    ] as const) {
      const height = (Math.PI * Math.min(period, 1 / period)) / 2;
      const step = 0.02;
      let re = 0;
      let im = 0;
      for (let k = -2000; k <= 2000; k++) {
        const t = { re: k * step, im: height };
        const below = multiply(multiply(t, sinh(t, period)), sinh(t, 1 / period));
        const size = Math.exp(2 * at * t.im);
        const above = { re: size * Math.cos(-2 * at * t.re), im: size * Math.sin(-2 * at * t.re) };
        const norm = 4 * (below.re * below.re + below.im * below.im);
        re += (step * (above.re * below.re + above.im * below.im)) / norm;
        im += (step * (above.im * below.re - above.re * below.im)) / norm;
      }
      const phase = -(Math.PI / 2) * at * at - (Math.PI / 24) * (period * period + 1 / (period * period));
      const value = kernelValue(doubleSineKernel(period), at, 0);
      expect(re).toBeCloseTo(value.re, 12);
      expect(im + phase).toBeCloseTo(value.im, 12);
    }
  });

  test('l(z) = log s_1(i z) in closed form', () => {
    // Source: Jafferis 2010, arXiv:1012.3210, for Im z >= 0; the dilogarithm by its series.
    const [a, c] = [0.3, 0.4];
    const size = Math.exp(-2 * Math.PI * c);
    const angle = 2 * Math.PI * a;
    const log = { re: 0.5 * Math.log((1 - size * Math.cos(angle)) ** 2 + (size * Math.sin(angle)) ** 2), im: 0 };
    log.im = Math.atan2(-size * Math.sin(angle), 1 - size * Math.cos(angle));
    let dilog = { re: 0, im: 0 };
    for (let k = 1; k < 60; k++) {
      const term = size ** k / k ** 2;
      dilog = { re: dilog.re + term * Math.cos(k * angle), im: dilog.im + term * Math.sin(k * angle) };
    }
    const square = { re: a * a - c * c, im: 2 * a * c };
    const re = -(a * log.re - c * log.im) - 0.5 * (Math.PI * square.im + dilog.im / Math.PI);
    const im = -(a * log.im + c * log.re) + 0.5 * (Math.PI * square.re + dilog.re / Math.PI) - Math.PI / 12;
    const value = kernelValue(doubleSineKernel(1), -c, a);
    expect(value.re).toBeCloseTo(re, 13);
    expect(value.im).toBeCloseTo(im, 13);
  });

  test('the product has the factors of the definition: s_b(2x)/s_b(x)^2 converges', () => {
    // prod (m b + n/b + Q/2 - i y)/(m b + n/b + Q/2 + i y): terms linear in y cancel between s_b(2x) and s_b(x)^2.
    const period = 1.3;
    const at = 0.3;
    const q = period + 1 / period;
    const partial = (count: number): number => {
      let sum = 0;
      for (let m = 0; m < count * 2; m++) {
        for (let n = 0; n * (1 / period) + m * period < count; n++) {
          const r = m * period + n / period + q / 2;
          sum += -2 * Math.atan2(2 * at, r) + 4 * Math.atan2(at, r);
        }
      }
      return sum;
    };
    const kernel = doubleSineKernel(period);
    const wanted = kernelValue(kernel, 2 * at, 0).im - 2 * kernelValue(kernel, at, 0).im;
    // The remainder falls like 1/count.
    expect(2 * partial(800) - partial(400)).toBeCloseTo(wanted, 4);
  });
});

function multiply(a: { re: number; im: number }, c: { re: number; im: number }): { re: number; im: number } {
  return { re: a.re * c.re - a.im * c.im, im: a.re * c.im + a.im * c.re };
}

function sinh(t: { re: number; im: number }, period: number): { re: number; im: number } {
  const [re, im] = [t.re * period, t.im * period];
  return { re: Math.sinh(re) * Math.cos(im), im: Math.cosh(re) * Math.sin(im) };
}

describe('pieces of notation', () => {
  test('sums are told from products', () => {
    expect(isSum('b(\\sigma_1-\\sigma_2)')).toBe(false);
    expect(isSum('\\sigma_1-\\sigma_2')).toBe(true);
    expect(asFactor('\\sigma')).toBe('\\sigma');
    expect(asFactor('-\\sigma')).toBe('(-\\sigma)');
  });

  test('real terms first', () => {
    expect(realFirst(Form.i.mul(x).add(Form.one), print)).toBe('1+ix');
    expect(realFirst(Form.one.sub(Form.i.mul(x)), print)).toBe('1-ix');
  });

  test('hyperbolic arguments', () => {
    const difference = Form.symbol('sigma1').sub(Form.symbol('sigma2'));
    expect(hyperbolicArgument(difference, print)).toBe('\\pi(\\sigma_1-\\sigma_2)');
    expect(hyperbolicArgument(Form.symbol('@b').mul(difference), print)).toBe('(\\pi b(\\sigma_1-\\sigma_2))');
    expect(hyperbolicArgument(Form.symbol('sigma'), print)).toBe('(\\pi\\sigma)');
  });
});
