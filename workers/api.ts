import type { FormulaForm } from '../engine/language/tree';
import { type Analysis, analyse } from '../engine/requests/analysis';
import { Unwanted } from '../engine/requests/answer';
import { type BuiltinBlock, builtinBlocks } from '../engine/requests/builtin-text';
import { type RepresentationChoice, representationChoices } from '../engine/requests/chooser';
import { type LatexOut, latexOut } from '../engine/requests/document';
import { type HoverText, hoverAt } from '../engine/requests/hover';
import { outline } from '../engine/requests/outline';
import { plotAt } from '../engine/requests/plot-at';
import type { FailureResult, Outline, PlotResult, Progress, Result } from '../engine/requests/result';
import { findRequest, run } from '../engine/requests/run';
import { type WeightPage, weightPage } from '../engine/requests/weight-page';

/** Digits of a value that does not say how many it wants. */
const DIGITS = 30;
/** Seconds between two questions whether the work is still wanted; each takes a fraction of a millisecond. */
const ASKED_EVERY = 0.05;

/**
 * What the worker offers. Plain data in, plain data out; nothing here knows that it runs in a worker, so that it can be
 * tried anywhere.
 */
export interface EngineApi {
  outline(text: string, notation: Readonly<Record<string, number>>): Outline;
  /** Null where the text holds no such request, and where the work of `token` is no longer wanted. */
  run(text: string, key: string, token: string, progress: (progress: Progress) => void): Result | null;
  plotFast(text: string, key: string, overrides: Readonly<Record<string, number>>): PlotResult | FailureResult | null;
  document(text: string, name: string, form: FormulaForm, notation: number): LatexOut;
  weightPage(text: string, name: string, latex: string, page: number, notation: number): WeightPage;
  representations(group: string, limit: number): readonly RepresentationChoice[];
  hover(text: string, offset: number): HoverText | null;
  builtins(): readonly BuiltinBlock[];
}

/** An engine that remembers the last text it read. `now` is a clock in seconds; `isWanted` asks about a token of `run`. */
export function createEngineApi(now: () => number, isWanted: (token: string) => boolean): EngineApi {
  let last: Analysis | null = null;
  const read = (text: string): Analysis => {
    if (last?.text !== text) last = analyse(text);
    return last;
  };
  return {
    outline: (text, notation) => outline(read(text), notation),
    run: (text, key, token, progress) => {
      const analysis = read(text);
      const request = findRequest(analysis, key);
      if (request === null) return null;
      let asked = now();
      const report = (step: Progress): boolean => {
        if (now() - asked < ASKED_EVERY) return true;
        asked = now();
        progress(step);
        return isWanted(token);
      };
      try {
        return run(analysis, request, { now, progress: report, digits: DIGITS });
      } catch (error) {
        if (error instanceof Unwanted) return null;
        throw error;
      }
    },
    plotFast: (text, key, overrides) => plotAt(read(text), key, overrides),
    document: (text, name, form, notation) => latexOut(read(text), name, form, notation),
    weightPage: (text, name, latex, page, notation) => weightPage(read(text), name, latex, page, notation),
    representations: representationChoices,
    hover: (text, offset) => hoverAt(read(text), offset),
    builtins: builtinBlocks,
  };
}
