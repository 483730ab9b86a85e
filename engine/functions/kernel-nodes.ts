import { divideFixed, multiplyFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { type FixedComplex, multiplyComplex, sinhCoshComplex, squareComplex } from '../arithmetic/fixed-complex';
import { expFixed } from '../arithmetic/fixed-exp';

/**
 * The midpoint rule for integrals of cosh(2zt) against the kernel 1/(t prod sinh(w_i t)) in fixed point: nodes
 * t_k = (k + 1/2) h and weights W_k = h/(t_k prod_i sinh(w_i t_k)).
 */
export interface KernelNodes {
  /** Fraction bits of everything here. */
  readonly bits: number;
  /** Exactly the number used in the weights, a multiple of 2^-48. */
  readonly step: bigint;
  readonly weights: readonly bigint[];
}

/** Sizes chosen for a rule; all but `step` only decide how many bits and nodes are needed. */
export interface KernelPlan {
  /** -log of what may be left out. */
  readonly depth: number;
  readonly step: number;
  readonly nodes: number;
  /** Bits above the target that rounding of weights and recurrence may use up. */
  readonly guard: number;
}

/** More nodes than this are not attempted. */
const MAXIMAL_NODES = 250_000;

/**
 * A rule for |Im z| <= reach, |Re z| <= half width, at a target of `bits`. `rate` is 2 pi p/h, p = pi/max(w) the height
 * of the nearest pole. Null when it would need too many nodes.
 */
export function planKernel(
  periods: readonly number[],
  bits: number,
  halfWidth: number,
  rate: number,
): KernelPlan | null {
  const depth = (bits + 12) * Math.LN2;
  const total = periods.reduce((sum, w) => sum + w, 0);
  const height = Math.PI / Math.max(...periods);
  const step = Math.floor(((2 * Math.PI * height) / rate) * 2 ** 48) * 2 ** -48;
  const last = depth / (total - 2 * halfWidth);
  const nodes = Math.ceil(last / step) + 2;
  if (!(step > 0) || nodes > MAXIMAL_NODES) return null;
  // W_0 is the largest weight; the recurrence for cosh gathers k^2 units, which the growth e^{2 |Re z| t} carries on.
  const first = periods.reduce((product, w) => product / (w * (step / 2)), 2);
  const growth = (2 * halfWidth * last) / Math.LN2;
  const guard = Math.ceil(3 * Math.log2(nodes) + Math.max(0, Math.log2(first)) + growth) + 12;
  return { depth, step, nodes, guard: 32 * Math.ceil(guard / 32) };
}

/** The nodes and weights of a plan; `periods` with `bits` fraction bits, off by at most one unit each. */
export function kernelNodes(plan: KernelPlan, periods: readonly bigint[], bits: number): KernelNodes {
  const shift = BigInt(bits);
  const one = 1n << shift;
  const step = BigInt(plan.step * 2 ** 48) << (shift - 48n);
  const total = periods.reduce((sum, w) => sum + w, 0n);
  const half = (w: bigint): bigint => expFixed(-multiplyFixed(w, step, bits), bits);
  // e^{-2 w t_k} for every period, e^{-|w| t_k}.
  const steps = periods.map((w) => half(2n * w));
  const powers = periods.map(half);
  let decay = half(total >> 1n);
  const decayStep = half(total);
  const weights: bigint[] = [];
  const factor = BigInt(2 ** (periods.length + 1));
  for (let k = 0; k < plan.nodes; k++) {
    // h/t_k = 2/(2k + 1).
    let below = BigInt(2 * k + 1) * one;
    for (let i = 0; i < powers.length; i++) {
      below = multiplyFixed(below, one - (powers[i] as bigint), bits);
      powers[i] = multiplyFixed(powers[i] as bigint, steps[i] as bigint, bits);
    }
    weights.push(divideFixed(factor * decay, below, bits));
    decay = multiplyFixed(decay, decayStep, bits);
  }
  return { bits, step, weights };
}

/**
 * sum_k W_k (cosh(2 z t_k) - 1) over the nodes that matter for this z, by c_{k+1} - c_k = c_k - c_{k-1} + kappa (c_k + 1),
 * kappa = 4 sinh^2(zh), c_0 = c_{-1} = 2 sinh^2(zh/2). z has the nodes' fraction bits.
 */
export function sumCosh(nodes: KernelNodes, z: FixedComplex, total: number, depth: number): FixedComplex {
  const { bits, step, weights } = nodes;
  const shift = BigInt(bits);
  const count = nodesFor(nodes, z, total, depth);
  const y = { re: multiplyFixed(z.re, step, bits), im: multiplyFixed(z.im, step, bits) };
  const whole = squareComplex(sinhCoshComplex(y, bits).sinh, bits);
  const half = squareComplex(sinhCoshComplex({ re: y.re >> 1n, im: y.im >> 1n }, bits).sinh, bits);
  const kappa = { re: 4n * whole.re, im: 4n * whole.im };
  const one = 1n << shift;
  if (z.re === 0n || z.im === 0n) {
    let value = 2n * half.re;
    let difference = 0n;
    let sum = 0n;
    for (let k = 0; k < count; k++) {
      sum += (weights[k] as bigint) * value;
      difference += (kappa.re * (value + one)) >> shift;
      value += difference;
    }
    return { re: sum >> shift, im: 0n };
  }
  let value: FixedComplex = { re: 2n * half.re, im: 2n * half.im };
  let differenceRe = 0n;
  let differenceIm = 0n;
  let sumRe = 0n;
  let sumIm = 0n;
  for (let k = 0; k < count; k++) {
    const weight = weights[k] as bigint;
    sumRe += weight * value.re;
    sumIm += weight * value.im;
    const bend = multiplyComplex(kappa, { re: value.re + one, im: value.im }, bits);
    differenceRe += bend.re;
    differenceIm += bend.im;
    value = { re: value.re + differenceRe, im: value.im + differenceIm };
  }
  return { re: sumRe >> shift, im: sumIm >> shift };
}

function nodesFor(nodes: KernelNodes, z: FixedComplex, total: number, depth: number): number {
  const decay = total - 2 * Math.abs(numberFromFixed(z.re, nodes.bits));
  const needed = Math.ceil(depth / (decay * numberFromFixed(nodes.step, nodes.bits))) + 2;
  return Math.min(nodes.weights.length, needed);
}

/** A point of `fromBits` fraction bits with more of them. */
export function liftPoint(z: FixedComplex, fromBits: number, toBits: number): FixedComplex {
  return { re: shiftRounded(z.re, fromBits - toBits), im: shiftRounded(z.im, fromBits - toBits) };
}

/** The least multiple of total/16 that is not below |re|, at most total/4: few different tables for all points. */
export function widthClass(re: number, total: number): number {
  return (Math.min(4, Math.ceil((16 * Math.abs(re)) / total - 1e-9)) * total) / 16;
}

/** The least power of two that is not below |value|, at least 1. */
export function reachClass(value: number): number {
  return 2 ** Math.max(0, Math.ceil(Math.log2(Math.max(1, Math.abs(value)))));
}
