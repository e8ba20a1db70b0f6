import { type ReactNode, useId, useRef, useState } from 'react';
import { FieldNote } from '@/components/ui/Field';
import type { Completion } from './complete';

interface CompletingProps {
  /** Where in the document it stands. */
  readonly at: string;
  readonly label: ReactNode;
  readonly value: string;
  readonly onChange: (text: string) => void;
  /** How it may go on with the caret there. */
  readonly complete: (text: string, caret: number) => readonly Completion[];
  readonly error?: string | undefined;
  readonly help?: ReactNode;
  /** At the right of the field: what it is, or what it takes. */
  readonly aside?: ReactNode;
  readonly readOnly?: boolean;
  readonly placeholder?: string | undefined;
  readonly onLeave?: (() => void) | undefined;
}

/** A text field that offers how to go on: arrow keys choose, Enter or Tab takes, Escape lets be. */
export function Completing(props: CompletingProps) {
  const { label, value, onChange, error, help, aside, readOnly, placeholder } = props;
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const offers = useOffers(props, input);
  return (
    <div className="relative min-w-0">
      <span className="mb-2 flex items-baseline gap-8">
        <label htmlFor={id} className="caps">
          {label}
        </label>
        {aside !== undefined && (
          <span id={`${id}-aside`} className="ml-auto text-note leading-14 text-ink-2">
            {aside}
          </span>
        )}
      </span>
      <input
        ref={input}
        id={id}
        data-at={props.at}
        className="input"
        role="combobox"
        aria-expanded={offers.list.length > 0}
        aria-controls={`${id}-list`}
        aria-autocomplete="list"
        aria-activedescendant={
          offers.list.length > 0 && offers.chosen >= 0 ? `${id}-${offers.chosen}` : undefined
        }
        aria-describedby={aside === undefined ? `${id}-note` : `${id}-aside ${id}-note`}
        aria-invalid={error ? true : undefined}
        autoComplete="off"
        spellCheck={false}
        readOnly={readOnly}
        placeholder={placeholder}
        value={value}
        onChange={(event) => {
          onChange(event.target.value);
          offers.open(event.target.value, event.target.selectionStart ?? event.target.value.length);
        }}
        onKeyDown={offers.onKeyDown}
        onBlur={() => {
          offers.close();
          props.onLeave?.();
        }}
      />
      <OfferList id={id} {...offers} />
      <FieldNote id={`${id}-note`} help={help} error={error} />
    </div>
  );
}

type Offers = ReturnType<typeof useOffers>;

function OfferList({
  id,
  list,
  chosen,
  take,
}: Pick<Offers, 'list' | 'chosen' | 'take'> & { readonly id: string }) {
  if (list.length === 0) return null;
  return (
    <div
      id={`${id}-list`}
      role="listbox"
      tabIndex={-1}
      aria-label="Ways to go on"
      className="absolute inset-x-0 z-20 max-h-240 overflow-auto border border-t-0 border-ink bg-field"
    >
      {list.map((one, index) => (
        <div
          key={one.text}
          id={`${id}-${index}`}
          role="option"
          tabIndex={-1}
          aria-selected={index === chosen}
          className={`flex min-h-28 cursor-pointer items-center gap-10 px-8 text-schedule pointer-coarse:min-h-44 ${index === chosen ? 'bg-ochre-wash' : 'hover:bg-paper-2'}`}
          onPointerDown={(event) => {
            event.preventDefault();
            take(one);
          }}
        >
          <b className="font-semibold">{one.text.trim()}</b>
          <span className="truncate text-ink-2">{one.note}</span>
        </div>
      ))}
    </div>
  );
}

const CLOSED: { list: readonly Completion[]; chosen: number } = { list: [], chosen: -1 };

function useOffers(
  { complete, onChange, value, readOnly }: CompletingProps,
  input: React.RefObject<HTMLInputElement | null>,
) {
  const [{ list, chosen }, setOffers] = useState(CLOSED);
  const open = (text: string, caret: number) =>
    setOffers(readOnly ? CLOSED : { list: complete(text, caret), chosen: -1 });
  const take = ({ text, from, to }: Completion) => {
    onChange(value.slice(0, from) + text + value.slice(to));
    setOffers(CLOSED);
    const caret = from + text.length;
    requestAnimationFrame(() => input.current?.setSelectionRange(caret, caret));
  };
  const onKeyDown = (event: React.KeyboardEvent<HTMLInputElement>) => {
    const { key } = event;
    if (list.length === 0) {
      if (key !== 'ArrowDown') return;
      event.preventDefault();
      open(value, event.currentTarget.selectionStart ?? value.length);
      return;
    }
    const step = { ArrowDown: 1, ArrowUp: -1 }[key];
    const offer = list[key === 'Tab' || key === 'Enter' ? chosen : -1];
    if (step !== undefined) setOffers({ list, chosen: (chosen + step + list.length) % list.length });
    else if (key === 'Escape') setOffers(CLOSED);
    else if (offer) take(offer);
    else return;
    event.preventDefault();
    event.stopPropagation();
  };
  return { list, chosen, open, take, onKeyDown, close: () => setOffers(CLOSED) };
}
