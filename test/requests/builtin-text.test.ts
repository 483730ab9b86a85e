import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { analyse } from '../../engine/requests/analysis';
import { builtinBlocks } from '../../engine/requests/builtin-text';
import { report } from '../../engine/requests/report';

const surroundings = { now: () => 0, progress: () => true, digits: 20 };

describe('spectra of fields as text', () => {
  test.each(builtinBlocks().map(({ label, text }) => [label, text] as const))(
    '%s reads without errors',
    (_label, text) => {
      const { spectra, diagnostics } = analyse(text);
      expect(diagnostics.filter(({ severity }) => severity === 'error')).toEqual([]);
      expect([...spectra.values()].every(({ spectrum }) => spectrum !== null)).toBe(true);
    },
  );

  // Klebanov, Pufu, Safdi 2011, arXiv:1105.4598: F of a conformal scalar on S^3 is (2 log 2 - 3 zeta(3)/pi^2)/16, of a
  // Dirac spinor (2 log 2 + 3 zeta(3)/pi^2)/8; digits by mpmath 1.2.1.
  test.each([
    ['scalar on S^3, conformal', 'scalar3', '-0.063807054776198210'],
    ['spinor on S^3', 'spinor3', '-0.218959480727576233'],
  ])('free energy of a %s', (label, name, minusF) => {
    const text = builtinBlocks().find((block) => block.label === label)?.text ?? '';
    const { output } = report(analyse(`${text}\nvalue log determinant of ${name}, 20 digits\n`), surroundings);
    const [answer] = output.results as [{ value: { re: string } }];
    expect(answer.value.re.slice(0, 17)).toBe(minusF.slice(0, 17));
  });

  test('a coupling stays a parameter', () => {
    const { text } = builtinBlocks().find(({ label }) => label === 'scalar on S^4, any coupling') ?? { text: '' };
    expect(analyse(text).values.get('xi')?.equals(Form.one)).toBe(true);
  });
});
