import { readFileSync } from 'node:fs';
import { expect, type Page, test } from '@playwright/test';
import { enter } from './support/person';

const LIBRARIAN = 'priyanka.velloor@quillmere.example';
const CHECKER = 'imogen.fairlocke@quillmere.example';
const ENGINEER = 'tomasz.brindle@quillmere.example';
const NAME = `Ottervane ${Date.now() % 1_000_000}`;
const SLUG = NAME.toLowerCase().replace(' ', '-');
const MARK = `OV${Date.now() % 100_000}`;
const OV_310 = 'OV 310×150×43';
const reviewOf = (edition: number) => `/library/section-table/${SLUG}/revisions/${edition}`;

test.describe.configure({ mode: 'serial' });
test.setTimeout(240_000);
test.use({ actionTimeout: 20_000 });

const block = (page: Page) => page.getByRole('region', { name: 'Title block' });
const main = (page: Page, name: string | RegExp) => block(page).getByRole('button', { name });
const problems = (page: Page) => page.locator('section.zone').filter({ hasText: 'Rows with problems' });
const open = (page: Page) => page.locator('[data-finding]');

/** What is pressed before the page's own script has come is not heard. */
const awake = (page: Page) => expect(page.locator('astro-island[ssr]')).toHaveCount(0, { timeout: 30_000 });

/** Brings a file and has it checked; `said` is what is not known of the supplier yet. */
async function bring(page: Page, file: { name: string; text: string }, said: () => Promise<void>) {
  await page.goto('/library');
  await page.getByRole('link', { name: /import a section table/i }).click();
  await page.getByLabel('File of a section table').setInputFiles({
    name: file.name,
    mimeType: 'text/csv',
    buffer: Buffer.from(file.text),
  });
  await expect(page).toHaveURL(/\/library\/imports\/[0-9a-f-]{36}$/, { timeout: 30_000 });
  await awake(page);
  await said();
  await main(page, 'Check the file').click();
  await expect(problems(page)).toBeVisible();
}

/** Waits until the check that a press has asked for is over. */
async function settled(page: Page, left: number) {
  await expect(open(page)).toHaveCount(left, { timeout: 30_000 });
}

async function saveDraft(page: Page, note: string) {
  await page.getByLabel('What is new in this edition, and why').fill(note);
  await page.getByLabel('Class of change').selectOption('improvement');
  await page.getByLabel('At stake').selectOption('safety');
  await main(page, 'Save as draft edition').click();
  await block(page).getByRole('link', { name: 'Send for review' }).click({ timeout: 60_000 });
  await main(page, 'Send to review').click();
  await expect(page.getByText('Sent to review.')).toBeVisible();
}

test('thirteen faults of a supplier’s file are put right, and a second person issues the edition', async ({
  page,
  browser,
  baseURL,
}) => {
  await enter(page, baseURL, LIBRARIAN);
  const text = readFileSync('tests/fixtures/ottervane-issue-7-faults.csv', 'utf8');

  await test.step('the file is recognised, and asked about', async () => {
    await bring(page, { name: 'ottervane-issue-7.csv', text }, async () => {
      await expect(page.getByText('semicolon')).toBeVisible();
      await expect(page.getByText('comma', { exact: true })).toBeVisible();
      await expect(page.getByText('4 wait for the axes')).toBeVisible();
      await expect(block(page).getByText('Say which letters the axes have.')).toBeVisible();
      await page.getByRole('radio', { name: /^EN/ }).check();
      await main(page, 'Check the file').click();
      await expect(page.getByText(/things are missing or wrong/)).toBeVisible();
      await page.getByLabel('Name of the table').fill(NAME);
      await page.getByLabel('Supplier').fill('Ottervane Section Works');
      await page.getByLabel('Standard').fill('Works standard');
      await page.getByLabel('Source document').fill('Catalogue, issue 7');
      await page.getByLabel('Day of the catalogue').fill('2026-11-02');
      await page.getByLabel('Licence note').fill('Kept by leave of the works.');
    });
  });

  await test.step('each fault has its line and its cause, and is put right by one press', async () => {
    await settled(page, 13);
    const press = async (cause: RegExp, name: string, left: number) => {
      await open(page).filter({ hasText: cause }).getByRole('button', { name }).click();
      await settled(page, left);
    };
    await press(/byte order mark/, 'Leave the mark out', 12);
    // Whoever works down the list is left where the next one stands.
    await expect(open(page).first()).toBeFocused();
    await press(/looks like dm⁶/, 'Read the column in dm⁶', 11);
    await press(/Keep one of the two/, 'Keep line 3', 10);
    await press(/decimals with a comma/, 'Read as 17,6', 9);
    await press(/looks like mm⁴/, 'Read the cell in mm⁴', 8);
    await press(/elastic and the plastic column/, 'Exchange the two cells', 7);
    await press(/another alphabet/, 'Read as', 6);
    await press(/looks like lb\/ft/, 'Read the cell in lb/ft', 5);
    await press(/axes look exchanged/, 'Exchange the two cells', 4);
    await press(/one column too far/, 'Move the cells back', 3);
    await press(/sums up other rows/, 'Leave out the row', 2);
  });

  await test.step('a value is looked up and typed; a reload loses nothing', async () => {
    const type = async (cause: RegExp, value: string, left: number) => {
      const item = open(page).filter({ hasText: cause });
      await item.getByRole('button', { name: 'Type another value' }).click();
      await item.getByRole('textbox').fill(value);
      await item.getByRole('button', { name: 'Put right' }).click();
      await settled(page, left);
    };
    await expect(main(page, 'Save as draft edition')).toHaveAttribute('aria-disabled', 'true');
    await type(/is a formula/, 'OVC 155×155×30', 1);
    await page.reload();
    await awake(page);
    await type(/value is missing|value of t_f/, '9,4', 0);
    await expect(page.getByText('nothing was found')).toBeVisible();
    await saveDraft(page, 'Issue 7 of the works.');
  });

  await test.step('the author cannot issue it, a checker does, with its report in view', async () => {
    await expect(main(page, 'Issue')).toHaveCount(0);
    const other = await browser.newPage();
    await enter(other, baseURL, CHECKER);
    await other.goto(reviewOf(1));
    await other.getByRole('link', { name: 'Report of its import' }).click();
    await expect(other.getByText('Read the column in dm⁶')).toBeVisible();
    await other.goto(reviewOf(1));
    await main(other, 'Issue').click();
    await expect(other.getByText('Issued. It can be used from now on.')).toBeVisible();
    await other.close();
  });
});

test('an engineer finds the section, and sees what edition 2 changes in a member of it', async ({
  page,
  browser,
  baseURL,
}) => {
  await enter(page, baseURL, ENGINEER);
  await test.step('found however it is typed', async () => {
    await page.goto(`/sections?table=${SLUG}&q=ov310`);
    await expect(page.getByRole('row', { name: /OV 310/ }).first()).toBeVisible();
  });
  const member = {
    mark: MARK,
    template: 'simple-span-uniform',
    parameters: { L: '6.6 m', w: { G: '12 kN/m' } },
    section: { designation: OV_310, table: SLUG, material: 's355' },
    criteria: 'steel-elastic-en',
  };
  const made = await page.request.post('/api/v1/jobs/Q-2417/members', {
    data: member,
    headers: { origin: new URL(baseURL ?? '').origin },
  });
  expect(made.status(), await made.text()).toBe(201);

  await test.step('the librarian’s next file is known, its difference is answered for', async () => {
    const desk = await browser.newPage();
    await enter(desk, baseURL, LIBRARIAN);
    const clean = readFileSync('tests/fixtures/ottervane-issue-7.csv', 'utf8');
    // A thicker flange: 11.5 for 11.2 mm; the properties by hand from the dimensions.
    const thicker = `${OV_310};308;150;6,9;11,5;12;43,5;55,4;9159;595;669;648;21,0;0,142`;
    const next = clean.replace(/^OV 310.*$/m, thicker);
    expect(next).not.toBe(clean);
    await bring(desk, { name: 'ottervane-issue-8.csv', text: next }, async () => {
      await desk.getByLabel('The next edition of').selectOption(SLUG);
      for (const [label, value] of [
        ['Supplier', 'Ottervane Section Works'],
        ['Standard', 'Works standard'],
        ['Source document', 'Catalogue, issue 8'],
        ['Day of the catalogue', '2026-11-30'],
        ['Licence note', 'Kept by leave of the works.'],
      ] as const)
        await desk.getByLabel(label).fill(value);
      const en = desk.getByRole('radio', { name: /^EN/ });
      if (await en.isVisible()) await en.check();
    });
    await expect(open(desk).filter({ hasText: /rows differ from the edition before/ })).toBeVisible({
      timeout: 30_000,
    });
    for (let left = await open(desk).count(); left > 0; left--) {
      const item = open(desk)
        .filter({ has: desk.getByRole('button', { name: 'Accept' }) })
        .first();
      if (!(await item.isVisible())) break;
      await item.getByRole('button', { name: 'Accept' }).click();
      await item.getByRole('textbox').fill('The works make a thicker flange.');
      await item.getByRole('button', { name: 'Accept with this reason' }).click();
      await expect(desk.getByText('Accepted by Priyanka Velloor').first()).toBeVisible();
    }
    await saveDraft(desk, 'Issue 8: a thicker flange.');
    await expect(desk.getByText('1 changed, 0 added, 0 withdrawn')).toBeVisible();
    await expect(desk.getByRole('row', { name: /OV 310.*1 member/ })).toBeVisible();
    await desk.close();
  });

  await test.step('the reviewer weighs it before issuing', async () => {
    const other = await browser.newPage();
    await enter(other, baseURL, CHECKER);
    await other.goto(reviewOf(2));
    await other.getByRole('button', { name: 'See what it changes' }).click();
    await expect(async () => {
      await other.goto(reviewOf(2));
      await expect(other.getByRole('row', { name: new RegExp(MARK) })).toBeVisible({ timeout: 2000 });
    }).toPass({ timeout: 60_000 });
    await main(other, 'Issue').click();
    await expect(other.getByText('Issued. It can be used from now on.')).toBeVisible();
    await other.close();
  });

  await test.step('the member keeps edition 1 until its owner looks and decides', async () => {
    await page.goto(`/jobs/Q-2417/members/${MARK}`);
    await awake(page);
    await page.getByRole('button', { name: 'What changes here' }).first().click();
    await expect(page.getByRole('button', { name: 'Upgrade to edition 2' })).toBeVisible({ timeout: 30_000 });
    await expect(page.getByRole('columnheader', { name: /edition 2/i })).toBeVisible();
  });
});
