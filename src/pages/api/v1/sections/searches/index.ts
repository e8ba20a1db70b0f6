import { NewSavedSearch, SavedSearchView } from '@/features/section/saved/saved';
import { listSavedSearches, saveSearch } from '@/features/section/saved/saved.server';
import { answer, endpoint } from '@/http/endpoint';
import { listOf, wholeList } from '@/http/list';
import { paths } from '@/paths';

export const GET = endpoint(
  {
    summary: 'Saved searches for sections',
    description: 'One’s own by name, then those that others share with the practice.',
    answer: listOf(SavedSearchView),
  },
  async (_, { user }) => wholeList(await listSavedSearches(user)),
);

export const POST = endpoint(
  {
    summary: 'Save a search for sections under a name',
    description:
      'query is that of the sections page; what it does not understand is left out. Sharing is for engineers and librarians.',
    body: NewSavedSearch,
    answer: SavedSearchView,
    status: 201,
  },
  async (_, { user, body }) => {
    const saved = await saveSearch(user, body);
    return answer(saved, { status: 201, headers: { Location: paths.api.savedSearch(saved.id) } });
  },
);
