import katex from 'katex';

/** Memo of typeset formulas by their LaTeX; the oldest go first. */
const typeset = new Map<string, string>();
const REMEMBERED = 2000;

/** HTML with MathML inside. A mistake in the LaTeX shows its source in the warning colour. */
export function renderTex(tex: string, display: boolean): string {
  const key = (display ? 'D' : 'T') + tex;
  const known = typeset.get(key);
  if (known !== undefined) return known;
  const html = katex.renderToString(tex, {
    displayMode: display,
    throwOnError: false,
    trust: false,
    strict: 'ignore',
    output: 'htmlAndMathml',
    errorColor: 'var(--warn)',
  });
  if (typeset.size >= REMEMBERED) {
    const [oldest] = typeset.keys();
    if (oldest !== undefined) typeset.delete(oldest);
  }
  typeset.set(key, html);
  return html;
}
