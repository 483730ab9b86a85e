import fc from 'fast-check';

/**
 * Property tests draw the same cases in every run, so that a failure is a change of the code and not of the dice.
 * FC_SEED=random npm test, or a number in its place, draws others; a failing seed is printed and becomes a named case.
 */
const SEED = 20_261_201;

const asked = process.env.FC_SEED;
if (asked !== 'random') fc.configureGlobal({ seed: asked === undefined ? SEED : Number(asked) });
