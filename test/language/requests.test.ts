// The forms are those of the notebook's text (our own).
import { describe, expect, test } from 'vitest';
import type { Request } from '../../engine/language/tree';
import { SPECIAL_FUNCTIONS } from '../../engine/language/words';
import { onlyBlock, outline } from './reading';

describe('parameters', () => {
  test('have a value, and may have a range', () => {
    expect(outline(onlyBlock('let', 'let r = 1/3'))).toEqual({ kind: 'let', name: 'r', value: '1/3', range: null });
    expect(outline(onlyBlock('let', 'let μ = 0.2 in -2 .. 2 % a slider'))).toEqual({
      kind: 'let',
      name: 'mu',
      value: '0.2',
      range: { from: '-2', to: '2' },
    });
    expect(outline(onlyBlock('let', 'let m = 0 in 0..1.5').range)).toEqual({ from: '0', to: '1.5' });
  });
});

const one = (kind: 'theory', what: string, theory: string, log = false) => ({ kind, log, what, theory });

describe('requests', () => {
  const cases: Record<string, [Request['kind'], object]> = {
    'formula electric': ['formula', { subject: 'electric', form: null }],
    'formula electric as modes': ['formula', { subject: 'electric', form: 'modes' }],
    'formula electric as unpaired': ['formula', { subject: 'electric', form: 'unpaired' }],
    'formula electric as functions': ['formula', { subject: 'electric', form: 'functions' }],
    'formula electric as elementary': ['formula', { subject: 'electric', form: 'elementary' }],
    'value one-loop of electric at sigma1 = 0.3, sigma2 = -1, 40 digits': [
      'value',
      {
        quantity: one('theory', 'one-loop', 'electric'),
        at: [
          { name: 'sigma1', value: '0.3' },
          { name: 'sigma2', value: '-1' },
        ],
        digits: { value: 40 },
      },
    ],
    'value log one-loop of A, 12 digits at x = 1/2 + i': [
      'value',
      { quantity: one('theory', 'one-loop', 'A', true), at: [{ name: 'x', value: '1/2 + i' }], digits: { value: 12 } },
    ],
    'value instanton(1, 0) of A at m = 2': [
      'value',
      {
        quantity: { ...one('theory', 'instanton', 'A'), orders: [1, 0] },
        at: [{ name: 'm', value: '2' }],
        digits: null,
      },
    ],
    "value q' of A": ['value', { quantity: one('theory', "q'", 'A'), at: [], digits: null }],
    'value log determinant of dirac by operator, 40 digits': [
      'value',
      {
        quantity: { kind: 'determinant', log: true, spectrum: 'dirac', prescription: 'operator' },
        at: [],
        digits: { value: 40 },
      },
    ],
    'value determinant of dirac by factors at a = 1': [
      'value',
      {
        quantity: { kind: 'determinant', log: false, spectrum: 'dirac', prescription: 'factors' },
        at: [{ name: 'a', value: '1' }],
        digits: null,
      },
    ],
    'value doublesine(0.3 + 0.2i, 5/4), 50 digits': [
      'value',
      {
        quantity: { kind: 'function', log: false, function: 'doublesine', arguments: ['0.3 + 0.2i', '5/4'] },
        at: [],
        digits: { value: 50 },
      },
    ],
    'plot one-loop of electric over sigma1 = -3 .. 3 at sigma2 = 0.4': [
      'plot',
      {
        curves: [{ part: null, quantity: one('theory', 'one-loop', 'electric') }],
        over: [{ name: 'sigma1', from: '-3', to: '3' }],
        at: [{ name: 'sigma2', value: '0.4' }],
      },
    ],
    'plot abs integrand of electric over sigma1 = -3 .. 3, sigma2 = -3 .. 3': [
      'plot',
      {
        curves: [{ part: 'abs', quantity: one('theory', 'integrand', 'electric') }],
        over: [
          { name: 'sigma1', from: '-3', to: '3' },
          { name: 'sigma2', from: '-3', to: '3' },
        ],
        at: [],
      },
    ],
    'plot abs vector of A, log classical of A, im log one-loop of B, abs of A at y = 1 over x = 0 .. 1': [
      'plot',
      {
        curves: [
          { part: 'abs', quantity: one('theory', 'vector', 'A') },
          { part: 'log', quantity: one('theory', 'classical', 'A') },
          { part: 'im', quantity: one('theory', 'one-loop', 'B', true) },
          { part: null, quantity: one('theory', 'abs', 'A') },
        ],
        over: [{ name: 'x', from: '0', to: '1' }],
        at: [{ name: 'y', value: '1' }],
      },
    ],
    'representation SU(3): fund x sym2': ['representation', { group: 'SU(3)', representation: 'fund x sym2' }],
    'representation E6: [1,0,0,0,0,0] + 27*  % sum': [
      'representation',
      { group: 'E6', representation: '[1,0,0,0,0,0] + 27*' },
    ],
    'representation SU(4): sym^3(fund) x alt^2(adj)': [
      'representation',
      { group: 'SU(4)', representation: 'sym^3(fund) x alt^2(adj)' },
    ],
    'integrate electric, 12 digits': ['integrate', { theory: 'electric', at: [], digits: { value: 12 } }],
    'integrate electric at m = 1/2': [
      'integrate',
      { theory: 'electric', at: [{ name: 'm', value: '1/2' }], digits: null },
    ],
    'extremize electric over r': ['extremize', { theory: 'electric', over: ['r'], at: [], digits: null }],
    'extremize A over r, s at m = 0, 20 digits': [
      'extremize',
      { theory: 'A', over: ['r', 's'], at: [{ name: 'm', value: '0' }], digits: { value: 20 } },
    ],
    'compare electric with magnetic over zeta = 0 .. 1': [
      'compare',
      { theories: ['electric', 'magnetic'], over: [{ name: 'zeta', from: '0', to: '1' }], at: [], digits: null },
    ],
    'compare A with B at ζ = 1, 30 digits': [
      'compare',
      { theories: ['A', 'B'], over: [], at: [{ name: 'zeta', value: '1' }], digits: { value: 30 } },
    ],
  };
  test.each(Object.entries(cases))('%s', (text, [kind, expected]) => {
    expect(outline(onlyBlock(kind, text))).toEqual({ kind, ...expected });
  });
});

describe('special functions', () => {
  test.each(Object.entries(SPECIAL_FUNCTIONS))('%s as the list of words writes it', (name, { signature }) => {
    const { quantity } = onlyBlock('value', `value log ${signature}`);
    expect(quantity).toMatchObject({ kind: 'function', log: true, function: { name } });
  });

  test('barnesgamma takes as many periods as are given', () => {
    const { quantity } = onlyBlock('value', 'value barnesgamma(1/2; 1, b, 1/b, 2)');
    expect(quantity.kind === 'function' && quantity.arguments.map(({ text }) => text)).toEqual([
      ...['1/2', '1', 'b', '1/b', '2'],
    ]);
  });

  test('can be plotted', () => {
    const { curves } = onlyBlock('plot', 'plot re gamma(1/2 + i*t), im gamma(1/2 + i*t) over t = 0 .. 3');
    expect(curves.map(({ part, quantity }) => [part, quantity.kind])).toEqual([
      ['re', 'function'],
      ['im', 'function'],
    ]);
  });
});
