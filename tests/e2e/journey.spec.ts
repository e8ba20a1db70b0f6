import { expect, type Page, test } from '@playwright/test';
import { ENGINEER } from './support/person';

async function signIn(page: Page): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(ENGINEER.email);
  await page.getByLabel('Password').fill(ENGINEER.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('heading', { name: 'Templates', level: 1 })).toBeVisible();
}

/** R_prop = 3wL/8 + wa + 3wa²/4L, kN: superposition by the force method, jobmap case 25, derived by hand. */
const propReaction = (L: number, a: number, w: number) => (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L);

test('from the catalogue to a calc sheet: a propped cantilever with an overhang', async ({ page }) => {
  await signIn(page);

  await test.step('a search with a typing error finds the template', async () => {
    await page.getByRole('searchbox').fill('proped cantilver overhang unifrm');
    await page
      .getByRole('link', { name: 'Propped cantilever with overhang, uniform load on all' })
      .first()
      .click();
    await expect(page).toHaveURL(/\/templates\/propped-cantilever-overhang-uniform/);
  });

  await test.step('dragging the overhang redraws the reactions', async () => {
    const handle = page.getByRole('slider', { name: 'Overhang, range' });
    await handle.scrollIntoViewIfNeeded();
    const before = await page.getByRole('textbox', { name: /^a ?Overhang/ }).inputValue();
    const box = await handle.boundingBox();
    if (!box) throw new Error('the overhang has no handle');
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width / 2 + 20, box.y + box.height / 2, { steps: 5 });
    await page.mouse.up();
    await expect(page.getByRole('textbox', { name: /^a ?Overhang/ })).not.toHaveValue(before);
  });

  await test.step('a typed overhang gives the reaction of the closed form', async () => {
    await page.getByRole('textbox', { name: /^a ?Overhang/ }).fill('2,4');
    await page.getByRole('textbox', { name: /^L ?Span/ }).fill('23\'-7 1/2"');
    const L = (23 * 12 + 7.5) * 0.0254;
    await expect(page.locator('svg.drawing').first()).toContainText(
      `${propReaction(L, 2.4, 10).toFixed(1)} kN`,
    );
  });

  await test.step('it is used in a job', async () => {
    await page
      .getByRole('link', { name: /Use in a job/ })
      .first()
      .click();
    await page
      .getByLabel('Job', { exact: true })
      .selectOption({ label: 'Q-2417 Larkfold School hall extension' });
    await page.getByLabel('Mark').fill(`J${Date.now() % 100000}`);
    await page.getByRole('textbox', { name: 'Title' }).fill('Canopy over the side door');
    await page.getByLabel('Checked by').selectOption({ index: 1 });
    await page.getByRole('button', { name: 'Place it in the job' }).click();
    await expect(page.getByRole('heading', { name: 'Canopy over the side door', level: 1 })).toBeVisible();
    await expect(page.getByText('evaluated by the server')).toBeVisible();
    await expect(page.getByText('Changed here, not saved yet.')).toHaveCount(0);
  });

  await test.step('a section is chosen by depth and mass', async () => {
    await page.getByLabel('Depth at most, mm').fill('310');
    await page.getByLabel('Mass at most, kg/m').fill('45');
    await page.getByLabel('Designation').fill('ipe300');
    const row = page.getByRole('row', { name: /IPE 300/ });
    await row.getByRole('button', { name: /Use/ }).click();
    await page.getByText('Change the basis').click();
    await page.getByLabel('Material').selectOption({ label: 'S355' });
    await expect(page.getByText('Bending stress').first()).toBeVisible();
  });

  await test.step('the server evaluates and keeps it', async () => {
    await page.getByRole('button', { name: /^Save/ }).first().click();
    await expect(page.getByText(/evaluated by the server/)).toBeVisible();
  });

  await test.step('the sheet carries a title block on every page', async () => {
    await page.getByRole('link', { name: 'Calc sheet' }).first().click();
    await expect(page.getByText('Draft, not checked').first()).toBeVisible();
    await expect(page.getByText('Canopy over the side door').first()).toBeVisible();
  });
});
