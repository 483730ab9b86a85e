import { formDouble } from '../arithmetic/form-double';
import type { Form } from '../exact/form';
import { LineIndex } from '../language/lines';
import { parseNotebook } from '../language/parse';
import type { Block, Diagnostic, Notebook, Parameter, Request, SpectrumBlock, TheoryBlock } from '../language/tree';
import { readSpectrum } from '../spectrum/read';
import type { Spectrum } from '../spectrum/tower';
import type { Sphere } from '../spheres/sphere';
import { spheres } from '../spheres/table';
import { type BuiltTheory, buildTheory } from '../theory/build';
import { problem, unknownNames, valueAt } from '../theory/report';

/** A `let` with its value in closed form; null when it could not be worked out. */
export interface ParameterEntry {
  readonly block: Parameter;
  readonly value: Form | null;
  readonly range: { readonly from: number; readonly to: number } | null;
}

export interface TheoryEntry {
  readonly block: TheoryBlock;
  /** Null when the `sphere` line is missing. */
  readonly sphere: Sphere | null;
  readonly built: BuiltTheory | null;
}

export interface SpectrumEntry {
  readonly block: SpectrumBlock;
  /** Null when anything in the block is in error. */
  readonly spectrum: Spectrum | null;
}

/** A notebook read as far as it goes: everything that requests and the page ask about. */
export interface Analysis {
  readonly text: string;
  readonly notebook: Notebook;
  readonly lines: LineIndex;
  readonly parameters: ReadonlyMap<string, ParameterEntry>;
  /** Closed values of all parameters that have one. */
  readonly values: ReadonlyMap<string, Form>;
  readonly theories: ReadonlyMap<string, TheoryEntry>;
  readonly spectra: ReadonlyMap<string, SpectrumEntry>;
  readonly diagnostics: readonly Diagnostic[];
}

/** Values put in place of those typed, while a slider moves. */
export type Overrides = ReadonlyMap<string, Form>;

/** Reads a notebook. Never throws on what a user typed. */
export function analyse(text: string, overrides: Overrides = new Map()): Analysis {
  const notebook = parseNotebook(text);
  const diagnostics: Diagnostic[] = [...notebook.diagnostics];
  const parameters = readParameters(notebook.blocks, overrides, diagnostics);
  const values = new Map<string, Form>();
  for (const [name, { value }] of parameters) if (value !== null) values.set(name, value);
  const theories = new Map<string, TheoryEntry>();
  const spectra = new Map<string, SpectrumEntry>();
  for (const block of notebook.blocks) {
    if (block.kind === 'spectrum' && !spectra.has(block.name.name)) {
      spectra.set(block.name.name, readSpectrumBlock(block, values, diagnostics));
    }
    if (block.kind !== 'theory' || theories.has(block.name.name)) continue;
    const sphere = block.sphere === null ? null : spheres[block.sphere.sphere.name];
    const read = sphere === null ? null : buildTheory(block, values, sphere);
    // A block that lost a line would be a different theory without it.
    const built = read && !block.sound ? { ...read, theory: null } : read;
    if (built) diagnostics.push(...built.diagnostics);
    theories.set(block.name.name, { block, sphere, built });
  }
  for (const block of notebook.blocks) if (isRequest(block)) checkSubject(block, theories, spectra, diagnostics);
  return { text, notebook, lines: new LineIndex(text), parameters, values, theories, spectra, diagnostics };
}

function readSpectrumBlock(
  block: SpectrumBlock,
  values: ReadonlyMap<string, Form>,
  diagnostics: Diagnostic[],
): SpectrumEntry {
  const read = readSpectrum(block, values);
  diagnostics.push(...read.diagnostics);
  const failed = !block.sound || read.diagnostics.some(({ severity }) => severity === 'error');
  return { block, spectrum: failed ? null : read.spectrum };
}

export function isRequest(block: Block): block is Request {
  return block.kind !== 'prose' && block.kind !== 'let' && block.kind !== 'theory' && block.kind !== 'spectrum';
}

/** Parameters in the order of the text; each may use those above it. */
function readParameters(
  blocks: readonly Block[],
  overrides: Overrides,
  diagnostics: Diagnostic[],
): Map<string, ParameterEntry> {
  const entries = new Map<string, ParameterEntry>();
  for (const block of blocks) {
    if (block.kind !== 'let' || entries.has(block.name.name)) continue;
    const values = new Map(
      [...entries].flatMap(([name, entry]) => (entry.value ? [[name, entry.value] as const] : [])),
    );
    const unknown = unknownNames(block.value, values);
    for (const name of unknown) diagnostics.push(problem('name-unknown', name.span, { name: name.name }));
    const typed = unknown.length > 0 ? null : valueAt(block.value, values, (found) => diagnostics.push(found));
    const value = overrides.get(block.name.name) ?? typed;
    entries.set(block.name.name, { block, value, range: readRange(block, values, diagnostics) });
  }
  return entries;
}

function readRange(
  block: Parameter,
  values: ReadonlyMap<string, Form>,
  diagnostics: Diagnostic[],
): { from: number; to: number } | null {
  if (block.range === null) return null;
  const ends = [block.range.from, block.range.to].map((end) =>
    realNumber(valueAt(end, values, (found) => diagnostics.push(found))),
  );
  const [from, to] = ends as [number | null, number | null];
  if (from === null || to === null || from >= to) {
    const span = { from: block.range.from.span.from, to: block.range.to.span.to };
    diagnostics.push(problem('range', span, { name: block.name.name }));
    return null;
  }
  return { from, to };
}

/** A closed form as a real double; null when it is not real or not finite. */
export function realNumber(form: Form | null): number | null {
  if (form === null) return null;
  const value = formDouble(form, () => null);
  if (value === null || !Number.isFinite(value.re) || Math.abs(value.im) > 1e-12 * (1 + Math.abs(value.re)))
    return null;
  return value.re;
}

/** The theory or spectrum that a request names has to be there. */
function checkSubject(
  request: Request,
  theories: ReadonlyMap<string, TheoryEntry>,
  spectra: ReadonlyMap<string, SpectrumEntry>,
  diagnostics: Diagnostic[],
): void {
  for (const { name, span, kind } of subjects(request)) {
    const known =
      kind === 'spectrum' ? spectra.has(name) : theories.has(name) || (kind === 'either' && spectra.has(name));
    if (known) continue;
    const names = kind === 'spectrum' ? [...spectra.keys()] : [...theories.keys()];
    const list = names.length === 0 ? 'none yet' : names.map((n) => `\`${n}\``).join(', ');
    diagnostics.push(
      problem('subject-unknown', span, { name, kind: kind === 'either' ? 'theory' : kind, known: list }),
    );
  }
}

type Subject = { name: string; span: { from: number; to: number }; kind: 'theory' | 'spectrum' | 'either' };

/** Names of theories and spectra that a request speaks of. */
export function subjects(request: Request): Subject[] {
  switch (request.kind) {
    case 'formula':
      return [{ ...request.subject, kind: 'either' }];
    case 'value':
      return quantitySubjects([request.quantity]);
    case 'plot':
      return quantitySubjects(request.curves.map(({ quantity }) => quantity));
    case 'representation':
      return [];
    case 'integrate':
    case 'extremize':
      return [{ ...request.theory, kind: 'theory' }];
    case 'compare':
      return request.theories.map((theory) => ({ ...theory, kind: 'theory' }));
  }
}

function quantitySubjects(quantities: readonly Extract<Request, { kind: 'value' }>['quantity'][]): Subject[] {
  return quantities.flatMap((quantity): Subject[] => {
    if (quantity.kind === 'theory') return [{ ...quantity.theory, kind: 'theory' }];
    return quantity.kind === 'determinant' ? [{ ...quantity.spectrum, kind: 'spectrum' }] : [];
  });
}
