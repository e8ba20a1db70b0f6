const KEY = 'landing';

/** The next page of this tab begins at this element, such as after a page is read again. */
export const landOn = (id: string): void => sessionStorage.setItem(KEY, id);

/** What the page before asked for, once. */
export function takeLanding(): HTMLElement | null {
  const id = sessionStorage.getItem(KEY);
  sessionStorage.removeItem(KEY);
  return id === null ? null : document.getElementById(id);
}
