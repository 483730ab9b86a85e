import { expect, type Locator, type Page } from 'playwright/test';

/** A theory on the page: its charge table, its checks, its formula. */
export class TheoryCard {
  readonly page: Page;
  readonly root: Locator;
  readonly rows: Locator;
  readonly checks: Locator;
  readonly pieces: Locator;

  constructor(page: Page, root: Locator) {
    this.page = page;
    this.root = root;
    this.rows = root.locator('tbody tr[data-multiplet]');
    this.checks = root.getByRole('list', { name: 'Checks' }).getByRole('listitem');
    this.pieces = root.locator('[data-piece]');
  }

  row(multiplet: string): Locator {
    return this.root.locator(`tr[data-multiplet="${multiplet}"]`);
  }

  async names(): Promise<readonly (string | null)[]> {
    return this.rows.evaluateAll((rows) => rows.map((row) => row.getAttribute('data-multiplet')));
  }

  cell(multiplet: string, column: string): Locator {
    return this.root.getByRole('button', { name: new RegExp(`^${multiplet}, ${column}:`) });
  }

  field(multiplet: string, column: string): Locator {
    return this.root.getByRole('textbox', { name: `${multiplet}, ${column}` });
  }

  async edit(multiplet: string, column: string, content: string): Promise<void> {
    await this.cell(multiplet, column).click();
    await this.field(multiplet, column).fill(content);
    await this.page.keyboard.press('Enter');
    await expect(this.field(multiplet, column)).toHaveCount(0);
  }

  /** Another group in the place of a column's. */
  async editGroup(column: string, group: string): Promise<void> {
    await this.root.getByRole('button', { name: `Group ${column}:` }).click();
    const field = this.root.getByRole('textbox', { name: `Group ${column}` });
    await field.fill(group);
    await this.page.keyboard.press('Enter');
    await expect(field).toHaveCount(0);
  }

  /** The formula's LaTeX as the typeset pieces carry it for assistive technology. */
  async formula(): Promise<string> {
    return (await this.pieces.locator('annotation').allTextContents()).join(' ');
  }

  form(name: 'all modes' | 'unpaired' | 'functions' | 'elementary'): Locator {
    return this.root.getByRole('radio', { name });
  }

  change(what: 'Copy' | 'Remove', multiplet: string): Locator {
    return this.root.getByRole('button', { name: `${what} ${multiplet}`, exact: true });
  }

  move(multiplet: string, to: 'up' | 'down'): Locator {
    return this.root.getByRole('button', { name: `Move ${multiplet} ${to}`, exact: true });
  }

  word(name: string | RegExp): Locator {
    return this.root.getByRole('button', { name });
  }
}
