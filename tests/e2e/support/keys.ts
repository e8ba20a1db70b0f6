import { expect, type Page } from '@playwright/test';

const MOST = 200;

/** The name and the ring of what has the focus; empty where nothing has it. */
function focused(page: Page): Promise<{ name: string; isSeen: boolean }> {
  return page.evaluate(() => {
    const { activeElement: element } = document;
    if (!(element instanceof HTMLElement || element instanceof SVGElement) || element === document.body)
      return { name: '', isSeen: false };
    const labels =
      element instanceof HTMLInputElement || element instanceof HTMLSelectElement ? element.labels : null;
    const words = element.getAttribute('aria-label') ?? labels?.[0]?.textContent ?? element.textContent ?? '';
    const { top, bottom } = element.getBoundingClientRect();
    const rings = [element, element.parentElement, element.parentElement?.parentElement].some(
      (one) => one && getComputedStyle(one).outlineStyle !== 'none',
    );
    return { name: words.replaceAll(/\s+/g, ' ').trim(), isSeen: rings && bottom > 0 && top < innerHeight };
  });
}

/** Presses Tab until something of this name has the focus, and sees that it shows. */
export async function tabTo(page: Page, name: RegExp, key: 'Tab' | 'Shift+Tab' = 'Tab'): Promise<void> {
  for (let presses = 0; presses < MOST; presses++) {
    await page.keyboard.press(key);
    const at = await focused(page);
    if (!name.test(at.name)) continue;
    expect(at.isSeen, `the focus on “${at.name}” shows`).toBe(true);
    return;
  }
  throw new Error(`Tab never came to ${name}`);
}

export async function typeOver(page: Page, text: string): Promise<void> {
  await page.keyboard.press('Control+A');
  await page.keyboard.type(text);
}
