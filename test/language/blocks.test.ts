// Prose and work: the rules of the notebook's text (our own), and CommonMark 0.31.2 for headings, breaks and fences.
import { describe, expect, test } from 'vitest';
import { parseNotebook } from '../../engine/language/parse';
import type { Block } from '../../engine/language/tree';

/** Each block as its kind and what it is called or says. */
function blocksOf(text: string): string[] {
  return parseNotebook(text).blocks.map((block) => `${block.kind} ${labelOf(block)}`);
}

function labelOf(block: Block): string {
  switch (block.kind) {
    case 'prose':
      return JSON.stringify(block.text);
    case 'let':
    case 'theory':
    case 'spectrum':
      return block.name.name;
    case 'formula':
      return block.subject.name;
    default:
      return '';
  }
}

describe('prose and work', () => {
  test('a work word at the start of a line begins work', () => {
    expect(blocksOf('let r = 1\n')).toEqual(['let r']);
    expect(blocksOf('Text.\n\nlet r = 1\nformula A\nMore text.')).toEqual([
      'prose "Text."',
      'let r',
      'formula A',
      'prose "More text."',
    ]);
  });

  test('inside a paragraph it does not', () => {
    expect(blocksOf('Here we\nlet r = 1\nbe.\n\nlet r = 1')).toEqual(['prose "Here we\\nlet r = 1\\nbe."', 'let r']);
    expect(blocksOf('- an item\nlet r = 1')).toEqual(['prose "- an item\\nlet r = 1"']);
  });

  test('only the whole word in lower case counts', () => {
    for (const line of ['letter r = 1', 'Let us', 'let-down', 'theory: x', 'LET r = 1', "let's go", 'values']) {
      expect(blocksOf(line)).toEqual([`prose ${JSON.stringify(line)}`]);
    }
    expect(blocksOf('let\tr = 1')).toEqual(['let r']);
    expect(blocksOf('let%comment')).toEqual([]);
    expect(blocksOf('theory A%comment')).toEqual(['theory A']);
    expect(blocksOf('let\u00a0r = 1')).toEqual(['let r']);
  });

  test('headings, breaks and underlines close the paragraph', () => {
    expect(blocksOf('# Title\nlet r = 1')).toEqual(['prose "# Title"', 'let r']);
    expect(blocksOf('***\nlet r = 1')).toEqual(['prose "***"', 'let r']);
    expect(blocksOf('Title\n=====\nlet r = 1')).toEqual(['prose "Title\\n====="', 'let r']);
    expect(blocksOf('Text\n# Title\nlet r = 1')).toEqual(['prose "Text\\n# Title"', 'let r']);
    expect(blocksOf('#notitle\nlet r = 1')).toEqual(['prose "#notitle\\nlet r = 1"']);
  });

  test('fenced code is prose, blank lines and all', () => {
    const fence = '```\nlet r = 1\n\nlet s = 2\n```';
    expect(blocksOf(`${fence}\nlet t = 3`)).toEqual([`prose ${JSON.stringify(fence)}`, 'let t']);
    expect(blocksOf(`Text\n${fence}\nlet t = 3`)).toEqual([`prose ${JSON.stringify(`Text\n${fence}`)}`, 'let t']);
    expect(blocksOf('~~~ a\n```\n~~~~\nlet t = 3')).toEqual(['prose "~~~ a\\n```\\n~~~~"', 'let t']);
    expect(blocksOf('```\nlet r = 1\n\nlet s = 2')).toEqual(['prose "```\\nlet r = 1\\n\\nlet s = 2"']);
    expect(blocksOf('```a``` b\n\nlet t = 3')).toEqual(['prose "```a``` b"', 'let t']);
  });

  test('prose in one stretch is one block, with its blank lines', () => {
    expect(blocksOf('\n\nA\n\n# B\n\n\n\nC  \n\n\nlet r = 1')).toEqual(['prose "A\\n\\n# B\\n\\n\\n\\nC"', 'let r']);
    expect(blocksOf('')).toEqual([]);
    expect(blocksOf(' \n\t\n\n')).toEqual([]);
  });
});

describe('blocks', () => {
  test('go on in indented lines, over blank lines and comments', () => {
    const text = 'theory A % a\n  sphere S3\n\n% not indented\n';
    expect(blocksOf(text)).toEqual(['theory A', 'prose "% not indented"']);
    const { blocks } = parseNotebook('theory A\n\tsphere S3\n\n  % a comment\n \t \n\n   gauge G = U(1)\nlet r = 1');
    expect(blocks.map((block) => block.kind)).toEqual(['theory', 'let']);
    expect(blocks[0]).toMatchObject({ sphere: { sphere: { name: 'S3' } }, groups: [{ name: { name: 'G' } }] });
  });

  test('requests go on in indented lines', () => {
    const { blocks, diagnostics } = parseNotebook('value\n  one-loop % of what?\n  of A\n\n  at x = 1,\n     y = 2');
    expect(diagnostics).toEqual([]);
    expect(blocks).toMatchObject([{ kind: 'value', at: [{ name: { name: 'x' } }, { name: { name: 'y' } }] }]);
  });

  test('span from their word to their last token, comments left out', () => {
    const text = 'Text\n\ntheory A\n  sphere S3  \n\nlet r = 1 % one\n';
    const spans = parseNotebook(text).blocks.map(({ span }) => text.slice(span.from, span.to));
    expect(spans).toEqual(['Text', 'theory A\n  sphere S3', 'let r = 1']);
  });

  test('a block that cannot be read leaves the others as they are', () => {
    const { blocks, diagnostics } = parseNotebook('let a = 1\nlet b = = 2\nvalue\ntheory\n  sphere S3\nlet c = 3');
    expect(blocks).toMatchObject([{ name: { name: 'a' } }, { name: { name: 'c' } }]);
    expect(diagnostics.map(({ code }) => code)).toEqual(['expression-expected', 'quantity-missing', 'name-missing']);
  });

  test('a theory or a spectrum with bad lines is kept without them, and says so', () => {
    const text = 'theory A\n  sphere S3\n  gauge\n\nspectrum s\n  boson\n  boson n\n\ntheory B\n  sphere S3\n';
    expect(parseNotebook(text).blocks).toMatchObject([
      { name: { name: 'A' }, sphere: { sphere: { name: 'S3' } }, groups: [], sound: false },
      { name: { name: 's' }, towers: [{ kind: 'boson' }], sound: false },
      { name: { name: 'B' }, sound: true },
    ]);
  });

  test('every line end and a byte order mark are understood', () => {
    for (const end of ['\n', '\r\n', '\r']) {
      const text = [
        '\ufefftheory A',
        '  sphere S3',
        '',
        '  gauge G = U(1) % c',
        'Text',
        'goes on',
        '',
        'let r = 1',
      ].join(end);
      expect(blocksOf(text)).toEqual(['theory A', `prose ${JSON.stringify(`Text${end}goes on`)}`, 'let r']);
      expect(parseNotebook(text).diagnostics).toEqual([]);
    }
  });
});
