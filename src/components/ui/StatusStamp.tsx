export const STATUS_WORDS = {
  draft: 'Draft',
  in_review: 'In review',
  issued: 'Issued',
  superseded: 'Superseded',
  withdrawn: 'Withdrawn',
} as const;

export type SheetStatus = keyof typeof STATUS_WORDS;

// The shape of the border carries the status; its colour only helps (visual.md §2).
const SHAPES: Record<SheetStatus, string> = {
  draft: 'border-[1.5px] border-dashed px-7 text-draft',
  in_review: 'border-[1.5px] border-l-7 px-7 text-review',
  issued: 'border-3 border-double px-6 text-issued',
  superseded: 'border px-7 text-superseded line-through decoration-1',
  withdrawn: 'stamp-struck border-[1.5px] pl-7 pr-24 text-withdrawn',
};

interface StatusStampProps {
  status: SheetStatus;
  /** Word to show instead of the usual one, for states that share a shape. */
  word?: string | undefined;
}

export function StatusStamp({ status, word }: StatusStampProps) {
  return (
    <span
      className={`inline-block whitespace-nowrap border-current py-1 text-[0.6875rem] leading-16 font-semibold tracking-[0.06em] uppercase ${SHAPES[status]}`}
    >
      {word ?? STATUS_WORDS[status]}
    </span>
  );
}
