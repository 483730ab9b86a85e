import { foldNodeProp, HighlightStyle, LanguageSupport, LRLanguage, syntaxHighlighting } from '@codemirror/language';
import type { EditorState } from '@codemirror/state';
import type { SyntaxNode } from '@lezer/common';
import { tags } from '@lezer/highlight';
import { parser } from '../../engine/language/notebook.parser.gen';

/** A block folds behind its first line, up to its last line that is not blank. */
function foldBlock(node: SyntaxNode, state: EditorState) {
  const from = state.doc.lineAt(node.from).to;
  const text = state.doc.sliceString(node.from, node.to);
  const to = node.from + text.trimEnd().length;
  return to > from ? { from, to } : null;
}

const folding = foldNodeProp.add({
  'Theory Spectrum Formula Value Plot Representation Integrate Extremize Compare FencedCode': foldBlock,
});

const language = LRLanguage.define({
  name: 'lathe',
  parser: parser.configure({ props: [folding] }),
  languageData: { commentTokens: { line: '%' }, closeBrackets: { brackets: ['(', '['] } },
});

/** Colours by meaning; the tokens hold for light and dark, so that no colour is fixed here. */
const colours = HighlightStyle.define([
  { tag: [tags.definitionKeyword, tags.controlKeyword, tags.keyword], color: 'var(--word-work)' },
  { tag: tags.modifier, color: 'var(--word-work)', fontStyle: 'italic' },
  { tag: tags.standard(tags.variableName), color: 'var(--word-group)' },
  { tag: tags.definition(tags.variableName), color: 'var(--word-name)', fontWeight: '700' },
  { tag: tags.variableName, color: 'var(--word-symbol)' },
  { tag: tags.number, color: 'var(--word-number)' },
  { tag: [tags.arithmeticOperator, tags.compareOperator, tags.punctuation, tags.paren], color: 'var(--ink-soft)' },
  { tag: tags.lineComment, color: 'var(--word-comment)', fontStyle: 'italic' },
  { tag: tags.invalid, color: 'var(--warn)', textDecoration: 'underline dotted' },
  { tag: tags.heading, color: 'var(--word-name)', fontWeight: '700' },
  { tag: tags.special(tags.string), color: 'var(--word-group)' },
  { tag: tags.monospace, color: 'var(--ink-soft)' },
  { tag: tags.contentSeparator, color: 'var(--word-comment)' },
]);

export const notebookLanguage = [new LanguageSupport(language), syntaxHighlighting(colours)];
