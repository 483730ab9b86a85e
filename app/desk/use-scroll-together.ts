import { type RefObject, useEffect } from 'react';
import { useSession } from '../state/session';
import { type Anchor, interpolate } from './interpolate';

type Half = 'text' | 'page';

/** The two halves scroll together: whichever the user has in hand leads, and the other stands at the same work. */
export function useScrollTogether(page: RefObject<HTMLElement | null>, ready: boolean): void {
  const { text, outline, cardAtCursor } = useSession();
  useEffect(() => {
    const editor = text.editor();
    const sheet = page.current;
    if (!ready || !editor || !sheet) return;
    let leader: Half = 'text';
    const { scroller } = editor;

    const anchors = (): readonly Anchor[] => {
      const { outline: shown, revision } = outline.state.get();
      const found: Anchor[] = [{ text: 0, page: 0 }];
      const top = sheet.getBoundingClientRect().top - sheet.scrollTop;
      const elements = new Map(
        [...sheet.querySelectorAll<HTMLElement>('[data-card]')].map((card) => [card.dataset.card, card] as const),
      );
      for (const card of shown?.cards ?? []) {
        const element = elements.get(card.id);
        const span = text.spanNow(revision, card.span) ?? card.span;
        if (!element) continue;
        found.push({ text: editor.topOf(span.from), page: element.getBoundingClientRect().top - top - 24 });
      }
      found.push({
        text: Math.max(found.at(-1)?.text ?? 0, scroller.scrollHeight - scroller.clientHeight),
        page: Math.max(found.at(-1)?.page ?? 0, sheet.scrollHeight - sheet.clientHeight),
      });
      return found;
    };

    const take = (half: Half) => () => {
      leader = half;
    };
    const fromText = () => {
      if (leader === 'text') sheet.scrollTop = interpolate(anchors(), 'text', 'page', scroller.scrollTop);
    };
    const fromPage = () => {
      if (leader === 'page') scroller.scrollTop = interpolate(anchors(), 'page', 'text', sheet.scrollTop);
    };
    const showCard = () => {
      const id = cardAtCursor.get();
      if (leader !== 'text' || id === null) return;
      const card = sheet.querySelector<HTMLElement>(`[data-card="${CSS.escape(id)}"]`);
      if (!card) return;
      const frame = sheet.getBoundingClientRect();
      const place = card.getBoundingClientRect();
      if (place.bottom < frame.top + 40 || place.top > frame.bottom - 40) {
        sheet.scrollTop += place.top - frame.top - 24;
      }
    };

    const stop = new AbortController();
    const how = { signal: stop.signal, passive: true };
    for (const event of ['wheel', 'pointerdown', 'touchstart', 'keydown', 'focusin']) {
      scroller.addEventListener(event, take('text'), how);
      sheet.addEventListener(event, take('page'), how);
    }
    scroller.addEventListener('scroll', fromText, how);
    sheet.addEventListener('scroll', fromPage, how);
    const leave = cardAtCursor.subscribe(showCard);
    return () => {
      stop.abort();
      leave();
    };
  }, [ready, text, outline, cardAtCursor, page]);
}
