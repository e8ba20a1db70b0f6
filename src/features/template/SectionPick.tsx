import { useEffect, useId, useRef, useState } from 'react';
import { FieldNote } from '@/components/ui/Field';
import { formatFor, type UnitSystemName } from '@/engine/quantity';
import { choiceOf, type MaterialChoice, namedChoices } from '@/features/material/choice';
import type { PickedSection } from './page';
import type { FoundSection } from './section-kit';
import { isMadeOf } from './section-pick';

interface SectionPickProps {
  readonly section: PickedSection | null;
  readonly materials: readonly MaterialChoice[];
  readonly system: UnitSystemName;
  /** Why a section of the address could not be taken. */
  readonly fault: string | null;
  readonly onPick: (section: PickedSection | null) => void;
}

const loadKit = () => import('./section-kit');
type Kit = Awaited<ReturnType<typeof loadKit>>;

const PAUSE_MS = 120; // between the last letter and the search

/** A section by its designation, however typed, and what it is made of. */
export function SectionPick({ section, materials, system, fault, onPick }: SectionPickProps) {
  const id = useId();
  const [text, setText] = useState('');
  const [message, setMessage] = useState<string | null>(fault);
  const host = useRef<HTMLDivElement>(null);
  const { kit, found, wrong } = useSearch(text);
  // What was pressed gives way to something else, which takes the focus.
  const goTo = (part: 'select' | 'input') =>
    requestAnimationFrame(() => host.current?.querySelector<HTMLElement>(part)?.focus());
  const take = (part: Kit, { table, values, origin }: FoundSection, material?: string) => {
    const offered = materials.filter((one) => isMadeOf(values, one.material));
    const made = choiceOf(offered, material ?? part.usualMaterial(values, table)) ?? offered[0];
    if (!made) return;
    const pick = part.pickSection(table, values, made, origin);
    setMessage(pick.ok ? null : pick.message);
    if (!pick.ok) return;
    onPick(pick.section);
    setText('');
    goTo('select');
  };
  return (
    <div ref={host} className="relative min-w-0 px-14 pt-8 pb-9">
      <label htmlFor={id} className="block text-schedule text-ink-2">
        Section
      </label>
      {section ? (
        <Picked
          section={section}
          materials={materials}
          onMaterial={(material) => loadKit().then((part) => take(part, section, material))}
          onClear={() => {
            onPick(null);
            goTo('input');
          }}
        />
      ) : (
        <input
          id={id}
          type="search"
          autoComplete="off"
          placeholder="W12x26, HEA 200 …"
          value={text}
          onChange={(event) => setText(event.target.value)}
          onKeyDown={(event) => event.key === 'Escape' && setText('')}
          aria-describedby={`${id}-note`}
          className="input mt-2 min-h-37! pointer-coarse:min-h-44!"
        />
      )}
      <FieldNote
        id={`${id}-note`}
        help={section ? undefined : 'Instead of EI. Leave empty for EI alone.'}
        error={message ?? wrong ?? undefined}
      />
      {kit && found.length > 0 && (
        <FoundList found={found} system={system} onTake={(one) => take(kit, one)} />
      )}
    </div>
  );
}

interface FoundListProps {
  readonly found: readonly FoundSection[];
  readonly system: UnitSystemName;
  readonly onTake: (section: FoundSection) => void;
}

function FoundList({ found, system, onTake }: FoundListProps) {
  return (
    <ul className="absolute inset-x-14 z-10 border border-ink bg-paper" aria-label="Sections found">
      {found.map((one) => (
        <li key={`${one.table} ${one.values.designation}`}>
          <button
            type="button"
            onClick={() => onTake(one)}
            className="flex min-h-34 w-full items-baseline gap-8 px-8 py-5 text-left hover:bg-paper-2 pointer-coarse:min-h-44"
          >
            <span className="font-semibold">{one.values.designation}</span>
            <span className="ml-auto text-note whitespace-nowrap text-ink-2">
              {formatFor(one.values.massKgM, 'mass_per_length', system)}
            </span>
          </button>
        </li>
      ))}
    </ul>
  );
}

interface PickedProps {
  readonly section: PickedSection;
  readonly materials: readonly MaterialChoice[];
  readonly onMaterial: (id: string) => void;
  readonly onClear: () => void;
}

function Picked({ section, materials, onMaterial, onClear }: PickedProps) {
  const { values, material } = section;
  const offered = namedChoices(materials.filter((one) => isMadeOf(values, one.material)));
  return (
    <div className="mt-2">
      <div className="flex items-baseline gap-8 border-b-[1.5px] border-ink bg-field px-6">
        <b className="min-h-34 flex-1 truncate text-[1.0625rem] leading-34 font-normal">
          {values.designation}
        </b>
        <button
          type="button"
          onClick={onClear}
          className="link min-h-26 text-schedule pointer-coarse:min-h-44"
        >
          Clear
        </button>
      </div>
      <select
        aria-label="Material"
        value={material}
        onChange={(event) => onMaterial(event.target.value)}
        className="mt-4 min-h-26 w-full text-schedule text-ink-2 underline decoration-ochre decoration-dotted underline-offset-3 pointer-coarse:min-h-44"
      >
        {offered.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </select>
    </div>
  );
}

/** What the practice's tables answer to a text, once it has rested. */
function useSearch(text: string) {
  const [kit, setKit] = useState<Kit | null>(null);
  const [found, setFound] = useState<readonly FoundSection[]>([]);
  const [wrong, setWrong] = useState<string | null>(null);
  const asked = useRef(0);
  useEffect(() => {
    const q = text.trim();
    const turn = ++asked.current;
    if (q === '') {
      setFound([]);
      setWrong(null);
      return;
    }
    const abort = new AbortController();
    const timer = setTimeout(async () => {
      try {
        const part = await loadKit();
        const answer = await part.searchSections(q, abort.signal);
        if (turn !== asked.current) return;
        setKit(part);
        setFound(answer);
        setWrong(answer.length === 0 ? `No section reads “${q}”. Try its depth, such as 300.` : null);
      } catch (error) {
        if (!abort.signal.aborted) setWrong(error instanceof Error ? error.message : String(error));
      }
    }, PAUSE_MS);
    return () => {
      clearTimeout(timer);
      abort.abort();
    };
  }, [text]);
  return { kit, found, wrong };
}
