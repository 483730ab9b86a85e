import type { Wording } from './wording-syntax';

/** Problems of a spectrum, and what is to be known of its determinant. */
export const spectrumWording = {
  'spectrum-empty': () =>
    'This spectrum has no tower. Add one, such as `fermion n + 3/2 times 2(n+1)(n+2) for n >= 0`.',
  'tower-not-polynomial': (d) =>
    `The eigenvalue is no polynomial in \`${d.index}\`. Use the square of the operator, or another power, with ` +
    '`power(1/2)` in front.',
  'tower-without-index': () =>
    'The eigenvalue depends on no index with a range. Add `index n >= 0` above, or `for n >= 0` at the end of the line.',
  'tower-zero-eigenvalue': () => 'A factor of the eigenvalue is identically zero. Leave it out.',
  'tower-degree': (d) =>
    `The eigenvalue has degree ${d.degree}; the limit is ${d.limit}. Split the tower, or use a root of the operator.`,
  'tower-indices': (d) => `The tower has ${d.count} endless indices; the limit is ${d.limit}.`,
  'tower-several-indices': (d) =>
    `The eigenvalue is no product of linear forms in \`${d.index}\`: such a zeta function is not computed here. ` +
    'Sum over one index first, and give its number of values as the degeneracy.',
  'tower-half-plane': (d) =>
    `The periods ${d.periods} lie in no open half plane: infinitely many eigenvalues crowd together, and there is no ` +
    'zeta function. Give all of them a positive component in one direction.',
  'tower-range-bound': (d) =>
    `The end \`${d.bound}\` of the range of \`${d.index}\` is no definite number of steps away. Write a number, and the ` +
    'number of values of a dependent index as the degeneracy.',
  'tower-range-order': (d) => `The range of \`${d.index}\` ends at ${d.to}, before it starts at ${d.from}.`,
  'tower-range-length': (d) => `The finite ranges hold more than ${d.limit} modes, the limit. Shorten them.`,
  'tower-power': (d) => `The power \`${d.exponent}\` has no rational value. Write a number such as \`power(-1/2)\`.`,
  'degeneracy-not-polynomial': () =>
    'The degeneracy is no polynomial in the index. Write one, such as `times (n+1)^2`, or a number.',
  'degeneracy-degree': (d) => `The degeneracy has degree ${d.degree}; the limit is ${d.limit}.`,
  'degeneracy-infinite': (d) =>
    `The eigenvalue does not depend on \`${d.index}\`, which has no end: every eigenvalue is infinitely degenerate. ` +
    'Give the index a last value, or leave it out.',
  'degeneracy-negative': (d) =>
    `The degeneracy is negative (${d.value} at step ${d.step} of the range). Start later, or move the sign into the ` +
    'power, as in `power(-1)`.',
  'degeneracy-not-real': () => 'The degeneracy is not real. Write a number of modes.',
  'degeneracy-fraction': () =>
    'The degeneracy is not a whole number everywhere: the determinant is then many-valued, and its logarithm is meant.',
  'operator-periods': () =>
    'The factors of the eigenvalue have different periods: as one operator they have no zeta function that is computed ' +
    'here. Ask for the determinant `by factors`.',
  'zero-mode': (d) =>
    `An eigenvalue is zero, with net power ${d.order}: the determinant is ${d.determinant}. Start the range after it to ` +
    'leave the zero mode out.',
  'determinant-zero': (d) =>
    `The determinant is 0, of order ${d.order}: an eigenvalue vanishes. Start the range after it to leave it out.`,
  'determinant-infinite': (d) =>
    `The determinant is infinite, a pole of order ${d.order}: an eigenvalue below the fraction vanishes. Start the range ` +
    'after it to leave it out.',
  'near-zero-mode': () => 'An eigenvalue is very close to zero; the value is that of a point next to a zero or a pole.',
  'negative-modes': (d) => `Negative eigenvalues occur with net power ${d.multiplicity}: they fix the sign.`,
  'negative-axis': (d) =>
    'Infinitely many eigenvalues are negative. The logarithm of -1 is taken as i pi, so that the determinant holds the ' +
    `phase (-1)^(${d.exponent}); the modulus does not depend on that.`,
  'square-root-sign': (d) =>
    `Negative eigenvalues occur with net power ${d.multiplicity}, so the sign of a square root is open: only the modulus ` +
    'is given.',
  'mixed-order': () =>
    'The towers have different orders: zeta(0) of each is that of its own polynomial, and a scale stands for each linear ' +
    'factor.',
  'scale-dependent': (d) =>
    `The determinant depends on the unit of the eigenvalues: multiplying every linear factor by c adds (${d.scale}) log c.`,
  'spectrum-names-unset': (d) => `No value for ${d.names}. Set with \`at\`, or add \`let\`.`,
  'spectrum-undefined': () =>
    'At these values the spectrum is undefined: an expression divides by zero, or zeros meet poles. Change a value a little.',
  'spectrum-too-far': () =>
    'Too many eigenvalues would have to be taken one by one: the roots lie too far out for these digits. Ask for fewer ' +
    'digits, or for smaller parameters.',
  'spectrum-too-large': () =>
    'The exact expressions grow beyond all bounds. Give numbers to some parameters, or lower the degrees.',
  'spectrum-digits': (d) => `Between 1 and ${d.limit} digits can be had.`,
  'closed-zero-mode': () => 'An eigenvalue vanishes, so the determinant is 0 or infinite and has no closed form.',
  'closed-unknown': () => 'No closed form is known here: some eigenvalue has a long finite range.',
  'closed-unconfirmed': () =>
    'A closed form was found, but it did not agree with the values of the product, or there was no point to compare at; it is ' +
    'not shown.',
} satisfies Record<string, Wording>;
