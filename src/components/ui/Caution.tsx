import type { ReactNode } from 'react';

interface CautionProps {
  title: string;
  /** Version of the wording: a sheet records which one was read. */
  version: number;
  children: ReactNode;
}

export function Caution({ title, version, children }: CautionProps) {
  return (
    <section aria-label={`Caution: ${title}`} className="hatch-edge bg-ochre-wash px-14 py-10">
      <h3 className="flex items-baseline gap-10 font-semibold">
        {title}
        <span className="ml-auto text-note font-normal whitespace-nowrap text-ink-2">wording {version}</span>
      </h3>
      <div className="mt-4">{children}</div>
    </section>
  );
}
