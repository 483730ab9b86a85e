import { type Group, parseGroup } from '../../engine/lie/group';
import { parseRepresentation, type Representation } from '../../engine/lie/representation';
import { type SimpleType, typeName } from '../../engine/lie/simple-type';

/** The group of a name that must be known. */
export function groupNamed(name: string): Group {
  const result = parseGroup(name);
  if (result.kind !== 'group') throw new Error(`${name}: ${result.what}`);
  return result.group;
}

/** A representation that must be known. */
export function representationNamed(group: string, text: string): Representation {
  const result = parseRepresentation(groupNamed(group), text);
  if (result.kind !== 'representation') throw new Error(`${group} ${text}: ${result.what} ${result.why}`);
  return result.representation;
}

/** Name of the simply connected group of a simple type. */
export function simplyConnected(type: SimpleType): string {
  const { series, rank } = type;
  switch (series) {
    case 'A':
      return `SU(${rank + 1})`;
    case 'B':
      return `Spin(${2 * rank + 1})`;
    case 'C':
      return `USp(${2 * rank})`;
    case 'D':
      return `Spin(${2 * rank})`;
    default:
      return typeName(type);
  }
}
