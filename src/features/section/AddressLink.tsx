import type { MouseEvent, ReactNode } from 'react';

interface AddressLinkProps {
  readonly href: string;
  readonly isCurrent?: boolean;
  /** Does in the page what the address says. */
  readonly onFollow: () => void;
  readonly children: ReactNode;
}

/** A link to another state of the same page: followed without loading it anew, and shared as any link. */
export function AddressLink({ href, isCurrent = false, onFollow, children }: AddressLinkProps) {
  const follow = (event: MouseEvent) => {
    if (event.metaKey || event.ctrlKey || event.shiftKey || event.altKey) return;
    event.preventDefault();
    onFollow();
  };
  return (
    <a
      href={href}
      aria-current={isCurrent ? 'true' : undefined}
      className={`inline-flex min-h-26 items-center pointer-coarse:min-h-44 max-md:min-h-44 ${isCurrent ? 'dimensioned pb-10 font-semibold no-underline' : ''}`}
      onClick={follow}
    >
      {children}
    </a>
  );
}
