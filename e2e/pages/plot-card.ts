import type { Download, Locator, Page } from 'playwright/test';

/** A plot on the page: drawing, sliders, and what can be taken out of it. */
export class PlotCard {
  readonly page: Page;
  readonly root: Locator;
  readonly drawing: Locator;
  readonly curves: Locator;
  readonly readout: Locator;

  constructor(page: Page, root: Locator) {
    this.page = page;
    this.root = root;
    this.drawing = root.getByRole('img').first();
    this.curves = root.locator('svg path[class*="curve"]');
    this.readout = root.getByRole('slider', { name: /^Read the/ });
  }

  slider(parameter: string): Locator {
    return this.root.locator(`input[type="range"][data-parameter="${parameter}"]`);
  }

  async path(): Promise<string> {
    return (await this.curves.first().getAttribute('d')) ?? '';
  }

  /** Presses a word that saves a file, and returns the file. */
  async take(ending: 'SVG' | 'PNG' | 'CSV'): Promise<Download> {
    const saved = this.page.waitForEvent('download');
    await this.root.getByRole('button', { name: new RegExp(`^${ending} of`) }).click();
    return saved;
  }
}
