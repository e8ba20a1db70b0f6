import { expect, type Page, test } from '@playwright/test';
import { enter } from './support/person';
import { expectSound, WIDTHS } from './support/screen';

test.use({ bypassCSP: true });
test.setTimeout(90_000);

const field = (page: Page) => page.getByRole('combobox', { name: 'Search everything' });
const chosen = (page: Page) => page.locator('[role="option"][aria-selected="true"]');
const answers = (page: Page) => page.getByRole('listbox', { name: 'What is found' });

/** A page that was opened listens by then. */
async function arrive(page: Page, address: RegExp): Promise<void> {
  await expect(page).toHaveURL(address);
  await page.waitForLoadState('networkidle');
}

async function search(page: Page, q: string): Promise<void> {
  await page.keyboard.press('Control+A');
  await page.keyboard.type(q);
}

test('anything is found and opened by keys alone', async ({ page, baseURL }) => {
  await enter(page, baseURL);
  await page.goto('/library', { waitUntil: 'networkidle' });

  await test.step('a section, however it is typed', async () => {
    await page.keyboard.press('/');
    await expect(field(page)).toBeFocused();
    for (const q of ['12x26', 'W12×26', 'w 12 x 26']) {
      await search(page, q);
      await expect(chosen(page)).toHaveAttribute('href', '/sections/american-wide-flange/W12x26');
    }
    await page.keyboard.press('Enter');
    await arrive(page, /\/sections\/american-wide-flange\/W12x26$/);
  });

  await test.step('a member by its mark, with Enter before the answer', async () => {
    await page.keyboard.press('Control+K');
    await page.keyboard.type('lf4');
    await page.keyboard.press('Enter');
    await arrive(page, /\/jobs\/Q-2417\/members\/LF4$/);
  });

  await test.step('a template by words with slips, by the arrows', async () => {
    await page.locator('main input').first().focus();
    await page.keyboard.press('Control+K');
    await search(page, 'propepd overhag');
    await expect(page.getByText('“propepd” read as “propped”')).toBeVisible();
    const first = await chosen(page).getAttribute('href');
    expect(first).toMatch(/^\/templates\/propped-cantilever-overhang/);
    await page.keyboard.press('ArrowDown');
    await expect(chosen(page)).not.toHaveAttribute('href', first ?? '');
    await expect(field(page)).toHaveAttribute('aria-activedescendant', /./);
    await page.keyboard.press('ArrowUp');
    await page.keyboard.press('Enter');
    await expect(page).toHaveURL(new RegExp(`${first}$`));
  });

  await test.step('a search made before, and a zone', async () => {
    await page.goto('/jobs', { waitUntil: 'networkidle' });
    await page.keyboard.press('/');
    await expect(answers(page).getByRole('option', { name: 'propepd overhag' })).toBeVisible();
    await page.keyboard.type('zone a');
    await expect(page.getByText(/^\d+ found/)).toBeVisible();
    await expect(answers(page).getByRole('option', { name: /Zone A Schedule of jobs/ })).toBeVisible();
    await page.keyboard.press('ArrowUp');
    await page.keyboard.press('Enter');
    await expect(page.locator('[data-zone="A"]')).toBeFocused();
  });

  await test.step('Esc gives the focus back', async () => {
    await page.keyboard.press('f');
    await expect(page.getByRole('searchbox', { name: 'Search jobs' })).toBeFocused();
    await page.keyboard.press('/');
    await expect(page.getByRole('searchbox', { name: 'Search jobs' })).toHaveValue('/');
    await page.keyboard.press('Control+K');
    await expect(field(page)).toBeFocused();
    await page.keyboard.press('Escape');
    await expect(page.getByRole('searchbox', { name: 'Search jobs' })).toBeFocused();
  });
});

test('what cannot be answered says so and can be tried again', async ({ page, baseURL }) => {
  await enter(page, baseURL);
  await page.goto('/jobs', { waitUntil: 'networkidle' });
  await page.keyboard.press('/');
  await page.keyboard.type('zzzqqq');
  await expect(page.getByText('Nothing has all of these words.')).toBeVisible();
  let isDown = true;
  await page.route('**/api/v1/search?*', (route) => (isDown ? route.abort() : route.continue()));
  await search(page, 'lf4');
  await expect(page.getByText('The search was not answered.')).toBeVisible();
  isDown = false;
  await page.keyboard.press('Enter');
  await expect(page).toHaveURL(/\/members\/LF4$/);
});

test('the dialog and its page are sound at every width', async ({ page, baseURL }) => {
  await enter(page, baseURL);
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 900 });
    await page.goto('/library', { waitUntil: 'networkidle' });
    await page.getByRole('link', { name: 'Search', exact: true }).click();
    await expect(answers(page).getByRole('option', { name: 'Help' })).toBeVisible();
    await expectSound(page, `search, nothing typed, ${width}`);
    await page.keyboard.type('two span');
    await expect(chosen(page)).toBeVisible();
    await expectSound(page, `search, ${width}`);
    for (const path of ['/search', '/search?q=two+span', '/search?q=zzzqqq']) {
      await page.goto(path, { waitUntil: 'networkidle' });
      await expectSound(page, `${path}, ${width}`);
    }
  }
});

test('without a script the page finds the same, in pages', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ javaScriptEnabled: false, ...(baseURL && { baseURL }) });
  const page = await context.newPage();
  await enter(page, baseURL);
  await page.goto('/jobs');
  await page.getByRole('link', { name: 'Search', exact: true }).click();
  await page.getByRole('searchbox', { name: 'Search everything' }).fill('ipe');
  await page.keyboard.press('Enter');
  await page.getByRole('link', { name: /^All \d+ sections$/ }).click();
  await expect(page.getByRole('link', { name: /^IPE 100/ })).toBeVisible();
  await page.getByRole('link', { name: 'Next', exact: true }).click();
  await expect(page.getByRole('link', { name: /^IPE 100/ })).toHaveCount(0);
  await expect(page.getByRole('link', { name: /^IPE/ }).first()).toBeVisible();
  await context.close();
});
