import type { ReactNode } from 'react';
import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { parentOf, textAt } from '@/features/author/edit';
import { CheckAt, ChoiceAt, LongTextAt, TextAt, useReadOnly } from '@/features/author/fields';
import { Row } from '@/features/author/Part';
import { useDraft, useFaultAt, useSnapshot } from '@/features/author/use-editor';
import { MOST_MATERIALS } from '@/features/material/material';
import { type Column, indexOf } from './cells';
import { Grid, type GridRow, RowActions } from './Grid';
import { focusRow } from './grid-keys';
import {
  BAND_VALUES,
  bandsOf,
  columnOf,
  EXPANSION,
  type Kind,
  LIST,
  moveAmongKind,
  newBand,
  newMaterial,
  orderBands,
  rowsOf,
  usualUnit,
  VALUES,
  type Value,
} from './materials';
import { useRows } from './use-rows';
import { ValueAt } from './ValueAt';

const NAMES: Readonly<Record<Kind, string>> = {
  steel: 'steel',
  timber_en: 'timber class',
  timber_nds: 'lumber grade',
};

const CAPTIONS: Readonly<Record<Kind, ReactNode>> = {
  steel: 'Stiffness, density and expansion: mean values',
  timber_en: (
    <>
      Characteristic strengths, before <i>k</i>
      <sub>mod</sub> and <i>γ</i>
      <sub>M</sub>
    </>
  ),
  timber_nds: 'Reference design values, before any adjustment factor',
};

/** Rows and columns of a table as they stand now; drawn again only when one of them is another. */
function useTable(
  rowsIn: (document: Readonly<Record<string, unknown>>) => readonly string[],
  values: readonly Value[],
  kind: Kind,
) {
  const rows = useSnapshot(({ history }) => rowsIn(history.document).join(' '))
    .split(' ')
    .filter((row) => row !== '');
  const units = useSnapshot(({ history }) =>
    values
      .map((one) => {
        const column = columnOf(
          history.document,
          rowsIn(history.document),
          one,
          usualUnit(kind, one.dimension),
        );
        return column.kind === 'quantity' ? column.unit : '';
      })
      .join('|'),
  ).split('|');
  const columns = values.map(
    (one, index): Column => columnOf({}, [], one, units[index] ?? usualUnit(kind, one.dimension)),
  );
  const heads = Object.fromEntries(
    values.map(({ key, letter, sub }, index) => [
      key,
      <span key={key}>
        <i>{letter}</i>
        {sub !== '' && <sub>{sub}</sub>}
        <small>{printed(units[index] ?? '')}</small>
      </span>,
    ]),
  );
  return { rows, columns, heads };
}

const printed = (unit: string): string => unit.replace('mm2', 'mm²').replace(/(m|ft)3$/, '$1³');

const NAME: Column = { key: 'name', label: 'Material', kind: 'text' };
const ID: Column = { key: 'id', label: 'Id', kind: 'text' };

/** American grades have long names and short values: their ids stand with the rest of the fields. */
const isIdApart = (kind: Kind): boolean => kind === 'timber_nds';

/** The materials of one kind as a table. */
export function MaterialZone({ kind }: { readonly kind: Kind }) {
  const act = useRows();
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const fault = useFaultAt(LIST);
  const { rows: at, columns, heads } = useTable((document) => rowsOf(document, kind), VALUES[kind], kind);
  const rows = at.map((row, index) => ({ at: row, name: `${NAMES[kind]} ${index + 1}` }));
  const blank = (document: Readonly<Record<string, unknown>>) => newMaterial(document, kind);
  const add = () => {
    const document = store.document;
    const { length } = Array.isArray(document['materials']) ? document['materials'] : [];
    act.add(LIST, length, blank);
  };
  return (
    <div>
      {rows.length === 0 ? (
        <p className="text-ink-2">None in this set.</p>
      ) : (
        <>
          <p className="mb-10 max-w-[80ch] text-ink-2">
            A number alone is in the unit of its column; type another with it, “51 ksi”. A block of a
            spreadsheet or of a CSV file can be pasted into a cell: rows beyond the last are added.
          </p>
          <Grid
            caption={CAPTIONS[kind]}
            columns={[NAME, ...(isIdApart(kind) ? [] : [ID]), ...columns]}
            heads={heads}
            widths={{ ...Object.fromEntries(columns.map(({ key }) => [key, WIDTHS[kind]])), id: '5rem' }}
            leastWidth="52rem"
            rows={rows}
            growth={{ list: LIST, most: MOST_MATERIALS, blank }}
            apart="strength"
            more={(row) => <More kind={kind} row={row} index={at.indexOf(row.at)} count={at.length} />}
          />
        </>
      )}
      <FieldNote id={`materials-${kind}-fault`} error={rows.length > 0 ? fault : undefined} />
      {!isReadOnly && (
        <div className="mt-10">
          <Button size="small" onClick={add}>
            Add a {NAMES[kind]}
          </Button>
        </div>
      )}
    </div>
  );
}

const WIDTHS: Readonly<Record<Kind, string>> = {
  steel: '6.5rem',
  timber_en: '4.25rem',
  timber_nds: '4.5rem',
};

interface MoreProps {
  readonly kind: Kind;
  readonly row: GridRow;
  readonly index: number;
  readonly count: number;
}

function More({ kind, row, index, count }: MoreProps) {
  const act = useRows();
  const store = useDraft();
  const { at } = row;
  const move = (to: number) => {
    const place = moveAmongKind(store.document, at, kind, to > index ? 1 : -1);
    if (place !== null) act.move(at, place);
  };
  return (
    <>
      <Row>
        {isIdApart(kind) && (
          <TextAt at={`${at}/id`} label="Id" maxLength={40} help="Members name it by this." />
        )}
        <TextAt at={`${at}/standard`} label="Standard" maxLength={80} />
        <TextAt at={`${at}/edition`} label="Edition" maxLength={20} />
        <TextAt at={`${at}/clause`} label="Table or clause" maxLength={80} />
        {kind !== 'steel' && <TimberFields kind={kind} at={at} />}
      </Row>
      {kind === 'timber_nds' && (
        <CheckAt at={`${at}/size_factor`}>The size factor applies: lumber, not glulam</CheckAt>
      )}
      <LongTextAt at={`${at}/note`} label="Note" rows={2} help="Where its moduli and its density are from." />
      <CheckAt at={`${at}/from_memory`}>From memory: to be compared with the print</CheckAt>
      <RowActions
        row={row}
        index={index}
        count={count}
        onDuplicate={() => act.duplicate(at)}
        onMove={move}
        onRemove={() => act.remove(at)}
      />
    </>
  );
}

const PRODUCTS: Readonly<Record<Exclude<Kind, 'steel'>, readonly { value: string; label: string }[]>> = {
  timber_en: [
    { value: 'solid', label: 'Solid timber' },
    { value: 'glulam', label: 'Glulam' },
  ],
  timber_nds: [
    { value: 'sawn', label: 'Sawn lumber' },
    { value: 'glulam', label: 'Glulam' },
  ],
};

function TimberFields({ kind, at }: { readonly kind: Exclude<Kind, 'steel'>; readonly at: string }) {
  return (
    <>
      <ChoiceAt at={`${at}/product`} label="Product" choices={PRODUCTS[kind]} />
      <ValueAt
        at={`${at}/expansion`}
        label="Thermal expansion"
        as={{ kind: 'quantity', dimension: 'expansion', unit: usualUnit(kind, EXPANSION.dimension) }}
        help={`In ${usualUnit(kind, EXPANSION.dimension)}, where no unit is given.`}
      />
    </>
  );
}

/** Strength of the steels by thickness, a row for each step. */
export function BandZone() {
  const { rows: at, columns, heads } = useTable(bandsOf, BAND_VALUES, 'steel');
  const names = useSnapshot(({ history }) =>
    at.map((row) => textAt(history.document, `${parentOf(parentOf(row))}/name`) || 'unnamed').join('\n'),
  ).split('\n');
  const rows = at.map((row, index) => ({ at: row, name: `${names[index]}, step ${indexOf(row) + 1}` }));
  if (rows.length === 0) return <p className="text-ink-2">No steel in this set.</p>;
  return (
    <Grid
      caption="Up to and with the thickness that is named; only the last step of a steel may be without one"
      columns={columns}
      heads={heads}
      widths={{}}
      rows={rows}
      lead={{
        head: 'Material',
        width: '12rem',
        of: (row) =>
          indexOf(row.at) === 0 ? names[at.indexOf(row.at)] : <span className="sr-only">{row.name}</span>,
      }}
      more={(row) => <BandActions row={row} />}
    />
  );
}

function BandActions({ row }: { readonly row: GridRow }) {
  const act = useRows();
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const material = parentOf(parentOf(row.at));
  const count = useSnapshot(
    ({ history }) => bandsOf(history.document).filter((one) => one.startsWith(`${material}/`)).length,
  );
  const isOrdered = useSnapshot(({ history }) => orderBands(history.document, material).length === 0);
  if (isReadOnly) return null;
  return (
    <div className="flex flex-wrap gap-10">
      <Button
        size="small"
        onClick={() => act.put(newBand(store.document, material), `${material}/strength/${count}`)}
      >
        Add a step
      </Button>
      {!isOrdered && (
        <Button
          size="small"
          onClick={() => {
            store.edit(...orderBands(store.document, material));
            focusRow(row.at);
          }}
        >
          Put the steps in order
        </Button>
      )}
      <Button
        size="small"
        aria-label={`Remove ${row.name}`}
        reason={count === 1 ? 'A steel has one step at least.' : undefined}
        onClick={() => act.remove(row.at)}
      >
        Remove the step
      </Button>
    </div>
  );
}
