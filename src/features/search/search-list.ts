/** The list of the search dialog as elements. */
import type { Group, Option } from './options';
import type { Marked } from './search';

function element(name: string, className: string, ...inside: readonly (Node | string)[]): HTMLElement {
  const made = document.createElement(name);
  if (className) made.className = className;
  made.append(...inside);
  return made;
}

/** A text with the stretches that answer set off. */
function marked({ text, marks }: Marked): (Node | string)[] {
  let at = 0;
  const parts = marks.flatMap(([from, to]) => {
    const before = text.slice(at, from);
    at = to;
    return [
      before,
      element('mark', 'border-b-2 border-ochre bg-transparent text-inherit', text.slice(from, to)),
    ];
  });
  return [...parts, text.slice(at)];
}

const OPTION =
  'block border-b border-rule border-l-3 border-l-transparent px-17 py-7 no-underline hover:bg-paper-2 aria-selected:border-l-ochre aria-selected:bg-ochre-wash max-md:min-h-44 max-md:px-9';

function toElement({ href, mark, title, detail, excerpt, state, keys }: Option, id: string): HTMLElement {
  const line = element('span', 'flex items-baseline gap-10');
  if (mark.text !== '') line.append(element('b', 'flex-none font-semibold', ...marked(mark)));
  line.append(element('span', 'min-w-0 flex-1', ...marked(title)));
  if (state !== '') line.append(element('i', 'flex-none text-note text-ink-2', state));
  if (keys !== '') line.append(...keys.split(' ').map((key) => element('kbd', 'flex-none', key)));
  const option = element('a', OPTION, line);
  for (const below of [detail, excerpt])
    if (below && below.text !== '')
      option.append(element('span', 'line-clamp-2 text-schedule text-ink-2', ...marked(below)));
  option.id = id;
  option.setAttribute('href', href);
  option.setAttribute('role', 'option');
  option.setAttribute('aria-selected', 'false');
  option.tabIndex = -1;
  return option;
}

/** The groups as they stand in the list, and their options in one row. */
export function drawGroups(groups: readonly Group[]): { groups: HTMLElement[]; options: HTMLElement[] } {
  const options: HTMLElement[] = [];
  const drawn = groups.map(({ title, options: own }, index) => {
    const heading = element('p', 'caps px-20 pt-12 pb-4 max-md:px-12', title);
    heading.id = `search-group-${index}`;
    const made = own.map((option, at) => toElement(option, `search-option-${options.length + at}`));
    options.push(...made);
    const group = element('div', '', heading, ...made);
    group.setAttribute('role', 'group');
    group.setAttribute('aria-labelledby', heading.id);
    return group;
  });
  return { groups: drawn, options };
}
