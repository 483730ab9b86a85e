import { Rational } from './rational';

/** An exact Gaussian rational re + i im. Immutable. */
export class Gaussian {
  static readonly zero = new Gaussian(Rational.zero, Rational.zero);
  static readonly one = new Gaussian(Rational.one, Rational.zero);
  static readonly i = new Gaussian(Rational.zero, Rational.one);

  readonly re: Rational;
  readonly im: Rational;

  private constructor(re: Rational, im: Rational) {
    this.re = re;
    this.im = im;
  }

  static of(re: Rational | number | bigint, im: Rational | number | bigint = Rational.zero): Gaussian {
    return new Gaussian(re instanceof Rational ? re : Rational.of(re), im instanceof Rational ? im : Rational.of(im));
  }

  add(other: Gaussian): Gaussian {
    return new Gaussian(this.re.add(other.re), this.im.add(other.im));
  }

  neg(): Gaussian {
    return new Gaussian(this.re.neg(), this.im.neg());
  }

  mul(other: Gaussian): Gaussian {
    if (this.im.isZero() && other.im.isZero()) return new Gaussian(this.re.mul(other.re), Rational.zero);
    return new Gaussian(
      this.re.mul(other.re).sub(this.im.mul(other.im)),
      this.re.mul(other.im).add(this.im.mul(other.re)),
    );
  }

  /** Throws RangeError at zero. */
  inverse(): Gaussian {
    const norm = this.re.mul(this.re).add(this.im.mul(this.im));
    return new Gaussian(this.re.div(norm), this.im.neg().div(norm));
  }

  pow(exponent: number): Gaussian {
    const base = exponent < 0 ? this.inverse() : this;
    let result = Gaussian.one;
    let square = base;
    for (let k = Math.abs(exponent); k > 0; k = Math.floor(k / 2)) {
      if (k % 2 === 1) result = result.mul(square);
      if (k > 1) square = square.mul(square);
    }
    return result;
  }

  conjugate(): Gaussian {
    return new Gaussian(this.re, this.im.neg());
  }

  equals(other: Gaussian): boolean {
    return this.re.equals(other.re) && this.im.equals(other.im);
  }

  isZero(): boolean {
    return this.re.isZero() && this.im.isZero();
  }

  isReal(): boolean {
    return this.im.isZero();
  }

  toString(): string {
    if (this.im.isZero()) return this.re.toString();
    return this.re.isZero() ? `${this.im}*i` : `(${this.re}+${this.im}*i)`;
  }
}
