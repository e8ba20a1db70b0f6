import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { expect, type Page } from '@playwright/test';
import type { AxeResults } from 'axe-core';

/** Read whole and put into the page; the content policy is bypassed where it is used. */
const AXE = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

export const WIDTHS = [1440, 1024, 390];
/** A theme changes colours alone: by night nothing but contrast is looked at again. */
const SCHEMES = [
  { colorScheme: 'light', options: {} },
  { colorScheme: 'dark', options: { runOnly: ['color-contrast'] } },
] as const;

/** Nothing serious for assistive technology by day or by night, and nothing beside the page. */
export async function expectSound(page: Page, said: string): Promise<void> {
  const beside = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(beside, `overflow, ${said}`).toBeLessThanOrEqual(0);
  await page.evaluate(AXE);
  for (const { colorScheme, options } of SCHEMES) {
    await page.emulateMedia({ colorScheme });
    const found = await page.evaluate(async (chosen) => {
      const { axe } = window as unknown as { axe: { run: (options: object) => Promise<AxeResults> } };
      const { violations } = await axe.run(chosen);
      return violations
        .filter(({ impact }) => impact === 'serious' || impact === 'critical')
        .map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`);
    }, options);
    expect(found, `${said}, ${colorScheme}`).toEqual([]);
  }
}
