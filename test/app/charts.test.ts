// Drawing: rules of our own, held against plain arithmetic. Relative luminance is that of WCAG 2.2, section 'relative luminance'.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { rampColour } from '../../app/charts/colour-ramp';
import { curvePath, linearScale } from '../../app/charts/curve-path';
import { verticalDomain } from '../../app/charts/domain';
import { csvOf } from '../../app/charts/export';
import { lineStyle } from '../../app/charts/line-styles';
import { mapScale } from '../../app/charts/map-scale';
import { sliderStep, sliderText } from '../../app/charts/slider-step';
import { symbolText } from '../../app/charts/symbol-text';
import { axisPower, niceTicks, readoutText, tickText } from '../../app/charts/ticks';
import type { PlotResult } from '../../engine/requests/result';

function plot(y: readonly (number | null)[], more: Partial<PlotResult> = {}): PlotResult {
  return {
    kind: 'plot',
    line: 1,
    request: '',
    of: '',
    seconds: 0,
    notes: [],
    axes: [{ name: 'sigma1', latex: '', from: 0, to: y.length - 1 }],
    series: [{ name: 'f', x: y.map((_, at) => at), y }],
    marks: [],
    asymptotes: [],
    ...more,
  };
}

describe('ticks', () => {
  test('lie inside the range, at even steps of 1, 2 or 5', () => {
    const range = fc.record({
      from: fc.double({ min: -1e6, max: 1e6, noNaN: true }),
      size: fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
    });
    fc.assert(
      fc.property(range, ({ from, size }) => {
        const to = from + size;
        const { ticks, step } = niceTicks(from, to, 6);
        expect(['1', '2', '5']).toContain(step.toExponential(0).charAt(0));
        expect(ticks.length).toBeGreaterThanOrEqual(2);
        expect(ticks.length).toBeLessThanOrEqual(8);
        for (const tick of ticks) expect(tick).toBeGreaterThanOrEqual(from - step * 1e-6);
        for (const tick of ticks) expect(tick).toBeLessThanOrEqual(to + step * 1e-6);
      }),
    );
  });

  test('are written with the decimals of their step', () => {
    expect([0.1, -0.30000000000000004, 0].map((tick) => tickText(tick, 0.1))).toEqual(['0.1', '−0.3', '0.0']);
    expect(tickText(-0.0001, 0.5)).toBe('0.0');
    expect(axisPower(0, 4e-8)).toBe(-8);
    expect(axisPower(-3, 3)).toBe(0);
    expect([1.5e-9, -2, 0, null, 123456.78].map(readoutText)).toEqual(['1.5·10⁻⁹', '−2', '0', 'not finite', '123457']);
  });
});

test('a slider writes numbers no longer than its steps', () => {
  expect(sliderStep({ from: -2, to: 2 })).toBeCloseTo(0.02, 12);
  expect(sliderText(0.30000000000000004, { from: -2, to: 2 })).toBe('0.3');
  expect(sliderText(-0.0001, { from: -2, to: 2 })).toBe('0');
  expect(sliderText(1500, { from: 0, to: 4000 })).toBe('1500');
  expect(sliderStep({ from: 1, to: 1 })).toBe(1);
});

describe('a curve', () => {
  const same = (value: number) => value;

  test('breaks where it is not finite and across a pole, and nowhere else', () => {
    const series = { name: 'f', x: [0, 1, 2, 3, 4], y: [1, 2, null, 4, 5] };
    const breaks = (path: string) => path.match(/M/g)?.length;
    expect(curvePath(series, [], same, same)).toBe('M0.0 1.0L1.0 2.0M3.0 4.0L4.0 5.0');
    expect(breaks(curvePath(series, [{ kind: 'pole', x: 0.5, order: 1, series: 0 }], same, same))).toBe(3);
    expect(breaks(curvePath(series, [{ kind: 'pole', x: 2.5, order: 1, series: 0 }], same, same))).toBe(2);
  });

  test('is shown whole, from the axis where it is near it, and cut only at a pole', () => {
    expect(verticalDomain(plot([0.1, 2, 4]))).toMatchObject({ from: 0 });
    const { from, to } = verticalDomain(plot([-1, 2, 4]));
    expect(from).toBeLessThan(-1);
    expect(to).toBeGreaterThan(4);
    const steep = [...Array.from({ length: 98 }, (_, at) => at % 7), 1e9, -1e9];
    expect(verticalDomain(plot(steep)).to).toBeGreaterThan(1e9);
    const pole = { kind: 'pole', x: 98.5, order: 1, series: 0 } as const;
    expect(verticalDomain(plot(steep, { marks: [pole] })).to).toBeLessThan(10);
    expect(verticalDomain(plot([null, null]))).toEqual({ from: 0, to: 1 });
    expect(verticalDomain(plot([3, 3])).to).toBeGreaterThan(3);
  });

  test('is told from every other by colour and dash together', () => {
    const styles = Array.from({ length: 30 }, (_, at) => JSON.stringify(lineStyle(at)));
    expect(new Set(styles).size).toBe(30);
  });

  test('meets its scale at both ends', () => {
    const scale = linearScale(-2, 2, 10, 110);
    expect([scale(-2), scale(0), scale(2)]).toEqual([10, 60, 110]);
  });
});

describe('a map', () => {
  test('is logarithmic only for positive values of many sizes', () => {
    expect(
      mapScale([
        [1, 2],
        [3, null],
      ]).kind,
    ).toBe('linear');
    expect(mapScale([[-1, 1e9]]).kind).toBe('linear');
    const wide = mapScale([
      [1e-6, 1],
      [0, null],
    ]);
    expect(wide.kind).toBe('logarithmic');
    expect(wide.part(0)).toBe(0);
    expect(wide.part(1e-3)).toBeCloseTo(0.5, 12);
    expect(wide.valueAt(0.5)).toBeCloseTo(1e-3, 12);
    expect(mapScale([[null]]).part(1)).toBe(1);
  });

  test('grows evenly brighter along its ramp', () => {
    const linear = (value: number) => (value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4);
    const lightness = Array.from({ length: 41 }, (_, at) => {
      const [red, green, blue] = rampColour(at / 40);
      const luminance = 0.2126 * linear(red / 255) + 0.7152 * linear(green / 255) + 0.0722 * linear(blue / 255);
      return Math.cbrt(luminance);
    });
    const steps = lightness.slice(1).map((value, at) => value - (lightness[at] ?? 0));
    expect(Math.min(...steps)).toBeGreaterThan(0);
    expect(Math.max(...steps) / Math.min(...steps)).toBeLessThan(2.5);
  });
});

test('the file of values has every point, and is read back as it was', () => {
  expect(csvOf(plot([1.5, null]))).toBe('sigma1,f\n0,1.5\n1,\n');
  const map = plot([0, 1], {
    axes: [
      { name: 'x', latex: '', from: 0, to: 1 },
      { name: 'y', latex: '', from: 0, to: 1 },
    ],
    series: [
      {
        name: 'a, "b"',
        x: [0, 1],
        y: [5, 6],
        z: [
          [1, 2],
          [3, null],
        ],
      },
    ],
  });
  expect(csvOf(map)).toBe('x,y,"a, ""b"""\n0,5,1\n1,5,2\n0,6,3\n1,6,\n');
});

test('names are written as they are typeset', () => {
  expect(['sigma1', 'mu', 'x12', "sigma'", 'beacon'].map(symbolText)).toEqual(['σ₁', 'μ', 'x₁₂', 'σ′', 'beacon']);
});
