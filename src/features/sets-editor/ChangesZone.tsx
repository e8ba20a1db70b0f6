import { useDeferredValue, useMemo } from 'react';
import { useSnapshot } from '@/features/author/use-editor';
import { changesBetween } from '@/features/desk/changes';
import { partName } from '@/features/desk/part-name';
import { valueWords } from '@/features/desk/value-words';
import { capital, counted } from '@/features/desk/words';
import type { ZoneProps } from './page';

/** Of a long list of changes: what the review shows in full. */
const MOST = 40;

/** What the draft changes of the issued revision, value by value. */
export function ChangesZone({ data: { issued } }: ZoneProps) {
  const document = useDeferredValue(useSnapshot(({ history }) => history.document));
  const changes = useMemo(
    () => (issued ? changesBetween(issued.document, document) : []),
    [issued, document],
  );
  if (!issued) return <p className="text-ink-2">Nothing is issued yet that it could be compared with.</p>;
  if (changes.length === 0) return <p>It says the same as revision {issued.revision}.</p>;
  return (
    <>
      <p className="mb-6 text-ink-2">
        {capital(counted(changes.length, 'value'))} {changes.length === 1 ? 'differs' : 'differ'} from
        revision {issued.revision}
        {changes.length > MOST && `; the first ${MOST} are shown`}.
      </p>
      <ul aria-label={`Changed since revision ${issued.revision}`}>
        {changes.slice(0, MOST).map(({ pointer, before, after }) => (
          <li key={pointer} className="border-b border-rule py-4 wrap-anywhere">
            <b className="block font-semibold">{capital(partName(pointer, document))}</b>
            <span className="text-schedule">
              <del className="text-ink-2">{wordsOf(before)}</del> →{' '}
              <ins className="no-underline">{after === null ? 'gone' : wordsOf(after)}</ins>
            </span>
          </li>
        ))}
      </ul>
    </>
  );
}

const wordsOf = (json: string | null): string => (json === null ? '–' : valueWords(JSON.parse(json)));
