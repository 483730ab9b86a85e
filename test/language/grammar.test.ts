// The grammar against its generator (@lezer/generator) and against itself: incremental parsing must equal parsing anew.
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { type Tree, TreeFragment } from '@lezer/common';
import { buildParserFile } from '@lezer/generator';
import { highlightTree, tagHighlighter, tags } from '@lezer/highlight';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { notebookLanguageParser } from '../../engine/language/notebook-language-parser';
import { junk, notebookText } from './arbitraries';

const file = (name: string) =>
  readFileSync(fileURLToPath(new URL(`../../engine/language/${name}`, import.meta.url)), 'utf8');

describe('the generated parser', () => {
  const built = buildParserFile(file('notebook.grammar'), { fileName: 'notebook.grammar', typeScript: true });

  test('is what the grammar generates', () => {
    expect(built.parser).toBe(file('notebook.parser.gen.ts'));
    expect(built.terms).toBe(file('notebook.parser.gen.terms.ts'));
  });
});

/** Nodes with their places; anonymous ones left out. */
function nodesOf(tree: Tree): string[] {
  const nodes: string[] = [];
  tree.iterate({ enter: ({ name, from, to }) => void nodes.push(`${name} ${from}-${to}`) });
  return nodes;
}

const parse = (text: string, fragments: readonly TreeFragment[] = []) => notebookLanguageParser.parse(text, fragments);

describe('the tree', () => {
  test('names the parts of work', () => {
    const text = 'theory A\n  gauge G = U(2), level 1 % c\n  level 3\n  matter G\nvalue one-loop of level\n';
    expect(parse(text).toString()).toBe(
      'Notebook(' +
        'Theory(TheoryWord,Name,GroupLine(GroupLineWord,Name,Comparison,Name,Bracket,Number,Bracket,Comma,' +
        'OptionWord,Number),Comment,Line(Name,Number),MatterLine(MatterLineWord,Name)),' +
        'Value(ValueWord,OneLoop,ClauseWord,Name))',
    );
  });

  test('names the parts of prose', () => {
    const text = '# T\nA $x^2$ `c` $$y$$ $ 5\n===\n***\n~~~\nlet r\n~~~\n';
    expect(parse(text).toString()).toBe(
      'Notebook(Heading,Paragraph(Text,Math,Text,Code,Text,Math,Text,Text,Underline),Rule,FencedCode)',
    );
  });

  test('gives words their meaning by place, for the colours', () => {
    const text = 'theory level\n  gauge level = U(1), level level\n';
    const styled: string[] = [];
    const style = tagHighlighter([
      { tag: tags.keyword, class: 'word' },
      { tag: tags.modifier, class: 'option' },
      { tag: tags.variableName, class: 'name' },
    ]);
    highlightTree(parse(text), style, (from, to, classes) => styled.push(`${classes} ${text.slice(from, to)}`));
    const levels = styled.filter((part) => part.endsWith('level'));
    expect(levels).toEqual(['name level', 'name level', 'option level', 'name level']);
    expect(styled[0]).toBe('word theory');
  });

  test('has no error on any text', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          junk,
          notebookText.map(({ text }) => text),
          fc.string({ unit: 'binary' }),
        ),
        (text) => {
          const tree = parse(text);
          expect(nodesOf(tree).filter((node) => node.startsWith('⚠'))).toEqual([]);
          expect(tree.length).toBe(text.length);
        },
      ),
      { numRuns: 120 },
    );
  });
});

describe('parsing after an edit', () => {
  const edit = fc.record({ at: fc.double({ min: 0, max: 1, noNaN: true }), remove: fc.nat(40), insert: junk });

  test('equals parsing anew', () => {
    fc.assert(
      fc.property(notebookText, fc.array(edit, { minLength: 1, maxLength: 4 }), ({ text }, edits) => {
        let before = text;
        let fragments = TreeFragment.addTree(parse(before));
        for (const { at, remove, insert } of edits) {
          const from = Math.floor(at * before.length);
          const to = Math.min(before.length, from + remove);
          const after = before.slice(0, from) + insert + before.slice(to);
          fragments = TreeFragment.applyChanges(fragments, [
            { fromA: from, toA: to, fromB: from, toB: from + insert.length },
          ]);
          const tree = parse(after, fragments);
          expect(nodesOf(tree)).toEqual(nodesOf(parse(after)));
          fragments = TreeFragment.addTree(tree, fragments);
          before = after;
        }
      }),
      { numRuns: 120 },
    );
  });
});
