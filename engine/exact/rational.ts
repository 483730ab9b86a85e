/**
 * An exact rational number: numerator and denominator without common factor, denominator positive.
 * Immutable; every operation returns a new value.
 */
export class Rational {
  static readonly zero = new Rational(0n, 1n);
  static readonly one = new Rational(1n, 1n);

  readonly numerator: bigint;
  readonly denominator: bigint;

  private constructor(numerator: bigint, denominator: bigint) {
    this.numerator = numerator;
    this.denominator = denominator;
  }

  /** numerator/denominator in lowest terms. Throws RangeError at denominator zero or at a non-integer number. */
  static of(numerator: bigint | number, denominator: bigint | number = 1n): Rational {
    let n = BigInt(numerator);
    let d = BigInt(denominator);
    if (d === 0n) throw new RangeError('A rational number has no zero denominator.');
    if (d === 1n) return n === 0n ? Rational.zero : n === 1n ? Rational.one : new Rational(n, 1n);
    if (d < 0n) {
      n = -n;
      d = -d;
    }
    const g = gcd(n < 0n ? -n : n, d);
    return g === 1n ? new Rational(n, d) : new Rational(n / g, d / g);
  }

  /** Reads `3`, `-1/3`, `0.25`, `1.5e-3`; null for anything else. The exponent is limited to four digits. */
  static parse(text: string): Rational | null {
    const fraction = /^([+-]?\d+)\/(\d+)$/.exec(text);
    if (fraction) {
      const d = BigInt(fraction[2] as string);
      return d === 0n ? null : Rational.of(BigInt(fraction[1] as string), d);
    }
    const decimal = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d{1,4}))?$/.exec(text);
    if (!decimal) return null;
    const whole = decimal[2] ?? '';
    const part = decimal[3] ?? '';
    if (whole === '' && part === '') return null;
    const shift = Number(decimal[4] ?? '0') - part.length;
    const digits = BigInt(`${decimal[1] ?? ''}${whole}${part}`);
    return shift >= 0 ? Rational.of(digits * 10n ** BigInt(shift)) : Rational.of(digits, 10n ** BigInt(-shift));
  }

  add(other: Rational): Rational {
    if (this.denominator === 1n && other.denominator === 1n) return Rational.of(this.numerator + other.numerator);
    return Rational.of(
      this.numerator * other.denominator + other.numerator * this.denominator,
      this.denominator * other.denominator,
    );
  }

  sub(other: Rational): Rational {
    return this.add(other.neg());
  }

  mul(other: Rational): Rational {
    return Rational.of(this.numerator * other.numerator, this.denominator * other.denominator);
  }

  /** Throws RangeError when the divisor is zero. */
  div(other: Rational): Rational {
    return Rational.of(this.numerator * other.denominator, this.denominator * other.numerator);
  }

  neg(): Rational {
    return this.numerator === 0n ? this : new Rational(-this.numerator, this.denominator);
  }

  abs(): Rational {
    return this.numerator < 0n ? this.neg() : this;
  }

  /** Integer power; a negative power of zero throws RangeError. */
  pow(exponent: number): Rational {
    if (exponent < 0) return Rational.one.div(this.pow(-exponent));
    return new Rational(this.numerator ** BigInt(exponent), this.denominator ** BigInt(exponent));
  }

  /** Largest integer not above the value. */
  floor(): bigint {
    const q = this.numerator / this.denominator;
    return this.numerator < 0n && q * this.denominator !== this.numerator ? q - 1n : q;
  }

  /** The non-negative rational square root where it exists, else null. */
  sqrt(): Rational | null {
    if (this.numerator < 0n) return null;
    const n = integerRoot(this.numerator);
    const d = integerRoot(this.denominator);
    return n * n === this.numerator && d * d === this.denominator ? Rational.of(n, d) : null;
  }

  compare(other: Rational): number {
    const difference = this.numerator * other.denominator - other.numerator * this.denominator;
    return difference < 0n ? -1 : difference > 0n ? 1 : 0;
  }

  equals(other: Rational): boolean {
    return this.numerator === other.numerator && this.denominator === other.denominator;
  }

  isZero(): boolean {
    return this.numerator === 0n;
  }

  isInteger(): boolean {
    return this.denominator === 1n;
  }

  sign(): -1 | 0 | 1 {
    return this.numerator < 0n ? -1 : this.numerator > 0n ? 1 : 0;
  }

  /** Nearest double up to two units in the last place, whatever the size of numerator and denominator. */
  toNumber(): number {
    const n = Number(this.numerator);
    const d = Number(this.denominator);
    if (Number.isFinite(n) && Number.isFinite(d)) return n / d;
    // A quotient of 64 or 65 bits, and its power of two in two steps: one alone may leave the doubles.
    const shift = 64 + bitsOf(this.denominator) - bitsOf(this.numerator);
    const [up, down] = shift >= 0 ? [BigInt(shift), 0n] : [0n, BigInt(-shift)];
    const quotient = Number((this.numerator << up) / (this.denominator << down));
    const half = Math.trunc(shift / 2);
    return quotient * 2 ** -half * 2 ** (half - shift);
  }

  toString(): string {
    return this.denominator === 1n ? `${this.numerator}` : `${this.numerator}/${this.denominator}`;
  }
}

function bitsOf(value: bigint): number {
  return (value < 0n ? -value : value).toString(2).length;
}

/** Greatest common divisor of two non-negative integers. */
export function gcd(a: bigint, b: bigint): bigint {
  let x = a;
  let y = b;
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** Integer part of the square root of a non-negative integer (Newton's iteration from above). */
export function integerRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let x = 1n << BigInt((n.toString(2).length + 1) >> 1);
  for (;;) {
    const y = (x + n / x) >> 1n;
    if (y >= x) return x;
    x = y;
  }
}
