import { expect, type Page, test } from '@playwright/test';
import { tabTo } from './support/keys';
import { enter } from './support/person';
import { expectSound } from './support/screen';

test.use({ bypassCSP: true, permissions: ['clipboard-read', 'clipboard-write'] });
test.setTimeout(120_000);

const COLUMNS = '/api/v1/me/section-columns';
const SEARCHES = '/api/v1/sections/searches';

/** The demo's engineer with the usual columns and nothing saved, whatever an earlier run left. */
async function begin(page: Page, baseURL: string | undefined): Promise<void> {
  await enter(page, baseURL);
  const headers = { origin: new URL(baseURL ?? '').origin };
  await page.request.put(COLUMNS, { data: { columns: null }, headers });
  const { items } = await (await page.request.get(SEARCHES)).json();
  for (const { id, mine } of items) if (mine) await page.request.delete(`${SEARCHES}/${id}`, { headers });
}

const head = (page: Page, name: RegExp) => page.getByRole('grid').getByRole('columnheader', { name });
const said = (page: Page) => page.getByRole('status').filter({ hasText: /of \d+ meet every range/ });
/** The page is alive once every row is read. */
const ready = (page: Page) => expect(page.getByText('Reading the tables')).toHaveCount(0);

test('a property is added, bounded, refused and taken out, by keys', async ({ page, baseURL }) => {
  await begin(page, baseURL);
  await page.goto('/sections?shape=i', { waitUntil: 'networkidle' });
  await ready(page);
  const focus = page.locator(':focus');
  const before = await said(page).textContent();

  await tabTo(page, /^Property to add$/);
  await page.keyboard.type('warping');
  await tabTo(page, /^Add$/);
  await page.keyboard.press('Enter');
  await expect(focus).toHaveAccessibleName('warping constant, least, dm⁶');
  await page.keyboard.type('1');
  await page.keyboard.press('Tab');
  await page.keyboard.type('two');
  await page.keyboard.press('Tab');
  await expect(page.getByRole('alert')).toContainText('warping constant, greatest: give a number');
  await expect(page.getByLabel('warping constant, greatest')).toHaveValue('two');
  await page.getByLabel('warping constant, greatest').fill('0.5');
  await expect(page.getByRole('alert')).toContainText('The least is above the greatest');
  await page.getByLabel('warping constant, greatest').fill('2,5');
  // 1 dm⁶ is 10⁶ cm⁶
  await expect(page).toHaveURL(/iw_min=1000000&iw_max=2500000/);
  await expect(page.getByRole('alert')).toHaveCount(0);
  await expect(said(page)).not.toHaveText(before ?? '');
  const shown = await page.getByRole('grid').locator('td:nth-last-child(2)').allTextContents();
  const warping = shown.map(Number).filter(Number.isFinite);
  expect(warping.length).toBeGreaterThan(0);
  expect(warping.every((value) => value >= 1 && value <= 2.5)).toBe(true);

  await page.reload({ waitUntil: 'networkidle' });
  await expect(page.getByLabel('warping constant, greatest')).toHaveValue('2.5');
  await page.getByRole('button', { name: 'Remove warping constant' }).click();
  await expect(focus).toHaveAccessibleName('Property to add');
  await expect(page).toHaveURL(/\?shape=i$/);
  await expect(said(page)).toHaveText(before ?? '');
});

test('columns are chosen, moved, copied, shared and kept', async ({ page, baseURL }) => {
  await begin(page, baseURL);
  await page.goto('/sections?q=w12x26', { waitUntil: 'networkidle' });
  await ready(page);
  await page.getByRole('button', { name: 'Columns' }).click();
  for (const name of ['width', 'web or wall', 'flange', 'root or corner radius', 'area'])
    await page.getByRole('checkbox', { name }).uncheck();
  await page.getByRole('button', { name: 'Move torsion constant earlier' }).press('Enter');
  await expect(page.locator(':focus')).toHaveAccessibleName('Move torsion constant earlier');
  await expect(head(page, /^b ?mm/)).toHaveCount(0);
  await expect(page).toHaveURL(/columns=mass\+depth\+i_major\+i_minor\+w_el\+w_pl\+r_major\+j\+r_minor\+iw/);
  await page.keyboard.press('Escape');
  await expect(page.locator(':focus')).toHaveAccessibleName('Columns');

  await page.getByRole('button', { name: 'Copy as CSV' }).click();
  await expect(page.getByText(/rows? (is|are) copied as CSV/)).toBeVisible();
  const [first] = (await page.evaluate(() => navigator.clipboard.readText())).split('\r\n');
  expect(first).toMatch(/^designation,table,edition,mass \(kg\/m\),depth \(mm\),"second moment, major axis/);
  expect(first).not.toContain('width');

  await expect.poll(async () => (await (await page.request.get(COLUMNS)).json()).columns?.length).toBe(10);
  await page.goto('/sections?q=w12x30', { waitUntil: 'networkidle' });
  await expect(head(page, /^b ?mm/)).toHaveCount(0);
  await page.goto('/sections?q=w12x30&columns=width+mass', { waitUntil: 'networkidle' });
  await expect(page.getByRole('grid').getByRole('columnheader')).toHaveCount(5);
  await ready(page);
  await page.getByRole('button', { name: 'Columns' }).click();
  await page.getByRole('button', { name: 'The usual columns' }).click();
  await expect(page).toHaveURL(/\?q=w12x30$/);
  await expect(page.getByRole('grid').getByRole('columnheader')).toHaveCount(18);
});

test('the pin and the name stay where a wide table is scrolled sideways', async ({ page, baseURL }) => {
  await begin(page, baseURL);
  await page.setViewportSize({ width: 800, height: 900 });
  const all = 'mass+depth+width+tw+tf+r+area+i_major+i_minor+w_el+w_pl+r_major+r_minor+iw+j';
  await page.goto(`/sections?sort=-i_major&columns=${all}`, { waitUntil: 'networkidle' });
  await ready(page);
  const scroller = page.locator('.section-scroll');
  const name = page.getByRole('grid').getByRole('rowheader').first();
  const before = await name.boundingBox();
  await scroller.evaluate((element) => {
    element.scrollLeft = element.scrollWidth;
  });
  expect(await scroller.evaluate((element) => element.scrollLeft)).toBeGreaterThan(60);
  const [pin, after] = [
    await page.getByRole('button', { name: /^Pin / }).first().boundingBox(),
    await name.boundingBox(),
  ];
  expect(Math.abs((after?.x ?? 0) - (before?.x ?? 0))).toBeLessThan(8);
  expect((pin?.x ?? 0) + (pin?.width ?? 0)).toBeLessThanOrEqual(after?.x ?? 0);
  const onTop = await page.evaluate(
    ([x = 0, y = 0]) => document.elementFromPoint(x, y)?.className,
    [(pin?.x ?? 0) + 10, (pin?.y ?? 0) + 10],
  );
  expect(onTop).toBe('pin');
});

test('a search is saved, opened, renamed, replaced, deleted and taken back', async ({ page, baseURL }) => {
  await begin(page, baseURL);
  const asked = '?shape=i&depth_max=310&w_pl_min=400';
  await page.goto('/sections', { waitUntil: 'networkidle' });
  await ready(page);
  const saveButton = page.getByRole('button', { name: 'Save this search' });
  const list = page.getByRole('list', { name: 'Saved searches' });
  const field = page.getByRole('textbox', { name: 'Name' });
  await saveButton.click();
  await expect(page.getByText('Nothing is asked yet.')).toBeVisible();
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: /^Saved \(\d+\)/ }).click();
  await expect(page.getByText('No search is saved yet.').or(list)).toBeVisible();

  await page.goto(`/sections${asked}`, { waitUntil: 'networkidle' });
  await ready(page);
  await saveButton.press('Enter');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('alert')).toContainText('Give the search a name.');
  await page.keyboard.type('Shallow floor');
  await page.keyboard.press('Enter');
  const link = list.getByRole('link', { name: 'Shallow floor' });
  await expect(link).toHaveAttribute('href', `/sections${asked}`);
  await expect(link).toHaveAttribute('aria-current', 'true');

  await page.getByRole('textbox', { name: 'Greatest depth' }).fill('260');
  await expect(link).not.toHaveAttribute('aria-current', 'true');
  await saveButton.click();
  await field.fill('SHALLOW floor');
  await field.press('Enter');
  await expect(page.getByRole('alert')).toContainText('You have a search called “Shallow floor” already.');
  await expect(field).toHaveValue('SHALLOW floor');
  await page.getByRole('button', { name: 'Replace it' }).click();
  await expect(link).toHaveAttribute('href', /depth_max=260/);

  await page.getByRole('button', { name: 'Clear all' }).first().click();
  await expect(page).toHaveURL(/\/sections$/);
  await link.click();
  await expect(page).toHaveURL(/depth_max=260/);
  await expect(page.getByRole('textbox', { name: 'Greatest depth' })).toHaveValue('260');

  await list.getByRole('button', { name: 'Rename Shallow floor' }).click();
  await page.keyboard.press('Control+A');
  await page.keyboard.type('Thin floor');
  await page.keyboard.press('Enter');
  const renamed = list.getByRole('link', { name: 'Thin floor' });
  await expect(renamed).toBeVisible();
  await list.getByRole('button', { name: 'Share Thin floor with the practice' }).click();
  await expect(list).toContainText('shared by you');

  await list.getByRole('button', { name: 'Delete Thin floor' }).click();
  await expect(page.locator(':focus')).toHaveAccessibleName('Take it back');
  await page.keyboard.press('Enter');
  await expect(page.locator(':focus')).toHaveAccessibleName('Thin floor');
  await page.reload({ waitUntil: 'networkidle' });
  await page.getByRole('button', { name: /^Saved \(\d+\)/ }).click();
  await expect(renamed).toBeVisible();
});

test('what is like a section is asked by its keys, and compared', async ({ page, baseURL }) => {
  await begin(page, baseURL);
  await page.goto('/sections?q=w12x26', { waitUntil: 'networkidle' });
  await ready(page);
  await page.getByRole('grid').focus();
  await page.keyboard.press('p');
  await page.keyboard.press('d');
  // W12x26 is 12.2 in deep: 5 % about it is 294.4 to 325.4 mm
  await expect(page).toHaveURL(/shape=i&sort=mass&depth_min=294&depth_max=326&pin=/);
  const chosen = page.getByRole('row', { selected: true });
  await expect(chosen).toContainText('W12×26');
  await expect(chosen).toBeInViewport();

  await page.keyboard.press('l');
  await expect(page).toHaveURL(/i_major_min=8[45]\d\d/);
  await expect(page).toHaveURL(/w_pl_min=6[01]\d/);
  const masses = await page.getByRole('grid').locator('tbody td:nth-child(3)').allTextContents();
  const numbers = masses.map(Number).filter(Number.isFinite);
  expect(numbers).toEqual([...numbers].sort((a, b) => a - b));

  const links = page.getByRole('list', { name: 'From the chosen section' }).getByRole('link');
  await expect(links).toHaveCount(2);
  await expect(links.first()).toHaveAttribute('href', /^\/sections\?shape=i&sort=mass/);

  await page.getByRole('grid').focus();
  for (let i = 0; i < 3; i++) {
    await page.keyboard.press('ArrowDown');
    await page.keyboard.press('p');
  }
  await expect(page.getByRole('heading', { name: 'Compared with 1' })).toBeVisible();
  const compared = page.locator('section', { hasText: 'Compared with 1' }).getByRole('columnheader');
  await expect(compared).toHaveCount(5);
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('p');
  await expect(page.getByText('4 sections are compared at most. Unpin one first.')).toBeVisible();
});

test('what is open is sound at every width', async ({ page, baseURL }) => {
  await begin(page, baseURL);
  const headers = { origin: new URL(baseURL ?? '').origin };
  await page.request.post(SEARCHES, {
    data: { name: 'Sound', query: '?shape=i' },
    headers,
  });
  for (const width of [1440, 1024, 390]) {
    await page.setViewportSize({ width, height: 900 });
    await page.goto('/sections?shape=i&r_minor_min=9&r_minor_max=4&iw_min=1', { waitUntil: 'networkidle' });
    await ready(page);
    await page.getByRole('button', { name: /^Saved \(\d+\)/ }).click();
    await expectSound(page, `a property and the saved searches, ${width}`);
    await page.goto('/sections?shape=i&columns=mass+j', { waitUntil: 'networkidle' });
    await ready(page);
    await page.getByRole('button', { name: 'Columns' }).click();
    await page.getByRole('button', { name: 'Save this search' }).click();
    await expectSound(page, `the columns and a name, ${width}`);
  }
});
