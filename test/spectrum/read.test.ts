// The forms of the notebook's text are our own; what has no determinant is common practice, no source.
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { parseNotebook } from '../../engine/language/parse';
import type { SpectrumBlock } from '../../engine/language/tree';
import { spectrumWording } from '../../engine/language/wording-spectrum';
import { readSpectrum } from '../../engine/spectrum/read';
import { determinant } from '../../engine/spectrum/regularised';

function read(text: string, parameters: ReadonlyMap<string, Form> = new Map()) {
  const { blocks, diagnostics } = parseNotebook(text);
  expect(diagnostics).toEqual([]);
  const block = blocks.find((b): b is SpectrumBlock => b.kind === 'spectrum');
  if (!block) throw new Error('no spectrum');
  return readSpectrum(block, parameters);
}

/** `code: text of the span` of every diagnostic. */
function problems(lines: string, parameters?: ReadonlyMap<string, Form>): string[] {
  const text = `spectrum own\n  ${lines}\n`;
  return read(text, parameters).diagnostics.map(({ code, span }) => `${code}: ${text.slice(span.from, span.to)}`);
}

describe('what is refused, and where', () => {
  test.each([
    ['boson sqrt(n+1) for n >= 0', 'tower-not-polynomial: sqrt(n+1)'],
    ['boson 1/(n+1) for n >= 0', 'tower-not-polynomial: 1/(n+1)'],
    ['boson n + 1', 'tower-without-index: n + 1'],
    ['boson n+1 times sqrt(n) for n >= 0', 'degeneracy-not-polynomial: sqrt(n)'],
    ['boson n+1 times n-3 for n >= 0', 'degeneracy-negative: n-3'],
    ['boson n+1 times 10-n for n >= 0', 'degeneracy-negative: 10-n'],
    ['boson n+1 times i for n >= 0', 'degeneracy-not-real: i'],
    ['boson n*m for n >= 0, m >= 0', 'degeneracy-infinite: n*m'],
    ['boson n+1 times m for n >= 0, m >= 1', 'degeneracy-infinite: n+1'],
    ['boson n^2+m^3+1 for n >= 0, m >= 0', 'tower-several-indices: n^2+m^3+1'],
    ['power(1) m-n+1/3 for n >= 0, m >= 0', 'tower-half-plane: m-n+1/3'],
    ['boson (n+1)^17 for n >= 0', 'tower-degree: (n+1)'],
    ['boson n+1 for n = 5 .. 2', 'tower-range-order: n = 5 .. 2'],
    ['boson n+1 for n = 1 .. 20000', 'tower-range-length: n = 1 .. 20000'],
    ['boson n+m for n >= 0, m = 0 .. n', 'tower-range-bound: m = 0 .. n'],
    [
      'boson n+m+k+l+p for n>=0, m>=0, k>=0, l>=0, p>=0',
      'tower-indices: boson n+m+k+l+p for n>=0, m>=0, k>=0, l>=0, p>=0',
    ],
    ['power(p) n+1 for n >= 0', 'tower-power: power(p) n+1 for n >= 0'],
    ['boson (n+1)(a-a) for n >= 0', 'tower-zero-eigenvalue: (n+1)(a-a)'],
  ])('%s', (line, expected) => {
    expect(problems(line)).toContain(expected);
  });

  test.each([
    ['boson n for n >= 0', 'zero-mode: n'],
    ['fermion -n-1 for n >= 0', 'negative-axis: -n-1'],
    ['boson n-5/2 for n >= 0', 'square-root-sign: own'],
    ['fermion n-5/2 for n >= 0', 'negative-modes: own'],
    ['fermion n+1 times n/3 for n >= 0', 'degeneracy-fraction: n/3'],
  ])('%s is remarked upon', (line, expected) => {
    expect(problems(line)).toContain(expected);
  });

  test('an empty spectrum says so', () => {
    expect(read('spectrum own\n').diagnostics.map(({ code }) => code)).toEqual(['spectrum-empty']);
  });

  test('a zero mode that cancels is none', () => {
    expect(problems('power(1) n for n >= 0\n  power(-1) n for n >= 0')).toEqual([]);
  });

  test('a bad tower does not touch the others', () => {
    const { spectrum } = read('spectrum own\n  boson sqrt(n) for n >= 0\n  fermion n+1 for n >= 0\n');
    expect(spectrum.towers.map(({ kind }) => kind)).toEqual(['fermion']);
  });
});

describe('what is read', () => {
  test('a tower takes the indices it uses, its own range before the common one', () => {
    const { spectrum } = read('spectrum own\n  index n >= 0\n  index k >= 2\n  boson n+1 for n >= 3\n  boson n+k\n');
    expect(spectrum.towers.map(({ ranges }) => ranges.map(({ name, from }) => `${name} ${from.key}`))).toEqual([
      ['n 3'],
      ['n 0', 'k 2'],
    ]);
  });

  test.each([
    ['boson', '-1/2'],
    ['complex boson', '-1'],
    ['fermion', '1'],
    ['real fermion', '1/2'],
    ['power(-2/3)', '-2/3'],
  ])('%s has the exponent %s', (kind, exponent) => {
    expect(read(`spectrum own\n  ${kind} n+1 for n >= 0\n`).spectrum.towers[0]?.exponent.key).toBe(exponent);
  });

  test('parameters stay symbols; their values serve for values and for ranges', () => {
    const parameters = new Map([
      ['a', Form.ratio(3, 10)],
      ['last', Form.number(4)],
    ]);
    const { spectrum, diagnostics } = read('spectrum own\n  power(1) n+a for n = 1 .. last\n', parameters);
    expect(diagnostics).toEqual([]);
    expect(spectrum.towers[0]?.eigenvalue[0]?.form.symbols()).toEqual(['a', 'n']);
    const found = determinant(spectrum, 'factors', new Map(), 15);
    if (found.kind !== 'value') throw new Error(found.remark.code);
    // log(1.3 * 2.3 * 3.3 * 4.3)
    expect(Number(found.log.re) / 2 ** found.log.bits).toBeCloseTo(Math.log(1.3 * 2.3 * 3.3 * 4.3), 13);
  });

  test('an index shadows a parameter of its name', () => {
    const { spectrum } = read('spectrum own\n  power(1) n+1 for n >= 0\n', new Map([['n', Form.number(7)]]));
    const found = determinant(spectrum, 'factors', new Map(), 15);
    expect(found.kind === 'value' && Number(found.log.re) / 2 ** found.log.bits).toBeCloseTo(
      Math.log(2 * Math.PI) / 2,
      13,
    );
  });

  test('half-integer starts count in steps of one', () => {
    const { spectrum } = read('spectrum own\n  power(1) j(j+1)+1/4 times 2j+1 for j >= 1/2\n');
    const { spectrum: moved } = read('spectrum own\n  power(1) (n+1)^2 times 2n+2 for n >= 0\n');
    const [one, other] = [spectrum, moved].map((s) => determinant(s, 'operator', new Map(), 20));
    expect(one?.kind === 'value' && other?.kind === 'value' && one.log.re === other.log.re).toBe(true);
  });
});

describe('values that are refused', () => {
  const { spectrum } = read('spectrum own\n  power(1) n + 1/a for n >= 0\n');
  test.each([
    ['a name without value', new Map<string, Form>(), 'spectrum-names-unset'],
    ['a division by zero', new Map([['a', Form.zero]]), 'spectrum-undefined'],
    ['a zero of the determinant', new Map([['a', Form.number(-1)]]), 'determinant-zero'],
    ['roots too far out', new Map([['a', Form.ratio(-1, 10_000_000)]]), 'determinant-zero'],
  ])('%s', (_what, values, code) => {
    const found = determinant(spectrum, 'factors', values, 20);
    expect(found.kind === 'refusal' && found.remark.code).toBe(code);
  });
  test('too many steps, too many digits', () => {
    const far = determinant(spectrum, 'factors', new Map([['a', Form.ratio(-2, 10_000_001)]]), 20);
    expect(far.kind === 'refusal' && far.remark.code).toBe('spectrum-too-far');
    const long = determinant(spectrum, 'factors', new Map([['a', Form.one]]), 5000);
    expect(long.kind === 'refusal' && long.remark.code).toBe('spectrum-digits');
  });
});

test('every sentence fills in its data', () => {
  const data = new Proxy({}, { get: (_target, key) => `<${String(key)}>` });
  for (const [code, says] of Object.entries(spectrumWording)) {
    const sentence = (says as (d: Readonly<Record<string, string>>) => string)(data);
    expect(sentence, code).toMatch(/^[A-Z].*\.$/s);
    expect(sentence, code).not.toContain('undefined at ');
  }
});
