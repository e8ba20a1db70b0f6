import type { ReactNode } from 'react';

interface NoticeChange {
  name: string;
  before: string;
  after: string;
  /** Unit and per cent, or whether it still passes. */
  note?: string | undefined;
}

interface NoticeProps {
  title: string;
  children?: ReactNode;
  /** Before and after of each governing result. */
  changes?: readonly NoticeChange[];
  /** Up to two actions of equal weight. */
  actions?: ReactNode;
  tone?: 'caution' | 'error';
}

/** What changed, in words, across the whole sheet. It states; it never acts by itself. */
export function Notice({ title, children, changes = [], actions, tone = 'caution' }: NoticeProps) {
  const error = tone === 'error';
  return (
    <section
      role={error ? 'alert' : 'status'}
      className={`hatch-edge flex flex-wrap items-stretch border-b border-b-ink max-md:flex-col ${error ? 'bg-error-wash' : 'bg-ochre-wash'}`}
    >
      <div className="flex min-w-0 flex-1 items-center gap-14 px-14 py-10">
        <svg width="22" height="19" viewBox="0 0 22 19" aria-hidden="true" className="flex-none">
          <path
            d="M11 1.2 20.8 18H1.2Z"
            fill="none"
            className={error ? 'stroke-error' : 'stroke-ochre-ink'}
          />
          <path
            d="M11 7v5M11 14v1.6"
            className={error ? 'stroke-error' : 'stroke-ochre-ink'}
            strokeWidth="1.6"
          />
        </svg>
        <div className="min-w-0">
          <p className="font-semibold">{title}</p>
          {children}
        </div>
      </div>
      {changes.length > 0 && (
        <dl className="flex flex-wrap">
          {changes.map((change) => (
            <div
              key={change.name}
              className="border-l border-rule-strong px-14 py-8 text-schedule max-md:border-l-0"
            >
              <dt className="text-note text-ink-2">{change.name}</dt>
              <dd className="whitespace-nowrap">
                {change.before} → <b className="font-semibold">{change.after}</b>{' '}
                <span className="text-note text-ink-2">{change.note}</span>
              </dd>
            </div>
          ))}
        </dl>
      )}
      {actions && <div className="flex flex-wrap items-center gap-10 px-14 py-8">{actions}</div>}
    </section>
  );
}
