import { ChoiceField, Field } from '@/components/ui/Field';
import { DIMENSION_NAMES, readQuantity } from '@/engine/quantity';
import type { Edit, Pointer } from './edit';
import { listAt, textAt } from './edit';
import { useReadOnly } from './fields';
import { StatedRows } from './StatedRows';
import { SymbolLabel } from './SymbolLabel';
import { useAt, useDraft, useFaultAt, useListAt, useTextAt } from './use-editor';

/** Values of the parameters by symbol; one that is left empty is at its default. */
export function StatedFields({ at }: { readonly at: Pointer }) {
  const parameters = useListAt('/parameters').filter((one) => textAt(one, '/symbol') !== '');
  const lists = parameters.filter((one) => textAt(one, '/kind') === 'rows');
  return (
    <>
      <div className="grid gap-12 md:grid-cols-3 lg:grid-cols-5">
        {parameters
          .filter((one) => textAt(one, '/kind') !== 'rows')
          .map((one) => (
            <StatedField
              key={textAt(one, '/symbol')}
              at={`${at}/${textAt(one, '/symbol')}`}
              parameter={one}
            />
          ))}
      </div>
      {lists.map((one) => (
        <StatedRows key={textAt(one, '/symbol')} at={`${at}/${textAt(one, '/symbol')}`} parameter={one} />
      ))}
      <Strangers at={at} known={parameters.map((one) => textAt(one, '/symbol'))} />
    </>
  );
}

function StatedField({ at, parameter }: { readonly at: Pointer; readonly parameter: unknown }) {
  const store = useDraft();
  const value = useTextAt(at);
  const fault = useFaultAt(at);
  const isReadOnly = useReadOnly();
  const symbol = textAt(parameter, '/symbol');
  const put = (text: string): Edit => (text === '' ? { do: 'remove', at } : { do: 'set', at, value: text });
  if (textAt(parameter, '/kind') === 'choice')
    return (
      <ChoiceField
        data-at={at}
        label={<SymbolLabel symbol={symbol} />}
        disabled={isReadOnly}
        error={fault}
        choices={[
          { value: '', label: `${textAt(parameter, '/default')}, the default` },
          ...listAt(parameter, '/options').map((option) => ({
            value: textAt(option, '/value'),
            label: textAt(option, '/value'),
          })),
        ]}
        value={value}
        onChange={(event) => store.edit(put(event.target.value))}
      />
    );
  const dimension = DIMENSION_NAMES.find((name) => name === textAt(parameter, '/dimension'));
  const reading = value === '' || !dimension ? null : readQuantity(value, dimension);
  return (
    <Field
      data-at={at}
      label={<SymbolLabel symbol={symbol} />}
      readOnly={isReadOnly}
      error={reading && !reading.ok ? reading.message : fault}
      autoComplete="off"
      placeholder={textAt(parameter, '/default')}
      value={value}
      onChange={(event) => store.edit(put(event.target.value))}
    />
  );
}

/** Values of what is no parameter any more: to be taken out. */
function Strangers({ at, known }: { readonly at: Pointer; readonly known: readonly string[] }) {
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const stated = Object(useAt(at));
  const strangers = Object.keys(stated).filter((symbol) => !known.includes(symbol));
  if (strangers.length === 0 || isReadOnly) return null;
  return (
    <p role="alert" className="text-note font-semibold text-error">
      There is no parameter {strangers.join(', ')} any more.{' '}
      <button
        type="button"
        className="link"
        onClick={() =>
          store.edit(...strangers.map((symbol): Edit => ({ do: 'remove', at: `${at}/${symbol}` })))
        }
      >
        Take it out
      </button>
    </p>
  );
}
