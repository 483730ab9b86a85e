/** What can be done from anywhere: named once, for the header, the keyboard and the list of keys alike. */
export interface Command {
  readonly name: string;
  readonly label: string;
  /** As `KeyboardEvent.key`; with `mod` Control, or Command on a Mac. */
  readonly key: string | null;
  readonly mod: boolean;
  readonly perform: () => void;
}

export const isMac = /Mac|iPhone|iPad/.test(navigator.userAgent);

export function keyText({ key, mod }: Pick<Command, 'key' | 'mod'>): string {
  if (key === null) return '';
  const name = key.length === 1 ? key.toUpperCase() : key;
  return mod ? `${isMac ? '⌘' : 'Ctrl'} ${name}` : name;
}

export function commandFor(event: KeyboardEvent, commands: readonly Command[]): Command | undefined {
  if (event.altKey || event.shiftKey) return undefined;
  const mod = isMac ? event.metaKey : event.ctrlKey;
  return commands.find(({ key, mod: wanted }) => key !== null && event.key === key && mod === wanted);
}

/** Keys of the editor and the page that are not commands; shown in the list of keys. */
export const otherKeys: readonly { readonly keys: string; readonly does: string }[] = [
  { keys: `${isMac ? '⌘' : 'Ctrl'} Z`, does: 'Undo, also what was changed on the page' },
  { keys: isMac ? '⌘ ⇧ Z' : 'Ctrl Y', does: 'Redo' },
  { keys: 'Ctrl Space', does: 'Offer words that may stand here' },
  { keys: 'F2', does: 'Explain the word at the cursor' },
  { keys: 'F8', does: 'Go to the next problem' },
  { keys: `${isMac ? '⌘' : 'Ctrl'} F`, does: 'Search in the text' },
  { keys: `${isMac ? '⌘' : 'Ctrl'} /`, does: 'Make the line a comment, or work again' },
  { keys: isMac ? '⌘ ⌥ [ and ]' : 'Ctrl Shift [ and ]', does: 'Fold and unfold a block' },
  { keys: 'Tab', does: 'Leave the text; it writes no blanks' },
  { keys: 'Enter, Escape', does: 'In a table cell: edit and keep, leave as it was' },
  { keys: 'Arrows', does: 'In a table: the next cell; on a plot: read it point by point; on the border: move it' },
];
