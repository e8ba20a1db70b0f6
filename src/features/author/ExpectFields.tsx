import { Button } from '@/components/ui/Button';
import { ChoiceField, Field } from '@/components/ui/Field';
import { DIMENSIONS, nameDimension } from '@/engine/quantity';
import { choicesOf } from './choices';
import { type Pointer, textAt, valueAt } from './edit';
import { ChoiceAt, ExpressionAt, TextAt, useReadOnly } from './fields';
import { Row } from './Part';
import { SelectorFields } from './SelectorFields';
import { quantityDimension } from './selectors';
import { useAt, useDraft, useFaultIn, useListAt } from './use-editor';

const WAYS = {
  printed: 'A figure with its unit',
  times: 'A printed coefficient, times an expression',
  over: 'An expression over a printed coefficient',
  exact: 'An expression, exactly',
  result: 'A closed form of this template',
} as const;
type Way = keyof typeof WAYS;

function wayOf(expectation: unknown): Way {
  const has = (key: string) => valueAt(expectation, `/${key}`) !== undefined;
  if (has('result')) return 'result';
  if (has('exact')) return 'exact';
  if (has('times')) return 'times';
  return has('over') ? 'over' : 'printed';
}

/** An expectation said another way: what it has in common with the old one is kept. */
function turned(expectation: unknown, way: Way, firstResult: string): object {
  if (way === 'result') return { result: firstResult };
  const quantity = valueAt(expectation, '/quantity') ?? { reaction: 'A' };
  const printed = textAt(expectation, '/printed');
  const sized =
    ['exact', 'times', 'over'].map((key) => textAt(expectation, `/${key}`)).find((text) => text !== '') ?? '';
  if (way === 'exact') return { quantity, exact: sized };
  return way === 'printed' ? { quantity, printed } : { quantity, printed, [way]: sized };
}

/** What must come out of a proof case. */
export function ExpectFields({ at }: { readonly at: Pointer }) {
  const store = useDraft();
  const expectations = useListAt(at);
  const isReadOnly = useReadOnly();
  return (
    <div className="grid gap-12">
      {expectations.map((_, index) => (
        <Expectation
          // biome-ignore lint/suspicious/noArrayIndexKey: an expectation has no identity but its place
          key={index}
          at={`${at}/${index}`}
          number={index + 1}
          isLast={expectations.length === 1}
        />
      ))}
      {!isReadOnly && (
        <div>
          <Button
            size="small"
            onClick={() =>
              store.edit({
                do: 'insert',
                at: `${at}/-`,
                value: { quantity: { largest: 'moment', sense: 'sagging' }, printed: '' },
              })
            }
          >
            Add what else must come out
          </Button>
        </div>
      )}
    </div>
  );
}

interface ExpectationProps {
  readonly at: Pointer;
  readonly number: number;
  readonly isLast: boolean;
}

function Expectation({ at, number, isLast }: ExpectationProps) {
  const store = useDraft();
  const expectation = useAt(at);
  const results = useListAt('/results').map((one) => textAt(one, '/id'));
  const isReadOnly = useReadOnly();
  const way = wayOf(expectation);
  return (
    <fieldset className="grid gap-10 border-t border-rule pt-8">
      <legend className="caps">Must come out {number}</legend>
      {way !== 'result' && <SelectorFields at={`${at}/quantity`} />}
      <Row>
        <ChoiceField
          label="Given as"
          disabled={isReadOnly}
          choices={Object.entries(WAYS).map(([value, label]) => ({
            value,
            label,
            reason: value === 'result' && results.length === 0 ? 'there is none' : undefined,
          }))}
          value={way}
          onChange={(event) => {
            const next = (Object.keys(WAYS) as Way[]).find((one) => one === event.target.value) ?? 'printed';
            store.edit({ do: 'set', at, value: turned(expectation, next, results[0] ?? '') });
          }}
        />
        {way === 'result' ? (
          <ChoiceAt at={`${at}/result`} label="Closed form" choices={choicesOf(results)} />
        ) : (
          <Figures at={at} way={way} expectation={expectation} />
        )}
        {!isReadOnly && !isLast && (
          <div className="self-end">
            <Button
              size="small"
              aria-label={`Remove what must come out ${number}`}
              onClick={() => store.edit({ do: 'remove', at })}
            >
              Remove
            </Button>
          </div>
        )}
      </Row>
    </fieldset>
  );
}

interface FiguresProps {
  readonly at: Pointer;
  readonly way: Exclude<Way, 'result'>;
  readonly expectation: unknown;
}

function Figures({ at, way, expectation }: FiguresProps) {
  const dimension = quantityDimension(valueAt(expectation, '/quantity'));
  const fault = useFaultIn(at);
  if (way === 'exact')
    return (
      <>
        <ExpressionAt at={`${at}/exact`} label="Expression" wanted={dimension} />
        <ToleranceAt at={`${at}/tolerance`} />
      </>
    );
  const help = {
    printed: `${nameDimension(DIMENSIONS[dimension])}, such as ${EXAMPLES[dimension] ?? '0.25'}`,
    times: 'As 0.125.',
    over: 'As 384.',
  }[way];
  return (
    <>
      <TextAt
        at={`${at}/printed`}
        label={way === 'printed' ? 'Value' : 'Coefficient'}
        help={fault === undefined ? help : undefined}
        maxLength={40}
      />
      {way !== 'printed' && (
        <ExpressionAt at={`${at}/${way}`} label={way === 'times' ? 'Times' : 'Over it'} wanted={dimension} />
      )}
    </>
  );
}

const EXAMPLES: Readonly<Record<string, string>> = {
  force: '12.5 kN',
  moment: '33.28 kNm',
  length: '8.75 mm',
  rotation: '3.13 mrad',
};

/** A share of the value; left empty, 1e-9. */
function ToleranceAt({ at }: { readonly at: Pointer }) {
  const store = useDraft();
  const value = useAt(at);
  return (
    <Field
      data-at={at}
      label="Tolerance"
      help="A share, at most 0.01. Left empty: exact to 1e-9."
      error={useFaultIn(at)}
      readOnly={useReadOnly()}
      autoComplete="off"
      value={value === undefined ? '' : String(value)}
      onChange={({ target }) => {
        const number = Number(target.value);
        const isNumber = /^\d*\.?\d+(e-?\d+)?$/.test(target.value) && Number.isFinite(number);
        store.edit(
          target.value === ''
            ? { do: 'remove', at }
            : { do: 'set', at, value: isNumber ? number : target.value },
        );
      }}
    />
  );
}
