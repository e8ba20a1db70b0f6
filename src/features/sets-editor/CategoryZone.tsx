import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { LOAD_GROUP_NAMES, LOAD_GROUPS, type LoadGroup } from '@/engine/combination';
import { valueAt } from '@/features/author/edit';
import { CheckAt, ChecksAt, TextAt, useReadOnly } from '@/features/author/fields';
import { useDraft, useFaultAt, useListAt, useSnapshot } from '@/features/author/use-editor';
import { MOST_CATEGORIES } from '@/features/combination/combination';
import { type Column, indexOf } from './cells';
import { newCategory, VARIABLE } from './combinations';
import { Grid, type GridRow, RowActions } from './Grid';
import { useRows } from './use-rows';

const COLUMNS: readonly Column[] = [
  { key: 'name', label: 'Category', kind: 'text' },
  { key: 'psi0', label: 'ψ0', kind: 'number' },
  { key: 'psi1', label: 'ψ1', kind: 'number' },
  { key: 'psi2', label: 'ψ2', kind: 'number' },
  { key: 'clause', label: 'Source', kind: 'text' },
];

const WIDTHS = { psi0: '5rem', psi1: '5rem', psi2: '5rem', clause: '12rem' };

const HEADS = Object.fromEntries(
  ['0', '1', '2'].map((digit) => [
    `psi${digit}`,
    <span key={digit}>
      ψ<sub>{digit}</sub>
    </span>,
  ]),
);

/** The ψ of what the variable groups may be: categories of use, snow by height, wind. */
export function CategoryZone() {
  return (
    <div className="grid gap-20">
      <p className="max-w-[80ch] text-ink-2">
        The first category of a group is the usual one: it is taken unless a member or its criteria choose
        another.
      </p>
      {VARIABLE.map((group) => (
        <GroupCategories key={group} group={group} />
      ))}
    </div>
  );
}

function GroupCategories({ group }: { readonly group: LoadGroup }) {
  const store = useDraft();
  const list = `/categories/${group}`;
  const { length: count } = useListAt(list);
  const isThere = useSnapshot(({ history }) => valueAt(history.document, list) !== undefined);
  const act = useRows();
  const isReadOnly = useReadOnly();
  const fault = useFaultAt(list);
  const called = LOAD_GROUP_NAMES[group];
  const rows = Array.from({ length: count }, (_, index) => ({
    at: `${list}/${index}`,
    name: `${called} category ${index + 1}`,
  }));
  return (
    <section aria-label={`ψ of ${called} loads`}>
      {count === 0 ? (
        <p className="text-ink-2">
          No ψ of {group}, {called}: none of its factors may be reduced by one.
        </p>
      ) : (
        <Grid
          caption={`ψ of ${group}, ${called}`}
          columns={COLUMNS}
          heads={HEADS}
          widths={WIDTHS}
          rows={rows}
          growth={{ list, most: MOST_CATEGORIES, blank: (document) => newCategory(document, group) }}
          more={(row) => <More group={group} row={row} count={count} />}
        />
      )}
      <FieldNote id={`${list}-fault`} error={fault} />
      {!isReadOnly && (
        <div className="mt-10 flex flex-wrap gap-8">
          <Button
            size="small"
            aria-label={`Add a category of ${called}`}
            onClick={() => act.add(list, count, (document) => newCategory(document, group))}
          >
            Add a category
          </Button>
          {count === 0 && isThere && (
            <Button size="small" onClick={() => store.edit({ do: 'remove', at: list })}>
              Leave the table out
            </Button>
          )}
        </div>
      )}
    </section>
  );
}

interface MoreProps {
  readonly group: LoadGroup;
  readonly row: GridRow;
  readonly count: number;
}

function More({ group, row, count }: MoreProps) {
  const store = useDraft();
  const act = useRows();
  const { at } = row;
  const others = LOAD_GROUPS.filter((one) => one !== group).map((one) => ({
    value: one,
    label: LOAD_GROUP_NAMES[one],
  }));
  // The last category goes with its table: a group without ψ has none.
  const remove = () =>
    count === 1 ? store.edit({ do: 'remove', at: `/categories/${group}` }) : act.remove(at);
  return (
    <>
      <div className="grid gap-12 md:grid-cols-2">
        <TextAt at={`${at}/id`} label="Id" maxLength={40} help="Members and criteria name it by this." />
        <ChecksAt at={`${at}/not_with`} label="Not combined with" choices={others} isOptional />
      </div>
      <CheckAt at={`${at}/from_memory`}>From memory: to be compared with the print</CheckAt>
      <RowActions
        row={row}
        index={indexOf(at)}
        count={count}
        onDuplicate={() => act.duplicate(at)}
        onMove={(to) => act.move(at, to)}
        onRemove={remove}
      />
    </>
  );
}
