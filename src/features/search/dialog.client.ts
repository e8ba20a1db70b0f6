/** The search dialog at work: it asks while one types, lists what answers, and is worked by keys alone. */

import { fromHere } from '@/components/ui/from-here';
import { goToZone } from '@/components/ui/zone';
import { paths } from '@/paths';
import {
  type Command,
  commandGroups,
  countWords,
  type Group,
  hitGroups,
  type Option,
  readRecent,
  recentGroups,
  withRecent,
} from './options';
import { fetchSearch, SearchFailed } from './search.api';
import { drawGroups } from './search-list';

/** Milliseconds: after a key until it is asked, and until a slow answer is spoken of. */
const PAUSE = 70;
const SLOW = 2000;
const RECENT = 'searched';
const ZONE = '#zone-';
const WAITING = 'Still searching. The answer takes longer than it should.';
const NOTHING =
  'Nothing has all of these words. Try fewer of them, or their beginnings; a job that is not open to you is not searched.';

function part<E extends HTMLElement>(dialog: HTMLElement, selector: string): E {
  const found = dialog.querySelector<E>(selector);
  if (!found) throw new Error(`The search dialog has ${selector}`);
  return found;
}

/** Where the person may go: zones of this sheet, then the pages that the server names. */
function commandsOf(dialog: HTMLElement): Command[] {
  const zones = [...document.querySelectorAll<HTMLElement>('main [data-zone]')].map((zone) => {
    const letter = zone.dataset['zone'] ?? '';
    const name = zone.querySelector(':scope > span:nth-child(2)')?.textContent.trim() ?? '';
    return { label: `Zone ${letter} ${name}`, href: `${ZONE}${letter}`, keys: `G ${letter}` };
  });
  const places = part(dialog, '[data-search-places]').querySelectorAll('a');
  return [
    ...[...places].map((place) => ({
      label: place.textContent.trim(),
      href: fromHere(place),
      keys: '',
    })),
    ...zones,
  ];
}

function kept(): string[] {
  try {
    return readRecent(localStorage.getItem(RECENT));
  } catch {
    return []; // storage is closed to the page
  }
}

function keep(q: string): void {
  try {
    if (q !== '') localStorage.setItem(RECENT, JSON.stringify(withRecent(kept(), q)));
  } catch {
    // a search is found again by typing it
  }
}

class SearchDialog {
  readonly #dialog: HTMLDialogElement;
  readonly #input: HTMLInputElement;
  readonly #state: HTMLElement;
  readonly #list: HTMLElement;
  readonly #tips: HTMLElement;
  #options: readonly Option[] = [];
  #drawn: readonly HTMLElement[] = [];
  #chosen = -1;
  #asking = new AbortController();
  #timer: ReturnType<typeof setTimeout> | undefined;
  #phase: 'answered' | 'asking' | 'failed' = 'answered';
  /** One of the list was chosen by an arrow, and nothing typed since. */
  #isPicked = false;
  /** Enter came before the answer: the first of it is opened. */
  #opensFirst = false;

  constructor(dialog: HTMLDialogElement) {
    this.#dialog = dialog;
    this.#input = part(dialog, 'input');
    this.#state = part(dialog, '[data-search-state]');
    this.#list = part(dialog, '#search-list');
    this.#tips = part(dialog, '[data-search-tips]');
    this.#input.addEventListener('input', () => this.#onInput());
    this.#input.addEventListener('keydown', (event) => this.#onKey(event));
    part(dialog, 'form').addEventListener('submit', (event) => {
      event.preventDefault();
      this.#onEnter(false);
    });
    part(dialog, '[data-search-close]').addEventListener('click', () => dialog.close());
    dialog.addEventListener('click', ({ target }) => target === dialog && dialog.close());
    dialog.addEventListener('close', () => this.#stop());
    this.#list.addEventListener('click', (event) => this.#onClick(event));
  }

  /** With what is typed already, and whether Enter was pressed on it. */
  start(isEntered: boolean): void {
    this.#input.focus();
    this.#onInput();
    if (isEntered) this.#onEnter(false);
  }

  /** With what was typed last, ready to be typed over. */
  startAgain(): void {
    this.#input.select();
    this.start(false);
  }

  get #q(): string {
    return this.#input.value.trim();
  }

  #stop(): void {
    clearTimeout(this.#timer);
    this.#asking.abort();
    this.#opensFirst = false;
    this.#isPicked = false;
  }

  #onInput(): void {
    this.#stop();
    if (this.#q === '') {
      this.#phase = 'answered';
      this.#say('');
      this.#show([...recentGroups(kept()), ...commandGroups('', commandsOf(this.#dialog), 'Go to')], false);
      this.#tips.hidden = false;
      return;
    }
    this.#phase = 'asking';
    this.#timer = setTimeout(() => void this.#ask(), PAUSE);
  }

  async #ask(): Promise<void> {
    this.#phase = 'asking';
    this.#asking = new AbortController();
    const { signal } = this.#asking;
    const q = this.#q;
    const slow = setTimeout(() => this.#say(WAITING), SLOW);
    try {
      const found = await fetchSearch(q, signal);
      if (signal.aborted) return;
      this.#phase = 'answered';
      const groups = [...hitGroups(q, found), ...commandGroups(q, commandsOf(this.#dialog), 'Go to')];
      this.#show(groups, true);
      this.#tips.hidden = groups.length > 0;
      this.#say(found.total === 0 ? NOTHING : countWords(found));
      if (this.#opensFirst) this.#onEnter(false);
    } catch (error) {
      if (!signal.aborted) this.#fail(error);
    } finally {
      clearTimeout(slow);
    }
  }

  #fail(error: unknown): void {
    if (!(error instanceof SearchFailed)) throw error;
    this.#phase = 'failed';
    this.#opensFirst = false;
    this.#show([], false);
    this.#say(error.message);
    if (error.isSignedOut) {
      // In another tab: this one may hold what is not saved.
      const link = Object.assign(document.createElement('a'), {
        href: paths.signIn,
        target: '_blank',
        className: 'link',
      });
      link.textContent = 'Sign in, in another tab';
      this.#state.append(' ', link);
    }
  }

  #say(words: string): void {
    if (this.#state.textContent !== words) this.#state.textContent = words;
  }

  #show(groups: readonly Group[], choosesFirst: boolean): void {
    const drawn = drawGroups(groups);
    this.#options = groups.flatMap(({ options }) => options);
    this.#drawn = drawn.options;
    this.#list.replaceChildren(...drawn.groups);
    this.#list.hidden = groups.length === 0;
    this.#input.setAttribute('aria-expanded', String(groups.length > 0));
    part(this.#dialog, '[data-search-scroll]').scrollTop = 0;
    this.#choose(choosesFirst && groups.length > 0 ? 0 : -1);
  }

  #choose(at: number): void {
    this.#drawn[this.#chosen]?.setAttribute('aria-selected', 'false');
    this.#chosen = at;
    this.#isPicked = false;
    const option = this.#drawn[at];
    if (option) {
      option.setAttribute('aria-selected', 'true');
      option.scrollIntoView({ block: 'nearest' });
      this.#input.setAttribute('aria-activedescendant', option.id);
    } else this.#input.removeAttribute('aria-activedescendant');
  }

  #onKey(event: KeyboardEvent): void {
    if (event.isComposing) return;
    const count = this.#drawn.length;
    if (event.key === 'Enter') {
      event.preventDefault();
      this.#onEnter(event.ctrlKey || event.metaKey);
    } else if (count > 0 && (event.key === 'ArrowDown' || event.key === 'ArrowUp')) {
      event.preventDefault();
      const before = this.#chosen <= 0 ? count - 1 : this.#chosen - 1;
      this.#choose(event.key === 'ArrowUp' ? before : (this.#chosen + 1) % count);
      this.#isPicked = true;
    }
  }

  #onEnter(isNewTab: boolean): void {
    const option = this.#options[this.#chosen];
    if (this.#phase === 'answered' || this.#isPicked) {
      if (option) this.#open(option, isNewTab);
      return;
    }
    this.#opensFirst = true;
    if (this.#phase === 'failed') void this.#ask();
  }

  #open(option: Option, isNewTab: boolean): void {
    if (option.again !== null) {
      this.#input.value = option.again;
      this.#onInput();
      return;
    }
    keep(this.#q);
    if (isNewTab && !option.href.startsWith(ZONE)) {
      window.open(option.href, '_blank', 'noopener');
      return;
    }
    // Closed, for whoever comes back to this page as it was left.
    this.#dialog.close();
    if (option.href.startsWith(ZONE)) goToZone(option.href.slice(ZONE.length));
    else location.assign(option.href);
  }

  /** A plain click does as Enter would; the others are the browser's own. */
  #onClick(event: MouseEvent): void {
    const at = this.#drawn.findIndex((one) => event.target instanceof Node && one.contains(event.target));
    const option = this.#options[at];
    if (!option || event.ctrlKey || event.metaKey || event.shiftKey) return;
    event.preventDefault();
    this.#open(option, false);
  }
}

let started: SearchDialog | undefined;

export function startSearch(dialog: HTMLDialogElement, isEntered: boolean): void {
  if (started) {
    started.startAgain();
    return;
  }
  started = new SearchDialog(dialog);
  started.start(isEntered);
}
