import { expect, type Page } from '@playwright/test';

/** The demo's engineer of Q-2417 and the password that the sign-in page offers. */
export const ENGINEER = { email: 'tomasz.brindle@quillmere.example', password: 'beams-for-everyone' };

/** Signed in without the form, for what is not about signing in. */
export async function enter(
  page: Page,
  baseURL: string | undefined,
  email: string = ENGINEER.email,
): Promise<void> {
  const answer = await page.request.post('/api/v1/session', {
    data: { email, password: ENGINEER.password },
    headers: { origin: new URL(baseURL ?? '').origin },
  });
  expect(answer.status()).toBe(200);
}
