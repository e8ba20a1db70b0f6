import { expect, type Page, test } from '@playwright/test';
import { ENGINEER, enter } from './support/person';
import { expectSound } from './support/screen';

const LIBRARIAN = 'priyanka.velloor@quillmere.example';
const JUNIOR = 'kofi.danesmoor@quillmere.example';
const SUPPLIER = `Wexcombe Yard ${Date.now() % 1_000_000}`;
const SLUG = SUPPLIER.toLowerCase().replaceAll(' ', '-');

/** Two that can be kept, one that no table has, one of a length that is none, one that is left out. */
const LIST = `Profil;Längen;Lieferzeit;Preisgruppe
IPE 300;6/12,5;3;B
HEA200;15,1;ab Lager;A
IPE 335;9;5;C
IPE 360;lang;5;C
XYZ 12;9;5;C
`;

test.describe.configure({ mode: 'serial' });
test.use({ actionTimeout: 20_000 });

const main = (page: Page, name: string) =>
  page.getByRole('region', { name: 'Title block' }).getByRole('button', { name });

/** What is pressed before the page's own script has come is not heard. */
const awake = (page: Page) => expect(page.locator('astro-island[ssr]')).toHaveCount(0, { timeout: 30_000 });

test('a librarian loads a supplier’s list: bad lines are put right or left out', async ({
  page,
  baseURL,
}) => {
  test.setTimeout(120_000);
  await enter(page, baseURL, LIBRARIAN);
  await page.goto('/library');
  await page.getByRole('link', { name: 'load a supplier’s stock' }).click();

  await test.step('a name that is missing is said at its field, and nothing typed is lost', async () => {
    await page.getByLabel('Note').fill('Ring before noon.');
    await main(page, 'Begin the list').click();
    await expect(page.getByText('Give the supplier’s name.')).toBeVisible();
    await expect(page.getByLabel('Note')).toHaveValue('Ring before noon.');
    await page.getByLabel('Supplier').fill(SUPPLIER);
    await main(page, 'Begin the list').click();
    await expect(page).toHaveURL(new RegExp(`/sections/stock/${SLUG}$`));
    await awake(page);
  });

  await test.step('each bad line stands with its value and the reason', async () => {
    await page.getByLabel('File of a stock list').setInputFiles({
      name: 'week-48.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from(LIST),
    });
    await expect(page.getByText('week-48.csv: 2 of 5 lines can be kept.')).toBeVisible();
    await expect(page.getByText('3 lines cannot be kept as they are.')).toBeVisible();
    await expect(page.getByLabel('Designation, line 4')).toHaveValue('IPE 335');
    await expect(page.getByLabel('Stock lengths, line 5')).toHaveValue('lang');
    await expectSound(page, 'a list with bad lines');
  });

  await test.step('put right, left out, kept', async () => {
    await page.getByRole('button', { name: 'IPE 330, European I sections' }).click();
    await page.getByLabel('Stock lengths, line 5').fill('6; 9,5');
    await page.getByRole('button', { name: 'Leave out line 6' }).click();
    await expect(page.getByText('week-48.csv: 4 of 4 lines can be kept, 1 left out.')).toBeVisible();
    await expect(page.getByText('Say the day that the supplier said it.')).toBeVisible();
    await page.getByLabel('This list is as of').fill(new Date().toISOString().slice(0, 10));
    await page.getByRole('button', { name: 'Keep 4 lines in place of 0' }).click();
    await expect(page.getByRole('row', { name: /^IPE 360 .* 6, 9\.5 m/ })).toBeVisible();
    await expect(page.getByRole('row', { name: /^HE 200 A .* off the shelf/ })).toBeVisible();
  });

  await test.step('a line is changed in its place, another removed', async () => {
    await page.getByRole('button', { name: 'Change IPE 300' }).click();
    await expect(page.getByLabel('Stock lengths, m')).toBeFocused();
    await page.keyboard.type('; 18; 700');
    await expect(page.getByText(/read as 700 m/)).toBeVisible();
    await page.getByLabel('Stock lengths, m').fill('12.5; 18');
    await page.keyboard.press('Enter');
    await expect(page.getByRole('row', { name: /^IPE 300 .* 12\.5, 18 m/ })).toBeVisible();
    await page.getByRole('button', { name: 'Remove IPE 360' }).click();
    await page.getByRole('button', { name: 'Take out IPE 360' }).click();
    await expect(page.getByRole('button', { name: 'Change IPE 360' })).toHaveCount(0);
    await page.setViewportSize({ width: 390, height: 800 });
    await expectSound(page, 'a stock list on a phone');
  });
});

test('a list that is older than 90 days says so wherever it is used', async ({ page, baseURL }) => {
  await enter(page, baseURL, JUNIOR);
  await page.goto('/sections/stock/marrowick-steel-stock');
  await expect(page.getByText(/^This list is \d{3} days old$/)).toBeVisible();
  await expect(page.getByRole('button', { name: 'Add a line' })).toHaveCount(0);
  await page.goto('/sections?supplier=marrowick-steel-stock');
  await expect(page.getByText(/^Marrowick Steel Stock: \d{3} days old$/)).toBeVisible();
});

test('a junior sees only what the supplier holds, and how soon', async ({ page, baseURL }) => {
  await enter(page, baseURL, JUNIOR);
  await page.goto('/sections');
  await awake(page);
  await page.getByLabel('Stock', { exact: true }).selectOption(SLUG);
  const grid = page.getByRole('grid');
  await expect(page).toHaveURL(new RegExp(`supplier=${SLUG}`));
  await expect(grid.getByText('IPE 300', { exact: true })).toBeVisible();
  await expect(grid.getByText('HE 200 A', { exact: true })).toBeVisible();
  await expect(grid.getByText('IPE 270', { exact: true })).toHaveCount(0);
  await page.goto('/sections/european-i/IPE%20300');
  const held = page.locator('section.zone').filter({ hasText: SUPPLIER });
  await expect(held).toContainText('12.5, 18 m');
  await expect(held).toContainText(/As of.*today/s);
  await page.goBack();
  await awake(page);
  await expect(page.getByLabel('Stock', { exact: true })).toHaveValue(SLUG);
  await expect(grid.getByText('IPE 330', { exact: true })).toBeVisible();
  await expect(grid.getByText('IPE 270', { exact: true })).toHaveCount(0);
});

test('a member is made of what is in stock', async ({ page, baseURL }) => {
  await enter(page, baseURL, ENGINEER.email);
  await page.goto('/jobs/Q-2417/members/LF2');
  await awake(page);
  const zone = page.locator('section.zone').filter({ has: page.getByLabel('Stock', { exact: true }) });
  await expect(zone.getByRole('row', { name: /^IPE 270/ })).toBeVisible();
  await page.getByLabel('Stock', { exact: true }).selectOption(SLUG);
  await expect(zone.getByRole('row', { name: /^IPE 270/ })).toHaveCount(0);
  await expect(
    zone.getByRole('row', { name: new RegExp(`^IPE 330.*${SUPPLIER}: 5 days · band C · 9 m`) }),
  ).toBeVisible();
  await zone.getByRole('button', { name: 'Use IPE 300' }).click();
  await expect(zone.getByRole('button', { name: 'IPE 300 is in use' })).toBeVisible();
});
