import { type Extension, StateEffect, StateField } from '@codemirror/state';
import { EditorView, hoverTooltip, keymap, showTooltip, type Tooltip } from '@codemirror/view';
import type { EngineClient, HoverHelp } from '../../workers/types';
import { saysNode } from './says-node';

function helpNode(help: HoverHelp): HTMLElement {
  const node = document.createElement('div');
  node.className = 'cm-help';
  const title = document.createElement('strong');
  title.append(saysNode(help.title));
  node.append(title);
  for (const line of help.lines) {
    const paragraph = document.createElement('p');
    paragraph.append(saysNode(line));
    node.append(paragraph);
  }
  return node;
}

function tooltipAt(view: EditorView, offset: number, help: HoverHelp): Tooltip {
  const word = view.state.wordAt(offset);
  return {
    pos: word?.from ?? offset,
    end: word?.to ?? offset,
    above: true,
    create: () => ({ dom: helpNode(help) }),
  };
}

const setHelp = StateEffect.define<Tooltip | null>();

/** Help asked for by key stays until the cursor moves on. */
const helpAtCursor = StateField.define<Tooltip | null>({
  create: () => null,
  update(before, transaction) {
    for (const effect of transaction.effects) if (effect.is(setHelp)) return effect.value;
    return transaction.docChanged || transaction.selection ? null : before;
  },
  provide: (field) => showTooltip.from(field),
});

async function explain(view: EditorView, client: EngineClient): Promise<void> {
  const offset = view.state.selection.main.head;
  const help = await client.hover(view.state.doc.toString(), offset);
  if (offset !== view.state.selection.main.head) return;
  const said = help ? [help.title, ...help.lines].join('. ') : 'Nothing to explain here.';
  view.dispatch({
    effects: [
      setHelp.of(tooltipAt(view, offset, help ?? { title: said, lines: [] })),
      EditorView.announce.of(said.replaceAll('$', '')),
    ],
  });
}

/** Help on a word: under the pointer, or by F2 at the cursor. */
export function help(client: EngineClient): Extension {
  return [
    hoverTooltip(
      async (view, offset) => {
        const found = await client.hover(view.state.doc.toString(), offset).catch(() => null);
        return found ? tooltipAt(view, offset, found) : null;
      },
      { hideOnChange: true },
    ),
    helpAtCursor,
    keymap.of([
      {
        key: 'F2',
        run: (view) => {
          explain(view, client).catch(() => undefined);
          return true;
        },
      },
      {
        key: 'Escape',
        run: (view) => {
          if (!view.state.field(helpAtCursor)) return false;
          view.dispatch({ effects: setHelp.of(null) });
          return true;
        },
      },
    ]),
  ];
}
