// What is compared: the list that comes with a small piece, and sizes of Weyl orbits (GAP: test/fixtures/lie).
import katex from 'katex';
import { describe, expect, test } from 'vitest';
import { type Analysis, analyse } from '../../engine/requests/analysis';
import { formulaView } from '../../engine/requests/formula';
import { printableTheory } from '../../engine/requests/formula-request';
import type { FormulaPiece } from '../../engine/requests/result';
import { PAGE_SIZE, weightPage } from '../../engine/requests/weight-page';

function theory(group: string, cell: string): Analysis {
  return analyse(
    ['theory lamp', '  sphere S3', `  gauge G = ${group}`, '  matter G R', `  chiral x ${cell} 1/3`, ''].join('\n'),
  );
}

function pieces(analysis: Analysis): readonly FormulaPiece[] {
  const printable = printableTheory(analysis, 'lamp', 0);
  const view = printable && formulaView(printable, 'functions');
  if (view?.kind !== 'formula') throw new Error('no formula');
  return view.pieces;
}

/** All pages of a piece, and how they are counted. */
function pagesOf(analysis: Analysis, latex: string): { readonly texts: string[]; readonly counts: number[] } {
  const texts: string[] = [];
  const counts: number[] = [];
  for (let page = 0; ; page++) {
    const found = weightPage(analysis, 'lamp', latex, page, 0);
    if (found.kind === 'none') throw new Error(latex);
    texts.push(found.latex);
    counts.push(found.to - found.from + 1);
    if (found.to >= found.of) return { texts, counts };
  }
}

describe('weights page by page', () => {
  test.each([
    ['SU(4)', 'adj'],
    ['Spin(8)', 'spinor'],
    ['USp(6)', 'alt2'],
  ])('a small piece of %s, %s has the list that comes with it', (group, cell) => {
    const analysis = theory(group, cell);
    const listed = pieces(analysis).filter(({ expanded }) => expanded !== null);
    expect(listed.length).toBeGreaterThan(0);
    for (const { latex, expanded, weights } of listed) {
      expect(weights).toBeUndefined();
      expect(pagesOf(analysis, latex).texts.join('\\;')).toBe(expanded);
    }
  });

  test('all weights of a large orbit can be reached, each once', () => {
    const analysis = theory('SU(8)', '[1,1,1,0,0,0,0]');
    const seen = new Set<string>();
    let total = 0;
    for (const { latex, expanded, weights = 0 } of pieces(analysis)) {
      if (weights === 0) continue;
      expect(expanded).toBeNull();
      const { texts, counts } = pagesOf(analysis, latex);
      expect(counts.reduce((sum, count) => sum + count, 0)).toBe(weights);
      expect(counts.slice(0, -1).every((count) => count === PAGE_SIZE)).toBe(true);
      total += weights;
      for (const factor of texts.flatMap((text) => text.split('\\;'))) seen.add(factor);
    }
    expect(total).toBeGreaterThan(300);
    expect(seen.size).toBe(total);
  });

  test('the last page of the 147250 of E8 is as good as the first', () => {
    const analysis = theory('E8', '[0,0,0,0,0,0,1,1]');
    const [largest] = pieces(analysis).toSorted((a, b) => (b.weights ?? 0) - (a.weights ?? 0));
    const last = Math.ceil((largest?.weights ?? 0) / PAGE_SIZE) - 1;
    expect(last).toBeGreaterThan(4);
    const [first, end] = [0, last].map((page) => weightPage(analysis, 'lamp', largest?.latex ?? '', page, 0));
    if (first?.kind !== 'page' || end?.kind !== 'page') throw new Error('no page');
    expect([first.from, end.to]).toEqual([1, largest?.weights]);
    expect(end.latex.split('\\;')).toHaveLength(end.to - end.from + 1);
    expect(weightPage(analysis, 'lamp', largest?.latex ?? '', last + 1, 0)).toMatchObject({ latex: '' });
  });

  test('a page is LaTeX', () => {
    const analysis = theory('SU(8)', '[1,1,1,0,0,0,0]');
    const [large] = pieces(analysis).filter(({ weights }) => weights !== undefined);
    const found = weightPage(analysis, 'lamp', large?.latex ?? '', 1, 0);
    expect(found.kind === 'page' && [found.from, found.latex.split('\\;').length]).toEqual([
      PAGE_SIZE + 1,
      found.kind === 'page' ? found.to - found.from + 1 : 0,
    ]);
    expect(() => katex.renderToString(found.kind === 'page' ? found.latex : '', { throwOnError: true })).not.toThrow();
  });

  test('of a piece that is not there, and of a theory that is not, there is none', () => {
    const analysis = theory('SU(4)', 'adj');
    expect(weightPage(analysis, 'lamp', 'x', 0, 0)).toEqual({ kind: 'none' });
    expect(weightPage(analysis, 'torch', 'x', 0, 0)).toEqual({ kind: 'none' });
  });
});
