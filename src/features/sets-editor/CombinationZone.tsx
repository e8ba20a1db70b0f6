import type { ReactNode } from 'react';
import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { LOAD_GROUP_NAMES, LOAD_GROUPS } from '@/engine/combination';
import { CheckAt, LongTextAt, TextAt, useReadOnly } from '@/features/author/fields';
import { useDraft, useFaultAt, useListAt, useSnapshot, useTextAt } from '@/features/author/use-editor';
import { MOST_COMBINATIONS } from '@/features/combination/combination';
import type { Column } from './cells';
import { leadingVariants, newCombination } from './combinations';
import { Grid, type GridRow, RowActions } from './Grid';
import { type List, usualText } from './preview';
import { useRows } from './use-rows';

const COLUMNS: readonly Column[] = [
  { key: 'name', label: 'Combination', kind: 'text' },
  ...LOAD_GROUPS.map(
    (group) => ({ key: `factors/${group}`, label: `Factor of ${group}`, kind: 'factor' }) as const,
  ),
  { key: 'clause', label: 'Clause', kind: 'text' },
];

const WIDTHS = {
  ...Object.fromEntries(LOAD_GROUPS.map((group) => [`factors/${group}`, '5.25rem'])),
  clause: '9rem',
};

interface CombinationZoneProps {
  readonly list: List;
  readonly caption: string;
  readonly children?: ReactNode;
}

/** The combinations of one list as a table to type through: a factor of each group, or none. */
export function CombinationZone({ list, caption, children }: CombinationZoneProps) {
  const { length: count } = useListAt(list);
  const rows = Array.from({ length: count }, (_, index) => ({
    at: `${list}/${index}`,
    name: `${list === '/strength' ? 'combination' : 'service combination'} ${index + 1}`,
  }));
  const act = useRows();
  const isReadOnly = useReadOnly();
  const fault = useFaultAt(list);
  const heads = useHeads();
  return (
    <div>
      <p className="mb-10 max-w-[80ch] text-ink-2">
        A factor is a number, or one that is reduced: type “1.5 p0” for 1.5 ψ₀, “p1”, “p2” or “xi” likewise.
        Left empty, the group does not act. The arrow keys go from cell to cell; a block of a spreadsheet can
        be pasted.
      </p>
      {count === 0 ? (
        <p className="text-ink-2">None yet.</p>
      ) : (
        <Grid
          caption={caption}
          columns={COLUMNS}
          heads={heads}
          widths={WIDTHS}
          rows={rows}
          growth={{ list, most: MOST_COMBINATIONS, blank: (document) => newCombination(document, list) }}
          below={(row) => <Expanded row={row} />}
          more={(row) => <More list={list} row={row} count={count} />}
        />
      )}
      <FieldNote id={`${list}-fault`} error={fault} />
      {!isReadOnly && (
        <div className="mt-10">
          <Button
            size="small"
            onClick={() => act.add(list, count, (document) => newCombination(document, list))}
          >
            Add a combination
          </Button>
        </div>
      )}
      {children}
    </div>
  );
}

/** The letters of the groups as the set calls them. */
function useHeads(): Readonly<Record<string, ReactNode>> {
  const letters = [
    useTextAt('/letters/G'),
    useTextAt('/letters/Q'),
    useTextAt('/letters/S'),
    useTextAt('/letters/W'),
  ];
  return Object.fromEntries(
    LOAD_GROUPS.map((group, index) => [
      `factors/${group}`,
      <span key={group}>
        <i>{letters[index] || group}</i>
        <small>{LOAD_GROUP_NAMES[group]}</small>
      </span>,
    ]),
  );
}

/** Where the preview is not beside the table, each row says itself what it comes to. */
function Expanded({ row }: { readonly row: GridRow }) {
  const text = useSnapshot(({ history }) => usualText(history.document, row.at));
  return <span className="block text-note text-ink-2 lg:hidden">{text}</span>;
}

function More({ list, row, count }: { readonly list: List; readonly row: GridRow; readonly count: number }) {
  const store = useDraft();
  const act = useRows();
  const { at } = row;
  const index = Number(at.slice(list.length + 1));
  const variants = useSnapshot(({ history }) => leadingVariants(history.document, at).length);
  return (
    <>
      <div className="grid gap-12 md:grid-cols-[minmax(0,1fr)_minmax(0,3fr)]">
        <TextAt at={`${at}/id`} label="Id" maxLength={60} help="Criteria name it by this." />
        <LongTextAt at={`${at}/when`} label="When it is used" rows={2} />
      </div>
      <CheckAt at={`${at}/from_memory`}>From memory: to be compared with the print</CheckAt>
      <RowActions
        row={row}
        index={index}
        count={count}
        onDuplicate={() => act.duplicate(at)}
        onMove={(to) => act.move(at, to)}
        onRemove={() => act.remove(at)}
      >
        <Button
          size="small"
          aria-label={`Let the others of ${row.name} lead`}
          reason={variants === 0 ? 'No other group that accompanies by ψ₀ and leads nowhere yet.' : undefined}
          onClick={() => act.put(leadingVariants(store.document, at), `${list}/${index + 1}`)}
        >
          Let the others lead
        </Button>
      </RowActions>
    </>
  );
}
