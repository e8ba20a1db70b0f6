import { ChangeSavedSearch, SavedSearchView } from '@/features/section/saved/saved';
import { changeSavedSearch, removeSavedSearch } from '@/features/section/saved/saved.server';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const PATCH = endpoint(
  {
    summary: 'Change a saved search',
    description: 'Its name, its query, or whether it is shared: by whoever saved it.',
    body: ChangeSavedSearch,
    answer: SavedSearchView,
  },
  ({ params }, { user, body }) => changeSavedSearch(user, idParam(params, 'id', 'This saved search'), body),
);

export const DELETE = endpoint(
  {
    summary: 'Delete a saved search',
    description: 'By whoever saved it; a shared one by a librarian too.',
  },
  ({ params }, { user }) => removeSavedSearch(user, idParam(params, 'id', 'This saved search')),
);
