import type { ReactNode } from 'react';

interface EmptyStateProps {
  title: string;
  /** What to do first, in one or two short sentences. */
  children: ReactNode;
  actions?: ReactNode;
}

/** Nothing yet: construction lines show where the drawing will be. */
export function EmptyState({ title, children, actions }: EmptyStateProps) {
  return (
    <div className="relative grid justify-items-center overflow-hidden md:min-h-440 md:content-start">
      <ConstructionLines />
      <div className="relative mt-252 mb-44 max-w-560 bg-paper px-26 pt-6 pb-10 text-center max-md:mt-0 max-md:mb-14 max-md:px-12">
        <h2 className="text-[1.625rem] leading-32 font-light">{title}</h2>
        <p className="mt-4 text-zone font-normal text-ink-2">{children}</p>
        {actions && <div className="mt-14 flex flex-wrap justify-center gap-8">{actions}</div>}
      </div>
    </div>
  );
}

function ConstructionLines() {
  return (
    <svg
      viewBox="0 0 1000 400"
      preserveAspectRatio="xMidYMid meet"
      aria-hidden="true"
      fill="none"
      className="pointer-events-none absolute inset-x-0 top-0 h-full w-full stroke-ink-3 [&_path]:[vector-effect:non-scaling-stroke] max-md:static max-md:h-160"
      strokeDasharray="5 4"
    >
      <path d="M116 60H880V88M116 88H880V128H116Z" />
      <path d="M130 42V166M880 128l13 20h-26zM858 154h44M90 108H920" />
      <path d="M130 176V208M880 160V208M130 202H880" />
      <path d="M130 330H880M130 290C290 348 380 380 560 380S880 330 880 330" />
      <text
        x="505"
        y="196"
        textAnchor="middle"
        fontSize="12"
        stroke="none"
        className="fill-ink-2 max-lg:hidden"
      >
        span
      </text>
    </svg>
  );
}
