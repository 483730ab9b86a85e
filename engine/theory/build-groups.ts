import { Form } from '../exact/form';
import type { Expression, GroupLine, GroupOption, MixedLine } from '../language/tree';
import { type Group, parseGroup } from '../lie/group';
import { problem, type Report, refused, unknownNames, valueAt } from './report';
import type { SphereRules } from './rules';
import type { MixedLevel, TheoryGroup } from './theory';

/** Reads the group lines; a line that cannot be read is left out and reported. */
export function buildGroups(
  lines: readonly GroupLine[],
  parameters: ReadonlyMap<string, Form>,
  rules: SphereRules,
  report: Report,
): { groups: TheoryGroup[]; backgrounds: string[]; couplings: string[] } {
  const groups: TheoryGroup[] = [];
  const backgrounds = new Set<string>();
  const couplings = new Set<string>();
  const taken = new Set<string>();
  const count = { gauge: 0, flavor: 0 };
  for (const line of lines) {
    const read = parseGroup(line.group.text);
    const place = count[line.role]++;
    if (read.kind === 'refusal') {
      report(refused(read, line.group.span));
      continue;
    }
    const { group } = read;
    const values = readOptions(line, group, parameters, rules, { backgrounds, couplings }, report);
    const stem = values.symbol ?? (line.role === 'gauge' ? 'sigma' : 'm') + "'".repeat(place);
    const coordinates = coordinateNames(stem, group);
    const dependent = dependentForms(group, coordinates);
    // A parameter may give a mass its value, but no coordinate that is integrated over or follows from others.
    const clash = coordinates.find(
      (name) => taken.has(name) || (parameters.has(name) && (line.role === 'gauge' || dependent.has(name))),
    );
    if (clash !== undefined) {
      report(problem('coordinate-taken', line.span, { name: clash, group: line.name.name, role: line.role }));
      continue;
    }
    for (const name of coordinates) taken.add(name);
    groups.push({
      role: line.role,
      name: line.name.name,
      group,
      coordinates,
      fluxes: coordinateNames(`flux${"'".repeat(place)}`, group),
      dependent,
      level: values.level ?? null,
      abelianLevel: values.abelian ?? null,
      fi: values.fi ?? null,
      theta: values.theta ?? null,
      coupling: values.coupling ?? null,
      span: line.span,
    });
  }
  const free = (names: ReadonlySet<string>): string[] =>
    [...names].filter((name) => !taken.has(name) && !parameters.has(name));
  return { groups, backgrounds: free(backgrounds), couplings: free(couplings) };
}

/** Names that options bring and no `let` gives a value. */
interface FreeNames {
  readonly backgrounds: Set<string>;
  readonly couplings: Set<string>;
}

interface OptionValues {
  symbol?: string;
  level?: Form;
  abelian?: Form;
  fi?: Form;
  theta?: Form;
  coupling?: Form;
}

function readOptions(
  line: GroupLine,
  group: Group,
  parameters: ReadonlyMap<string, Form>,
  rules: SphereRules,
  names: FreeNames,
  report: Report,
): OptionValues {
  const values: OptionValues = {};
  for (const option of line.options) {
    if (!rules.options[line.role].includes(option.kind)) {
      report(problem('group-option', option.span, optionData(option.kind, line, rules)));
      continue;
    }
    if ('symbol' in option) {
      values.symbol = option.symbol.name;
      continue;
    }
    const reason = unfitting(option.kind, group);
    if (reason !== null) {
      report(problem(reason, option.span, { group: group.name }));
      continue;
    }
    const value = readValue(option.kind, option.value, parameters, names, report);
    if (value !== null) values[option.kind] = value;
  }
  if (values.abelian !== undefined && values.level === undefined) values.level = Form.zero;
  return values;
}

function optionData(kind: GroupOption['kind'], line: GroupLine, rules: SphereRules): Record<string, string> {
  const allowed = rules.options[line.role].map((word) => `\`${word}\``).join(', ');
  return { option: kind, sphere: rules.name, role: line.role, allowed, why: rules.refusals[kind] ?? '' };
}

/** FI and theta terms need a U(1) in the centre; a level of its own for the U(1) part needs U(n) with n > 1. */
function unfitting(kind: GroupOption['kind'], group: Group): string | null {
  if ((kind === 'fi' || kind === 'theta') && group.abelianRank === 0) return `${kind}-not-abelian`;
  if (kind === 'abelian' && (group.abelianRank === 0 || group.isAbelian)) return 'abelian-level';
  return null;
}

/** Levels are exact numbers; FI, theta and coupling may bring names of their own. */
function readValue(
  kind: 'level' | 'abelian' | 'fi' | 'theta' | 'coupling',
  expression: Expression,
  parameters: ReadonlyMap<string, Form>,
  names: FreeNames,
  report: Report,
): Form | null {
  const unknown = unknownNames(expression, parameters);
  if (kind !== 'level' && kind !== 'abelian') {
    for (const { name } of unknown) (kind === 'coupling' ? names.couplings : names.backgrounds).add(name);
    return expression.form;
  }
  const value = valueAt(expression, parameters, report);
  if (value === null) return null;
  if (unknown.length > 0 || value.toRational() === null) {
    report(problem('level-number', expression.span, { text: expression.text }));
    return null;
  }
  return expression.form;
}

/** `sigma` alone at rank 1, `sigma1, sigma2, ...` else; dependent coordinates carry numbers too. */
function coordinateNames(stem: string, group: Group): string[] {
  if (group.coordinateCount === 1) return [stem];
  return Array.from({ length: group.coordinateCount }, (_, k) => `${stem}${k + 1}`);
}

function dependentForms(group: Group, coordinates: readonly string[]): ReadonlyMap<string, Form> {
  return new Map(
    group.dependent.map(({ coordinate, terms }) => [
      coordinates[coordinate] as string,
      Form.sum(terms.map((t) => Form.symbol(coordinates[t.coordinate] as string).scale(t.coefficient))),
    ]),
  );
}

/** `mixed G H = k` between two abelian factors. */
export function buildMixed(
  lines: readonly MixedLine[],
  groups: readonly TheoryGroup[],
  parameters: ReadonlyMap<string, Form>,
  rules: SphereRules,
  report: Report,
): MixedLevel[] {
  const why = rules.refusals.mixed;
  if (why !== undefined) {
    for (const { span } of lines) report(problem('mixed-sphere', span, { sphere: rules.name, why }));
    return [];
  }
  return lines.flatMap((line) => {
    const places = line.groups.map((name) => groups.findIndex((group) => group.name === name.name));
    for (const [k, place] of places.entries()) {
      const name = line.groups[k] as { name: string; span: { from: number; to: number } };
      if (place < 0) report(problem('group-name', name.span, { name: name.name }));
      else if ((groups[place] as TheoryGroup).group.abelianRank === 0) {
        report(
          problem('mixed-not-abelian', name.span, {
            name: name.name,
            group: (groups[place] as TheoryGroup).group.name,
          }),
        );
      }
    }
    const unknown = unknownNames(line.level, parameters);
    const value = valueAt(line.level, parameters, report)?.toRational() ?? null;
    if (unknown.length > 0 || value === null)
      report(problem('level-number', line.level.span, { text: line.level.text }));
    const [i, j] = places as [number, number];
    if (i < 0 || j < 0 || value === null) return [];
    if (i === j) {
      report(problem('mixed-same', line.span, { name: line.groups[0].name }));
      return [];
    }
    return [{ groups: [i, j] as const, level: line.level.form, span: line.span }];
  });
}
