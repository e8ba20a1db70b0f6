import { Button } from '@/components/ui/Button';
import { ChoiceField, FieldNote } from '@/components/ui/Field';
import { LIMIT_NAMES } from '@/engine/check';
import { LIMIT_STATES, LOAD_GROUP_NAMES, LOAD_GROUPS } from '@/engine/combination';
import type { UnitSystemName } from '@/engine/quantity';
import { ChecksAt, ChoiceAt, LinesAt, LongTextAt, useReadOnly } from '@/features/author/fields';
import { useDraft, useFaultAt, useFaultIn, useListAt, useSnapshot } from '@/features/author/use-editor';
import { type Column, indexOf } from './cells';
import { GROUP_CHOICES } from './combinations';
import { capColumn, chosenGroups, newLimit, referredKey, referredTo, setKey } from './criteria';
import { Grid, type GridRow, RowActions } from './Grid';
import { TitleFields } from './HeadZone';
import { SourceFields } from './PatternZone';
import type { ZoneProps } from './page';
import { useRows } from './use-rows';
import { ValueAt } from './ValueAt';

const FAMILIES = [
  { value: 'steel', label: 'Steel' },
  { value: 'timber', label: 'Timber' },
];

const LIMIT_CHOICES = LIMIT_STATES.map((value) => ({ value, label: LIMIT_NAMES[value] }));

/** What the criteria are called, of what they are and what they leave out. */
export function CriteriaHead() {
  return (
    <div className="grid gap-12">
      <TitleFields example="Steel elastic 3" />
      <ChecksAt at="/families" label="For members of" choices={FAMILIES} />
      <LinesAt
        at="/not_checked"
        label="Not checked"
        help="One a line: what an engineer must look at besides."
      />
    </div>
  );
}

/** Which combinations members are held against, and what their variable loads are where nobody says another. */
export function ReferenceZone({ data: { sets } }: ZoneProps) {
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const fault = useFaultIn('/combinations');
  const key = useSnapshot(({ history }) => referredKey(history.document));
  const set = useSnapshot(({ history }) => referredTo(history.document, sets))?.document;
  const groups = useSnapshot(({ history }) => (set ? chosenGroups(history.document, set).join(' ') : ''));
  const choices = sets.map(({ slug, revision, document }) => ({
    value: setKey(slug, revision),
    label: `${document.reference}, revision ${revision}: ${document.name}`,
  }));
  const isKnown = choices.some(({ value }) => value === key);
  const other = {
    value: key,
    label: key === '' ? 'Choose' : `${key.replace(' ', ', revision ')}: not issued`,
  };
  const choose = (value: string) => {
    const chosen = sets.find(({ slug, revision }) => setKey(slug, revision) === value);
    if (!chosen) return;
    const { slug, revision } = chosen;
    store.edit({ do: 'set', at: '/combinations', value: { set: slug, revision } });
  };
  return (
    <div className="grid gap-12">
      <div className="grid gap-12 md:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
        <ChoiceField
          data-at="/combinations"
          label="Combination set"
          error={fault && key === '' ? 'Choose one that is issued.' : fault}
          help="A revision that is issued; another is chosen here when it is superseded."
          disabled={isReadOnly}
          choices={isKnown ? choices : [other, ...choices]}
          value={key}
          onChange={({ target }) => choose(target.value)}
        />
        <ChoiceAt at="/limit_state" label="The limits of stress are for" choices={LIMIT_CHOICES} />
      </div>
      {set && (
        <div className="grid gap-12 md:grid-cols-3">
          {LOAD_GROUPS.filter((group) => groups.includes(group)).map((group) => (
            <ChoiceAt
              key={group}
              at={`/categories/${group}`}
              label={`${LOAD_GROUP_NAMES[group]} as`}
              choices={[
                { value: '', label: `The usual: ${set.categories[group]?.[0]?.name ?? 'none'}` },
                ...(set.categories[group] ?? []).map(({ id, name }) => ({ value: id, label: name })),
              ]}
            />
          ))}
        </div>
      )}
    </div>
  );
}

/** How much of the material's strengths may be used, and why. */
export function StressZone() {
  return (
    <div className="grid gap-12">
      <div className="grid gap-12 md:grid-cols-2">
        <ValueAt
          at="/strength/bending"
          label="Share of the bending strength"
          as={{ kind: 'number' }}
          help="A number, or a quotient: 1/1.67. Of steel, of its yield strength."
        />
        <ValueAt
          at="/strength/shear"
          label="Share of the shear strength"
          as={{ kind: 'number' }}
          help="Of steel, of its yield strength over √3."
        />
      </div>
      <LongTextAt
        at="/strength/basis"
        label="Basis"
        rows={2}
        help="Printed on the calc sheet: what the factors are."
      />
      <SourceFields at="/strength/source" />
    </div>
  );
}

/** Pasted at once; nobody holds a member to more. */
const MOST_LIMITS = 40;

const WIDTHS = {
  'combination/id': '13rem',
  span_ratio: '5.5rem',
  overhang_factor: '5.5rem',
  overhang_ratio: '5.5rem',
  cap: '6.5rem',
};

const columnsOf = (
  choices: readonly { value: string; label: string }[],
  system: UnitSystemName,
): readonly Column[] => [
  { key: 'name', label: 'Limit', kind: 'text' },
  { key: 'combination/id', label: 'Combination', kind: 'choice', choices },
  { key: 'span_ratio', label: 'Span over', kind: 'number' },
  { key: 'overhang_factor', label: 'Overhang times', kind: 'number' },
  { key: 'overhang_ratio', label: 'Overhang over', kind: 'number' },
  capColumn(system),
];

/** The limits of deflection as a table: of which combination, span and overhang over what, and a cap. */
export function DeflectionZone({ data: { sets, system } }: ZoneProps) {
  const act = useRows();
  const isReadOnly = useReadOnly();
  const fault = useFaultAt('/deflection');
  const { length: count } = useListAt('/deflection');
  const set = useSnapshot(({ history }) => referredTo(history.document, sets))?.document;
  const choices = (set?.service ?? []).map(({ id, name }) => ({ value: id, label: name }));
  const rows = Array.from({ length: count }, (_, index) => ({
    at: `/deflection/${index}`,
    name: `limit ${index + 1}`,
  }));
  return (
    <div>
      {count === 0 ? (
        <p className="text-ink-2">None yet. A member has one limit at least.</p>
      ) : (
        <Grid
          caption="The lower of span over ratio and the cap governs; an overhang is its length times a factor over its ratio"
          columns={columnsOf(choices, system)}
          heads={headsIn(capColumn(system).unit)}
          widths={WIDTHS}
          leastWidth="46rem"
          rows={rows}
          growth={{ list: '/deflection', most: MOST_LIMITS, blank: newLimit }}
          more={(row) => <LimitMore row={row} count={count} />}
        />
      )}
      <FieldNote id="deflection-fault" error={fault} />
      {!isReadOnly && (
        <div className="mt-10">
          <Button size="small" onClick={() => act.add('/deflection', count, newLimit)}>
            Add a limit
          </Button>
        </div>
      )}
    </div>
  );
}

const headsIn = (unit: string) => ({
  span_ratio: (
    <span>
      <i>L</i> over
    </span>
  ),
  overhang_factor: (
    <span>
      <i>a</i> times
    </span>
  ),
  overhang_ratio: (
    <span>
      <i>a</i> over
    </span>
  ),
  cap: (
    <span>
      At most<small>{unit}</small>
    </span>
  ),
});

function LimitMore({ row, count }: { readonly row: GridRow; readonly count: number }) {
  const act = useRows();
  const { at } = row;
  return (
    <>
      <ChecksAt
        at={`${at}/combination/groups`}
        label="Of these groups of it alone; of all where none is ticked"
        choices={GROUP_CHOICES}
        isOptional
      />
      <SourceFields at={`${at}/source`} />
      <RowActions
        row={row}
        index={indexOf(at)}
        count={count}
        onDuplicate={() => act.duplicate(at)}
        onMove={(to) => act.move(at, to)}
        onRemove={() => act.remove(at)}
      />
    </>
  );
}
