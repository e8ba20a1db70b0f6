import type { ReactNode } from 'react';

interface ZoneHeadingProps {
  /** Stable letter: printed on calc sheets and quoted in queries. */
  letter: string;
  children: ReactNode;
  /** One note or link at the right. */
  note?: ReactNode;
  tone?: 'ink' | 'error';
}

export function ZoneHeading({ letter, children, note, tone = 'ink' }: ZoneHeadingProps) {
  const colour = tone === 'error' ? 'border-error text-error' : 'border-ink';
  return (
    <h2
      data-zone={letter}
      tabIndex={-1}
      className="mb-10 flex min-h-26 scroll-mt-14 items-center gap-10 text-zone font-semibold"
    >
      <span
        data-bubble
        className={`grid size-22 flex-none place-items-center rounded-full border text-note leading-none ${colour}`}
      >
        <span className="sr-only">Zone </span>
        {letter}
      </span>
      <span>{children}</span>
      {note !== undefined && (
        <span className="ml-auto text-right text-schedule font-normal text-ink-2">{note}</span>
      )}
    </h2>
  );
}
