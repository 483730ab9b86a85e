import { styleTags, tags } from '@lezer/highlight';

/** How the editor colours the notebook. */
export const highlighting = styleTags({
  'LetWord TheoryWord SpectrumWord': tags.definitionKeyword,
  'FormulaWord ValueWord PlotWord RepresentationWord IntegrateWord ExtremizeWord CompareWord': tags.controlKeyword,
  'TheoryLineWord GroupLineWord MatterLineWord SpectrumLineWord TowerLineWord': tags.keyword,
  'InWord ClauseWord OptionWord TowerClauseWord': tags.modifier,
  'QuantityWord OneLoop': tags.standard(tags.variableName),
  Name: tags.variableName,
  'Theory/Name Spectrum/Name Let/Name': tags.definition(tags.variableName),
  Number: tags.number,
  Operator: tags.arithmeticOperator,
  'Comparison RangeDots': tags.compareOperator,
  Bracket: tags.paren,
  'Comma Punctuation': tags.punctuation,
  Comment: tags.lineComment,
  Junk: tags.invalid,
  Heading: tags.heading,
  Underline: tags.heading,
  Rule: tags.contentSeparator,
  FencedCode: tags.monospace,
  Text: tags.content,
  Math: tags.special(tags.string),
  Code: tags.monospace,
});
