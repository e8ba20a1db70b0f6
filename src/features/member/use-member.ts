import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { FieldFaults } from '@/features/template/faults';
import { fieldFaults } from '@/features/template/faults';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { evaluateMember, type MemberEvaluation, type MemberInputs } from './evaluate';
import type { MemberView, SaveMember } from './member';
import { putMember } from './member.api';
import { sameFigures, toStoredResult } from './result';
import {
  asSaved,
  bodyOf,
  changesOf,
  type Draft,
  differencesOf,
  type HistoryLine,
  inFields,
  toBody,
  toDraft,
  toInputs,
  type WorkspaceData,
} from './workspace';

export type SaveState =
  | { readonly kind: 'idle' }
  | { readonly kind: 'saving' }
  | { readonly kind: 'saved'; readonly isSame: boolean }
  | { readonly kind: 'stale'; readonly current: MemberView }
  | { readonly kind: 'refused'; readonly message: string; readonly faults: readonly Fault[] };

/** The member's draft, what it comes to, and its saving. */
export function useMember(data: WorkspaceData) {
  const { template, job } = data;
  const read = (saved: MemberView) => inFields(saved, template, job.unitSystem);
  const [member, setMember] = useState(() => read(data.member));
  const [draft, setDraft] = useState<Draft>(() =>
    toDraft(data.member, template, data.section, job.unitSystem),
  );
  const [saving, setSaving] = useState<SaveState>({ kind: 'idle' });
  const change = useCallback((part: Partial<Draft>) => {
    setDraft((before) => ({ ...before, ...part }));
    // What was wrong with the last save may be put right now; a difference to somebody else's stays until it is settled.
    setSaving((before) => (before.kind === 'stale' || before.kind === 'saving' ? before : { kind: 'idle' }));
  }, []);
  const inputs = useMemo(() => toInputs(draft, data), [draft, data]);
  const live = useEvaluation(inputs);
  const [history, setHistory] = useState(data.history);
  const lastGoodDraft = useLastGood(draft, live.evaluation !== null);
  const body = useMemo(
    () => toBody(draft, template, { status: member.status, reason: member.reason }),
    [draft, template, member],
  );
  const isDirty = useMemo(() => differencesOf(bodyOf(member), body).length > 0, [member, body]);
  const readAgain = useReadAgain(isDirty);

  /** Sends what stands in the fields, or what is given instead, over the version that was read. */
  async function save(sent: SaveMember = body, over = member.version): Promise<MemberView | null> {
    setSaving({ kind: 'saving' });
    const outcome = await putMember(job.number, member.mark, over, sent);
    if (outcome.kind !== 'saved') {
      setSaving(outcome.kind === 'stale' ? { ...outcome, current: read(outcome.current) } : outcome);
      return null;
    }
    const { result } = outcome.member;
    const { evaluation } = live;
    const isSame = evaluation !== null && result !== null && sameFigures(toStoredResult(evaluation), result);
    const saved = read(outcome.member);
    setMember(saved);
    setDraft((before) => asSaved(before, saved));
    setHistory([savedLine(member, saved), ...history]);
    setSaving({ kind: 'saved', isSame });
    return outcome.member;
  }

  const putBack = () => change(lastGoodDraft.current);

  const faults: FieldFaults = useMemo(
    () => fieldFaults(saving.kind === 'refused' && live.faults.length === 0 ? saving.faults : live.faults),
    [saving, live.faults],
  );
  return {
    member,
    draft,
    change,
    inputs,
    live,
    body,
    isDirty,
    saving,
    save,
    faults,
    history,
    putBack,
    readAgain,
  };
}

/** Asks before the page is left with something unsaved; gives back what reads the page again and drops it unasked. */
function useReadAgain(isDirty: boolean) {
  const [isLeaving, setLeaving] = useState(false);
  useUnsavedGuard(isDirty && !isLeaving);
  return () => {
    setLeaving(true);
    setTimeout(() => location.reload());
  };
}

/** The draft as it was when it last held. */
function useLastGood(draft: Draft, isGood: boolean) {
  const last = useRef(draft);
  useEffect(() => {
    if (isGood) last.current = draft;
  }, [draft, isGood]);
  return last;
}

/** The record's line of a save, as the record will say it when it is read again. */
const savedLine = (before: MemberView, after: MemberView): HistoryLine => ({
  at: after.changed_at,
  by: after.changed_by,
  ...changesOf('member.save', {
    before: bodyOf(before),
    after: { ...bodyOf(after), version: after.version },
  }),
});

export interface Live {
  /** Null where the inputs fail. */
  readonly evaluation: MemberEvaluation | null;
  /** The last one that held, to be drawn dashed while the inputs fail. */
  readonly lastGood: MemberEvaluation | null;
  readonly faults: readonly Fault[];
}

const NONE: readonly Fault[] = [];

function useEvaluation(inputs: MemberInputs): Live {
  const reading = useMemo(() => evaluateMember(inputs), [inputs]);
  const lastGood = useRef<MemberEvaluation | null>(null);
  const evaluation = reading.ok && reading.evaluation.proof.proven ? reading.evaluation : null;
  useEffect(() => {
    if (evaluation) lastGood.current = evaluation;
  }, [evaluation]);
  const faults = useMemo(
    () =>
      reading.ok
        ? evaluation
          ? NONE
          : [
              {
                pointer: '',
                code: 'unproven',
                message: 'The two methods do not agree: there is no result that can be trusted.',
              },
            ]
        : reading.faults.map(({ path, code, message }) => ({ pointer: pointer(path), code, message })),
    [reading, evaluation],
  );
  return { evaluation, lastGood: evaluation ?? lastGood.current, faults };
}

/** The browser asks before a page with unsaved changes is left. */
function useUnsavedGuard(isDirty: boolean) {
  useEffect(() => {
    if (!isDirty) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    addEventListener('beforeunload', ask);
    return () => removeEventListener('beforeunload', ask);
  }, [isDirty]);
}
