import { addBalls, type Ball, expBall } from '../arithmetic/ball';
import { formDouble } from '../arithmetic/form-double';
import { formFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import type { ExactParameter, FunctionName, PreciseLog } from '../functions/special-function';
import { functions } from '../functions/table';
import { exactOrder } from '../product/divisor';
import { expand, type Product } from '../product/factor';
import { isTooFar } from './reach';

/** Digits that a request may ask for. */
export const MAXIMAL_DIGITS = 1000;
/** Working precision is not raised beyond this many bits above what the digits need. */
const MAXIMAL_GUARD = 4096;

export type PreciseValue =
  | { readonly kind: 'value'; readonly value: Ball; readonly log: Ball; readonly route: string | null }
  | { readonly kind: 'zero' | 'pole'; readonly order: number }
  /** Zeros and poles of single factors meet: the product has a limit there, but no factor-by-factor value. */
  | { readonly kind: 'meeting'; readonly order: number }
  | { readonly kind: 'indistinct'; readonly argument: string }
  | { readonly kind: 'unset'; readonly names: readonly string[] }
  /** A function has no value there; `why` says it in words. */
  | { readonly kind: 'outside'; readonly why: string }
  /** `why` says it in words where there is more to say than that. */
  | { readonly kind: 'unreachable'; readonly why: string | null };

/** Which algorithm evaluates the functions: their main one, or the independent second one where there is one. */
export type Route = 'main' | 'second';

/** Told before each function of a product is evaluated, how many are done and how many there are. */
export type Report = (done: number, of: number) => void;

/** One function value of a product: equal ones are evaluated once. */
export interface Entry {
  readonly name: FunctionName;
  readonly argument: Form;
  readonly parameters: readonly Form[];
  readonly power: number;
}

/**
 * The product at exactly known values of its symbols. The relative error of the value is below 10^-digits; the error
 * carried by the balls adds up what every function states for its own value and argument.
 */
export function evaluatePrecise(
  product: Product,
  values: (name: string) => Form | null,
  digits: number,
  route: Route = 'main',
  report: Report = () => undefined,
): PreciseValue {
  const entries = collectEntries(product, values);
  const names = [...new Set(entries.flatMap((e) => [e.argument, ...e.parameters].flatMap((f) => f.symbols())))];
  if (names.length > 0) return { kind: 'unset', names };
  const far = entries.some(({ name, argument, parameters: periods }) => {
    const at = formDouble(argument, () => null);
    return at === null || isTooFar(name, at, periods);
  });
  if (far) return { kind: 'unreachable', why: 'an argument is undefined, or lies too many periods out' };
  for (const { name, argument } of entries) {
    const why = functions[name].outside?.(argument) ?? null;
    if (why !== null) return { kind: 'outside', why };
  }
  let order = 0;
  let meets = false;
  for (const entry of entries) {
    const own = exactOrder(entry.name, entry.argument, entry.parameters) * entry.power;
    order += own;
    if (own !== 0) meets = true;
  }
  if (order !== 0) return { kind: order > 0 ? 'zero' : 'pole', order: Math.abs(order) };
  if (meets) return { kind: 'meeting', order: 0 };
  return sumLogs(entries, digits, route, report);
}

/** All weights written out at the values, equal arguments collected. */
export function collectEntries(product: Product, values: (name: string) => Form | null): Entry[] {
  const collected = new Map<string, Entry>();
  for (const factor of expand(product)) {
    const argument = factor.argument.substitute(values);
    const parameters = factor.parameters.map((p) => p.substitute(values));
    const key = [factor.name, argument.key, ...parameters.map((p) => p.key)].join('|');
    const power = factor.power + (collected.get(key)?.power ?? 0);
    collected.set(key, { name: factor.name, argument, parameters, power });
  }
  return [...collected.values()].filter(({ power }) => power !== 0);
}

/** A function value and the powers of it and of its complex conjugate in a product. */
interface Shared extends Entry {
  readonly conjugatePower: number;
}

/** Entries at mirrored points, f(x)^p f(mirror x)^q, share one evaluation; periods have to be real. */
function shareMirrored(entries: readonly Entry[]): Shared[] {
  const shared = new Map<string, Shared>();
  for (const entry of entries) {
    const { name, argument, parameters } = entry;
    const periods = parameters.map((period) => period.key).join('|');
    const real = parameters.every((period) => period.conjugate().equals(period));
    const mirrored = real ? functions[name].mirror?.(argument) : undefined;
    const partner = mirrored && shared.get([name, mirrored.key, periods].join('|'));
    if (partner) {
      const key = [name, partner.argument.key, periods].join('|');
      shared.set(key, { ...partner, conjugatePower: partner.conjugatePower + entry.power });
    } else shared.set([name, argument.key, periods].join('|'), { ...entry, conjugatePower: 0 });
  }
  return [...shared.values()];
}

function sumLogs(found: readonly Entry[], digits: number, route: Route, report: Report): PreciseValue {
  const entries = shareMirrored(found);
  const needed = Math.ceil(digits * Math.log2(10)) + 4;
  let guard = 24;
  while (guard <= MAXIMAL_GUARD) {
    const bits = needed + guard;
    const attempt = logAt(entries, bits, route, report);
    if (attempt.kind === 'refused') return attempt.why;
    if (attempt.kind === 'value') {
      const { log } = attempt;
      const excess = log.error.toString(2).length - guard;
      if (excess <= 0) {
        const value = expBall(log, needed + 16);
        return value === null
          ? { kind: 'unreachable', why: null }
          : { kind: 'value', value, log, route: attempt.route };
      }
      guard += excess + 8;
    } else guard *= 2;
  }
  return stuck(entries);
}

type Attempt =
  | { readonly kind: 'value'; readonly log: Ball; readonly route: string | null }
  | { readonly kind: 'again' }
  | { readonly kind: 'refused'; readonly why: PreciseValue };

function logAt(entries: readonly Shared[], bits: number, route: Route, report: Report): Attempt {
  const precision = 4 * bits + 256;
  let sum: Ball = { re: 0n, im: 0n, bits, error: 0n };
  let used: string | null = null;
  for (const [done, entry] of entries.entries()) {
    report(done, entries.length);
    const argument = formFixed(entry.argument, bits);
    if (argument === null) return { kind: 'refused', why: { kind: 'unreachable', why: null } };
    const parameters = entry.parameters.map(exactParameter);
    const declared = functions[entry.name];
    const second = route === 'second' ? (declared.crossCheck?.(argument, parameters, bits) ?? null) : null;
    const confirmed = second !== null && second.log.kind !== 'unreachable';
    if (confirmed) used = second.route;
    const log: PreciseLog = confirmed ? second.log : declared.precise(argument, parameters, bits);
    if (log.kind === 'indistinct') return { kind: 'again' };
    if (log.kind === 'unreachable') return { kind: 'refused', why: { kind: 'unreachable', why: log.says } };
    if (log.kind !== 'value') {
      return { kind: 'refused', why: { kind: log.kind, order: log.order * Math.abs(entry.power) } };
    }
    const { power, conjugatePower } = entry;
    const term: Ball = {
      re: BigInt(power + conjugatePower) * log.re,
      im: BigInt(power - conjugatePower) * log.im,
      bits,
      error: BigInt(Math.abs(power) + Math.abs(conjugatePower)) * log.error,
    };
    sum = addBalls(sum, term, precision);
  }
  return { kind: 'value', log: sum, route: used };
}

/** A period for the precise tier. */
export function exactParameter(form: Form): ExactParameter {
  const approx = formDouble(form, () => null) ?? { re: Number.NaN, im: Number.NaN };
  return {
    square: form.mul(form).toRational(),
    overPi: form.div(Form.pi).toRational(),
    value: (bits) => formFixed(form, bits) ?? { re: 0n, im: 0n },
    approx,
  };
}

function stuck(entries: readonly Entry[]): PreciseValue {
  const near = entries.find(({ name }) => functions[name].zeros.length > 0);
  return near ? { kind: 'indistinct', argument: near.argument.key } : { kind: 'unreachable', why: null };
}
