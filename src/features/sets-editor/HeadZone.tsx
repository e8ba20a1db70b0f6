import { LIMIT_NAMES } from '@/engine/check';
import { LIMIT_STATES, LOAD_GROUP_NAMES, LOAD_GROUPS } from '@/engine/combination';
import { ChoiceAt, LinesAt, LongTextAt, TextAt } from '@/features/author/fields';
import { Row } from '@/features/author/Part';
import { SNOW_NAMES } from '@/features/combination/combination';
import { ValueAt } from './ValueAt';

/** What any set is called. */
export function TitleFields({ example }: { readonly example: string }) {
  return (
    <>
      <div className="grid gap-12 md:grid-cols-[minmax(0,3fr)_minmax(0,1fr)]">
        <TextAt at="/name" label="Title" maxLength={120} />
        <TextAt at="/reference" label="Reference" maxLength={40} help={`A word and a number: ${example}.`} />
      </div>
      <LongTextAt at="/summary" label="Summary" rows={2} />
    </>
  );
}

const LIMIT_CHOICES = LIMIT_STATES.map((value) => ({ value, label: LIMIT_NAMES[value] }));

/** Which standard, edition and annex the combinations are of, and what they are made for. */
export function CombinationHead() {
  return (
    <div className="grid gap-12">
      <TitleFields example="Combinations EN 2" />
      <div className="grid gap-12 md:grid-cols-2">
        <TextAt
          at="/publication"
          label="Standard, edition and annex"
          maxLength={120}
          help="As it is cited: EN 1990:2002+A1:2005, UK national annex."
        />
        <ChoiceAt at="/limit_state" label="Made for" choices={LIMIT_CHOICES} />
      </div>
      <LongTextAt
        at="/basis"
        label="Basis"
        rows={2}
        help="Printed on the calc sheet: which expression, with whose values."
      />
      <LinesAt at="/not_covered" label="Not in it" help="One a line: what the combinations leave out." />
    </div>
  );
}

const SNOW_CHOICES = Object.entries(SNOW_NAMES).map(([value, label]) => ({ value, label }));

/** What the loads are called, what snow must be, and the one reduction of the permanent load. */
export function GroupZone() {
  return (
    <div className="grid gap-12">
      <Row>
        {LOAD_GROUPS.map((group) => (
          <TextAt
            key={group}
            at={`/letters/${group}`}
            label={`${group}, ${LOAD_GROUP_NAMES[group]}`}
            maxLength={4}
            isOptional
            placeholder={group}
            help={group === 'G' ? 'Where the standard has another letter: D.' : undefined}
          />
        ))}
      </Row>
      <div className="grid gap-12 md:grid-cols-2">
        <ChoiceAt at="/snow/basis" label="Snow loads are" choices={SNOW_CHOICES} />
        <ValueAt
          at="/xi"
          label={
            <>
              Reduction <span className="normal-case">ξ</span>
            </>
          }
          as={{ kind: 'number', isOptional: true }}
          help="Of the adverse permanent load, 0.85; empty where no factor has it."
        />
      </div>
      <LongTextAt
        at="/snow/caution"
        label="What to heed of snow"
        rows={2}
        help="Which map the factors are made for, and which would count the load factor twice."
      />
    </div>
  );
}
