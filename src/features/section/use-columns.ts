import { useEffect, useRef, useState } from 'react';
import type { PageState } from './address';
import { putColumnChoice } from './column-choice.api';
import { asChoice } from './columns';
import type { SectionMeasure } from './query';

const REST_MS = 500;

export interface ColumnChoosing {
  /** Null: the usual ones. */
  readonly columns: readonly SectionMeasure[] | null;
  readonly choose: (columns: readonly SectionMeasure[]) => void;
  /** Why the choice is not kept for the next visit. */
  readonly failure: string | null;
  readonly again: () => void;
}

/** The columns of the address, else those that the person has chosen; a choice goes into both. */
export function useColumns(
  state: PageState,
  setState: (change: (state: PageState) => PageState) => void,
  own: readonly SectionMeasure[] | null,
): ColumnChoosing {
  const [kept, setKept] = useState(own);
  const [failure, setFailure] = useState<string | null>(null);
  const [round, setRound] = useState(0);
  const written = useRef(own);
  useEffect(() => {
    if (written.current === kept && round === 0) return;
    const timer = setTimeout(() => {
      written.current = kept;
      putColumnChoice({ columns: kept }).then(setFailure);
    }, REST_MS);
    return () => clearTimeout(timer);
  }, [kept, round]);
  return {
    columns: state.columns ?? kept,
    choose: (columns) => {
      const choice = asChoice(columns);
      setKept(choice);
      setState((before) => ({ ...before, columns: choice }));
    },
    failure,
    again: () => setRound((before) => before + 1),
  };
}
