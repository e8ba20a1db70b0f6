import { useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Checkbox, ChoiceSet } from '@/components/ui/Choice';
import { ChoiceField, Field } from '@/components/ui/Field';
import { LOAD_GROUP_NAMES, LOAD_GROUPS, type LoadGroup } from '@/engine/combination';
import { listAt } from '@/features/author/edit';
import { useReadOnly } from '@/features/author/fields';
import { useDraft, useSnapshot } from '@/features/author/use-editor';
import { readDecimal } from '@/lib/decimal';
import {
  exchange,
  fromPartialFactors,
  GROUP_CHOICES,
  type PartialFactors,
  partialFactorsOf,
  VARIABLE,
} from './combinations';
import { useRows } from './use-rows';

const LIST = '/strength';

/** What is done to many combinations at once. */
export function FactorTools() {
  if (useReadOnly()) return null;
  return (
    <div className="mt-14 grid gap-6">
      <details>
        <summary className="link flex min-h-26 items-center max-md:min-h-44">
          Change a partial factor everywhere
        </summary>
        <Exchange />
      </details>
      <details>
        <summary className="link flex min-h-26 items-center max-md:min-h-44">
          Make combinations from partial factors
        </summary>
        <Making />
      </details>
    </div>
  );
}

/** What is wrong with a number that a tool needs; nothing while it is empty. */
const numberFault = (text: string): string | undefined =>
  text.trim() !== '' && readDecimal(text) === null ? 'Give a number, 1.35.' : undefined;

function Exchange() {
  const store = useDraft();
  const [group, setGroup] = useState<LoadGroup>('G');
  const [from, setFrom] = useState('');
  const [to, setTo] = useState('');
  const known = useSnapshot(({ history }) => partialFactorsOf(history.document, LIST, group).join(' ')).split(
    ' ',
  );
  const chosen = known.includes(from) ? from : (known[0] ?? '');
  const value = readDecimal(to);
  const count = useSnapshot(
    ({ history }) => exchange(history.document, LIST, group, Number(chosen), value ?? 0).length,
  );
  return (
    <div className="grid items-start gap-12 py-8 md:grid-cols-4">
      <ChoiceField
        label="Group"
        choices={GROUP_CHOICES}
        value={group}
        onChange={({ target }) => setGroup(LOAD_GROUPS.find((one) => one === target.value) ?? 'G')}
      />
      <ChoiceField
        label="From"
        choices={known.map((one) => ({ value: one, label: one || 'none' }))}
        value={chosen}
        onChange={({ target }) => setFrom(target.value)}
      />
      <Field
        label="To"
        inputMode="decimal"
        autoComplete="off"
        value={to}
        error={numberFault(to)}
        onChange={({ target }) => setTo(target.value)}
      />
      <div className="md:pt-16">
        <Button
          size="small"
          reason={value === null ? 'Give the new factor.' : chosen === '' ? 'It has no factor.' : undefined}
          onClick={() => {
            if (value !== null) store.edit(...exchange(store.document, LIST, group, Number(chosen), value));
            setTo('');
          }}
        >
          {count === 1 ? 'Change it in one place' : `Change it in ${count} places`}
        </Button>
      </div>
    </div>
  );
}

const NOTHING = { permanent: '', favourable: '', variable: '', called: '', clause: '' };
type Typed = typeof NOTHING;

/** The partial factors that were typed; null while one that is needed is missing. */
function readTyped(typed: Typed, groups: readonly LoadGroup[]): PartialFactors | null {
  const permanent = readDecimal(typed.permanent);
  const favourable = readDecimal(typed.favourable);
  const variable = readDecimal(typed.variable);
  const isBad = typed.favourable.trim() !== '' && favourable === null;
  if (permanent === null || variable === null || isBad || groups.length === 0) return null;
  return {
    permanent,
    favourable,
    variable,
    groups,
    called: typed.called.trim(),
    clause: typed.clause.trim(),
  };
}

function Making() {
  const store = useDraft();
  const act = useRows();
  const [typed, setTyped] = useState(NOTHING);
  const [groups, setGroups] = useState(VARIABLE);
  const given = readTyped(typed, groups);
  const count = useSnapshot(({ history }) =>
    given ? fromPartialFactors(history.document, LIST, given).length : 0,
  );
  const make = () => {
    if (!given) return;
    const place = listAt(store.document, LIST).length;
    act.put(fromPartialFactors(store.document, LIST, given), `${LIST}/${place}`);
  };
  const isWhole = given !== null && given.called !== '' && given.clause !== '';
  const lacking = isWhole ? undefined : 'Give both factors, a group, a name and the clause.';
  return (
    <div className="grid items-start gap-12 py-8 md:grid-cols-3">
      <MakingFields typed={typed} onType={(part) => setTyped({ ...typed, ...part })} />
      <ChoiceSet legend="Variable groups">
        <div className="flex flex-wrap gap-x-14">
          {VARIABLE.map((group) => (
            <Checkbox
              key={group}
              checked={groups.includes(group)}
              onChange={() => setGroups(VARIABLE.filter((one) => groups.includes(one) !== (one === group)))}
            >
              {LOAD_GROUP_NAMES[group]}
            </Checkbox>
          ))}
        </div>
      </ChoiceSet>
      <div className="md:col-span-3">
        <Button
          size="small"
          reason={lacking ?? (count === 0 ? 'The set has all of them.' : undefined)}
          onClick={make}
        >
          {count === 1 ? 'Add one combination' : `Add ${count} combinations`}
        </Button>
      </div>
    </div>
  );
}

interface MakingFieldsProps {
  readonly typed: Typed;
  readonly onType: (part: Partial<Typed>) => void;
}

function MakingFields({ typed, onType }: MakingFieldsProps) {
  const field = (key: keyof Typed) => ({
    autoComplete: 'off',
    value: typed[key],
    onChange: ({ target }: { target: { value: string } }) => onType({ [key]: target.value }),
  });
  const number = (key: keyof Typed) =>
    ({ ...field(key), inputMode: 'decimal', error: numberFault(typed[key]) }) as const;
  return (
    <>
      <Field label="Permanent, adverse" help="γ of the permanent load." {...number('permanent')} />
      <Field
        label="Permanent, favourable"
        help="Empty: no combinations of lifting."
        {...number('favourable')}
      />
      <Field
        label="Variable"
        help="γ of the one that leads; the others have it by ψ₀."
        {...number('variable')}
      />
      <Field label="Called" help="Before each name: 6.10." maxLength={40} {...field('called')} />
      <Field label="Clause" maxLength={120} {...field('clause')} />
    </>
  );
}
