import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { analyse } from '../../engine/requests/analysis';
import { outline } from '../../engine/requests/outline';
import { plotAt } from '../../engine/requests/plot-at';
import type { PlotResult, Result } from '../../engine/requests/result';
import { findRequest, run } from '../../engine/requests/run';
import { answer, failureOf, SURROUNDINGS } from './answers';

function plotOf(...lines: readonly string[]): PlotResult {
  return asPlot(answer(...lines));
}

function asPlot(result: Result | null): PlotResult {
  if (result?.kind !== 'plot') throw new Error(result === null ? 'nothing' : failureOf(result));
  return result;
}

const hypers = [
  'theory h',
  '  sphere S3',
  '  gauge G = U(1), fi zeta',
  '  flavor F = U(1), mass m',
  '  matter G F',
  '  hyper q 1 1',
  '',
];
const su2 = ['theory v', '  sphere S3, b = 5/4', '  gauge G = SU(2)', '  matter G R', '  chiral q fund 1/3', ''];

/** Value of a curve at the grid point next to x. */
function near({ series }: PlotResult, x: number, k = 0): { x: number; y: number } {
  const xs = series[k]?.x ?? [];
  const best = xs.reduce(
    (found, value, index) => (Math.abs(value - x) < Math.abs((xs[found] ?? 0) - x) ? index : found),
    0,
  );
  return { x: xs[best] as number, y: series[k]?.y[best] as number };
}

// 1/(2 cosh pi x): Kapustin, Willett, Yaakov 2010, arXiv:1003.5694.
describe('curves', () => {
  test('of a hyper: the closed form, at every point', () => {
    const plot = plotOf(...hypers, 'plot one-loop of h over sigma = -3 .. 3 at m = 1/4');
    const [curve] = plot.series;
    expect(curve?.name).toBe('re one-loop');
    curve?.x.forEach((x, k) => {
      expect(curve.y[k]).toBeCloseTo(1 / (2 * Math.cosh(Math.PI * (x + 0.25))), 13);
    });
    expect([curve?.x[0], curve?.x.at(-1), plot.axes[0]?.latex]).toEqual([-3, 3, '\\sigma']);
    expect(plot.marks).toEqual([]);
    expect(plot.notes).toEqual([]);
  });

  test('over a mass; Coulomb parameters that are not set are zero, and this is said', () => {
    const plot = plotOf(...hypers, 'plot one-loop of h over m = 0 .. 1');
    expect(near(plot, 1).y).toBeCloseTo(1 / (2 * Math.cosh(Math.PI)), 13);
    expect(plot.notes).toEqual(['Not set, taken as zero: sigma.']);
  });

  test('parts: modulus, argument, real, imaginary, logarithm', () => {
    const parts = ['abs', 'arg', 're', 'im', 'log'];
    const plot = plotOf(
      ...hypers,
      `plot ${parts.map((part) => `${part} integrand of h`).join(', ')} over sigma = 0 .. 1 at zeta = 1/8`,
    );
    expect(plot.series.map(({ name }) => name)).toEqual(parts.map((part) => `${part} integrand`));
    const x = 0.5;
    const size = 1 / (2 * Math.cosh(Math.PI * x));
    const phase = (2 * Math.PI * x) / 8;
    const expected = [size, phase, size * Math.cos(phase), size * Math.sin(phase), Math.log(size)];
    expect(parts.map((_, k) => near(plot, x, k).y)).toEqual(expected.map((y) => expect.closeTo(y, 13)));
  });

  test('a function of a parameter', () => {
    const plot = plotOf('plot gamma(x) over x = -2 .. 3');
    expect(near(plot, 2.5).y).toBeCloseTo(0.75 * Math.sqrt(Math.PI), 12);
    // Poles at 0, -1, -2 (DLMF 5.2).
    expect(plot.marks.map(({ kind, x, order }) => [kind, x, order])).toEqual([
      ['pole', -2, 1],
      ['pole', -1, 1],
      ['pole', 0, 1],
    ]);
    expect(plot.series[0]?.y.every((y) => y === null || Number.isFinite(y))).toBe(true);
  });
});

describe('marks and growth', () => {
  test('the vector multiplet vanishes at the wall, to second order', () => {
    const plot = plotOf(...su2, 'plot abs vector of v over sigma = -1 .. 1');
    expect(plot.marks).toEqual([{ kind: 'zero', x: 0, order: 2, series: 0 }]);
    expect(near(plot, 0).y).toBe(0);
  });

  // |4 sinh(2 pi b x) sinh(2 pi x/b)| -> e^{2 pi Q |x|}, Q = b + 1/b.
  test('the curve comes to its asymptote', () => {
    const plot = plotOf(...su2, 'plot log vector of v over sigma = -4 .. 4');
    expect(plot.asymptotes.map(({ name }) => name)).toEqual(['growth of log vector', 'growth of log vector']);
    const [left, right] = plot.asymptotes;
    expect(left?.x[0]).toBe(-4);
    expect(left?.y[0]).toBeCloseTo(2 * Math.PI * 2.05 * 4, 9);
    expect(right?.y.at(-1)).toBeCloseTo(plot.series[0]?.y.at(-1) ?? Number.NaN, 9);
  });

  test('other parts have none', () => {
    expect(plotOf(...su2, 'plot arg q of v over sigma = -4 .. 4').asymptotes).toEqual([]);
  });
});

describe('maps', () => {
  const u2 = ['theory u', '  sphere S3', '  gauge G = U(2)', '  matter G', '  hyper q fund', ''];

  test('rows run along the second range', () => {
    const { series, axes } = plotOf(...u2, 'plot one-loop of u over sigma1 = -1 .. 1, sigma2 = 0 .. 1');
    const [map] = series;
    expect(axes.map(({ name }) => name)).toEqual(['sigma1', 'sigma2']);
    expect([map?.x.length, map?.y.length, map?.z?.length, map?.z?.[0]?.length]).toEqual([101, 101, 101, 101]);
    const [i, j] = [30, 80];
    const [x, y] = [map?.x[i] as number, map?.y[j] as number];
    const expected = (2 * Math.sinh(Math.PI * (x - y))) ** 2 / (4 * Math.cosh(Math.PI * x) * Math.cosh(Math.PI * y));
    expect(map?.z?.[j]?.[i]).toBeCloseTo(expected, 12);
  });

  test.each([
    ['plot one-loop of u, vector of u over sigma1 = 0 .. 1, sigma2 = 0 .. 1', /shows one quantity/],
    ['plot one-loop of u over sigma1 = 0 .. 1, sigma1 = 0 .. 1', /different names|given twice|twice/],
  ])('%s', (request, says) => {
    const text = [...u2, request].join('\n');
    const analysis = analyse(text);
    const said = [
      ...outline(analysis, {}).problems.map(({ message }) => message),
      ...outline(analysis, {}).cards.flatMap((card) => {
        const found = card.kind === 'request' ? findRequest(analysis, card.key) : null;
        return found ? [failureOf(run(analysis, found, SURROUNDINGS))] : [];
      }),
    ];
    expect(said.join('\n')).toMatch(says);
  });
});

describe('what cannot be drawn is said', () => {
  test.each([
    ['plot one-loop of h over sigma = 1 .. x', /has to run from a real number to a larger one|`x`/],
    ['plot one-loop of h over tau = 0 .. 1', /no `tau`/],
    ['plot p of h over sigma = 0 .. 1', /`p` is no quantity of `h`/],
  ])('%s', (request, says) => {
    expect(failureOf(answer(...hypers, request))).toMatch(says);
  });
});

describe('while a slider moves', () => {
  const lets = ['let r = 1/3 in 0 .. 1', 'let s = 2r', ''];
  const lines = ['theory t', '  sphere S3, b = 1+r', '  gauge G = U(1)', '  matter G R', '  chiral q 1 s', ''];
  const text = (r: string) =>
    [lets[0]?.replace('1/3', r), ...lets.slice(1), ...lines, 'plot abs q of t over sigma = -2 .. 2'].join('\n');
  const analysis = analyse(text('1/3'));
  const key = outline(analysis, {}).cards.flatMap((card) => (card.kind === 'request' ? [card.key] : []))[0] as string;

  test('the curve is the one of the text with the value put in', () => {
    const moved = asPlot(plotAt(analysis, key, { r: 0.45 }));
    const typed = analyse(text('0.45'));
    const request = findRequest(
      typed,
      outline(typed, {}).cards.flatMap((c) => (c.kind === 'request' ? [c.key] : []))[0] as string,
    );
    const expected = request ? asPlot(run(typed, request, SURROUNDINGS)) : null;
    expect(moved.series).toEqual(expected?.series);
    const still = asPlot(plotAt(analysis, key, {}));
    expect(still.series).not.toEqual(moved.series);
  });

  test('values in scientific notation, names that are not there, and no number at all', () => {
    const still = asPlot(plotAt(analysis, key, {})).series;
    expect(asPlot(plotAt(analysis, key, { r: 1e-7 })).series).not.toEqual(still);
    expect(asPlot(plotAt(analysis, key, { r: Number.NaN, q: 3 })).series).toEqual(still);
  });

  test('a value that leads nowhere is a failure in words', () => {
    const result = plotAt(analysis, key, { r: -1 });
    expect(result?.kind === 'failure' && result.failure.message).toMatch(/errors/);
  });

  test('nothing for a key that is not there', () => {
    expect(plotAt(analysis, 'plot nothing', {})).toBeNull();
  });

  test('overrides are exact', () => {
    const moved = analyse(text('1/3'), new Map([['r', Form.number(Rational.of(9, 20))]]));
    expect(moved.values.get('s')?.key).toBe('9/10');
  });
});
