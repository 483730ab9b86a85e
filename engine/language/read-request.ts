import { readClauses } from './read-clauses';
import { readGroupWord } from './read-group-line';
import { readCurve, readQuantity } from './read-quantity';
import type { Reading } from './reading';
import { TokenReader } from './token-reader';
import type { WorkPiece } from './tokens';
import type {
  CompareRequest,
  ExtremizeRequest,
  FormulaRequest,
  IntegrateRequest,
  PlotRequest,
  RepresentationRequest,
  Request,
  Span,
  ValueRequest,
} from './tree';
import { FORMULA_FORMS, type WorkWord } from './words';

export type RequestWord = Exclude<WorkWord, 'let' | 'theory' | 'spectrum'>;

type RequestReader = (reader: TokenReader, span: Span) => Request | null;

/** A request; null when it cannot be read, which is then reported. */
export function readRequest(word: RequestWord, piece: WorkPiece, reading: Reading): Request | null {
  const reader = new TokenReader(piece.lines[0] ?? [], piece.wordSpan, reading);
  return READERS[word](reader, { from: piece.from, to: piece.to });
}

const READERS: Readonly<Record<RequestWord, RequestReader>> = {
  formula: readFormula,
  value: readValue,
  plot: readPlot,
  representation: readRepresentation,
  integrate: readIntegrate,
  extremize: readExtremize,
  compare: readCompare,
};

function readFormula(reader: TokenReader, span: Span): FormulaRequest | null {
  const subject = reader.name('subject-missing', 'the name of a theory or a spectrum');
  if (!subject) return null;
  const as = reader.take('as');
  if (!as)
    return reader.expectEnd('`as` and a form, or the end of the line')
      ? { kind: 'formula', span, subject, form: null }
      : null;
  const token = reader.next();
  const form = FORMULA_FORMS.find((word) => word === token?.text);
  if (!form) return reader.report('formula-form-unknown', token ?? as, { word: token?.text ?? '' });
  return reader.expectEnd('the end of the line') ? { kind: 'formula', span, subject, form } : null;
}

function readValue(reader: TokenReader, span: Span): ValueRequest | null {
  const quantity = readQuantity(reader);
  const clauses = quantity && readClauses(reader, { at: true, digits: true });
  return clauses && { kind: 'value', span, quantity, at: clauses.at, digits: clauses.digits };
}

/** Two ranges make a map; more have no picture. */
const MOST_RANGES = 2;

function readPlot(reader: TokenReader, span: Span): PlotRequest | null {
  const curves: PlotRequest['curves'][number][] = [];
  do {
    const curve = readCurve(reader);
    if (!curve) return null;
    curves.push(curve);
  } while (reader.take(','));
  const clauses = readClauses(reader, { at: true, over: 'ranges' });
  if (!clauses) return null;
  const { over, at } = clauses;
  if (over.length === 0) return reader.report('over-missing', reader.last, { word: 'plot' });
  const surplus = over[MOST_RANGES];
  if (surplus) return reader.report('ranges-too-many', surplus.name.span, { name: surplus.name.name });
  return { kind: 'plot', span, curves, over, at };
}

function readRepresentation(reader: TokenReader, span: Span): RepresentationRequest | null {
  if (reader.atEnd) return reader.report('group-missing', reader.last);
  const group = readGroupWord(reader);
  if (!group || !reader.expect(':', '`:` and a representation')) return null;
  const from = reader.here.from;
  if (reader.atEnd) return reader.report('representation-missing', reader.last);
  for (let token = reader.next(); token; token = reader.next()) {
    if (token.kind === 'junk') return reader.unexpected(token, 'a representation');
  }
  const representation = { text: reader.textFrom(from), span: { from, to: reader.last.to } };
  return { kind: 'representation', span, group, representation };
}

function readIntegrate(reader: TokenReader, span: Span): IntegrateRequest | null {
  const theory = reader.name('subject-missing', 'the name of a theory');
  const clauses = theory && readClauses(reader, { at: true, digits: true });
  return clauses && { kind: 'integrate', span, theory, at: clauses.at, digits: clauses.digits };
}

function readExtremize(reader: TokenReader, span: Span): ExtremizeRequest | null {
  const theory = reader.name('subject-missing', 'the name of a theory');
  const clauses = theory && readClauses(reader, { at: true, over: 'names', digits: true });
  if (!clauses) return null;
  if (clauses.names.length === 0) return reader.report('over-missing', reader.last, { word: 'extremize' });
  return { kind: 'extremize', span, theory, over: clauses.names, at: clauses.at, digits: clauses.digits };
}

function readCompare(reader: TokenReader, span: Span): CompareRequest | null {
  const first = reader.name('subject-missing', 'the name of a theory');
  if (!first) return null;
  if (!reader.take('with')) return reader.report('with-missing', reader.here, { name: first.name });
  const second = reader.name('subject-missing', 'the name of a second theory');
  const clauses = second && readClauses(reader, { at: true, over: 'ranges', digits: true });
  if (!clauses) return null;
  return {
    kind: 'compare',
    span,
    theories: [first, second],
    over: clauses.over,
    at: clauses.at,
    digits: clauses.digits,
  };
}
