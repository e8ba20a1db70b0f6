import 'katex/dist/katex.min.css';
import { useEffect, useMemo, useRef, useState } from 'react';
import { type Key, type Subject, type Trace, Traces } from '@/engine/why';
import { ROOT, rowsOf, type TreeState, trailOf } from './rows';
import { type About, toSubject } from './subject';
import { WhyDetails } from './WhyDetails';
import { WhyTrail } from './WhyTrail';
import { WhyTree } from './WhyTree';

export interface WhyPanelProps {
  readonly about: About;
  readonly question: Key;
  /** With a parameter's symbol: its field is to be gone to. */
  readonly onClose: (symbol?: string) => void;
}

/** Where a number comes from: its chain as an outline, down to what was given, with the formula of what is chosen. */
export function WhyPanel({ about, question, onClose }: WhyPanelProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const subject = useMemo(() => toSubject(about), [about]);
  const root = useMemo(() => answer(subject, question), [subject, question]);
  useEffect(() => {
    const { current } = dialog;
    current?.showModal();
    current?.querySelector<HTMLElement>('[role=treeitem]')?.focus();
    return () => current?.close();
  }, []);
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: beside the panel a click closes it, as Esc does
    <dialog
      ref={dialog}
      aria-labelledby="why-title"
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onClick={(event) => event.target === dialog.current && onClose()}
      className="m-0 ml-auto h-dvh max-h-none w-[min(600px,100vw)] max-w-none overflow-hidden border-ink bg-paper p-0 text-ink backdrop:bg-ink/25 open:flex open:flex-col md:border-l-2"
    >
      <header className="flex min-h-46 flex-none items-center gap-10 border-b border-ink pl-(--pad)">
        <h2 id="why-title" className="text-zone font-semibold">
          Where this number comes from
        </h2>
        <button
          type="button"
          onClick={() => onClose()}
          className="ml-auto min-h-46 border-l border-ink px-14 font-semibold hover:bg-paper-3 focus-visible:-outline-offset-4"
        >
          Close
        </button>
      </header>
      {root ? (
        <Answer subject={subject} root={root} isMember={about.kind === 'member'} onField={onClose} />
      ) : (
        <p className="px-(--pad) py-14">This number cannot be taken apart at these values.</p>
      )}
    </dialog>
  );
}

/** A number that the subject does not have is no answer; anything else is our mistake. */
function answer(subject: Subject, question: Key): Trace | null {
  try {
    return new Traces(subject).why(question);
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

interface AnswerProps {
  readonly subject: Subject;
  readonly root: Trace;
  readonly isMember: boolean;
  readonly onField: (symbol: string) => void;
}

function Answer({ subject, root, isMember, onField }: AnswerProps) {
  const [state, setState] = useState<TreeState>({ open: new Set([ROOT]), active: ROOT });
  const rows = useMemo(() => rowsOf(root, state.open), [root, state.open]);
  const trail = trailOf(rows, state.active);
  const chosen = trail.at(-1);
  const { system } = subject;
  return (
    <>
      <WhyTrail trail={trail} onChoose={(active) => setState({ ...state, active })} />
      {chosen && (
        <WhyDetails key={chosen.path} row={chosen} subject={subject} isMember={isMember} onField={onField} />
      )}
      <WhyTree rows={rows} state={state} system={system} onChange={setState} />
    </>
  );
}
