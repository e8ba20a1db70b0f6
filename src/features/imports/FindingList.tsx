import { useEffect, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { useKeys } from '@/components/ui/use-keys';
import type { Finding, FindingGroup } from '@/features/section/import/contract';
import { mayAccept } from '@/features/section/import/report';
import { FileScale } from './FileScale';
import { type Deeds, FindingItem, OneField } from './FindingItem';
import type { ImportView } from './imports';
import { type Place, shownFindings } from './place';
import { causeWords, countWords } from './words';

interface FindingListProps extends Deeds {
  readonly view: ImportView;
  readonly place: Place;
}

/** What was found, by cause, over one scale of the file. */
export function FindingList({ view, place, ...deeds }: FindingListProps) {
  const groups = view.report?.groups ?? [];
  const all = groups.flatMap(({ findings }) => findings);
  const accepted = new Map(view.acceptances.map((one) => [one.key, one]));
  const [areNotesShown, setNotesShown] = useState(false);
  const notes = groups.filter(({ severity }) => severity === 'note');
  const shown = areNotesShown ? groups : groups.filter(({ severity }) => severity !== 'note');
  useKeys({ e: () => goToNext('error'), w: () => goToNext('warning') });
  // biome-ignore lint/correctness/useExhaustiveDependencies: when something was done and this is how it stands then
  useEffect(() => {
    if (!deeds.isOff) place.resume();
  }, [deeds.isOff, view]);
  if (groups.length === 0) return <None>{NOTHING[view.state] ?? NOTHING.findings}</None>;
  const lines = Math.max(view.rows ?? 0, ...all.map(({ line }) => line ?? 0));
  return (
    <>
      <FileScale lines={lines} findings={all} onChoose={goTo} />
      <div className="border-t-2 border-ink">
        {shown.map((group) => (
          <Group key={group.group} {...{ group, accepted, ...deeds }} />
        ))}
      </div>
      {shown.length === 0 && <None>No error and no warning is left.</None>}
      {notes.length > 0 && (
        <p className="mt-8">
          <Button tone="text" aria-expanded={areNotesShown} onClick={() => setNotesShown(!areNotesShown)}>
            {areNotesShown ? 'Hide notes' : `Show ${countWords(view.report?.notes ?? 0)} notes`}
          </Button>
        </p>
      )}
    </>
  );
}

/** Where the focus goes when the last finding is gone. */
function None({ children }: { children: string }) {
  return (
    <p tabIndex={-1} data-no-finding>
      {children}
    </p>
  );
}

interface GroupProps extends Deeds {
  readonly group: FindingGroup;
  readonly accepted: ReadonlyMap<string, ImportView['acceptances'][number]>;
}

function Group({ group, accepted, ...deeds }: GroupProps) {
  const { severity, cause, heading, count, findings } = group;
  const ofAll = accepted.get(group.group);
  const open = findings.filter(({ key }) => !ofAll && !accepted.has(key));
  return (
    <section data-group aria-label={`${heading} ${causeWords(cause)}`.trim()}>
      {count > 1 && (
        <header className="flex flex-wrap items-center gap-x-14 gap-y-2 border-b border-rule py-6 text-schedule">
          <b className="font-semibold">
            {heading ? `${heading}: ` : ''}
            {causeWords(cause)}
          </b>
          <span className="text-ink-2">
            {countWords(count)} {severity}s
            {count > findings.length && `, the first ${findings.length} are shown`}
          </span>
          {!deeds.isOff && open.length > 1 && <ForAll {...{ group, open, ...deeds }} />}
        </header>
      )}
      <ul>
        {findings.map((finding) => (
          <FindingItem
            key={finding.key}
            finding={finding}
            accepted={ofAll ?? accepted.get(finding.key)}
            {...deeds}
          />
        ))}
      </ul>
    </section>
  );
}

interface ForAllProps extends Pick<Deeds, 'onFix' | 'onAccept' | 'firstRow'> {
  readonly group: FindingGroup;
  /** Those of its findings that nothing was done about. */
  readonly open: readonly Finding[];
}

/** One press for all findings of a cause. */
function ForAll({ group, open, firstRow, onFix, onAccept }: ForAllProps) {
  const [isAccepting, setAccepting] = useState(false);
  const canFix = open.every(({ fixes }) => fixes.length > 0);
  const lines = open.flatMap(({ line }) => (line === null || line < firstRow ? [] : [line]));
  return (
    <>
      {canFix && (
        <Button
          tone="text"
          onClick={() => onFix({ apply: open.map(({ key }) => ({ finding: key, fix: 0 })) })}
        >
          Take the first suggestion for all
        </Button>
      )}
      {group.severity === 'error' && lines.length > 1 && (
        <Button tone="text" onClick={() => onFix({ leave_out: lines })}>
          Leave out all {lines.length} lines
        </Button>
      )}
      {open.every(mayAccept) && (
        <Button tone="text" aria-expanded={isAccepting} onClick={() => setAccepting(!isAccepting)}>
          Accept all
        </Button>
      )}
      {isAccepting && (
        <OneField
          label="Why they are right as they stand"
          word="Accept all with this reason"
          start=""
          least={3}
          onGiven={(reason) => onAccept({ keys: [group.group], reason })}
          onClose={() => setAccepting(false)}
        />
      )}
    </>
  );
}

const NOTHING: Partial<Readonly<Record<ImportView['state'], string>>> & { readonly findings: string } = {
  findings: 'Every rule was tried on every row, and nothing was found. The rows can become an edition.',
  committed: 'Every rule was tried on every row, and nothing was left. The rows are an edition.',
  cancelled: 'Every rule was tried on every row, and nothing was found. The import was cancelled.',
};

function goTo(key: string): void {
  const item = shownFindings().find(({ dataset }) => dataset['finding'] === key);
  item?.focus({ preventScroll: true });
  item?.scrollIntoView({ block: 'center' });
}

/** The next one after where the focus is, round to the first. */
function goToNext(severity: 'error' | 'warning'): void {
  const all = shownFindings();
  const at = all.findIndex((item) => item.contains(document.activeElement));
  const next = [...all.slice(at + 1), ...all.slice(0, at + 1)].find(
    ({ dataset }) => dataset['severity'] === severity,
  );
  if (next) goTo(next.dataset['finding'] ?? '');
}
