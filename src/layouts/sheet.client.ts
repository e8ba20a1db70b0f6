import { fromHere } from '@/components/ui/from-here';
import { createKeyReader, takesTyping } from '@/components/ui/keys';
import { takeLanding } from '@/components/ui/landing';
import { keysAreOn } from '@/components/ui/use-keys';
import { goToZone } from '@/components/ui/zone';

const YEAR_S = 31_536_000;
const SHARE_IN_VIEW = 0.35; // of the title block; with less of it the title strip stands in

function openKeys() {
  document.querySelector<HTMLDialogElement>('dialog[data-keys-list]')?.showModal();
}

function listenForKeys() {
  const read = createKeyReader();
  document.addEventListener('keydown', (event) => {
    if (event.defaultPrevented || !keysAreOn() || document.querySelector('dialog[open]')) return;
    const typing = event.target instanceof HTMLElement && takesTyping(event.target);
    const press = read(event, typing, event.timeStamp);
    if (press?.kind === 'zone') {
      event.preventDefault();
      goToZone(press.letter);
    } else if (press?.key === '?') {
      openKeys();
    } else if (press?.key === 'f') {
      const filter = document.querySelector<HTMLElement>('[data-search]');
      if (!filter) return;
      event.preventDefault();
      filter.focus();
    } else if (press) {
      document.querySelector<HTMLElement>(`a[data-key="${CSS.escape(press.key)}"]`)?.click();
    }
  });
  for (const button of document.querySelectorAll('[data-open-keys]'))
    button.addEventListener('click', openKeys);
}

function listenForTheme() {
  for (const form of document.querySelectorAll<HTMLFormElement>('[data-theme-switch]')) {
    form.addEventListener('submit', (event) => {
      if (!(event.submitter instanceof HTMLButtonElement)) return;
      event.preventDefault();
      const theme = event.submitter.value;
      document.documentElement.dataset['theme'] = theme;
      // The word that was pressed gives way to the other one.
      [...form.querySelectorAll('button')].find(({ offsetParent }) => offsetParent !== null)?.focus();
      const secure = location.protocol === 'https:' ? '; Secure' : '';
      // biome-ignore lint/suspicious/noDocumentCookie: cookieStore is missing where the page is not served by https
      document.cookie = `theme=${theme}; Path=/; Max-Age=${YEAR_S}; SameSite=Lax${secure}`;
    });
  }
}

function watchTitleBlock() {
  const block = document.querySelector('[data-title-block]');
  const strip = document.querySelector<HTMLElement>('[data-title-strip]');
  if (!block || !strip) return;
  const show = (on: boolean) => {
    strip.toggleAttribute('data-on', on);
    strip.inert = !on;
  };
  new IntersectionObserver(([entry]) => entry && show(entry.intersectionRatio < SHARE_IN_VIEW), {
    threshold: [0, SHARE_IN_VIEW],
  }).observe(block);
}

/** A form that comes back has the focus where it is wrong; one that was taken, on what it says; a page read again, on its block. */
function startWhereItMatters() {
  const wrong = document.querySelector<HTMLElement>(
    'form:is([method="post"], [data-judged]) [aria-invalid="true"]',
  );
  const said = document.querySelector('[data-said]')?.closest<HTMLElement>('[data-zone]');
  (takeLanding() ?? wrong ?? said)?.focus();
}

function closeMenusOnLeaving() {
  for (const menu of document.querySelectorAll<HTMLDetailsElement>('details[data-menu]')) {
    const close = () => menu.removeAttribute('open');
    menu.addEventListener('keydown', (event) => {
      if (event.key !== 'Escape') return;
      close();
      menu.querySelector('summary')?.focus();
    });
    document.addEventListener('click', (event) => {
      if (event.target instanceof Node && !menu.contains(event.target)) close();
    });
  }
}

function sayWhereFrom() {
  for (const link of document.querySelectorAll<HTMLAnchorElement>('a[data-from-here]'))
    for (const event of ['click', 'auxclick'])
      link.addEventListener(event, () => link.setAttribute('href', fromHere(link)));
}

listenForKeys();
sayWhereFrom();
listenForTheme();
watchTitleBlock();
closeMenusOnLeaving();
startWhereItMatters();
