import type { ReactNode } from 'react';

/** Revision cloud round what is wrong or still in question. */
export function ErrorCloud({ children }: { children: ReactNode }) {
  return (
    <div className="cloud inline-block text-error">
      <span className="sr-only">Wrong here: </span>
      {children}
    </div>
  );
}
