import { expect, type Page, test } from '@playwright/test';
import { enter } from './support/person';

/** The demo's hall canopy: a propped cantilever with overhang, with a section and criteria. */
const SHEET = '/jobs/Q-2417/members/LF4/sheet';
const PAPERS = [
  { paper: 'a4', width: 595, height: 842 },
  { paper: 'letter', width: 612, height: 792 },
] as const;

test.beforeEach(({ page, baseURL }) => enter(page, baseURL));

async function openSheet(page: Page, paper: string): Promise<number> {
  await page.goto(`${SHEET}?paper=${paper}`);
  await page.locator('[data-paged="done"]').waitFor();
  return page.locator('.cs-page').count();
}

for (const { paper, width, height } of PAPERS) {
  test(`prints on ${paper} as many pages as it counts`, async ({ page }) => {
    const count = await openSheet(page, paper);
    expect(count).toBeGreaterThan(2);
    const pdf = (await page.pdf({ preferCSSPageSize: true, printBackground: true })).toString('latin1');
    expect(pdf.match(/\/Type\s*\/Page\b/g)?.length).toBe(count);
    const [, w, h] = /\/MediaBox\s*\[0 0 ([\d.]+) ([\d.]+)\]/.exec(pdf) ?? [];
    expect([Math.round(Number(w)), Math.round(Number(h))]).toEqual([width, height]);
  });

  test(`has its title block and watermark on every page of ${paper}, and nothing outside`, async ({
    page,
  }) => {
    const count = await openSheet(page, paper);
    for (let index = 0; index < count; index++) {
      const sheet = page.locator('.cs-page').nth(index);
      const block = sheet.locator('[data-sheet-block]');
      await expect(block).toContainText(`${index + 1} of ${count}`);
      await expect(block).toContainText('Q-2417');
      await expect(block).toContainText('Hall canopy');
      await expect(block).toContainText(/Verification code [0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}/);
      await expect(block).toContainText(/Printed \d.*\d\d:\d\d [A-Z]/);
      await expect(sheet.locator('.cs-watermark')).toContainText('Draft, not checked');
      const spare = await sheet
        .locator('[data-sheet-rows]')
        .evaluate((body) => body.clientHeight - body.scrollHeight);
      expect(spare).toBeGreaterThanOrEqual(0);
      expect(await sheet.locator('.cs-row[data-leads]:last-child').count()).toBe(0);
    }
  });
}

test('keeps its tables’ heads, and signs at the end', async ({ page }) => {
  await openSheet(page, 'a4');
  for (const table of await page.locator('.cs-row table').all())
    await expect(table.locator('thead')).toHaveCount(1);
  await expect(page.locator('.cs-page').last()).toContainText('not signed');
  await expect(page.locator('.cs-signatures')).toHaveCount(1);
});

test('fits a phone', async ({ page }) => {
  await page.setViewportSize({ width: 390, height: 844 });
  await openSheet(page, 'a4');
  await expect(page.getByRole('button', { name: 'Print' })).toBeVisible();
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
});
