import { expect, type Page, test } from '@playwright/test';
import { tabTo } from './support/keys';
import { enter } from './support/person';
import { expectSound } from './support/screen';

test.use({ bypassCSP: true });
test.setTimeout(90_000);

const panel = (page: Page) => page.getByRole('dialog', { name: 'Where this number comes from' });
const chosen = (page: Page) => panel(page).getByRole('treeitem', { selected: true });

async function press(page: Page, ...keys: readonly string[]): Promise<void> {
  for (const key of keys) await page.keyboard.press(key);
}

test('a reaction on the drawing opens down to the field that it comes from', async ({ page, baseURL }) => {
  await enter(page, baseURL);
  await page.goto('/templates/propped-cantilever-overhang-uniform', { waitUntil: 'networkidle' });
  const reaction = page.getByRole('button', { name: /^RB .*where this number comes from/ });
  await reaction.click();
  await expect(chosen(page)).toContainText('Reaction at B, a redundant');
  await expect(panel(page).locator('.katex').first()).toBeVisible();
  await panel(page)
    .getByRole('treeitem', { name: /Deflection at B of the released beam/ })
    .click();
  await expect(panel(page).getByText(/Steel Construction Manual .* case 19 \(from memory\)/)).toBeVisible();
  await press(page, 'Escape');
  await expect(panel(page)).toHaveCount(0);
  await expect(reaction).toBeFocused();

  await reaction.press('Enter');
  await press(page, 'ArrowDown', 'ArrowRight', 'ArrowDown');
  await expect(chosen(page)).toContainText(/Uniform load, G.*10 kN\/m/);
  await panel(page).getByRole('button', { name: 'Go to its field' }).click();
  await expect(panel(page)).toHaveCount(0);
  await expect(page.locator('[data-symbol="w"] input').first()).toBeFocused();
});

test('a check of a member opens by keys alone, down to its combination, section and clause', async ({
  page,
  baseURL,
}) => {
  await enter(page, baseURL);
  await page.goto('/jobs/Q-2417/members/LF3', { waitUntil: 'networkidle' });
  const bending = page.getByRole('row', { name: /Bending stress/ });
  // The table of checks is one stop; the arrow keys go on from there.
  await tabTo(page, /^13\.2$/);
  await press(page, 'ArrowDown', 'ArrowDown', 'End');
  await expect(bending.locator('button:focus')).toHaveCount(1);
  await press(page, 'Enter');
  await expect(chosen(page)).toContainText('Utilisation: Bending stress');
  await press(
    page,
    'ArrowDown',
    'ArrowRight',
    'ArrowDown',
    'ArrowRight',
    'ArrowDown',
    'ArrowRight',
    'ArrowDown',
  );
  await expect(chosen(page)).toContainText(/Factor of G, permanent/);
  await expect(
    panel(page)
      .getByText(/EN 1990 expression 6\.10 .*\(from memory\)/)
      .first(),
  ).toBeVisible();
  await panel(page)
    .getByRole('treeitem', { name: /Elastic modulus, major axis/ })
    .click();
  await expect(panel(page).getByRole('link', { name: 'Open the section' })).toHaveAttribute(
    'href',
    '/sections/european-i/IPE%20330?edition=1',
  );
  await press(page, 'Escape');
  await expect(bending.locator('button:focus')).toHaveCount(1);
});

test('the panel is sound on a phone and on a desk, by day and by night', async ({ page, baseURL }) => {
  await enter(page, baseURL);
  for (const width of [1440, 390]) {
    await page.setViewportSize({ width, height: 844 });
    await page.goto('/jobs/Q-2417/members/LF3', { waitUntil: 'networkidle' });
    await page
      .getByRole('row', { name: /Shear stress/ })
      .locator('button')
      .last()
      .click();
    await expect(chosen(page)).toBeVisible();
    await press(page, 'ArrowDown', 'ArrowRight', 'ArrowDown');
    await expectSound(page, String(width));
  }
});
