import { useState } from 'react';
import type { BlockAction } from '@/components/ui/BlockActions';
import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { TitleBlock } from '@/components/ui/TitleBlock';
import { TitleStrip } from '@/components/ui/TitleStrip';
import { KIND_LABELS } from '@/features/desk/words';
import { KIND_NAMES } from '@/features/review/review';
import { paths } from '@/paths';
import { type Answer, askProof, bundleAddress, layAside, submitDraft } from './author.api';
import type { Autosave } from './autosave.api';
import type { DraftPageData } from './page';
import { useSnapshot, useTextAt } from './use-editor';

interface BlockProps {
  readonly data: DraftPageData;
  readonly autosave: () => Autosave | null;
}

/** What is said when something is not saved that must be. */
const UNSAVED: Answer<never> = {
  kind: 'refused',
  message: 'Not saved yet. See above what keeps it.',
  faults: [],
};

/** The steps of a draft, each taken of what is saved: a step saves first. */
function useSteps({ data, autosave }: BlockProps) {
  const [said, setSaid] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  const version = useSnapshot((snapshot) => snapshot.version);
  const { kind, slug, revision } = data.draft;
  const take = async (act: () => Promise<Answer<unknown>>, to: string) => {
    if (isBusy) return;
    setBusy(true);
    setSaid(undefined);
    const isSaved = (await autosave()?.flush()) ?? false;
    const outcome = isSaved ? await act() : UNSAVED;
    setBusy(false);
    if (outcome.kind === 'done') location.assign(to);
    else setSaid([...new Set([outcome.message, ...outcome.faults.map(({ message }) => message)])].join(' '));
  };
  const of = { kind, slug, revision };
  const review = paths.review(kind, slug, revision);
  return {
    said,
    isBusy,
    version,
    prove: () => void take(() => askProof(of), `${review}#proof`),
    submit: (now: () => number) => void take(() => submitDraft(of, now()), `${review}?done=submit`),
    layAside: () => void take(() => layAside(of), paths.libraryDocument(kind, slug)),
  };
}

/** Why the draft cannot be sent to review yet; undefined where it can. */
function useHindrance(): string | undefined {
  const faults = useSnapshot((snapshot) => snapshot.faults.length);
  const change = useSnapshot((snapshot) => snapshot.change);
  if (faults > 0) return faults === 1 ? 'One fault is left.' : `${faults} faults are left.`;
  if (change.change_note.trim() === '') return 'Say what is new and why.';
  if (change.change_class === null) return 'Say the class of change.';
  return change.consequence === null ? 'Say what is at stake.' : undefined;
}

export function DraftBlock(props: BlockProps & { readonly versionNow: () => number }) {
  const { data, versionNow } = props;
  const { draft } = data;
  const steps = useSteps(props);
  const name = useTextAt('/name');
  const reference = useTextAt('/reference');
  const hindrance = useHindrance();
  const faults = useSnapshot((snapshot) => snapshot.faults.length);
  const review = paths.review(draft.kind, draft.slug, draft.revision);
  const isProven = draft.kind === 'template';
  const submit: BlockAction = {
    label: steps.isBusy ? 'One moment' : 'Send to review',
    reason: hindrance,
    onPress: () => steps.submit(versionNow),
  };
  const prove: BlockAction = {
    label: 'Prove it',
    reason: faults > 0 ? 'Without faults' : undefined,
    onPress: steps.prove,
  };
  return (
    <>
      <MoreActions {...props} onLayAside={steps.layAside} />
      <TitleBlock
        org={data.practice}
        orgNote={KIND_LABELS[draft.kind]}
        kind="Title"
        title={name || draft.slug}
        by={draft.author}
        status="draft"
        reference={reference}
        revision={String(draft.revision)}
        action={data.isEditable ? submit : undefined}
        others={[
          ...(data.isEditable && isProven ? [prove] : []),
          { label: isProven ? 'Proof, comments' : 'Changes, comments', href: review },
        ]}
      >
        {steps.said !== undefined && (
          <div className="col-span-6">
            <FieldNote id="step-refused" error={steps.said} />
          </div>
        )}
      </TitleBlock>
      <TitleStrip
        kind={`Draft of a ${KIND_NAMES[draft.kind]}`}
        title={name || draft.slug}
        status="draft"
        reference={reference}
        revision={String(draft.revision)}
        action={data.isEditable ? submit : undefined}
      />
    </>
  );
}

function MoreActions({ data, onLayAside }: BlockProps & { readonly onLayAside: () => void }) {
  const { draft, isEditable } = data;
  const faults = useSnapshot((snapshot) => snapshot.faults.length);
  const [isAsked, setAsked] = useState(false);
  const text = paths.libraryDraftText(draft.kind, draft.slug, draft.revision);
  return (
    <section className="zone">
      <div className="flex flex-wrap gap-8">
        <Button size="small" href={text}>
          As text
        </Button>
        <Button
          size="small"
          href={faults === 0 ? bundleAddress(draft) : undefined}
          reason={faults === 0 ? undefined : 'When its faults are put right.'}
        >
          Download the bundle
        </Button>
        {isEditable && !isAsked && (
          <Button size="small" onClick={() => setAsked(true)}>
            Lay it aside
          </Button>
        )}
      </div>
      {isAsked && (
        <p className="mt-8 flex flex-wrap items-center gap-8">
          <span>Nothing is deleted: it is left out of the lists, and saving it takes it up again.</span>
          <Button size="small" onClick={onLayAside}>
            Lay it aside now
          </Button>
          <Button size="small" onClick={() => setAsked(false)}>
            Go on with it
          </Button>
        </p>
      )}
    </section>
  );
}
