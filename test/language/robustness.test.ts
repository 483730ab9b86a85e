// Laws of the parser, on generated notebooks; there is no outside source.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { spellName } from '../../engine/language/names';
import { parseNotebook } from '../../engine/language/parse';
import type { Block, Notebook } from '../../engine/language/tree';
import { say } from '../../engine/language/wording';
import { type Facts, junk, notebookText } from './arbitraries';
import { outline } from './reading';

function ofKind<K extends Block['kind']>(notebook: Notebook, kind: K): Extract<Block, { kind: K }>[] {
  return notebook.blocks.filter((block): block is Extract<Block, { kind: K }> => block.kind === kind);
}

/** What the tree says, in the shape of the facts the text was made from. */
function factsIn(notebook: Notebook): Facts {
  return {
    parameters: ofKind(notebook, 'let').map(({ name, value }) => ({
      name: name.name,
      value: value.form.toRational()?.toNumber() ?? Number.NaN,
    })),
    theories: ofKind(notebook, 'theory').map(({ name, sphere, groups, multiplets }) => ({
      name: name.name,
      sphere: sphere?.sphere.name ?? '',
      groups: groups.map((group) => group.name.name),
      rows: multiplets.map((row) => ({ name: row.name.name, cells: row.cells.map(({ text }) => text) })),
    })),
    spectra: ofKind(notebook, 'spectrum').map(({ name, towers }) => ({
      name: name.name,
      towers: towers.map(({ eigenvalue }) => ({
        shift: eigenvalue[0]?.factor.form.linearPart('n').rest.toRational()?.toNumber() ?? Number.NaN,
        power: eigenvalue[0]?.power ?? 0,
      })),
    })),
    values: ofKind(notebook, 'value').map(({ quantity, at, digits }) => ({
      of: quantity.kind === 'theory' ? quantity.theory.name : '',
      at: at.map((assignment) => assignment.value.form.toRational()?.toNumber() ?? Number.NaN),
      digits: digits?.value ?? 0,
    })),
    paragraphs: ofKind(notebook, 'prose').map(({ text }) => text),
  };
}

test('a notebook without mistakes is found again in its tree', () => {
  fc.assert(
    fc.property(notebookText, ({ text, facts }) => {
      const notebook = parseNotebook(text);
      expect(notebook.diagnostics).toEqual([]);
      const found = factsIn(notebook);
      // Paragraphs next to each other are one block.
      expect({ ...found, paragraphs: found.paragraphs.join('\n\n').split('\n\n') }).toEqual({
        ...facts,
        paragraphs: facts.paragraphs.join('\n\n').split('\n\n'),
      });
    }),
    { numRuns: 120 },
  );
});

/** Every span in a value, with the names that must stand there. */
function checkSpans(value: unknown, text: string): void {
  if (typeof value !== 'object' || value === null || value instanceof Form) return;
  if (Array.isArray(value)) {
    for (const entry of value) checkSpans(entry, text);
    return;
  }
  if ('from' in value && 'to' in value && typeof value.from === 'number' && typeof value.to === 'number') {
    expect(value.from).toBeGreaterThanOrEqual(0);
    expect(value.to).toBeGreaterThanOrEqual(value.from);
    expect(value.to).toBeLessThanOrEqual(text.length);
  }
  if ('name' in value && typeof value.name === 'string' && 'span' in value) {
    const { from, to } = value.span as { from: number; to: number };
    expect(spellName(text.slice(from, to))).toBe(value.name);
  }
  for (const entry of Object.values(value)) checkSpans(entry, text);
}

/** What must hold of any text. */
function checkNotebook(text: string): void {
  const notebook = parseNotebook(text);
  checkSpans(notebook.blocks, text);
  let end = 0;
  for (const { span } of notebook.blocks) {
    expect(span.from).toBeGreaterThanOrEqual(end);
    end = span.to;
  }
  for (const diagnostic of notebook.diagnostics) {
    checkSpans(diagnostic, text);
    expect(diagnostic.span.to).toBeGreaterThan(diagnostic.span.from);
    expect(say(diagnostic)).not.toMatch(/undefined|NaN/);
  }
}

describe('any text has a tree and problems inside the text', () => {
  test('random characters', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary', maxLength: 200 }), checkNotebook), { numRuns: 150 });
  });

  test('random pieces of the language', () => {
    fc.assert(fc.property(junk, checkNotebook), { numRuns: 400 });
  });

  test('notebooks with damage', () => {
    const place = fc.double({ min: 0, max: 1, noNaN: true });
    const damage = fc.record({
      kind: fc.constantFrom('delete', 'insert', 'repeat', 'cut'),
      at: place,
      size: fc.nat(30),
      junk,
    });
    fc.assert(
      fc.property(notebookText, fc.array(damage, { minLength: 1, maxLength: 3 }), ({ text }, damages) => {
        let damaged = text;
        for (const { kind, at, size, junk: inserted } of damages) {
          const from = Math.floor(at * damaged.length);
          const piece = damaged.slice(from, from + size);
          const rest = damaged.slice(from + size);
          const middle = { delete: '', insert: inserted + piece, repeat: piece + piece, cut: '' }[kind];
          damaged = damaged.slice(0, from) + middle + (kind === 'cut' ? '' : rest);
        }
        checkNotebook(damaged);
      }),
      { numRuns: 200 },
    );
  });
});

test('a damaged block leaves the blocks around it as they are', () => {
  const oneLine = junk.map((text) => text.replace(/[\r\n]+/g, '\n  '));
  const head = fc.constantFrom('let ', 'theory ', 'spectrum ', 'value ', 'plot ', 'representation ', 'compare ');
  fc.assert(
    fc.property(notebookText, head, oneLine, notebookText, (before, word, line, after) => {
      const alone = [before, after].map(({ text }) => parseNotebook(text).blocks.map(outline));
      const inserted = parseNotebook(`${before.text}${word}${line}\n\n${after.text}`).blocks.map(outline);
      expect(inserted.slice(0, alone[0]?.length)).toEqual(alone[0]);
      const count = alone[1]?.length ?? 0;
      expect(count === 0 ? [] : inserted.slice(-count)).toEqual(alone[1]);
    }),
    { numRuns: 120 },
  );
});
