import { useMemo, useRef, useState } from 'react';
import type { UnitSystemName } from '@/engine/quantity';
import { type NamedAction, namedActions } from './actions';
import { askedOf, keyOf, MOST_PINS, type PageState, withPin } from './address';
import { type Answer, isNearest } from './answer';
import { nudged } from './RangeFilter';
import type { SectionItem } from './section';

/** What is chosen and pinned of an answer, and how its ranges are nudged. */
export function useSearch(
  { rows, query, spread, isSettled }: Answer,
  state: PageState,
  setState: (change: (state: PageState) => PageState) => void,
  system: UnitSystemName,
) {
  const [chosenKey, setChosenKey] = useState<string | null>(null);
  const [said, setSaid] = useState('');
  const at = useMemo(
    () => Math.max(0, chosenKey === null ? 0 : rows.findIndex((item) => keyOf(item) === chosenKey)),
    [rows, chosenKey],
  );
  const chosen = rows[at] ?? null;
  const opensAtChosen = useRef(false);
  const actions = useMemo(() => (chosen ? namedActions(state, chosen, system) : []), [state, chosen, system]);
  const act = (action: NamedAction | undefined) => {
    if (!action || !chosen) return;
    setChosenKey(keyOf(chosen));
    opensAtChosen.current = action.opensAtIt && askedOf(action.state) !== askedOf(state);
    setSaid('');
    setState(() => action.state);
  };
  const pin = (item: SectionItem) => {
    const next = withPin(state, keyOf(item));
    setSaid(next ? '' : `${MOST_PINS} sections are compared at most. Unpin one first.`);
    if (next) setState(() => next);
  };
  return {
    /** Index of the chosen row; the first one where none is chosen. */
    at,
    chosen,
    actions,
    act,
    /** Set where the next answer is read from the chosen row on. */
    opensAtChosen,
    choose: (item: SectionItem) => setChosenKey(keyOf(item)),
    pin,
    nudge: (turn: 1 | -1) => setState((before) => nudged(before, spread.depth, turn, system)),
    said,
    setSaid,
    nearest: isSettled && isNearest(query, rows),
  };
}
