import { expect, type Page, test } from '@playwright/test';
import { typeOver } from './support/keys';
import { enter } from './support/person';
import { expectSound, WIDTHS } from './support/screen';

const LIBRARIAN = 'priyanka.velloor@quillmere.example';
const CHECKER = 'imogen.fairlocke@quillmere.example';
const STAMP = Date.now();
const SLUG = `combinations-of-the-journey-${STAMP}`;
const DRAFT = `/library/combination-set/${SLUG}/drafts/1`;
const REVIEW = `/library/combination-set/${SLUG}/revisions/1`;

test.describe.configure({ mode: 'serial' });
test.use({ actionTimeout: 20_000, bypassCSP: true });

const main = (page: Page, name: string) =>
  page.getByRole('region', { name: 'Title block' }).getByRole('button', { name });
const used = (page: Page, of = 'for the limit state') =>
  page.getByRole('region', { name: `Combinations as used, ${of}` });
const cell = (page: Page, name: string) => page.getByRole('textbox', { name, exact: true });
const isLive = (page: Page) => expect(page.locator('astro-island[ssr]')).toHaveCount(0, { timeout: 30_000 });
const isSaved = (page: Page) => expect(page.locator('[data-saving=saved]')).toBeVisible();

test('a librarian changes a ψ0, sees its combinations change, and somebody else issues it', async ({
  page,
  browser,
  baseURL,
}) => {
  test.setTimeout(180_000);
  await enter(page, baseURL, LIBRARIAN);

  await test.step('a set of its own, from the practice’s EN 1990', async () => {
    await page.goto('/library/combination-set/en-1990-6-10');
    await page.getByRole('link', { name: 'Another document from revision 1' }).click();
    await page.getByLabel('Address').fill(SLUG);
    await main(page, 'Begin the draft').click();
    await expect(page).toHaveURL((url) => url.pathname === DRAFT);
    await isLive(page);
    await page.getByLabel('Title', { exact: true }).fill('EN 1990 for the journey');
    await page.getByLabel('Reference').fill(`Journey ${STAMP % 100_000}`);
  });

  // Expression 6.10 by hand, offices 0.7, snow 0.5, wind 0.6: 1.5 · 0.7 = 1.05; with 0.5, 1.5 · 0.5 = 0.75.
  await test.step('ψ0 of offices, typed into its table, changes the combinations that it accompanies in', async () => {
    await expect(used(page).getByText('1.35 G + 1.05 Q + 1.5 S + 0.9 W', { exact: true })).toBeVisible();
    await cell(page, 'ψ0, imposed category 1').fill('0.5');
    await expect(used(page).getByText('1.35 G + 0.75 Q + 1.5 S + 0.9 W', { exact: true })).toBeVisible();
    await expect(used(page).getByText('1.35 G + 1.5 Q + 0.75 S + 0.9 W', { exact: true })).toBeVisible();
    await isSaved(page);
  });

  await test.step('a factor is typed through the table by keys, and one that is none has its fault', async () => {
    await cell(page, 'Factor of G, combination 1').focus();
    await page.keyboard.press('ArrowDown');
    await expect(cell(page, 'Factor of G, combination 2')).toBeFocused();
    await page.keyboard.press('ArrowRight');
    await expect(cell(page, 'Factor of Q, combination 2')).toBeFocused();
    await typeOver(page, '1.6 p');
    const said = page.getByRole('alert').getByText('Give a number, 1.5, or one that is reduced');
    await expect(said).toBeVisible();
    await expect(used(page).getByText('The factor of Q cannot be read yet.')).toBeVisible();
    await page.keyboard.press('Control+z');
    await expect(cell(page, 'Factor of Q, combination 2')).toHaveValue('1.5');
    await expect(said).toHaveCount(0);
  });

  await test.step('one partial factor is changed everywhere, and taken back', async () => {
    await page.getByText('Change a partial factor everywhere').click();
    await page.getByLabel('Group', { exact: true }).selectOption('Q');
    await page.getByLabel('To', { exact: true }).fill('1.6');
    await page.getByRole('button', { name: /^Change it in \d places$/ }).click();
    await expect(used(page).getByText('1.35 G + 0.8 Q + 1.5 S + 0.9 W', { exact: true })).toBeVisible();
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(used(page).getByText('1.35 G + 0.75 Q + 1.5 S + 0.9 W', { exact: true })).toBeVisible();
  });

  await test.step('it is sent to review', async () => {
    await page.getByLabel('What is new and why').fill('ψ0 of offices by our own survey.');
    await page.getByLabel('Class of change').selectOption('improvement');
    await page.getByLabel('What is at stake').selectOption('safety');
    await main(page, 'Send to review').click();
    await expect(page.getByText('Sent to review. Those who may review it are told.')).toBeVisible();
  });

  await test.step('a checker reads the combinations and issues it', async () => {
    const context = await browser.newContext(baseURL ? { baseURL } : {});
    const checker = await context.newPage();
    await enter(checker, baseURL, CHECKER);
    await checker.goto(REVIEW);
    await main(checker, 'Issue').click();
    await expect(checker.getByText('Issued. It can be used from now on.')).toBeVisible();
    await context.close();
  });
});

test('two librarians’ changes of different rows are both kept', async ({ page, browser, baseURL }) => {
  test.setTimeout(120_000);
  await enter(page, baseURL, LIBRARIAN);
  await page.goto(`/library/combination-set/${SLUG}`);
  await page.getByRole('button', { name: 'Begin a draft from revision 1' }).click();
  await expect(page).toHaveURL(/\/drafts\/2$/);
  await isLive(page);
  const context = await browser.newContext(baseURL ? { baseURL } : {});
  const other = await context.newPage();
  await enter(other, baseURL, LIBRARIAN);
  await other.goto(page.url());
  await isLive(other);
  await cell(page, 'ψ0, snow category 1').fill('0.6');
  await isSaved(page);
  await expect(page.locator('[data-saving=saved]')).toHaveText(/version 2$/);
  await cell(other, 'ψ0, wind category 1').fill('0.5');
  await expect(other.getByText(/Somebody else saved at .*: both changes are in\./)).toBeVisible();
  await expect(cell(other, 'ψ0, snow category 1')).toHaveValue('0.6');
  // 1.5 · 0.6 = 0.9 of snow and 1.5 · 0.5 = 0.75 of wind; before, 0.75 and 0.9.
  const line = used(other).getByRole('listitem').filter({ hasText: '1.35 G + 1.5 Q + 0.9 S + 0.75 W' });
  await expect(line).toContainText('was 1.35 G + 1.5 Q + 0.75 S + 0.9 W');

  await isSaved(other);
  await other.goto(`/library/combination-set/${SLUG}/revisions/2`);
  const changed = other.getByRole('table', { name: /^Combinations that come to something else/ });
  await expect(changed.getByRole('row', { name: /^6\.10, imposed leading 1\.35 G/ })).toContainText(
    '1.35 G + 1.5 Q + 0.9 S + 0.75 W',
  );
  const parts = other.getByRole('row', { name: /Wind › ψ₀/ });
  await expect(parts).toContainText('0.60.5');
  await context.close();
});

test('the form is sound at every width, by day and by night', async ({ page, baseURL }) => {
  test.setTimeout(120_000);
  await enter(page, baseURL, LIBRARIAN);
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 1000 });
    await page.goto(`/library/combination-set/${SLUG}/drafts/2`);
    await isLive(page);
    await page.getByRole('button', { name: 'More of combination 2', exact: true }).click();
    await expectSound(page, `combination set at ${width}`);
  }
});

test('a librarian writes a material set: values in their units, what cannot be, a pasted step', async ({
  page,
  baseURL,
}) => {
  test.setTimeout(120_000);
  const slug = `materials-of-the-journey-${STAMP}`;
  await enter(page, baseURL, LIBRARIAN);
  await page.goto(`/library/new?kind=material-set&from=${encodeURIComponent('en-10025-2004 1')}`);
  await page.getByLabel('Address').fill(slug);
  await main(page, 'Begin the draft').click();
  await expect(page).toHaveURL(/\/drafts\/1$/);
  await isLive(page);
  await page.getByLabel('Reference').fill(`Steel of ${STAMP % 100_000}`);

  await test.step('f_u below f_y is said at its field, and is gone when it is put right', async () => {
    const tensile = cell(page, 'Tensile strength f_u, S355, step 1');
    await expect(tensile).toHaveValue('470');
    await tensile.fill('354');
    await expect(page.getByRole('alert').getByText('not below the yield strength')).toBeVisible();
    await expect(tensile).toHaveAttribute('aria-invalid', 'true');
    await tensile.fill('68 ksi');
    await tensile.fill('470');
    await expect(page.getByText('None. It can be sent to review.')).toBeVisible();
  });

  await test.step('a steel pasted from a spreadsheet has a row of its own', async () => {
    const last = cell(page, 'Material, steel 4');
    await last.focus();
    await last.evaluate((field, text) => {
      const clipboardData = new DataTransfer();
      clipboardData.setData('text/plain', text);
      field.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
    }, 'S460N\ts460n\nS420N\ts420n\n');
    await expect(cell(page, 'Material, steel 5')).toHaveValue('S420N');
    await expect(cell(page, 'Modulus of elasticity E, steel 5')).toHaveValue('210000');
    await cell(page, 'Yield strength f_y, S420N, step 1').fill('420');
    await cell(page, 'Tensile strength f_u, S420N, step 1').fill('520');
    await expect(page.getByText('None. It can be sent to review.')).toBeVisible();
    await isSaved(page);
  });

  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 1000 });
    await page.goto(`/library/material-set/${slug}/drafts/1`);
    await isLive(page);
    await expect(cell(page, 'Yield strength f_y, S420N, step 1')).toHaveValue('420');
    await page.getByRole('button', { name: 'More of steel 2', exact: true }).click();
    await expectSound(page, `material set at ${width}`);
  }
});

test('a librarian writes criteria: against which combinations, over what, at most how much', async ({
  page,
  baseURL,
}) => {
  test.setTimeout(120_000);
  const slug = `criteria-of-the-journey-${STAMP}`;
  await enter(page, baseURL, LIBRARIAN);
  await page.goto(`/library/new?kind=criteria&from=${encodeURIComponent('steel-elastic-en 1')}`);
  await page.getByLabel('Address').fill(slug);
  await main(page, 'Begin the draft').click();
  await expect(page).toHaveURL(/\/drafts\/1$/);
  await isLive(page);
  await page.getByLabel('Reference').fill(`Limits of ${STAMP % 100_000}`);
  const limits = page.getByRole('region', { name: 'Limits of deflection as used' });

  await test.step('the set is chosen among the issued ones, and what it does not have is said at its limit', async () => {
    const set = page.getByLabel('Combination set', { exact: true });
    const strength = await set.locator('option', { hasText: 'ASCE 7-16, strength' }).getAttribute('value');
    const eurocode = await set.inputValue();
    await set.selectOption(strength);
    await expect(page.getByRole('alert').getByText('has no service combination').first()).toBeVisible();
    await expect(limits.getByText('The set has no such combination.').first()).toBeVisible();
    await set.selectOption(eurocode);
    await expect(page.getByText('None. It can be sent to review.')).toBeVisible();
  });

  // Characteristic, imposed leading, without G: Q + ψ0 S, of snow 0.5.
  await test.step('a limit is typed with its cap, and stands beside the form in numbers', async () => {
    await cell(page, 'Span over, limit 1').fill('480');
    await cell(page, 'At most, limit 1').fill('1 in');
    await cell(page, 'Span over, limit 2').focus();
    await expect(cell(page, 'At most, limit 1')).toHaveValue('25.4');
    await expect(limits.getByText('L/480, a/180 of overhangs')).toBeVisible();
    await expect(limits.getByText('Q + 0.5 S', { exact: true }).first()).toBeVisible();
    await isSaved(page);
  });

  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 1000 });
    await page.goto(`/library/criteria/${slug}/drafts/1`);
    await isLive(page);
    await expect(cell(page, 'At most, limit 1')).toHaveValue('25.4');
    await page.getByRole('button', { name: 'More of limit 2', exact: true }).click();
    await expectSound(page, `criteria at ${width}`);
  }
});
