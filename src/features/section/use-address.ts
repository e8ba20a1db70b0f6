import { useEffect, useState } from 'react';
import { type PageState, readAddress, writeAddress } from './address';

const REST_MS = 400;

/** The page's state, kept in its address: each rest makes a step that the back button takes back. */
export function useAddress(search: string) {
  const [state, setState] = useState<PageState>(() => readAddress(search));
  useEffect(() => {
    const timer = setTimeout(() => {
      const written = writeAddress(state);
      if (written !== writeAddress(readAddress(location.search)))
        history.pushState(null, '', location.pathname + written);
    }, REST_MS);
    return () => clearTimeout(timer);
  }, [state]);
  useEffect(() => {
    const goBack = () => setState(readAddress(location.search));
    addEventListener('popstate', goBack);
    return () => removeEventListener('popstate', goBack);
  }, []);
  return [state, setState] as const;
}
