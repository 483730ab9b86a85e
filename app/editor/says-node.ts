import { renderTex } from '../page/render-tex';
import { sentenceParts } from '../page/sentence-parts';

/** A sentence of the engine as a node, for the editor's own windows. */
export function saysNode(text: string): HTMLElement {
  const node = document.createElement('span');
  for (const { kind, part } of sentenceParts(text)) {
    if (kind === 'text') {
      node.append(part);
      continue;
    }
    const inner = document.createElement(kind === 'word' ? 'code' : 'span');
    if (kind === 'word') inner.append(part);
    else inner.innerHTML = renderTex(part, false);
    node.append(inner);
  }
  return node;
}
