import type { ReactNode } from 'react';

interface SheetHeadProps {
  /** Where the sheet lies, outermost first. */
  trail?: readonly { label: string; href: string }[];
  reference?: string | undefined;
  title: string;
  /** Up to five facts; never status and never an action. */
  facts?: readonly { label: string; value: string }[];
  children?: ReactNode;
}

export function SheetHead({ trail = [], reference, title, facts = [], children }: SheetHeadProps) {
  return (
    <header className="flex items-end gap-28 border-b border-ink px-(--pad) pt-16 pb-14 max-lg:flex-wrap max-md:flex-col max-md:items-stretch max-md:gap-10 max-md:py-12">
      <div className="min-w-0">
        {(trail.length > 0 || reference) && (
          <nav aria-label="Trail" className="mb-2 flex flex-wrap gap-12 text-ink-2">
            {trail.map(({ label, href }) => (
              <a key={href} href={href}>
                {label}
              </a>
            ))}
            {reference && <span className="font-semibold">{reference}</span>}
          </nav>
        )}
        <h1 className="text-sheet break-words">{title}</h1>
      </div>
      {children}
      {facts.length > 0 && (
        <dl className="ml-auto flex flex-wrap gap-y-8 max-md:ml-0">
          {facts.map(({ label, value }) => (
            <div
              key={label}
              className="border-l border-rule px-18 last:pr-0 max-md:px-10 max-md:first:border-l-0 max-md:first:pl-0"
            >
              <dt className="caps">{label}</dt>
              <dd className="text-zone leading-20 max-md:text-schedule">{value}</dd>
            </div>
          ))}
        </dl>
      )}
    </header>
  );
}
