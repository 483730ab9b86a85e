// How the page follows the text; rules of our own, there is no outside source.
import { expect, test } from 'vitest';
import { createNotebookText } from '../../app/state/notebook-text';
import { cardNow, followOutline } from '../../app/state/outline';
import type { Outline } from '../../engine/requests/result';
import { heldClient, outlineOf, settled } from './follow';

test('one question is out at a time, and the next one asks about the newest text', async () => {
  const text = createNotebookText();
  const { client, outlines } = heldClient();
  const followed = followOutline(text, client, () => ({ notation: {} }));
  text.open('a');
  text.edit([{ from: 1, to: 1, insert: 'b' }]);
  text.edit([{ from: 2, to: 2, insert: 'c' }]);
  expect(outlines.map((asked) => asked.text)).toEqual(['a']);
  outlines[0]?.answer(outlineOf('k'));
  await settled();
  expect(outlines.map((asked) => asked.text)).toEqual(['a', 'abc']);
  expect(followed.state.get().text).toBe('a');
  outlines[1]?.answer(null);
  await settled();
  expect(followed.state.get().text).toBe('a');
});

test('a card that merely moved is the same object, and its place is found', async () => {
  const text = createNotebookText();
  const { client, outlines } = heldClient();
  const followed = followOutline(text, client, () => ({ notation: {} }));
  text.open('value');
  outlines[0]?.answer(outlineOf('k'));
  await settled();
  const [card] = followed.state.get().cards;
  text.edit([{ from: 0, to: 0, insert: '   ' }]);
  const moved = outlineOf('k');
  outlines[1]?.answer({ ...moved, cards: moved.cards.map((one) => ({ ...one, span: { from: 3, to: 12 } })) });
  await settled();
  expect(followed.state.get().cards[0]).toBe(card);
  expect(card && cardNow(followed.state.get(), card)?.span).toEqual({ from: 3, to: 12 });
});

test('a broken card remembers how it was when it was whole; another notebook does not', async () => {
  const text = createNotebookText();
  const { client, outlines } = heldClient();
  const followed = followOutline(text, client, () => ({ notation: {} }));
  text.open('a');
  const whole = outlineOf('sound');
  outlines[0]?.answer(whole);
  await settled();
  const broken: Outline = {
    ...outlineOf('broken'),
    problems: [{ span: { from: 2, to: 3 }, line: 1, column: 3, severity: 'error', message: '' }],
  };
  text.edit([{ from: 0, to: 0, insert: 'x' }]);
  outlines[1]?.answer(broken);
  await settled();
  const kept = followed.state.get().sound.get('value::1');
  expect(kept?.kind === 'request' && kept.key).toBe('sound');
  text.open('b');
  outlines[2]?.answer(broken);
  await settled();
  expect(followed.state.get().sound.has('value::1')).toBe(false);
});

test('a defect of the engine keeps the last outline and says what happened', async () => {
  const text = createNotebookText();
  const { client, outlines } = heldClient();
  const failing = { ...client, outline: client.outline };
  const followed = followOutline(text, failing, () => ({ notation: {} }));
  text.open('a');
  outlines[0]?.answer(outlineOf('k'));
  await settled();
  failing.outline = () => Promise.reject(new Error('broken inside'));
  text.edit([{ from: 0, to: 0, insert: 'x' }]);
  await settled();
  expect(followed.state.get().trouble).toBe('broken inside');
  expect(followed.state.get().outline?.cards).toHaveLength(1);
});
