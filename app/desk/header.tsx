import { WordButton } from '../page/word-button';
import { useSession } from '../state/session';
import type { Theme } from '../state/settings';
import { useSelected, useStore } from '../state/store';
import type { Saving } from '../storage/keeper';
import { type Command, keyText } from './commands';
import styles from './header.module.css';

const savingText: Record<Saving, string> = {
  saved: 'saved',
  saving: 'saving…',
  impossible: 'not kept: save it as a file',
};

const themes: readonly { readonly value: Theme; readonly label: string }[] = [
  { value: 'system', label: 'as the system' },
  { value: 'light', label: 'light' },
  { value: 'dark', label: 'dark' },
];

export function Header({ commands }: { readonly commands: readonly Command[] }) {
  const { outline, keeper, settings } = useSession();
  const title = useSelected(outline.state, (state) => state.outline?.title ?? '');
  const { saving } = useStore(keeper.state);
  const { theme } = useStore(settings.state);
  return (
    <header className={styles.header}>
      <span className={styles.name}>Spherelathe</span>
      <span className={styles.title}>{title}</span>
      <span className={styles.saved} data-saving={saving}>
        {savingText[saving]}
      </span>
      <nav className={styles.words} aria-label="Notebook">
        {commands
          .filter(({ name }) => name !== 'other-half')
          .map((command) => (
            <WordButton key={command.name} title={keyText(command)} onClick={command.perform}>
              {command.name}
            </WordButton>
          ))}
        <label className={styles.theme}>
          <span className="heard">Light or dark</span>
          <select
            value={theme}
            onChange={(event) => {
              const chosen = themes.find(({ value }) => value === event.target.value);
              if (chosen) settings.change({ theme: chosen.value });
            }}
          >
            {themes.map(({ value, label }) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </select>
        </label>
      </nav>
    </header>
  );
}
