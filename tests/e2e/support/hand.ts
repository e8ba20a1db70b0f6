import type { Locator, Page } from '@playwright/test';

/** Somebody's hand at a page: every press, filled field, choice and key is one interaction, and there are only so many. */
export class Hand {
  count = 0;
  constructor(
    readonly page: Page,
    readonly most: number,
  ) {}

  async press(what: Locator): Promise<void> {
    this.one(`press ${what}`);
    await what.click();
  }

  async fill(field: Locator, text: string): Promise<void> {
    this.one(`fill ${field}`);
    await field.fill(text);
  }

  async choose(field: Locator, option: string): Promise<void> {
    this.one(`choose in ${field}`);
    await field.selectOption(option);
  }

  async key(name: string): Promise<void> {
    this.one(`the key ${name}`);
    await this.page.keyboard.press(name);
  }

  private one(what: string): void {
    this.count++;
    if (this.count > this.most) throw new Error(`More than ${this.most} interactions: ${what}`);
  }
}
