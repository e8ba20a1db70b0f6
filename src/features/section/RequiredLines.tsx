import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { Button } from '@/components/ui/Button';
import type { UnitSystemName } from '@/engine/quantity';
import { type Bound, type PageState, withoutRequired } from './address';
import { axesOf, FIELD_WORDS, richUnitOf, symbolOf } from './display';
import { NumberBound } from './NumberBound';
import { SECTION_MEASURES, type SectionMeasure } from './query';

export interface RequirementsProps {
  readonly state: PageState;
  readonly system: UnitSystemName;
  readonly onState: (change: (state: PageState) => PageState) => void;
  readonly onBound: (bounds: readonly (readonly [Bound, number | null])[]) => void;
}

/** To the first field of a measure's line, once it is drawn; without a measure to where another is added. */
export function focusOnLine(measure: SectionMeasure | undefined): void {
  const what = measure ? `[data-required="${measure}"] input` : '[aria-label="Property to add"]';
  requestAnimationFrame(() => document.querySelector<HTMLElement>(what)?.focus());
}

/** Properties that were added, each a range in a line of its own that can be taken out again. */
export function RequiredLines({ state, system, onBound, onState }: RequirementsProps) {
  const { required } = state;
  if (required.length === 0) return null;
  return (
    <ul
      aria-label="Properties added"
      className="col-span-full grid border-t border-rule px-20 py-6 max-md:px-12 lg:grid-cols-3 lg:gap-x-28"
    >
      {required.map((measure, i) => (
        <Line
          key={measure}
          {...{ measure, state, system, onBound, onState }}
          onRemove={() => {
            onState((before) => withoutRequired(before, measure));
            focusOnLine(required[i + 1] ?? required[i - 1]);
          }}
        />
      ))}
    </ul>
  );
}

interface LineProps extends RequirementsProps {
  readonly measure: SectionMeasure;
  readonly onRemove: () => void;
}

function Line({ measure, state, system, onBound, onRemove }: LineProps) {
  const field = SECTION_MEASURES[measure];
  const { name } = FIELD_WORDS[field];
  const [least, greatest] = [state.bounds[`${measure}_min`], state.bounds[`${measure}_max`]];
  const bound = (end: 'min' | 'max', word: string, value: number | undefined) => (
    <NumberBound
      label={`${name}, ${word}`}
      name={`${measure}_${end}`}
      placeholder="any"
      {...{ field, value, system }}
      onChange={(bounded, changed) => onBound([[bounded, changed]])}
    />
  );
  return (
    <li
      data-required={measure}
      className="grid min-w-0 items-center gap-x-8 gap-y-2 py-3 text-schedule md:grid-cols-[minmax(0,1fr)_auto_auto_auto_32px_auto] max-md:grid-cols-[auto_auto_auto_1fr_auto]"
    >
      <span className="block min-w-0 first-letter:uppercase max-md:col-span-full">
        {name}{' '}
        <i className="whitespace-nowrap">
          <RichHtml text={symbolOf(field, axesOf(system))} />
        </i>
      </span>
      {bound('min', 'least', least)}
      <span className="text-ink-2">to</span>
      {bound('max', 'greatest', greatest)}
      <span className="text-ink-2">
        <RichHtml text={richUnitOf(field, system)} />
      </span>
      <Button tone="text" aria-label={`Remove ${name}`} onClick={onRemove}>
        Remove
      </Button>
      {least !== undefined && greatest !== undefined && least > greatest && (
        <p role="alert" className="order-last col-span-full text-note font-semibold text-error">
          The least is above the greatest, so that no section can meet both.
        </p>
      )}
    </li>
  );
}
