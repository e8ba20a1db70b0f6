import { useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Field } from '@/components/ui/Field';
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
  const { member, draft, change, body, isDirty, saving, live } = work;
  const why = reasonNotToSave(work, mayEdit);
  const action = {
    label: saving.kind === 'saving' ? 'Saving' : 'Save',
    keyName: 'S',
    ...(why === undefined ? { onPress: () => void work.save() } : { reason: why }),
  };
  useKeys({ s: () => why === undefined && void work.save() });
  const title = draft.title || template.name;
  const identity = {
    kind: 'Member',
    status: SHAPES[member.status],
    statusWord: STATUS_NAMES[member.status],
    reference: member.mark,
    revision: String(member.version),
  };
  const status = (next: 'draft' | 'ready') => () => void work.save({ ...body, status: next, reason: '' });
  const isReady = member.status === 'ready';
  const step = {
    label: member.status === 'draft' ? 'Ready for check' : 'Take back to draft',
    ...(!mayEdit
      ? { reason: 'Members are changed by engineers.' }
      : isReady || member.status === 'removed' || live.evaluation?.checks
        ? { onPress: status(member.status === 'draft' ? 'ready' : 'draft') }
        : { reason: 'Needs a section and criteria.' }),
  };
  return (
    <>
      <TitleBlock
        {...identity}
        org={job.name}
        jobNumber={job.number}
        title={title}
        by={member.changed_by}
        date={day.format(new Date(member.changed_at))}
        action={action}
        others={[
          isDirty
            ? { label: 'Calc sheet', reason: 'Save first: the sheet prints what is stored.' }
            : { label: 'Calc sheet', href: paths.memberSheet(job.number, member.mark) },
          step,
        ]}
      >
        <div className="col-span-6 grid gap-10">
          {mayEdit && (
            <>
              <Field
                label="Title"
                maxLength={120}
                value={draft.title}
                error={work.faults.get('title')}
                onChange={(event) => change({ title: event.target.value })}
              />
              <Field
                label="Purpose"
                maxLength={500}
                value={draft.purpose}
                help="What it carries, what it bears on."
                error={work.faults.get('purpose')}
                onChange={(event) => change({ purpose: event.target.value })}
              />
            </>
          )}
          <p role="status" className="text-schedule">
            {said(work)}
          </p>
          {member.fingerprint && (
            <p className="text-note text-ink-2">
              Fingerprint <b className="font-semibold text-ink">{member.fingerprint.slice(0, 8)}</b>, engine{' '}
              {member.engine_version}
            </p>
          )}
          {mayEdit && member.status !== 'removed' && <RemoveMember work={work} />}
          {member.status === 'removed' && <p className="text-schedule">Removed: {member.reason}</p>}
        </div>
      </TitleBlock>
      <TitleStrip {...identity} title={title} action={action} />
    </>
  );
}

function reasonNotToSave({ live, draft, isDirty, saving }: MemberBlockProps['work'], mayEdit: boolean) {
  if (!mayEdit) return 'Members are changed by engineers with access to the job.';
  if (live.faults.length > 0) return 'Not saved while inputs fail. Put them right above.';
  if (!draft.selfWeight && draft.selfWeightReason.trim() === '') return 'Say why the own weight is left out.';
  if (saving.kind === 'saving') return 'Saving.';
  return isDirty ? undefined : 'Nothing to save.';
}

function said({ saving, isDirty, member }: MemberBlockProps['work']): string {
  if (saving.kind === 'saving') return 'Saving: the server evaluates the member.';
  if (isDirty) return 'Changed here, not saved yet.';
  return `Saved as version ${member.version}, evaluated by the server.`;
}

function RemoveMember({ work }: Pick<MemberBlockProps, 'work'>) {
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
          onClick={() => void work.save({ ...work.body, status: 'removed', reason: reason.trim() })}
        >
          Remove
        </Button>
      </div>
    </details>
  );
}
