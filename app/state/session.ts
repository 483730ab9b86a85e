import { createContext, useContext } from 'react';
import type { EngineClient } from '../../workers/types';
import { createKeeper, type Keeper } from '../storage/keeper';
import { type Answers, createAnswers } from './answers';
import { createCardAtCursor } from './card-at-cursor';
import { createLit, type Lit } from './lit';
import { createLiveValues, type LiveValues } from './live-values';
import { createNotebookText, type NotebookText } from './notebook-text';
import { createNotices, type Notices } from './notices';
import { type FollowedOutline, followOutline } from './outline';
import { createSettings, type SettingsStore } from './settings';
import type { Readable, Store } from './store';
import { createView, type View } from './view';

/** All that the page works with. Text, view and settings are its state; outline and answers are derived from them. */
export interface Session {
  readonly client: EngineClient;
  readonly text: NotebookText;
  readonly view: Store<View>;
  readonly settings: SettingsStore;
  readonly notices: Notices;
  readonly outline: FollowedOutline;
  readonly answers: Answers;
  readonly live: LiveValues;
  readonly lit: Lit;
  /** Id of the card whose text the cursor is in. */
  readonly cardAtCursor: Readable<string | null>;
  readonly keeper: Keeper;
}

export function createSession(client: EngineClient): Session {
  const text = createNotebookText();
  const view = createView();
  const settings = createSettings();
  const notices = createNotices();
  const outline = followOutline(text, client, () => ({ notation: view.get().notation }));
  const answers = createAnswers(outline.state, client);
  let notation = view.get().notation;
  view.subscribe(() => {
    if (view.get().notation === notation) return;
    notation = view.get().notation;
    outline.refresh();
  });
  client.onRestart(outline.refresh);
  return {
    client,
    text,
    view,
    settings,
    notices,
    outline,
    answers,
    live: createLiveValues(outline.state),
    lit: createLit(outline.state, text.state),
    cardAtCursor: createCardAtCursor(outline.state, text.state),
    keeper: createKeeper(text, view, settings, notices),
  };
}

export const SessionContext = createContext<Session | null>(null);

export function useSession(): Session {
  const session = useContext(SessionContext);
  if (!session) throw new Error('a component stands outside the session');
  return session;
}
