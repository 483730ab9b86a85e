import { deflateRawSync } from 'node:zlib';
import { expect, type Locator, type Page } from 'playwright/test';
import { PlotCard } from './plot-card';
import { TheoryCard } from './theory-card';

/** The whole desk as a user sees it: text at the left, page at the right, words above. */
export class NotebookPage {
  readonly page: Page;
  readonly editor: Locator;
  readonly sheet: Locator;
  readonly saved: Locator;
  readonly notices: Locator;

  constructor(page: Page) {
    this.page = page;
    this.editor = page.locator('.cm-content');
    this.sheet = page.getByRole('main');
    this.saved = page.getByText('saved', { exact: true });
    // The announcements of finished answers are status regions too, but heard only.
    this.notices = page.getByRole('status').filter({ hasText: 'Dismiss' });
  }

  /** Opens the site; the editor is a chunk of its own and comes a little later. */
  async open(address = './'): Promise<void> {
    await this.page.goto(address);
    await expect(this.editor).toBeVisible({ timeout: 15_000 });
  }

  /** Opens a notebook by the link that holds it, packed here independently of the site's own code. */
  async openText(text: string): Promise<void> {
    await this.open(`./#1${deflateRawSync(Buffer.from(text, 'utf8')).toString('base64url')}`);
    await expect.poll(() => this.text()).toBe(text);
  }

  async text(): Promise<string> {
    return (await this.page.locator('.cm-line').allInnerTexts()).map((line) => line.replace(/^\n$/, '')).join('\n');
  }

  /** Replaces the text as typing would. */
  async write(text: string): Promise<void> {
    await this.editor.click();
    await this.page.keyboard.press('ControlOrMeta+a');
    await this.page.keyboard.insertText(text);
  }

  /** Puts the cursor at the end of a line, counted from 1, and types there. */
  async typeAtEndOf(line: number, typed: string): Promise<void> {
    await this.page
      .locator('.cm-line')
      .nth(line - 1)
      .click();
    await this.page.keyboard.press('End');
    await this.page.keyboard.type(typed);
    await this.page.keyboard.press('Escape');
  }

  async undo(): Promise<void> {
    await this.editor.focus();
    await this.page.keyboard.press('ControlOrMeta+z');
  }

  word(name: string): Locator {
    return this.page.getByRole('navigation', { name: 'Notebook' }).getByRole('button', { name, exact: true });
  }

  dialog(title: string | RegExp): Locator {
    return this.page.getByRole('dialog', { name: title });
  }

  card(name: string | RegExp): Locator {
    return this.sheet.getByRole('article', { name });
  }

  theory(name: string): TheoryCard {
    return new TheoryCard(this.page, this.card(`Theory ${name}`));
  }

  plot(name: string | RegExp): PlotCard {
    return new PlotCard(this.page, this.card(name));
  }

  theme(theme: 'light' | 'dark' | 'as the system'): Promise<unknown> {
    return this.page.getByLabel('Light or dark').selectOption(theme);
  }
}
