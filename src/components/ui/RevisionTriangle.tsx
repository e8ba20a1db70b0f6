interface RevisionTriangleProps {
  revision: string;
  /** What changed, for readers who cannot see the mark's place. */
  what?: string;
}

/** The drawing board's mark for "changed at this revision". */
export function RevisionTriangle({ revision, what = 'Changed' }: RevisionTriangleProps) {
  const words = `${what} at revision ${revision}`;
  return (
    <svg
      width="22"
      height="19"
      viewBox="0 0 22 19"
      role="img"
      aria-label={words}
      className="inline-block flex-none align-[-4px] text-ochre-ink"
    >
      <title>{words}</title>
      <path d="M11 1.2 20.8 18H1.2Z" fill="none" stroke="currentColor" strokeWidth="1.2" />
      <text x="11" y="15.4" textAnchor="middle" fontSize="10.5" fontWeight="600" fill="currentColor">
        {revision}
      </text>
    </svg>
  );
}
