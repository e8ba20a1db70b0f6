/** The load groups that a load of a draft belongs to, by the parameters that size it. */
import type { Written } from '@/features/review/draft';
import { listAt, textAt } from './edit';

const SIZES = ['p', 'w0', 'w1', 'm', 'kappa'];
const WORD = /[A-Za-z][A-Za-z0-9]*/g;

/** "group G", "groups G and Q", "the group of each row"; '' where nothing that sizes it is a load. */
export function declaredGroups(document: Written, load: unknown): string {
  const repeat = textAt(load, '/repeat');
  if (repeat !== '') return 'the group of each row';
  const symbols = new Set(SIZES.flatMap((key) => textAt(load, `/${key}`).match(WORD) ?? []));
  const deeper = listAt(document, '/derived')
    .filter((one) => symbols.has(textAt(one, '/symbol')))
    .flatMap((one) => textAt(one, '/expression').match(WORD) ?? []);
  for (const symbol of deeper) symbols.add(symbol);
  const groups = listAt(document, '/parameters')
    .filter((one) => symbols.has(textAt(one, '/symbol')))
    .map((one) => textAt(one, '/group'))
    .filter((group) => group !== '');
  const different = [...new Set(groups)];
  if (different.length === 0) return '';
  return `${different.length === 1 ? 'group' : 'groups'} ${different.join(' and ')}`;
}
