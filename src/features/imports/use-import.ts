import { useCallback, useEffect, useRef, useState } from 'react';
import { onProgress } from '@/features/notice/live.api';
import type { Fault } from '@/lib/app-error';
import type { ImportView } from './imports';
import { type Acted, importApi, readProgress } from './imports.api';
import { UNDER_WAY } from './state';

/** Milliseconds between two looks while the worker is at it, in case that no message of its progress arrives. */
const LOOK_EVERY = 2000;

const isUnderWay = ({ state }: Pick<ImportView, 'state'>): boolean => UNDER_WAY.some((one) => one === state);

/** An import as it stands, kept up to date while the worker is at it, and what a person does with it. */
export function useImport(first: ImportView) {
  const [view, setView] = useState(first);
  const [isBusy, setBusy] = useState(false);
  const [problem, setProblem] = useState<{ message: string; faults: readonly Fault[] } | null>(null);
  const busy = useRef(false);

  const take = useCallback((acted: Acted): boolean => {
    if (acted.view) setView(acted.view);
    if (acted.kind === 'refused') setProblem(acted);
    else {
      setProblem(
        acted.kind === 'stale'
          ? { message: 'Somebody acted on this import before you. This is how it stands now.', faults: [] }
          : null,
      );
    }
    return acted.kind === 'done';
  }, []);

  const act = useCallback(
    async (work: () => Promise<Acted>): Promise<boolean> => {
      if (busy.current) return false;
      busy.current = true;
      setBusy(true);
      const acted = await work();
      busy.current = false;
      setBusy(false);
      return take(acted);
    },
    [take],
  );

  const isLost = useLive(view, setView, take);
  return { view, isBusy, problem, act, isLost, underWay: isUnderWay(view) };
}

/**
 * Looks again at every message of progress, and from time to time; after a reload or a lost connection as well. Whether
 * the server could not be reached the last time.
 */
function useLive(
  view: ImportView,
  setView: (change: (before: ImportView) => ImportView) => void,
  take: (acted: Acted) => void,
): boolean {
  const { id } = view;
  const isLive = isUnderWay(view);
  const [isLost, setLost] = useState(false);
  useEffect(() => {
    if (!isLive) return;
    let isOver = false;
    const look = async () => {
      const progress = await readProgress(id);
      if (isOver) return;
      setLost(progress === null);
      if (progress === null) return;
      if (isUnderWay(progress)) setView((before) => ({ ...before, ...progress }));
      else {
        const acted = await importApi.read(id);
        if (isOver) return;
        setLost(acted.kind === 'refused');
        if (acted.kind === 'refused') return; // asked again
        isOver = true;
        take(acted);
      }
    };
    const stop = onProgress((about) => {
      if (about === null || about === id) void look();
    });
    const timer = setInterval(look, LOOK_EVERY);
    void look();
    return () => {
      isOver = true;
      stop();
      clearInterval(timer);
    };
  }, [id, isLive, setView, take]);
  return isLost;
}
