import { useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Radio } from '@/components/ui/Choice';
import { Notice } from '@/components/ui/Notice';
import { Upgrade, type UpgradeHost } from '@/features/impact/Upgrade';
import { paths } from '@/paths';
import type { MemberView, Moves, Pin, SaveMember } from './member';
import type { SaveState } from './use-member';
import { bodyOf, differencesOf, settle } from './workspace';

interface PinNoticesProps {
  readonly member: MemberView;
  readonly host: UpgradeHost;
}

/** What is to be known of what the member pins, and what is newer: shown before and after, upgraded when it is pressed. */
export function PinNotices({ member, host }: PinNoticesProps) {
  const { template, criteria, combinations, section, materials } = member;
  const lines = [
    ...pinLine(template, (template_revision) => ({ template_revision })),
    ...factLines(`${template.reference} revision ${template.revision}`, template),
    ...(criteria
      ? [
          ...pinLine(criteria, (criteria_revision) => ({ criteria_revision })),
          ...factLines(`${criteria.reference} revision ${criteria.revision}`, criteria),
        ]
      : []),
    ...(combinations
      ? [
          ...pinLine(combinations, (combinations_revision) => ({ combinations_revision })),
          ...factLines(`${combinations.reference} revision ${combinations.revision}`, combinations),
        ]
      : []),
    ...(section ? editionLines(section) : []),
    ...(materials
      ? [
          ...pinLine(materials, (material_revision) => ({ material_revision })),
          ...factLines(`${materials.reference} revision ${materials.revision}`, materials),
        ]
      : []),
  ];
  return lines.map(({ title, detail, tone, recall, upgrade }) =>
    upgrade ? (
      <Upgrade key={title} {...{ title, detail, tone, member, host }} moves={upgrade.moves} to={upgrade.to} />
    ) : (
      <Notice key={title} title={title} tone={tone}>
        <p>{detail}</p>
        {recall && (
          <p>
            <a href={paths.recall(recall)}>Open the recall</a>
          </p>
        )}
      </Notice>
    ),
  );
}

interface Line {
  readonly title: string;
  readonly detail: string;
  readonly tone: 'caution' | 'error';
  readonly recall?: string;
  /** What the member can be moved to. */
  readonly upgrade?: { readonly moves: Moves; readonly to: string };
}

type Facts = Pick<Pin, 'recall' | 'review' | 'review_by' | 'withdrawn_ancestor'>;

/** What is to be known of a pinned revision besides its state: its recall, its review, what it was made from. */
function factLines(name: string, { recall, review, review_by, withdrawn_ancestor: ancestor }: Facts): Line[] {
  const lines: Line[] = [];
  if (recall && !recall.closed)
    lines.push({
      title: `${name} is recalled.`,
      detail: recall.decided
        ? 'What becomes of this member has been decided.'
        : 'What becomes of this member has to be decided, by name.',
      tone: recall.decided ? 'caution' : 'error',
      recall: recall.id,
    });
  if (review === 'due' || review === 'expired')
    lines.push({
      title: `${name} was to be reviewed by ${review_by}.`,
      detail:
        review === 'due'
          ? 'Ask a librarian whether it still holds.'
          : 'New members may not use it any more. Ask a librarian whether it still holds.',
      tone: 'caution',
    });
  if (ancestor)
    lines.push({
      title: `${name} was made from ${ancestor.reference} revision ${ancestor.revision}, which was withdrawn: ${ancestor.reason}`,
      detail: 'Check whether the fault was taken over.',
      tone: 'caution',
    });
  return lines;
}

function editionLines(section: NonNullable<MemberView['section']>): Line[] {
  const name = `Edition ${section.edition} of ${section.table_name}`;
  const withdrawn: Line[] =
    section.state === 'withdrawn'
      ? [
          {
            title: `${name} was withdrawn: ${section.withdrawal_reason}`,
            detail: 'This member still uses it. Check what the fault means here before the member goes on.',
            tone: 'error',
          },
        ]
      : [];
  const newer: Line[] =
    section.newer === null
      ? []
      : [
          {
            title: `Edition ${section.newer} of ${section.table_name} is issued. This member still uses edition ${section.edition}.`,
            detail: 'Its section keeps the figures of that edition until it is upgraded.',
            tone: 'caution',
            upgrade: { moves: { section_edition: section.newer }, to: `edition ${section.newer}` },
          },
        ];
  return [...withdrawn, ...factLines(name, section), ...newer];
}

function pinLine(
  { reference, revision, state, newer, newer_note, withdrawal_reason }: Pin,
  movesTo: (newer: number) => Moves,
): Line[] {
  const upgrade = newer === null ? {} : { upgrade: { moves: movesTo(newer), to: `revision ${newer}` } };
  if (state === 'withdrawn')
    return [
      {
        title: `${reference} revision ${revision} was withdrawn: ${withdrawal_reason}`,
        detail: `This member still uses it.${newer === null ? '' : ` Revision ${newer} is issued.`} Check what the fault means here before the member goes on.`,
        tone: 'error',
        ...upgrade,
      },
    ];
  return newer === null
    ? []
    : [
        {
          title: `${reference} revision ${newer} is issued. This member still uses revision ${revision}.`,
          detail: newer_note ?? '',
          tone: 'caution',
          ...upgrade,
        },
      ];
}

interface SaveNoticeProps {
  readonly saving: SaveState;
  readonly body: SaveMember;
  /** Save over theirs, each field as it was chosen. */
  readonly onSettle: (current: MemberView, body: SaveMember) => void;
  readonly onTakeTheirs: () => void;
}

/** What came of the last save, where a person has something to settle. */
export function SaveNotice(props: SaveNoticeProps) {
  const host = useRef<HTMLDivElement>(null);
  const { saving } = props;
  const isOpen =
    saving.kind === 'refused' || saving.kind === 'stale' || (saving.kind === 'saved' && !saving.isSame);
  // Saving is pressed at the foot of the sheet: what came of it is brought to whoever pressed.
  useEffect(() => {
    if (isOpen) host.current?.focus();
  }, [isOpen]);
  return (
    <div ref={host} tabIndex={-1}>
      {isOpen && <OpenNotice {...props} />}
    </div>
  );
}

function OpenNotice({ saving, body, onSettle, onTakeTheirs }: SaveNoticeProps) {
  if (saving.kind === 'refused')
    return (
      <Notice tone="error" title={`Not saved. ${saving.message}`}>
        {saving.faults.length > 1 && (
          <ul className="list-disc pl-18">
            {saving.faults.map(({ pointer, message }) => (
              <li key={pointer + message}>{message}</li>
            ))}
          </ul>
        )}
      </Notice>
    );
  if (saving.kind === 'saved' && !saving.isSame)
    return (
      <Notice
        tone="error"
        title="Saved, but the server found other figures than this browser shows. Read the page again before you rely on either, and report it."
      />
    );
  if (saving.kind !== 'stale') return null;
  return <StaleNotice current={saving.current} body={body} onSettle={onSettle} onTakeTheirs={onTakeTheirs} />;
}

type StaleProps = Omit<SaveNoticeProps, 'saving'> & { readonly current: MemberView };

function StaleNotice({ current, body, onSettle, onTakeTheirs }: StaleProps) {
  const theirs = bodyOf(current);
  const differences = differencesOf(theirs, body);
  const [taken, setTaken] = useState<ReadonlySet<string>>(new Set());
  const choose = (field: string, isTheirs: boolean) => {
    const next = new Set(taken);
    if (isTheirs) next.add(field);
    else next.delete(field);
    setTaken(next);
  };
  return (
    <Notice
      tone="error"
      title={`Not saved. ${current.changed_by} saved version ${current.version} after you opened this member. Nothing you typed is lost.`}
      actions={
        <>
          <Button onClick={() => onSettle(current, settle(theirs, body, taken))}>
            Save with these choices
          </Button>
          <Button onClick={onTakeTheirs}>Take all of theirs</Button>
        </>
      }
    >
      {differences.length === 0 ? (
        <p>Theirs and yours say the same.</p>
      ) : (
        <table className="schedule mt-6 bg-paper">
          <thead>
            <tr>
              <th scope="col">Field</th>
              <th scope="col">Theirs</th>
              <th scope="col">Yours</th>
            </tr>
          </thead>
          <tbody>
            {differences.map((difference) => (
              <tr key={difference.field}>
                <th scope="row">{difference.name}</th>
                {(['theirs', 'yours'] as const).map((side) => (
                  <td key={side} className="break-words">
                    <Radio
                      name={`settle ${difference.field}`}
                      checked={taken.has(difference.field) === (side === 'theirs')}
                      onChange={() => choose(difference.field, side === 'theirs')}
                    >
                      {difference[side]}
                    </Radio>
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </Notice>
  );
}
