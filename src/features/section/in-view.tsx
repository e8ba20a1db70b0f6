import { useSyncExternalStore } from 'react';

interface View {
  readonly first: number;
  readonly last: number;
}

/** Which rows are in view. Told to those who show it alone: the schedule is not drawn again for it with every scroll. */
export class InView {
  private now: View = { first: 1, last: 0 };
  private readonly listeners = new Set<() => void>();

  tell = (first: number, last: number): void => {
    this.now = { first, last };
    for (const listener of this.listeners) listener();
  };

  read = (): View => this.now;

  listen = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
}

export function RowsInView({ inView, total }: { inView: InView; total: number }) {
  const { first, last } = useSyncExternalStore(inView.listen, inView.read, inView.read);
  if (total === 0 || last === 0) return null;
  return (
    <span className="ml-auto text-ink-2">
      Rows {first} to {last} of {total}
    </span>
  );
}
