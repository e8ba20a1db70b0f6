import { expect, type Page, test } from '@playwright/test';
import { enter } from './support/person';

const LIBRARIAN = 'priyanka.velloor@quillmere.example';
const CHECKER = 'imogen.fairlocke@quillmere.example';
const SLUG = `span-of-the-journey-${Date.now()}`;
const MARK = `LJ${Date.now() % 100_000}`;
const DRAFT = `/library/template/${SLUG}/drafts/1?as=text`;
const REVIEW = `/library/template/${SLUG}/revisions/1`;

test.describe.configure({ mode: 'serial' });

const textOf = (page: Page) => page.getByLabel('Template as JSON');
const main = (page: Page, name: string) =>
  page.getByRole('region', { name: 'Title block' }).getByRole('button', { name });

test('a draft made from an issued template is written, proven, reviewed and issued by somebody else', async ({
  page,
  browser,
  baseURL,
}) => {
  test.setTimeout(180_000);
  await enter(page, baseURL, LIBRARIAN);

  await test.step('begun from a revision, at an address of its own', async () => {
    await page.goto('/library/template/simple-span-uniform');
    await page.getByRole('link', { name: 'Another document from revision 1' }).click();
    await page.getByLabel('Address').fill('Not an address');
    await main(page, 'Begin the draft').click();
    await expect(page.getByText('cannot be part of an address')).toBeVisible();
    await expect(page.getByLabel('Address')).toHaveValue('Not an address');
    await page.getByLabel('Address').fill(SLUG);
    await main(page, 'Begin the draft').click();
    await page.getByRole('link', { name: 'As text' }).click();
    await expect(page).toHaveURL((url) => `${url.pathname}${url.search}` === DRAFT);
  });

  await test.step('what is no JSON is refused and not lost; a fault has its line', async () => {
    const whole = await textOf(page).inputValue();
    await textOf(page).fill('{"name": ');
    await main(page, 'Save').click();
    await expect(page.getByText('Not saved. This is not JSON')).toBeVisible();
    await expect(textOf(page)).toHaveValue('{"name": ');
    await textOf(page).fill(whole.replace('"arrangement": "simple-span"', '"arrangement": "no such thing"'));
    await main(page, 'Save').click();
    await expect(page.getByText('Saved as version 2.')).toBeVisible();
    await page.getByRole('link', { name: /^Line \d+ \/arrangement/ }).click();
    await expect(textOf(page)).toBeFocused();
    const chosen = await textOf(page).evaluate((area: HTMLTextAreaElement) =>
      area.value.slice(area.selectionStart, area.selectionEnd),
    );
    expect(chosen).toContain('no such thing');
    await textOf(page).fill(whole.replace(/"name": "Simple span[^"]*"/, '"name": "Span of the journey"'));
    await main(page, 'Save').click();
    await expect(page.getByText('None. It can be sent to review.')).toBeVisible();
  });

  await test.step('an older page is told of the newer save and keeps what was typed', async () => {
    const other = await page.context().newPage();
    await other.goto(DRAFT);
    await page.getByLabel('What is new and why').fill('Theirs');
    await main(page, 'Save').click();
    await expect(page.getByText(/^Saved as version/)).toBeVisible();
    await other.getByLabel('What is new and why').fill('A span for the journey.');
    await main(other, 'Save').click();
    await expect(other.getByText(/Not saved: somebody saved version/)).toBeVisible();
    await expect(other.getByLabel('What is new and why')).toHaveValue('A span for the journey.');
    await main(other, 'Save').click();
    await expect(other.getByText(/^Saved as version/)).toBeVisible();
    await other.close();
    await page.goto(DRAFT);
    await expect(page.getByLabel('What is new and why')).toHaveValue('A span for the journey.');
  });

  await test.step('sent to review when it says its class and what is at stake', async () => {
    await main(page, 'Send to review').click();
    await expect(page.getByText('Say what kind of change it is')).toBeVisible();
    await page.getByLabel('Class of change').selectOption('improvement');
    await page.getByLabel('What is at stake').selectOption('safety');
    await main(page, 'Send to review').click();
    await expect(page.getByText('Sent to review. Those who may review it are told.')).toBeVisible();
    await expect(main(page, 'Issue')).toHaveCount(0);
  });

  const context = await browser.newContext(baseURL ? { baseURL } : {});
  const checker = await context.newPage();
  await enter(checker, baseURL, CHECKER);

  await test.step('proven in front of the checker, who may not issue it before', async () => {
    await checker.goto('/library');
    await checker
      .getByRole('link', { name: /, revision 1$/ })
      .first()
      .waitFor();
    await checker.goto(REVIEW);
    await main(checker, 'Issue').click();
    await expect(checker.getByRole('alert').getByText(/prove|proof/i)).toBeVisible();
    await checker.getByRole('button', { name: 'Prove it' }).click();
    await expect(async () => {
      await checker.goto(REVIEW);
      await expect(checker.locator('#proof').getByText('Passed')).toBeVisible({ timeout: 500 });
    }).toPass({ timeout: 120_000 });
  });

  await test.step('an open comment holds the issue up until whoever raised it resolves it', async () => {
    await checker.getByLabel('Comment', { exact: true }).fill('Which drawing is it for?');
    await checker.getByLabel('Part of the document').fill('/name');
    await checker.getByRole('button', { name: 'Add the comment' }).click();
    await main(checker, 'Issue').click();
    await expect(checker.getByText('One comment is not resolved.')).toBeVisible();
    await page.goto(REVIEW);
    await page.getByText('Reply', { exact: false }).first().click();
    await page.getByLabel(/^Reply to/).fill('For all of them.');
    await page.getByRole('button', { name: 'Send the reply' }).click();
    await expect(page.getByText('For all of them.')).toBeVisible();
    await checker.goto(REVIEW);
    await checker.getByRole('button', { name: 'Resolve' }).click();
    await main(checker, 'Issue').click();
    await expect(checker.getByText('Issued. It can be used from now on.')).toBeVisible();
  });
  await context.close();
});

test('a template that a member uses is withdrawn, decided about by the engineer, and closed', async ({
  page,
  browser,
  baseURL,
}) => {
  await enter(page, baseURL);
  const placed = await page.request.post('/api/v1/jobs/Q-2417/members', {
    data: { mark: MARK, template: SLUG },
    headers: { origin: new URL(baseURL ?? '').origin },
  });
  expect(placed.status(), await placed.text()).toBe(201);
  const context = await browser.newContext(baseURL ? { baseURL } : {});
  const librarian = await context.newPage();
  await enter(librarian, baseURL, LIBRARIAN);

  await test.step('the librarian sees every use and its owner before withdrawing', async () => {
    await librarian.goto(`${REVIEW}/withdraw`);
    await expect(librarian.getByRole('row', { name: MARK })).toContainText('Tomasz Brindle');
    await main(librarian, 'Withdraw and recall 1 use').click();
    await expect(librarian.getByText('Say what is at stake for the members')).toBeVisible();
    await librarian.getByLabel('What is wrong').fill('The reaction is too small.');
    await librarian.getByLabel('What is at stake').selectOption('safety');
    await main(librarian, 'Withdraw and recall 1 use').click();
    await expect(librarian).toHaveURL(/\/library\/recalls\//);
    await expect(librarian.getByText('No decision yet')).toBeVisible();
  });

  await test.step('the engineer finds it first on the desk and decides with a reason', async () => {
    await page.goto('/library?mine=on');
    await page
      .getByRole('row', { name: /The reaction is too small/ })
      .getByRole('link')
      .first()
      .click();
    const use = page.getByRole('row', { name: MARK });
    await use.getByRole('button', { name: 'Record the decision' }).click();
    await expect(use.getByText('Choose what becomes of this member.')).toBeVisible();
    await use.getByLabel(/What becomes of/).selectOption('accepted');
    await use.getByRole('button', { name: 'Record the decision' }).click();
    await expect(use.getByText('Say why. The reason is kept with your name.')).toBeVisible();
    await expect(use.getByLabel(/What becomes of/)).toHaveValue('accepted');
    await use.getByLabel('Why').fill('Checked by hand against the right reaction.');
    await use.getByRole('button', { name: 'Record the decision' }).click();
    await expect(use.getByText('Accepted as it stands').first()).toBeVisible();
    await expect(main(page, 'Close the recall')).toHaveCount(0);
  });

  await test.step('the librarian closes it', async () => {
    await librarian.reload();
    await expect(librarian.getByText('Checked by hand against the right reaction.').first()).toBeVisible();
    await main(librarian, 'Close the recall').click();
    await expect(librarian.getByText(/^Closed by/)).toBeVisible();
  });
  await context.close();
});

test('a request is raised from a screen and answered', async ({ page, browser, baseURL }) => {
  const title = `The span lacks a settlement ${Date.now()}`;
  await enter(page, baseURL);
  await page.goto('/templates/simple-span-point');
  await page.getByText('Tomasz Brindle').first().click();
  await page.getByRole('link', { name: 'Ask the librarian' }).click();
  await main(page, 'Send it').click();
  await expect(page.getByText('Say in a line what you need, or what is wrong.')).toBeVisible();
  await page.getByLabel('In a line').fill(title);
  await expect(page.getByLabel('About')).toHaveValue('template simple-span-point');
  await main(page, 'Send it').click();
  await expect(page.getByText('Sent to the librarians.')).toBeVisible();

  const context = await browser.newContext(baseURL ? { baseURL } : {});
  const librarian = await context.newPage();
  await enter(librarian, baseURL, LIBRARIAN);
  await librarian.goto('/library');
  await librarian.getByRole('link', { name: title }).click();
  await expect(librarian.getByRole('link', { name: '/templates/simple-span-point' })).toBeVisible();
  await librarian.getByLabel('State').selectOption('declined');
  await main(librarian, 'Save the answer').click();
  await expect(librarian.getByText('Say why it is declined, for whoever asked.')).toBeVisible();
  await librarian.getByLabel('Answer').fill('It comes with the next edition.');
  await librarian.getByLabel('State').selectOption('accepted');
  await main(librarian, 'Save the answer').click();
  await expect(librarian.getByText('Saved. Whoever asked is told.')).toBeVisible();
  await context.close();

  await page.reload();
  await expect(page.getByText('It comes with the next edition.')).toBeVisible();
});
