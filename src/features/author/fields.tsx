/** Fields of a draft: each shows what stands at its pointer, with its fault, and keeps whatever is typed. */
import { type ReactNode, useDeferredValue, useMemo, useState } from 'react';
import { Checkbox, ChoiceSet } from '@/components/ui/Choice';
import { ChoiceField, Field, FieldNote, TextField } from '@/components/ui/Field';
import { type DimensionName, readQuantity } from '@/engine/quantity';
import { Completing } from './Completing';
import { completions, unitCompletions } from './complete';
import type { Edit, Pointer } from './edit';
import { type Expected, readAs, wantedWords } from './expression';
import { useAt, useDraft, useFaultAt, useListAt, useSnapshot, useTextAt } from './use-editor';
import { useKinds, useSymbolNames } from './use-kinds';

interface FieldAt {
  readonly at: Pointer;
  readonly label: ReactNode;
  readonly help?: ReactNode;
}

export const useReadOnly = (): boolean => useSnapshot(({ readOnly }) => readOnly);

/** A field that is empty and was not left yet is not blamed for it: the list of faults says what is missing. */
function useShownFault(at: Pointer, isEmpty: boolean) {
  const fault = useFaultAt(at);
  const [isLeft, setLeft] = useState(false);
  return { error: isEmpty && !isLeft ? undefined : fault, onLeave: () => setLeft(true) };
}

const write = (at: Pointer, text: string, isOptional: boolean): Edit =>
  text === '' && isOptional ? { do: 'remove', at } : { do: 'set', at, value: text };

/** One line of text. `isOptional`: emptied, it is left out of the document. */
export function TextAt({
  at,
  label,
  help,
  isOptional = false,
  ...input
}: FieldAt & { readonly isOptional?: boolean; readonly maxLength?: number; readonly placeholder?: string }) {
  const store = useDraft();
  const value = useTextAt(at);
  const { error, onLeave } = useShownFault(at, value === '');
  return (
    <Field
      data-at={at}
      {...input}
      label={label}
      help={help}
      error={error}
      readOnly={useReadOnly()}
      autoComplete="off"
      value={value}
      onBlur={onLeave}
      onChange={(event) => store.edit(write(at, event.target.value, isOptional))}
    />
  );
}

export function LongTextAt({
  at,
  label,
  help,
  rows = 3,
  isOptional = false,
}: FieldAt & { readonly rows?: number; readonly isOptional?: boolean }) {
  const store = useDraft();
  const value = useTextAt(at);
  const { error, onLeave } = useShownFault(at, value === '');
  return (
    <TextField
      data-at={at}
      label={label}
      help={help}
      error={error}
      rows={rows}
      readOnly={useReadOnly()}
      value={value}
      onBlur={onLeave}
      onChange={(event) => store.edit(write(at, event.target.value, isOptional))}
    />
  );
}

/** A list of texts as one text: its entries between `between`, as they were typed while the field is in use. */
function useJoined(at: Pointer, between: string) {
  const store = useDraft();
  const list = useListAt(at);
  const said = list.map(String).join(between === ',' ? ', ' : between);
  const [typed, setTyped] = useState(said);
  const split = (text: string) =>
    text
      .split(between)
      .map((one) => one.trim())
      .filter((one) => one !== '');
  const value = split(typed).join('\n') === list.map(String).join('\n') ? typed : said;
  const onChange = (text: string) => {
    setTyped(text);
    store.edit({ do: 'set', at, value: split(text) });
  };
  const fault = useSnapshot(
    ({ faults }) => faults.find(({ pointer }) => pointer === at || pointer.startsWith(`${at}/`))?.message,
  );
  return { value, onChange, fault, isEmpty: list.length === 0 };
}

/** A list of texts, one a line. */
export function LinesAt({ at, label, help, rows = 3 }: FieldAt & { readonly rows?: number }) {
  const { value, onChange, fault, isEmpty } = useJoined(at, '\n');
  const [isLeft, setLeft] = useState(false);
  return (
    <TextField
      data-at={at}
      label={label}
      help={help}
      error={isEmpty && !isLeft ? undefined : fault}
      rows={rows}
      readOnly={useReadOnly()}
      value={value}
      onBlur={() => setLeft(true)}
      onChange={(event) => onChange(event.target.value)}
    />
  );
}

/** A list of words, with commas between. */
export function WordsAt({ at, label, help }: FieldAt) {
  const { value, onChange, fault, isEmpty } = useJoined(at, ',');
  return (
    <Field
      data-at={at}
      label={label}
      help={help}
      error={isEmpty ? undefined : fault}
      readOnly={useReadOnly()}
      autoComplete="off"
      spellCheck={false}
      value={value}
      onChange={(event) => onChange(event.target.value)}
    />
  );
}

interface Choice {
  readonly value: string;
  readonly label: string;
}

/** One of several values; an empty one leaves the key out. */
export function ChoiceAt({
  at,
  label,
  help,
  choices,
  onPick,
}: FieldAt & { readonly choices: readonly Choice[]; readonly onPick?: (value: string) => readonly Edit[] }) {
  const store = useDraft();
  const value = useTextAt(at);
  const fault = useFaultAt(at);
  const isKnown = choices.some((one) => one.value === value);
  const offered = isKnown ? choices : [{ value, label: value === '' ? 'Choose' : value }, ...choices];
  return (
    <ChoiceField
      data-at={at}
      label={label}
      help={help}
      error={fault}
      disabled={useReadOnly()}
      choices={offered}
      value={value}
      onChange={(event) => {
        const picked = event.target.value;
        store.edit(...(onPick?.(picked) ?? [write(at, picked, true)]));
      }}
    />
  );
}

/** Any of several values, kept in the order in which they are offered. `isOptional`: a list of none is left out. */
export function ChecksAt({
  at,
  label,
  choices,
  isOptional = false,
}: FieldAt & { readonly choices: readonly Choice[]; readonly isOptional?: boolean }) {
  const store = useDraft();
  const list = useListAt(at);
  const fault = useFaultAt(at);
  const isReadOnly = useReadOnly();
  const toggle = (value: string) =>
    choices
      .map((one) => one.value)
      .filter((one) => (one === value ? !list.includes(one) : list.includes(one)));
  return (
    <div>
      <ChoiceSet legend={label}>
        <div className="flex flex-wrap gap-x-14">
          {choices.map((one) => (
            <Checkbox
              key={one.value}
              disabled={isReadOnly}
              checked={list.includes(one.value)}
              onChange={() => {
                const value = toggle(one.value);
                store.edit(
                  isOptional && value.length === 0 ? { do: 'remove', at } : { do: 'set', at, value },
                );
              }}
            >
              {one.label}
            </Checkbox>
          ))}
        </div>
      </ChoiceSet>
      <FieldNote id={`${at}-note`} error={fault} />
    </div>
  );
}

/** A quantity with its unit, "7.2 m", which offers the units of its dimension. */
export function QuantityAt({
  at,
  label,
  help,
  dimension,
  isOptional = false,
}: FieldAt & { readonly dimension: DimensionName; readonly isOptional?: boolean }) {
  const store = useDraft();
  const value = useTextAt(at);
  const { error, onLeave } = useShownFault(at, value === '');
  const reading = value === '' ? null : readQuantity(value, dimension);
  return (
    <Completing
      at={at}
      label={label}
      help={help}
      readOnly={useReadOnly()}
      value={value}
      error={reading && !reading.ok ? reading.message : error}
      onLeave={onLeave}
      complete={(text, caret) => unitCompletions(text, caret, dimension)}
      onChange={(text) => store.edit(write(at, text, isOptional))}
    />
  );
}

/** An expression: what it is says itself as it is typed, against what its place takes. */
export function ExpressionAt({
  at,
  label,
  help,
  wanted,
  isOptional = false,
  placeholder,
}: FieldAt & { readonly wanted: Expected; readonly isOptional?: boolean; readonly placeholder?: string }) {
  const store = useDraft();
  const value = useTextAt(at);
  const now = useKinds();
  // Another symbol may change every expression of the page: the field that is typed into goes first.
  const kinds = useDeferredValue(now);
  const names = useSymbolNames();
  const { error, onLeave } = useShownFault(at, value === '');
  const reading = useMemo(() => readAs(value, wanted, kinds), [value, wanted, kinds]);
  const isMissing = value === '' && !isOptional;
  return (
    <Completing
      at={at}
      label={label}
      help={help}
      readOnly={useReadOnly()}
      value={value}
      error={reading.fault ?? (value === '' && isOptional ? undefined : error)}
      onLeave={onLeave}
      aside={
        reading.is !== '' && reading.fault === undefined ? (
          <span className="text-issued">{withoutArticle(reading.is)}</span>
        ) : (
          `${isMissing ? 'takes ' : ''}${wantedWords(wanted)}${isOptional ? ', or nothing' : ''}`
        )
      }
      placeholder={placeholder}
      complete={(text, caret) => completions(text, caret, { wanted, kinds: now, names })}
      onChange={(text) => store.edit(write(at, text, isOptional))}
    />
  );
}

const withoutArticle = (words: string): string => words.replace(/^an? /, '');

/** A whole number. */
export function CountAt({ at, label, help }: FieldAt) {
  const store = useDraft();
  const value = useAt(at);
  const fault = useFaultAt(at);
  return (
    <Field
      data-at={at}
      label={label}
      help={help}
      error={fault}
      inputMode="numeric"
      autoComplete="off"
      readOnly={useReadOnly()}
      value={value === undefined ? '' : String(value)}
      onChange={({ target }) =>
        store.edit({
          do: 'set',
          at,
          value: /^\d{1,3}$/.test(target.value) ? Number(target.value) : target.value,
        })
      }
    />
  );
}

/** True or false. */
export function CheckAt({ at, children }: { readonly at: Pointer; readonly children: ReactNode }) {
  const store = useDraft();
  const value = useAt(at);
  return (
    <Checkbox
      disabled={useReadOnly()}
      checked={value === true}
      onChange={(event) => store.edit({ do: 'set', at, value: event.target.checked })}
    >
      {children}
    </Checkbox>
  );
}
