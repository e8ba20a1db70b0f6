import { type ReactNode, useContext } from 'react';
import type { Key } from '@/engine/why';
import { InGridContext, WhyContext } from './why-context';

interface WhyProps {
  readonly question: () => Key | null;
  readonly children: ReactNode;
}

const LOOK =
  'why -my-3 inline-flex min-h-24 min-w-24 cursor-help items-center text-inherit [.figure_&]:justify-end decoration-ochre decoration-dotted underline-offset-3 hover:underline focus-visible:underline';

/** A number that says where it comes from, where the page answers; else the number alone. */
export function Why({ question, children }: WhyProps) {
  const ask = useContext(WhyContext);
  const isInGrid = useContext(InGridContext);
  if (!ask) return children;
  return (
    <button
      type="button"
      className={LOOK}
      aria-haspopup="dialog"
      title="Where this number comes from"
      tabIndex={isInGrid ? -1 : undefined}
      onClick={(event) => ask(question, event.currentTarget)}
    >
      {children}
    </button>
  );
}
