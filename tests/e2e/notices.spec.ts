import { expect, type Page, test } from '@playwright/test';
import { closeConnection } from '@/db/client';
import { ENGINEER, enter } from './support/person';
import { tellPerson } from './support/tell';

test.afterAll(closeConnection);

/** Signed in, with nothing unread whatever other journeys have told. */
async function enterWithNothingNew(page: Page, baseURL: string | undefined): Promise<void> {
  await enter(page, baseURL);
  const answer = await page.request.post('/api/v1/notices/read', {
    data: { until: new Date().toISOString() },
    headers: { origin: new URL(baseURL ?? '').origin },
  });
  expect(answer.status()).toBe(200);
}

const bellOf = (page: Page) => page.locator('[data-bell] > summary');
const HREF = '/templates/propped-cantilever-overhang-uniform';

test('a recall rings the bell on every open page, comes by e-mail, and is read by opening it', async ({
  page,
  context,
  baseURL,
}) => {
  await enterWithNothingNew(page, baseURL);
  const other = await context.newPage();
  await Promise.all([page.goto('/jobs'), other.goto('/sections')]);
  await expect(bellOf(page)).toHaveText(/Notices/);
  const event = crypto.randomUUID();

  await test.step('both pages count it, whichever of them holds the stream', async () => {
    await tellPerson(ENGINEER.email, {
      kind: 'recall',
      title: `Prop 3, revision 1, is recalled (${event})`,
      detail: 'The reaction at the prop is too small.',
      href: HREF,
      dedupe: event,
      mailData: { reference: 'Prop 3' },
    });
    for (const one of [page, other]) await expect(bellOf(one)).toHaveText(/1 unread/);
  });

  await test.step('the bell says it, by keyboard', async () => {
    await bellOf(page).focus();
    await page.keyboard.press('Enter');
    await expect(page.getByRole('link', { name: event })).toBeVisible();
    await page.keyboard.press('Escape');
    await expect(bellOf(page)).toBeFocused();
    await expect(page.getByRole('link', { name: event })).toBeHidden();
  });

  await test.step('its page has it among the unread', async () => {
    await page.goto('/notices');
    await expect(
      page.getByRole('row', { name: event }).getByRole('button', { name: 'Mark as read' }),
    ).toBeVisible();
  });

  await test.step('the e-mail leads to the item', async () => {
    await expect(async () => {
      await other.goto('/demo-mail?to=brindle');
      await expect(other.frameLocator('iframe').getByText(event)).toBeVisible({ timeout: 500 });
    }).toPass();
    await expect(
      other.getByRole('link', { name: 'Recalled: Prop 3. Your decision is needed' }).first(),
    ).toBeVisible();
    await other.frameLocator('iframe').getByRole('link', { name: 'Open the recall and decide' }).click();
    await expect(other).toHaveURL(new RegExp(`${HREF}$`));
  });

  await test.step('then it is read, on the other page too', async () => {
    await expect(bellOf(other)).not.toHaveText(/unread/);
    await expect(bellOf(page)).not.toHaveText(/unread/);
    await page.reload();
    await expect(page.getByRole('row', { name: event }).getByRole('button')).toHaveCount(0);
  });
});

test('all are marked as read at once, and the e-mails are chosen under Account', async ({
  page,
  baseURL,
}) => {
  await enterWithNothingNew(page, baseURL);
  for (const n of [1, 2])
    await tellPerson(ENGINEER.email, {
      kind: 'issued',
      title: `Span ${n} is issued`,
      href: '/sections',
      dedupe: crypto.randomUUID(),
    });
  await page.goto('/notices');
  await page.getByRole('button', { name: 'Mark all as read' }).click();
  await expect(page.getByText('You have read everything.')).toBeVisible();
  await expect(page.getByText('Marked as read.')).toBeVisible();
  await page.getByRole('link', { name: 'Choose the e-mails' }).click();
  await page.getByLabel('Comment', { exact: true }).selectOption('No e-mail');
  await page.getByRole('button', { name: 'Save the e-mails' }).click();
  await expect(page.getByText('Saved.')).toBeVisible();
  await expect(page.getByLabel('Comment', { exact: true })).toHaveValue('none');
});
