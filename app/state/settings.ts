import { createStore, type Readable } from './store';

export type Theme = 'light' | 'dark' | 'system';
export type Pane = 'text' | 'page';

export interface Settings {
  readonly theme: Theme;
  /** Width of the text's half, in per cent of the desk. */
  readonly split: number;
  /** Which half a narrow screen shows. */
  readonly pane: Pane;
  /** The notebook that was open last. */
  readonly notebook: string | null;
}

export interface SettingsStore {
  readonly state: Readable<Settings>;
  change(changed: Partial<Settings>): void;
}

const PLACE = 'spherelathe settings';
export const SPLIT_RANGE = { from: 20, to: 80 } as const;
const usual: Settings = { theme: 'system', split: 40, pane: 'page', notebook: null };

/** Settings as stored, by any version: what is not understood is as usual. */
export function readSettings(stored: string | null): Settings {
  let found: unknown = null;
  try {
    found = stored === null ? null : JSON.parse(stored);
  } catch {
    return usual;
  }
  if (typeof found !== 'object' || found === null) return usual;
  const theme = 'theme' in found ? found.theme : null;
  const split = 'split' in found ? found.split : null;
  const pane = 'pane' in found ? found.pane : null;
  const notebook = 'notebook' in found ? found.notebook : null;
  return {
    theme: theme === 'light' || theme === 'dark' ? theme : usual.theme,
    split: typeof split === 'number' && split >= SPLIT_RANGE.from && split <= SPLIT_RANGE.to ? split : usual.split,
    pane: pane === 'text' || pane === 'page' ? pane : usual.pane,
    notebook: typeof notebook === 'string' ? notebook : usual.notebook,
  };
}

function stored(): string | null {
  try {
    return localStorage.getItem(PLACE);
  } catch {
    return null;
  }
}

export function createSettings(): SettingsStore {
  const state = createStore(readSettings(stored()));
  return {
    state,
    change(changed) {
      const next = { ...state.get(), ...changed };
      state.set(next);
      try {
        localStorage.setItem(PLACE, JSON.stringify(next));
      } catch {
        // A browser that keeps nothing still works; the settings then last as long as the page.
      }
    },
  };
}
