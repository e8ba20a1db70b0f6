import { useEffect, useState } from 'react';
import type { Template } from '@/engine/template';
import { BrokenExpression } from '@/engine/template/evaluate';
import type { StatedValues } from '../edit';
import { beginSearch, type Search, searchFurther } from './worst';

/** So many points between two looks at the page, which stays alive meanwhile. */
const CHUNK = 4;

/** Looks for the worst geometry in the browser; `onFound` is given its values. Another draft begins anew. */
export function useWorst(template: Template | null, onFound: (values: StatedValues) => void) {
  const [search, setSearch] = useState<Search | null>(null);
  const [isOn, setOn] = useState(false);
  const [of, setOf] = useState(template);
  if (of !== template) {
    setOf(template);
    setSearch(null);
    setOn(false);
  }
  useEffect(() => {
    if (!isOn || !search || !template) return;
    if (search.done >= search.total) {
      setOn(false);
      if (search.worst) onFound(search.worst.values);
      return;
    }
    const timer = setTimeout(() => setSearch(further(template, search)));
    return () => clearTimeout(timer);
  }, [isOn, search, template, onFound]);
  const begin = () => {
    if (!template) return;
    setSearch(beginSearch(template));
    setOn(true);
  };
  return { search, isOn, begin };
}

/** Rules and closed forms that are still being written may speak of what is not there: then nothing is compared with them. */
function further(template: Template, search: Search): Search {
  try {
    return searchFurther(template, search, CHUNK);
  } catch (error) {
    if (!(error instanceof BrokenExpression)) throw error;
    return searchFurther({ ...template, rules: [], results: [] }, search, CHUNK);
  }
}
