import { type KeyboardEvent, useId, useState } from 'react';
import { ChoiceField, FieldFrame, noteId } from '@/components/ui/Field';
import type { UnitSystemName } from '@/engine/quantity';
import { MATERIALS } from '@/engine/section';
import { shownName, sizeLine } from './display';
import type { SectionItem } from './section';
import { type Suggestions, useSuggestions } from './use-suggestions';

interface SectionPickProps {
  readonly value: SectionItem | null;
  /** Null when the choice is taken back. */
  readonly onPick: (section: SectionItem | null) => void;
  /** A material's id. */
  readonly material: string;
  readonly onMaterial: (material: string) => void;
  readonly system: UnitSystemName;
  readonly error?: string | undefined;
  readonly materialError?: string | undefined;
}

/** Materials that sections of a shape are made of: solid rectangles are timber, the rest is steel. */
const materialsFor = (section: SectionItem | null) =>
  section === null
    ? MATERIALS
    : MATERIALS.filter(({ kind }) => (kind === 'steel') !== (section.shape === 'rectangle'));

/** A section by its designation, however typed, and the material that it is made of. */
export function SectionPick(props: SectionPickProps) {
  const { value, material, onMaterial, materialError } = props;
  const offered = materialsFor(value);
  const pick = (section: SectionItem | null) => {
    props.onPick(section);
    const suiting = materialsFor(section);
    if (section && !suiting.some(({ id }) => id === material)) onMaterial('');
  };
  return (
    <div className="grid grid-cols-[minmax(0,3fr)_minmax(0,2fr)] gap-14 max-md:grid-cols-1">
      <SectionBox {...props} onPick={pick} />
      <ChoiceField
        label="Material"
        value={offered.some(({ id }) => id === material) ? material : ''}
        onChange={(event) => onMaterial(event.target.value)}
        error={materialError}
        choices={[
          { value: '', label: 'Choose a material' },
          ...offered.map(({ id, name }) => ({ value: id, label: name })),
        ]}
      />
    </div>
  );
}

function SectionBox({ value, onPick, system, error }: SectionPickProps) {
  const id = useId();
  const [text, setText] = useState<string | null>(null);
  const [open, setOpen] = useState(false);
  const [active, setActive] = useState(0);
  const shown = text ?? (value ? shownName(value.designation) : '');
  const suggestions = useSuggestions(open ? (text ?? '') : '');
  const items = suggestions.state === 'found' ? suggestions.items : [];
  const choose = (item: SectionItem | undefined) => {
    if (!item) return;
    onPick(item);
    setText(null);
    setOpen(false);
  };
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (step !== undefined && items.length > 0) {
      event.preventDefault();
      setActive((items.length + active + step) % items.length);
    } else if (event.key === 'Enter' && open && items.length > 0) {
      event.preventDefault();
      choose(items[active]);
    } else if (event.key === 'Escape' && open) {
      event.preventDefault();
      setText(null);
      setOpen(false);
    }
  };
  const help =
    value && text === null ? sizeLine(value, system) : 'Type a designation, such as W12x26 or IPE 300.';
  return (
    <FieldFrame label="Section" controlId={id} help={help} error={error}>
      <div className="relative">
        <input
          id={id}
          className="input"
          type="text"
          role="combobox"
          autoComplete="off"
          spellCheck={false}
          value={shown}
          aria-expanded={open && items.length > 0}
          aria-controls={`${id}-list`}
          aria-autocomplete="list"
          aria-activedescendant={open && items.length > 0 ? `${id}-${active}` : undefined}
          aria-invalid={error ? true : undefined}
          aria-describedby={noteId(id)}
          onChange={(event) => {
            setText(event.target.value);
            setOpen(true);
            setActive(0);
            if (event.target.value === '') onPick(null);
          }}
          onBlur={() => {
            setOpen(false);
            setText(null);
          }}
          onKeyDown={onKeyDown}
        />
        {open && text !== null && text !== '' && (
          <Offer id={id} suggestions={suggestions} active={active} system={system} onChoose={choose} />
        )}
      </div>
    </FieldFrame>
  );
}

interface OfferProps {
  readonly id: string;
  readonly suggestions: Suggestions;
  readonly active: number;
  readonly system: UnitSystemName;
  readonly onChoose: (item: SectionItem) => void;
}

function Offer({ id, suggestions, active, system, onChoose }: OfferProps) {
  const items = suggestions.state === 'found' ? suggestions.items : [];
  return (
    <div className="absolute inset-x-0 top-full z-30 max-h-320 overflow-y-auto border-2 border-ink bg-paper">
      <p role="status" className="px-10 py-5 text-note text-ink-2 empty:hidden">
        {wordsOf(suggestions)}
      </p>
      <div role="listbox" id={`${id}-list`} aria-label="Sections">
        {items.map((item, i) => (
          // biome-ignore lint/a11y/useFocusableInteractive: as above
          // biome-ignore lint/a11y/useKeyWithClickEvents: the box takes the keys
          <div
            key={`${item.table} ${item.designation}`}
            id={`${id}-${i}`}
            role="option"
            aria-selected={i === active}
            className={`flex min-h-34 cursor-pointer items-baseline gap-10 px-10 py-6 text-schedule max-md:min-h-44 ${i === active ? 'bg-ochre-wash' : 'hover:bg-paper-2'}`}
            onPointerDown={(event) => event.preventDefault()}
            onClick={() => onChoose(item)}
          >
            <b className="font-semibold whitespace-nowrap">{shownName(item.designation)}</b>
            <span className="ml-auto text-right text-ink-2">{sizeLine(item, system)}</span>
          </div>
        ))}
      </div>
    </div>
  );
}

function wordsOf(suggestions: Suggestions): string {
  switch (suggestions.state) {
    case 'idle':
    case 'reading':
      return 'Reading the tables';
    case 'failed':
      return suggestions.message;
    case 'found':
      if (suggestions.total === 0)
        return 'No section is called so. Check the designation, or search the sections page.';
      return suggestions.total > suggestions.items.length
        ? `${suggestions.items.length} of ${suggestions.total}. Type on to narrow them.`
        : '';
  }
}
