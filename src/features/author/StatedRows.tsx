import { Button } from '@/components/ui/Button';
import { listAt, type Pointer, textAt } from './edit';
import { TextAt, useReadOnly } from './fields';
import { SymbolLabel } from './SymbolLabel';
import { useAt, useDraft, useListAt } from './use-editor';

interface RowsProps {
  /** Where the rows stand. */
  readonly at: Pointer;
  readonly columns: readonly unknown[];
}

const freshRow = (columns: readonly unknown[]) =>
  Object.fromEntries(columns.map((column) => [textAt(column, '/symbol'), textAt(column, '/default')]));

/** Rows of a list, a line of fields each. */
export function RowFields({ at, columns }: RowsProps) {
  const store = useDraft();
  const rows = useListAt(at);
  const isReadOnly = useReadOnly();
  return (
    <>
      {rows.map((_, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: a row has no identity but its place
        <div key={index} className="flex flex-wrap items-end gap-10">
          {columns.map((column) => (
            <div key={textAt(column, '/symbol')} className="w-120">
              <TextAt
                at={`${at}/${index}/${textAt(column, '/symbol')}`}
                label={<SymbolLabel symbol={textAt(column, '/symbol')} />}
                maxLength={40}
              />
            </div>
          ))}
          {!isReadOnly && (
            <Button
              tone="text"
              aria-label={`Remove row ${index + 1}`}
              onClick={() => store.edit({ do: 'remove', at: `${at}/${index}` })}
            >
              Remove
            </Button>
          )}
        </div>
      ))}
      {!isReadOnly && (
        <div>
          <Button
            size="small"
            onClick={() => store.edit({ do: 'insert', at: `${at}/-`, value: freshRow(columns) })}
          >
            Add a row
          </Button>
        </div>
      )}
    </>
  );
}

/** The rows of a list as a case states them; none stated: those of its default. */
export function StatedRows({ at, parameter }: { readonly at: Pointer; readonly parameter: unknown }) {
  const store = useDraft();
  const isStated = Array.isArray(useAt(at));
  const isReadOnly = useReadOnly();
  const symbol = textAt(parameter, '/symbol');
  const columns = listAt(parameter, '/columns');
  if (!isStated)
    return (
      <p className="text-schedule">
        Rows of <i>{symbol}</i>: as it begins.{' '}
        {!isReadOnly && (
          <button
            type="button"
            className="link"
            onClick={() => store.edit({ do: 'set', at, value: [freshRow(columns)] })}
          >
            State others
          </button>
        )}
      </p>
    );
  return (
    <fieldset className="grid gap-8">
      <legend className="caps">Rows of {symbol}</legend>
      <RowFields at={at} columns={columns} />
      {!isReadOnly && (
        <div>
          <Button size="small" onClick={() => store.edit({ do: 'remove', at })}>
            Take the default
          </Button>
        </div>
      )}
    </fieldset>
  );
}
