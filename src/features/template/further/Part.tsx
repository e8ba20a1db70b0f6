import type { ReactNode } from 'react';

interface PartProps {
  readonly title: string;
  readonly note?: ReactNode;
  readonly children: ReactNode;
}

/** A part of the zone, under a rule of its own. */
export function Part({ title, note, children }: PartProps) {
  return (
    <section className="min-w-0">
      <h3 className="mb-8 flex flex-wrap items-baseline gap-x-10 font-semibold">
        {title}
        {note && <span className="text-schedule font-normal text-ink-2">{note}</span>}
      </h3>
      {children}
    </section>
  );
}
