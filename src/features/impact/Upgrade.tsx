import { useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Notice } from '@/components/ui/Notice';
import type { UnitSystemName } from '@/engine/quantity';
import type { Template } from '@/engine/template';
import type { MemberView, Moves, SaveMember } from '@/features/member/member';
import { putMember } from '@/features/member/member.api';
import { paths } from '@/paths';
import { ChangeTable } from './ChangeTable';
import { type Changes, changesBetween, isSame } from './figures';
import { readParameterChanges, type Trying, tryMoves } from './upgrade.api';

/** What the member's sheet gives to the notices of what is newer. */
export interface UpgradeHost {
  readonly job: string;
  readonly system: UnitSystemName;
  readonly template: Template;
  /** Why the member cannot be upgraded now; null where it can. */
  readonly barred: string | null;
  /** The member as a body, so that an upgrade changes nothing else. */
  readonly body: SaveMember;
  /** Once it is upgraded: its documents are others by then. */
  readonly onUpgraded: () => void;
}

interface UpgradeProps {
  readonly title: string;
  readonly detail: string;
  readonly tone: 'caution' | 'error';
  readonly member: MemberView;
  readonly moves: Moves;
  /** "revision 3", "edition 2". */
  readonly to: string;
  readonly host: UpgradeHost;
}

type Shown =
  | { readonly kind: 'closed' }
  | { readonly kind: 'asking' }
  | { readonly kind: 'refused'; readonly message: string }
  | {
      readonly kind: 'open';
      readonly changes: Changes | null;
      readonly gone: readonly string[];
      readonly taken: readonly string[];
      /** Where the two were found by different engines. */
      readonly engines: string | null;
    };

/** Says what is newer, shows before and after of this member, and upgrades it with one press. Nothing upgrades by itself. */
export function Upgrade({ title, detail, tone, member, moves, to, host }: UpgradeProps) {
  const [shown, setShown] = useState<Shown>({ kind: 'closed' });
  const [isSaving, setSaving] = useState(false);

  async function show() {
    setShown({ kind: 'asking' });
    const number = moves.template_revision;
    const [trying, parameters] = await Promise.all([
      tryMoves(host.job, member.mark, moves),
      number === undefined ? NO_CHANGES : readParameterChanges(member.template.slug, number, host.template),
    ]);
    setShown(toShown(member, trying, parameters));
  }

  async function upgrade() {
    setSaving(true);
    const outcome = await putMember(host.job, member.mark, member.version, { ...host.body, ...moves });
    if (outcome.kind === 'saved') return host.onUpgraded();
    setSaving(false);
    const message =
      outcome.kind === 'refused'
        ? outcome.message
        : `${outcome.current.changed_by} saved version ${outcome.current.version} meanwhile. Read the page again.`;
    setShown({ kind: 'refused', message });
  }

  const actions =
    shown.kind === 'open' ? (
      <>
        <Button onClick={upgrade} reason={host.barred ?? (isSaving ? 'Saving …' : undefined)}>
          Upgrade to {to}
        </Button>
        <Button onClick={() => setShown({ kind: 'closed' })}>Leave it as it is</Button>
      </>
    ) : (
      <Button onClick={show} reason={shown.kind === 'asking' ? 'Worked out …' : undefined}>
        What changes here
      </Button>
    );
  return (
    <Notice title={title} tone={tone} actions={actions}>
      {detail && <p>{detail}</p>}
      {moves.template_revision !== undefined && (
        <p>
          <a
            className="link"
            href={paths.comparison(member.template.slug, member.template.revision, moves.template_revision)}
          >
            What changed in the template
          </a>
        </p>
      )}
      <div aria-live="polite">
        {shown.kind === 'refused' && (
          <p className="mt-4 font-semibold text-error">Not upgraded. {shown.message}</p>
        )}
        {shown.kind === 'open' && <Opened shown={shown} system={host.system} to={to} />}
      </div>
    </Notice>
  );
}

const NO_CHANGES = { gone: [], taken: [] };

function toShown(
  { result, engine_version: engine }: MemberView,
  trying: Trying,
  parameters: { readonly gone: readonly string[]; readonly taken: readonly string[] },
): Shown {
  if (trying.kind === 'refused') return trying;
  const { tried } = trying;
  if (tried.result?.kind !== 'result')
    return { kind: 'refused', message: tried.result?.message ?? 'It has no result then.' };
  return {
    kind: 'open',
    changes: result?.kind === 'result' ? changesBetween(result, tried.result) : null,
    engines:
      engine === null || engine === tried.engine_version
        ? null
        : `What is saved was found by engine ${engine}, what is new by engine ${tried.engine_version}.`,
    ...parameters,
  };
}

interface OpenedProps {
  readonly shown: Extract<Shown, { kind: 'open' }>;
  readonly system: UnitSystemName;
  readonly to: string;
}

function Opened({ shown: { changes, gone, taken, engines }, system, to }: OpenedProps) {
  return (
    <div className="mt-6">
      {changes === null ? (
        <p>It has no saved result to compare with.</p>
      ) : isSame(changes) ? (
        <p className="font-semibold">Every figure of this member stays as it is.</p>
      ) : (
        <ChangeTable changes={changes} system={system} to={to} />
      )}
      {gone.length > 0 && <p className="mt-4">No parameter any more, and left out: {gone.join(', ')}.</p>}
      {taken.length > 0 && <p className="mt-4">New parameters, at their defaults: {taken.join(', ')}.</p>}
      {engines && <p className="mt-4 text-ink-2">{engines}</p>}
    </div>
  );
}
