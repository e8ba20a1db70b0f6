import { Button } from '@/components/ui/Button';
import { DIMENSION_NAMES, DIMENSION_WORDS, type DimensionName } from '@/engine/quantity';
import { choicesOf, sizedBy } from './choices';
import { DraftSteps } from './draft-steps';
import { type Pointer, textAt } from './edit';
import { choice, groupColumn, ofDimension, pointLoadRows } from './entries';
import { ChoiceAt, CountAt, LongTextAt, QuantityAt, TextAt, useReadOnly } from './fields';
import { openPart } from './open-part';
import { Part, Parts, Row } from './Part';
import { RowFields } from './StatedRows';
import { SymbolAt } from './SymbolAt';
import { useDraft, useFaultAt, useListAt, useTextAt } from './use-editor';

const LIST = '/parameters';

/** What a person gives: quantities, choices, and lists of rows. */
export function ParameterZone() {
  const parameters = useListAt(LIST);
  const fault = useFaultAt(LIST);
  return (
    <Parts
      label="Parameters"
      empty="None yet. A span is a good first one."
      count={parameters.length}
      fault={fault}
      add={<AddParameter />}
    >
      {parameters.map((one, index) => (
        <Part
          // biome-ignore lint/suspicious/noArrayIndexKey: a part has no identity but its place
          key={index}
          at={`${LIST}/${index}`}
          name={`parameter ${textAt(one, '/symbol')}`}
          count={parameters.length}
          title={<i>{textAt(one, '/symbol') || '?'}</i>}
          line={lineOf(one)}
        >
          <ParameterFields at={`${LIST}/${index}`} />
        </Part>
      ))}
    </Parts>
  );
}

function lineOf(one: unknown): string {
  const name = textAt(one, '/name') || 'without a name';
  switch (textAt(one, '/kind')) {
    case 'quantity': {
      const group = textAt(one, '/group');
      const range = `${textAt(one, '/default')}, from ${textAt(one, '/min')} to ${textAt(one, '/max')}`;
      return `${name}: ${range}${group ? `, group ${group}` : ''}`;
    }
    case 'rows':
      return `${name}: a list of rows`;
    default:
      return `${name}: a choice`;
  }
}

function AddParameter() {
  const store = useDraft();
  const add = (make: (steps: DraftSteps) => unknown) => {
    const steps = new DraftSteps(store.document);
    const at = steps.append(LIST, make(steps));
    store.edit(...steps.edits);
    openPart(store, at);
  };
  return (
    <>
      <Button size="small" onClick={() => add((steps) => ofDimension(steps.fresh('c'), 'length'))}>
        Add a quantity
      </Button>
      <Button size="small" onClick={() => add((steps) => choice(steps.fresh('kind')))}>
        Add a choice
      </Button>
      <Button
        size="small"
        onClick={() =>
          add((steps) =>
            pointLoadRows(steps.fresh('loads'), steps.fresh('x'), steps.fresh('P'), steps.fresh('g')),
          )
        }
      >
        Add a list of rows
      </Button>
    </>
  );
}

function ParameterFields({ at }: { readonly at: Pointer }) {
  const kind = useTextAt(`${at}/kind`);
  return (
    <>
      <Row>
        <SymbolAt at={at} />
        <TextAt at={`${at}/name`} label="Name" maxLength={60} />
        <TextAt at={`${at}/tex`} label="In formulas" help="As TeX: L_1, \Delta." maxLength={400} />
        {kind === 'quantity' && <DimensionAt at={at} />}
      </Row>
      <LongTextAt
        at={`${at}/help`}
        label="What it is"
        rows={2}
        help="Shown under its field: between which points, which sense."
      />
      {kind === 'quantity' && <QuantityFields at={at} />}
      {kind === 'choice' && <ChoiceFields at={at} />}
      {kind === 'rows' && <RowsFields at={at} />}
      {kind === 'group' && <TextAt at={`${at}/default`} label="Group of a new row" maxLength={8} />}
    </>
  );
}

const dimensionAt = (name: string): DimensionName =>
  DIMENSION_NAMES.find((known) => known === name) ?? 'ratio';

function DimensionAt({ at }: { readonly at: Pointer }) {
  return (
    <ChoiceAt
      at={`${at}/dimension`}
      label="Quantity"
      choices={DIMENSION_NAMES.map((value) => ({
        value,
        label: DIMENSION_WORDS[value].replace(/^an? /, ''),
      }))}
    />
  );
}

function QuantityFields({ at }: { readonly at: Pointer }) {
  const dimension = dimensionAt(useTextAt(`${at}/dimension`));
  return (
    <>
      <Row>
        <QuantityAt at={`${at}/default`} label="Default" dimension={dimension} />
        <QuantityAt at={`${at}/min`} label="Smallest" dimension={dimension} />
        <QuantityAt at={`${at}/max`} label="Largest" dimension={dimension} />
        <QuantityAt
          at={`${at}/step`}
          label="Step"
          dimension={dimension}
          help="Of one press of an arrow key."
        />
      </Row>
      <Row>
        <TextAt at={`${at}/group`} label="Load group" isOptional maxLength={8} help={sizedBy} />
        <TextAt
          at={`${at}/units/metric`}
          label="Shown in, metric"
          isOptional
          maxLength={20}
          help="Left empty: the usual unit."
        />
        <TextAt at={`${at}/units/us`} label="Shown in, US" isOptional maxLength={20} />
      </Row>
    </>
  );
}

function ChoiceFields({ at }: { readonly at: Pointer }) {
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const options = useListAt(`${at}/options`);
  const values = options.map((option) => textAt(option, '/value'));
  return (
    <>
      {options.map((option, index) => {
        const place = `${at}/options/${index}`;
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: an option has no identity but its place
          <div key={index} className="grid items-start gap-12 md:grid-cols-[1fr_2fr_auto]">
            <TextAt
              at={`${place}/value`}
              label={`Value ${index + 1}`}
              maxLength={40}
              help="Small letters, digits and hyphens."
            />
            <TextAt at={`${place}/name`} label="Name" maxLength={60} />
            <div className="md:pt-20" hidden={isReadOnly}>
              <Button
                tone="text"
                aria-label={`Remove the value ${textAt(option, '/value')}`}
                reason={options.length <= 2 ? 'Two at least.' : undefined}
                onClick={() => store.edit({ do: 'remove', at: place })}
              >
                Remove
              </Button>
            </div>
          </div>
        );
      })}
      <div className="flex flex-wrap items-end gap-12">
        <ChoiceAt at={`${at}/default`} label="Default" choices={choicesOf(values)} />
        {!isReadOnly && (
          <Button
            size="small"
            onClick={() =>
              store.edit({
                do: 'insert',
                at: `${at}/options/-`,
                value: { value: `value-${options.length + 1}`, name: '' },
              })
            }
          >
            Add a value
          </Button>
        )}
      </div>
    </>
  );
}

function RowsFields({ at }: { readonly at: Pointer }) {
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const columns = useListAt(`${at}/columns`);
  const add = (value: (symbol: string) => unknown, symbol: string) => {
    const steps = new DraftSteps(store.document);
    steps.append(`${at}/columns`, value(steps.fresh(symbol)));
    store.edit(...steps.edits);
  };
  return (
    <>
      <Row>
        <CountAt at={`${at}/least`} label="Rows at least" />
        <CountAt at={`${at}/most`} label="Rows at most" />
      </Row>
      {columns.map((column, index) => {
        const place = `${at}/columns/${index}`;
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: a column has no identity but its place
          <fieldset key={index} className="grid gap-12 border-t border-rule pt-8">
            <legend className="caps">Column {index + 1}</legend>
            <ParameterFields at={place} />
            <div hidden={isReadOnly}>
              <Button
                size="small"
                aria-label={`Remove column ${textAt(column, '/symbol')}`}
                onClick={() => store.edit({ do: 'remove', at: place })}
              >
                Remove the column
              </Button>
            </div>
          </fieldset>
        );
      })}
      <fieldset className="grid gap-8 border-t border-rule pt-8">
        <legend className="caps">Rows at the start</legend>
        <RowFields at={`${at}/default`} columns={columns} />
      </fieldset>
      <div className="flex flex-wrap gap-8" hidden={isReadOnly}>
        <Button size="small" onClick={() => add((symbol) => ofDimension(symbol, 'force'), 'c')}>
          Add a column
        </Button>
        {!columns.some((column) => textAt(column, '/kind') === 'group') && (
          <Button size="small" onClick={() => add(groupColumn, 'g')}>
            Add the load group of a row
          </Button>
        )}
      </div>
    </>
  );
}
