import { absolute, bitLength, numberFromFixed } from '../arithmetic/fixed';
import { atan2Fixed } from '../arithmetic/fixed-atan';
import { type FixedComplex, logModulus, multiplyComplex, oneComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import type { Estimate } from './euler-maclaurin';

/**
 * The sum of principal logarithms of many numbers, by multiplying them out: one logarithm in the end, the number of
 * turns from arguments in doubles. Good for up to 10^6 numbers; each is known to `bits` fraction bits.
 */
export class LogProduct {
  private readonly bits: number;
  private product: FixedComplex;
  private exponent = 0;
  private angle = 0;
  private count = 0;

  constructor(bits: number) {
    this.bits = bits;
    this.product = oneComplex(bits);
  }

  /** z must not be 0. */
  multiply(z: FixedComplex): void {
    const { bits } = this;
    this.angle += Math.atan2(numberFromFixed(z.im, bits), numberFromFixed(z.re, bits));
    // Both factors keep `bits` significant bits, so that small numbers lose nothing.
    const up = bits - Math.max(bitLength(z.re), bitLength(z.im));
    const lifted = up > 0 ? { re: z.re << BigInt(up), im: z.im << BigInt(up) } : z;
    const product = multiplyComplex(this.product, lifted, bits);
    const excess = Math.max(bitLength(product.re), bitLength(product.im)) - bits;
    this.product = excess > 0 ? { re: product.re >> BigInt(excess), im: product.im >> BigInt(excess) } : product;
    this.exponent += Math.max(0, excess) - Math.max(0, up);
    this.count++;
  }

  /** Error: rounding of the products; not the errors of the numbers. */
  logarithm(): Estimate {
    const { bits, product } = this;
    const principal = atan2Fixed(product.im, product.re, bits);
    const turns = BigInt(Math.round((this.angle - numberFromFixed(principal, bits)) / (2 * Math.PI)));
    return {
      value: { re: logModulus(product, bits - this.exponent, bits), im: principal + 2n * turns * piFixed(bits) },
      error: BigInt(8 * this.count + 8) + 2n * absolute(turns),
    };
  }
}
