// Setting sentences, prose and numbers. Prose is CommonMark (spec 0.31.2, sections 6.2, 6.3, 6.6); the rest is our own.
import { describe, expect, test } from 'vitest';
import { interpolate } from '../../app/desk/interpolate';
import { errorText, secondsText } from '../../app/page/digits';
import { renderProse } from '../../app/page/prose';
import { sentenceParts } from '../../app/page/sentence-parts';
import { numbered } from '../../app/state/numbered';

describe('prose', () => {
  test('is CommonMark', () => {
    expect(renderProse('# A\n\n*b* and `c`\n\n- d\n- e')).toBe(
      '<h1>A</h1>\n<p><em>b</em> and <code>c</code></p>\n<ul>\n<li>d</li>\n<li>e</li>\n</ul>',
    );
  });

  test('sets formulas in the line, displayed, and in blocks', () => {
    const html = renderProse('a $x^2$ b $$y^3$$\n\n$$\nz^4\n$$\n');
    expect(html.match(/<annotation encoding="application\/x-tex">[^<]+/g)?.map((found) => found.at(-1))).toEqual([
      '2',
      '3',
      '4',
    ]);
    expect(html.match(/class="katex-display"/g)).toHaveLength(2);
    expect(renderProse('a price of $5 alone')).toBe('<p>a price of $5 alone</p>');
  });

  test('lets no markup, no image and no script through', () => {
    const html = renderProse(
      '<b onclick="x()">b</b> ![i](https://example.org/i.png) [l](javascript:x()) [m](https://example.org) $\\href{javascript:x()}{y}$',
    );
    expect(html).not.toMatch(/<b|<img|href="javascript|onclick="/);
    expect(html).toContain('<a target="_blank" rel="noopener noreferrer" href="https://example.org">');
  });
});

test('a sentence falls into text, formulas and words', () => {
  expect(sentenceParts('R of `q` is $r$.').map(({ kind, part }) => `${kind} ${part}`)).toEqual([
    'text R of ',
    'word q',
    'text  is ',
    'formula r',
    'text .',
  ]);
  expect(sentenceParts('')).toEqual([]);
  expect(sentenceParts('a lone $ sign')).toEqual([{ kind: 'text', part: 'a lone $ sign', place: 0 }]);
});

test('errors and times are written as people read them', () => {
  expect(['4e-34', '2.5e+3', '0.1'].map(errorText)).toEqual(['4·10⁻³⁴', '2.5·10³', '0.1']);
  expect([0.0009, 0.145, 2.34, 600].map(secondsText)).toEqual(['0.90 ms', '145 ms', '2.3 s', '10 min']);
});

test('two halves meet at their anchors and move evenly between them', () => {
  const anchors = [
    { text: 0, page: 0 },
    { text: 100, page: 400 },
    { text: 100, page: 500 },
    { text: 300, page: 600 },
  ];
  expect([0, 50, 100, 200, 300, 900].map((at) => interpolate(anchors, 'text', 'page', at))).toEqual([
    0, 200, 400, 550, 600, 600,
  ]);
  expect(interpolate(anchors, 'page', 'text', 450)).toBe(100);
  expect(interpolate([], 'page', 'text', 450)).toBe(0);
});

test('items of one name are told apart', () => {
  expect(numbered(['a', 'b', 'a'], (name) => name).map(({ key }) => key)).toEqual(['a 0', 'b 0', 'a 1']);
});
