import type { Wording } from './wording-syntax';

/** Problems found when a block is given its meaning: theory, parameters, requests. */
export const theoryWording = {
  refused: (d) => `${d.what} ${d.why} ${d.remedy}`,
  'name-unknown': (d) => `\`${d.name}\` has no value. Add \`let ${d.name} = ...\` above, or correct the name.`,
  'value-undefined': (d) =>
    `\`${d.text}\` is undefined at the values of its parameters: it divides by zero. Change one of them.`,
  range: (d) => `The range of \`${d.name}\` has to run from a real number to a larger one.`,
  'sphere-option': (d) => `\`${d.name}\` is no parameter of ${d.sphere}; it takes ${d.allowed}.`,
  'squashing-zero': (d) =>
    `\`${d.name}\` is zero: the squashing has to be a positive number, such as \`${d.name} = 5/4\`.`,
  'squashing-negative': (d) =>
    `\`${d.name} = ${d.value}\` is negative: the squashing has to be a positive number, such as \`${d.name} = 5/4\`.`,
  'squashing-complex': (d) =>
    `\`${d.name} = ${d.value}\` is complex: the squashing has to be a positive number, such as \`${d.name} = 5/4\`.`,
  'squashing-half-plane': (d) =>
    `\`${d.name} = ${d.value}\` does not have a positive real part: the squashing may be complex, such as ` +
    `\`${d.name} = 5/4 + i/3\`, where it has one.`,
  'squashing-extreme': (d) =>
    `\`${d.name} = ${d.value}\` is out of reach: the squashing has to lie between 1/100 and 100.`,
  supersymmetry: (d) => `${d.sphere} takes \`supersymmetry ${d.allowed}\`; \`${d.value}\` is not known here.`,
  'field-unknown': (d) =>
    `The superpotential names \`${d.name}\`, but no multiplet is called so; there are ${d.known}.`,
  'coordinate-taken': (d) =>
    `The coordinates of \`${d.group}\` would be called \`${d.name}\`, a name already in use. Give others with ` +
    `\`${d.role === 'gauge' ? 'coulomb' : 'mass'} NAME\`.`,
  'group-option': (d) =>
    `\`${d.option}\` is no option of a ${d.role} group on ${d.sphere}${d.why ? `: ${d.why}` : ''}. It takes ${d.allowed}.`,
  'fi-not-abelian': (d) =>
    `${d.group} has no U(1) factor, so there is no FI term: it would not be gauge invariant. Leave out \`fi\`, or use U(n).`,
  'theta-not-abelian': (d) =>
    `${d.group} has no U(1) factor, so there is no theta term here. Leave out \`theta\`, or use U(n).`,
  'abelian-level': (d) =>
    `\`abelian\` sets the level of the U(1) part of U(n), n > 1; ${d.group} has no such part. Use \`level\`.`,
  'level-number': (d) => `The level \`${d.text}\` is no exact number. Write an integer or a half such as \`1/2\`.`,
  'group-name': (d) => `No group is called \`${d.name}\`; use a name from a \`gauge\` or \`flavor\` line.`,
  'mixed-sphere': (d) => `There is no mixed level on ${d.sphere}: ${d.why}. Leave the line out.`,
  'mixed-not-abelian': (d) => `\`${d.name}\` is ${d.group}: a mixed level needs two groups with a U(1).`,
  'mixed-same': (d) =>
    `A mixed level joins two different groups; for one alone write \`level\` on the line of \`${d.name}\`.`,
  'column-unknown': (d) => `The column \`${d.name}\` is no group of this theory; columns are ${d.known}.`,
  'multiplet-kind': (d) =>
    `\`${d.kind}\` does not exist on ${d.sphere}${d.why ? `: ${d.why}` : ''}; there are ${d.allowed}.`,
  'r-charge': (d) =>
    `The R-charge \`${d.text}\` cannot be read. Write an exact number or an expression such as \`1-r\`, without blanks.`,
  'r-charge-name': (d) =>
    `The R-charge \`${d.text}\` uses \`${d.name}\`, which has no value. Add \`let ${d.name} = 1/2\` above.`,
  'r-charge-fixed': (d) =>
    `The R-charge \`${d.text}\` is not possible here: this multiplet has R = ${d.value}. Leave it at that.`,
  'half-hyper': (d) =>
    `A half-hyper needs a pseudoreal representation; the weights of \`${d.name}\` do not come in pairs. Write \`hyper\`.`,
  'subject-unknown': (d) => `There is no ${d.kind} called \`${d.name}\`; there is ${d.known}.`,
} satisfies Record<string, Wording>;
