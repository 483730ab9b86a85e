import type { Form } from '../../engine/exact/form';
import { parseNotebook } from '../../engine/language/parse';
import { printer } from '../../engine/latex/product';
import { s3 } from '../../engine/spheres/s3';
import { buildTheory } from '../../engine/theory/build';
import type { Condition } from '../../engine/theory/checks/condition';
import type { SphereRules } from '../../engine/theory/rules';
import type { Theory } from '../../engine/theory/theory';

/**
 * The theory of a notebook with one: `lines` are those under its name. Names given in `parameters` are exact
 * expressions. Throws when anything in it is in error.
 */
export function theoryOf(
  lines: readonly string[],
  parameters: Readonly<Record<string, string>> = {},
  rules: SphereRules = s3,
): Theory {
  const lets = Object.entries(parameters).map(([name, value]) => `let ${name} = ${value}`);
  const sphere = lines.some((line) => line.startsWith('sphere')) ? [] : [`sphere ${rules.name}`];
  const text = [...lets, 'theory test', ...[...sphere, ...lines].map((line) => `  ${line}`), ''].join('\n');
  const { blocks, diagnostics } = parseNotebook(text);
  const values = new Map<string, Form>();
  for (const block of blocks) {
    if (block.kind === 'let') {
      values.set(
        block.name.name,
        block.value.form.substitute((name) => values.get(name) ?? null),
      );
    }
    if (block.kind !== 'theory') continue;
    const built = buildTheory(block, values, rules);
    const problems = [...diagnostics, ...built.diagnostics].filter(({ severity }) => severity === 'error');
    if (built.theory && problems.length === 0) return built.theory;
    throw new Error(`${text}\n${JSON.stringify(problems)}`);
  }
  throw new Error(`${text}\n${JSON.stringify(diagnostics)}`);
}

/** What one condition says: `verdict: sentence`, one line a finding. */
export function says(condition: Condition, theory: Theory): string[] {
  return condition.examine(theory, printer).map((finding) => `${finding.verdict}: ${finding.says}`);
}

/** The worst verdict of a condition, null where it does not apply. */
export function verdict(condition: Condition, theory: Theory): 'holds' | 'fails' | 'unknown' | null {
  const verdicts = condition.examine(theory, printer).map((finding) => finding.verdict);
  return verdicts.includes('fails') ? 'fails' : verdicts.includes('unknown') ? 'unknown' : (verdicts[0] ?? null);
}
