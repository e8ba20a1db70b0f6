/** What a new set begins with: its lists, empty, and what it must say one of. */
import type { Written } from '@/features/review/draft';
import type { SetKind } from '@/features/review/read-set';

const SOURCE = { publication: '', clause: '', from_memory: true };

const EMPTY: Readonly<Record<SetKind, Written>> = {
  'combination-set': {
    name: '',
    summary: '',
    publication: '',
    basis: '',
    limit_state: 'strength',
    snow: { basis: 'nominal', caution: '' },
    categories: {},
    strength: [],
    service: [],
    patterns: [],
    not_covered: [],
  },
  'material-set': { name: '', summary: '', materials: [] },
  criteria: {
    name: '',
    summary: '',
    families: [],
    limit_state: 'strength',
    strength: { basis: '', source: SOURCE },
    deflection: [],
    not_checked: [],
  },
};

export const emptySet = (kind: SetKind): Written => EMPTY[kind];
