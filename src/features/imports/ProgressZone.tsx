import { Button } from '@/components/ui/Button';
import type { ImportView } from './imports';
import { countWords, PHASE_WORDS, sizeWords } from './words';

interface ProgressZoneProps {
  readonly view: ImportView;
  /** The server did not answer when it was asked last. */
  readonly isLost: boolean;
  readonly onCancel: (() => void) | undefined;
}

/** How far the worker is. The page may be closed meanwhile; whoever opens it again sees where it is. */
export function ProgressZone({ view: { phase, done, total }, isLost, onCancel }: ProgressZoneProps) {
  const words = phase === 'reading' ? sizeWords : countWords;
  return (
    <div className="sticky top-20 grid gap-10">
      <p role="status">
        {phase ? `${PHASE_WORDS[phase]}: ${words(done)} of ${words(total)}.` : 'It waits for the worker.'}
      </p>
      <progress className="import-progress w-full" max={total || 1} value={done} aria-label="Done" />
      {isLost && (
        <p role="status" className="font-semibold text-ochre-ink">
          The server cannot be asked now: the connection is lost, or the session has ended. This page asks
          again every two seconds.
        </p>
      )}
      <p className="text-ink-2">
        It goes on if this page is closed or the connection is lost. Come back to it from the list of imports.
      </p>
      {onCancel && (
        <div>
          <Button onClick={onCancel}>Cancel the import</Button>
        </div>
      )}
    </div>
  );
}
