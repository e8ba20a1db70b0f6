import { paths } from '@/paths';
import type { SearchView } from './search';

/** The search could not be made: said to the person, with what to do. */
export class SearchFailed extends Error {
  /** The session has ended. */
  readonly isSignedOut: boolean;

  constructor(status?: number, options?: ErrorOptions) {
    super(
      status === 401
        ? 'The session has ended. Sign in again, then search again.'
        : 'The search was not answered. Press Enter to try again.',
      options,
    );
    this.name = 'SearchFailed';
    this.isSignedOut = status === 401;
  }
}

/** The best answers of every kind: GET /api/v1/search. */
export async function fetchSearch(q: string, signal: AbortSignal): Promise<SearchView> {
  const lost = (cause: unknown) => {
    throw signal.aborted ? cause : new SearchFailed(undefined, { cause });
  };
  const response = await fetch(`${paths.api.search}?${new URLSearchParams({ q })}`, { signal }).catch(lost);
  if (!response.ok) throw new SearchFailed(response.status);
  return response.json().catch(lost);
}
