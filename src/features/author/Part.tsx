import { type ReactNode, useEffect, useRef } from 'react';
import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { removal, reordering, whyKept } from './drawing/change';
import { isAtDrawing } from './drawing/in-view';
import { type Pointer, parentOf } from './edit';
import { useReadOnly } from './fields';
import { focusPart } from './open-part';
import { useDraft, useFaultAt, useFaultIn, useIsSelected, useSnapshot } from './use-editor';

interface PartProps {
  readonly at: Pointer;
  /** In one line while it is closed: what it is, and the figures that tell it from others. */
  readonly title: ReactNode;
  readonly line: ReactNode;
  /** What it is called to a screen reader's user: "parameter L". */
  readonly name: string;
  readonly count: number;
  readonly children: ReactNode;
}

/** One entry of a list: a line that opens into its fields. Open, it is the part that the drawing points out. */
export function Part({ at, title, line, name, count, children }: PartProps) {
  const store = useDraft();
  const isOpen = useIsSelected(at);
  const fault = useFaultIn(at);
  const ownFault = useFaultAt(at);
  const place = useRef<HTMLLIElement>(null);
  useEffect(() => {
    if (isOpen && !place.current?.contains(document.activeElement) && !isAtDrawing())
      place.current?.scrollIntoView({ block: 'nearest' });
  }, [isOpen]);
  return (
    <li
      ref={place}
      data-part={at}
      className={`scroll-mt-200 scroll-mb-70 border-b border-rule ${isOpen ? 'border-l-3 border-l-ochre pl-10' : ''}`}
    >
      <button
        type="button"
        aria-expanded={isOpen}
        onClick={() => store.select(isOpen ? null : at)}
        className={`flex min-h-34 w-full flex-wrap items-baseline gap-x-10 gap-y-2 py-6 text-left hover:bg-paper-2 pointer-coarse:min-h-44 ${isOpen ? 'bg-ochre-wash' : ''}`}
      >
        <b className="font-semibold">{title}</b>
        <span className="min-w-0 flex-1 wrap-anywhere text-ink-2">{line}</span>
        {fault !== undefined && (
          <span className="text-note font-semibold text-error">
            <span aria-hidden="true">× </span>
            {isOpen ? '' : 'has a fault'}
          </span>
        )}
      </button>
      {isOpen && (
        <div className="grid gap-12 py-10">
          <FieldNote id={`${at}-fault`} error={ownFault} />
          {children}
          <PartActions at={at} name={name} count={count} />
        </div>
      )}
    </li>
  );
}

function PartActions({ at, name, count }: Pick<PartProps, 'at' | 'name' | 'count'>) {
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const why = useSnapshot(({ history }) => whyKept(history.document, at));
  if (isReadOnly) return null;
  const list = parentOf(at);
  const index = Number(at.slice(list.length + 1));
  const move = (to: number) => {
    store.edit(...reordering(store.document, at, to));
    store.select(`${list}/${to}`);
  };
  return (
    <div className="flex flex-wrap gap-10">
      <Button
        size="small"
        aria-label={`Remove ${name}`}
        reason={why}
        onClick={() => {
          store.edit(...removal(store.document, at));
          focusPart(`${list}/${Math.max(0, index - 1)}`);
        }}
      >
        Remove
      </Button>
      {index > 0 && (
        <Button size="small" aria-label={`Move ${name} up`} onClick={() => move(index - 1)}>
          Up
        </Button>
      )}
      {index < count - 1 && (
        <Button size="small" aria-label={`Move ${name} down`} onClick={() => move(index + 1)}>
          Down
        </Button>
      )}
    </div>
  );
}

/** Fields side by side where there is room. */
export function Row({ children }: { readonly children: ReactNode }) {
  return <div className="grid gap-12 md:grid-cols-2 lg:grid-cols-4">{children}</div>;
}

interface PartsProps {
  readonly label: string;
  /** What to do where there are none yet. */
  readonly empty: string;
  readonly count: number;
  readonly fault?: string | undefined;
  readonly add?: ReactNode;
  readonly children: ReactNode;
}

/** A list of entries, what is wrong with it as a whole, and what adds one. */
export function Parts({ label, empty, count, fault, add, children }: PartsProps) {
  const isReadOnly = useReadOnly();
  return (
    <div>
      {count === 0 ? (
        <p className="text-ink-2">{empty}</p>
      ) : (
        <ul aria-label={label} className="border-t-2 border-ink">
          {children}
        </ul>
      )}
      <FieldNote id={`${label}-fault`} error={count === 0 ? undefined : fault} />
      {!isReadOnly && add && <div className="mt-10 flex flex-wrap gap-8">{add}</div>}
    </div>
  );
}
