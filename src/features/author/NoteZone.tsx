import { lazy, Suspense, useState } from 'react';
import { useRestedValue } from '@/features/template/use-live';
import { LinesAt, LongTextAt } from './fields';
import { useTextAt } from './use-editor';

const Preview = lazy(() => import('./NotePreview').then(({ NotePreview }) => ({ default: NotePreview })));

/** How it is solved, and where it is used and where not. */
export function NoteZone() {
  return (
    <div className="grid gap-12">
      <LongTextAt
        at="/method"
        label="Method"
        rows={7}
        help="How it is solved and what is assumed. Markdown; a blank line begins a paragraph."
      />
      <MethodPreview />
      <div className="grid gap-12 md:grid-cols-2">
        <LinesAt at="/use" label="Use for" rows={4} help="One a line." />
        <LinesAt at="/do_not_use" label="Do not use for" rows={4} help="One a line." />
      </div>
    </div>
  );
}

function MethodPreview() {
  const method = useRestedValue(useTextAt('/method'), 200);
  const [isOpen, setOpen] = useState(false);
  if (method === '') return null;
  return (
    <details onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="link inline-block min-h-26 pointer-coarse:min-h-44">As it will read</summary>
      {isOpen && (
        <Suspense fallback={<p className="text-ink-2">Setting the note</p>}>
          <Preview text={method} />
        </Suspense>
      )}
    </details>
  );
}
