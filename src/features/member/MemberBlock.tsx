import { useRef, useState } from 'react';
import type { BlockAction } from '@/components/ui/BlockActions';
import { Button } from '@/components/ui/Button';
import { Field, TextField } from '@/components/ui/Field';
import { TitleBlock } from '@/components/ui/TitleBlock';
import { TitleStrip } from '@/components/ui/TitleStrip';
import { useKeys } from '@/components/ui/use-keys';
import { paths } from '@/paths';
import { STATUS_NAMES } from './member';
import type { useMember } from './use-member';
import type { WorkspaceData } from './workspace';

const SHAPES = { draft: 'draft', ready: 'in_review', removed: 'withdrawn' } as const;
const day = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: '2-digit',
  timeZone: 'UTC',
});

interface MemberBlockProps {
  readonly data: WorkspaceData;
  readonly work: ReturnType<typeof useMember>;
}

/** Whose the member is, where it stands, and saving it. */
export function MemberBlock({ data, work }: MemberBlockProps) {
  const { job, mayEdit, template } = data;
  const status = useRef<HTMLParagraphElement>(null);
  const { member, draft, isDirty, saving } = work;
  const why = reasonNotToSave(work, mayEdit);
  const isSaving = saving.kind === 'saving';
  const action = {
    label: isSaving ? 'Saving' : 'Save',
    keyName: 'S',
    ...(why === undefined
      ? { onPress: () => void work.save() }
      : { reason: why, isQuiet: !isDirty || isSaving }),
  };
  useKeys({ s: () => why === undefined && void work.save() });
  const identity = {
    kind: 'Member',
    title: draft.title || template.name,
    status: SHAPES[member.status],
    statusWord: STATUS_NAMES[member.status],
    reference: member.mark,
    revision: String(member.version),
  };
  const sheet = isDirty
    ? { label: 'Calc sheet', reason: 'Save first: the sheet prints what is stored.' }
    : { label: 'Calc sheet', href: paths.memberSheet(job.number, member.mark) };
  return (
    <>
      <TitleBlock
        {...identity}
        org={job.name}
        jobNumber={job.number}
        by={member.changed_by}
        date={day.format(new Date(member.changed_at))}
        action={action}
        others={[sheet, statusStep(work, mayEdit)]}
      >
        <div className="col-span-6 grid gap-10">
          {mayEdit && <Names work={work} />}
          <p ref={status} role="status" tabIndex={-1} className="text-schedule">
            {said(work)}
          </p>
          {member.fingerprint && (
            <p className="text-note text-ink-2">
              Fingerprint <b className="font-semibold text-ink">{member.fingerprint.slice(0, 8)}</b>, engine{' '}
              {member.engine_version}
            </p>
          )}
          {mayEdit && member.status !== 'removed' && (
            <RemoveMember work={work} onRemoved={() => status.current?.focus()} />
          )}
          {member.status === 'removed' && <p className="text-schedule">Removed: {member.reason}</p>}
        </div>
      </TitleBlock>
      <TitleStrip {...identity} action={action} />
    </>
  );
}

function Names({ work: { draft, change, faults } }: Pick<MemberBlockProps, 'work'>) {
  return (
    <>
      <Field
        label="Title"
        maxLength={120}
        value={draft.title}
        error={faults.get('title')}
        onChange={(event) => change({ title: event.target.value })}
      />
      <TextField
        label="Purpose"
        maxLength={500}
        rows={2}
        value={draft.purpose}
        help="What it carries, what it bears on."
        error={faults.get('purpose')}
        onChange={(event) => change({ purpose: event.target.value })}
      />
    </>
  );
}

/** Between draft and ready for check; a removed member comes back as a draft. */
function statusStep({ member, body, live, save }: MemberBlockProps['work'], mayEdit: boolean): BlockAction {
  const isDraft = member.status === 'draft';
  const label = isDraft ? 'Ready for check' : 'Take back to draft';
  if (!mayEdit) return { label, reason: 'Members are changed by engineers.' };
  if (isDraft && !live.evaluation?.checks) return { label, reason: 'Needs a section and criteria.' };
  return { label, onPress: () => void save({ ...body, status: isDraft ? 'ready' : 'draft', reason: '' }) };
}

function reasonNotToSave({ live, draft, isDirty, saving }: MemberBlockProps['work'], mayEdit: boolean) {
  if (!mayEdit) return 'Members are changed by engineers with access to the job.';
  if (live.faults.length > 0) return 'Not saved while inputs fail. Put them right above.';
  if (!draft.selfWeight && draft.selfWeightReason.trim() === '') return 'Say why the own weight is left out.';
  if (!draft.patterns && draft.patternsReason.trim() === '') return 'Say why adverse patterns are left out.';
  if (saving.kind === 'saving') return 'Saving.';
  return isDirty ? undefined : 'Nothing to save.';
}

function said({ saving, isDirty, member }: MemberBlockProps['work']): string {
  if (saving.kind === 'saving') return 'Saving: the server evaluates the member.';
  if (saving.kind === 'stale' || saving.kind === 'refused')
    return 'Not saved. What to settle stands at the top of the sheet.';
  if (isDirty) return 'Changed here, not saved yet.';
  return `Saved as version ${member.version}, evaluated by the server.`;
}

interface RemoveProps extends Pick<MemberBlockProps, 'work'> {
  readonly onRemoved: () => void;
}

function RemoveMember({ work, onRemoved }: RemoveProps) {
  const [reason, setReason] = useState('');
  return (
    <details>
      <summary className="link min-h-24 text-schedule pointer-coarse:min-h-44">Remove this member</summary>
      <div className="mt-6 grid gap-8">
        <Field
          label="Because"
          maxLength={300}
          value={reason}
          help="The member and its mark are kept; the mark is never used again."
          onChange={(event) => setReason(event.target.value)}
        />
        <Button
          size="small"
          reason={reason.trim() === '' ? 'Say why first.' : undefined}
          onClick={async () => {
            if (await work.save({ ...work.body, status: 'removed', reason: reason.trim() })) onRemoved();
          }}
        >
          Remove
        </Button>
      </div>
    </details>
  );
}
