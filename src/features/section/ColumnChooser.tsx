import { type ReactNode, useEffect, useRef } from 'react';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { Button } from '@/components/ui/Button';
import { Checkbox } from '@/components/ui/Choice';
import type { UnitSystemName } from '@/engine/quantity';
import { USUAL_COLUMNS } from './columns';
import { axesOf, FIELD_WORDS, symbolOf } from './display';
import { SECTION_MEASURES, type SectionMeasure } from './query';
import type { ColumnChoosing } from './use-columns';

interface ColumnChooserProps {
  readonly id: string;
  readonly choosing: ColumnChoosing;
  readonly system: UnitSystemName;
  readonly onClose: () => void;
}

type Part = 'shown' | 'earlier' | 'later';

/** Which measures the schedule shows, and in which order: every change is seen at once. */
export function ColumnChooser({ id, choosing, system, onClose }: ColumnChooserProps) {
  const host = useRef<HTMLFieldSetElement>(null);
  const shown = choosing.columns ?? USUAL_COLUMNS;
  const hidden = USUAL_COLUMNS.filter((measure) => !shown.includes(measure));
  const keepFocus = useFocusAfter(host, shown);
  const change = (measure: SectionMeasure, part: Part, columns: readonly SectionMeasure[]) => {
    keepFocus(measure, part);
    choosing.choose(columns);
  };
  const move = (measure: SectionMeasure, part: 'earlier' | 'later') => {
    const others = shown.filter((one) => one !== measure);
    const to = shown.indexOf(measure) + (part === 'earlier' ? -1 : 1);
    change(measure, part, others.toSpliced(to, 0, measure));
  };
  return (
    <fieldset
      ref={host}
      id={id}
      className="border-b border-rule px-(--pad) py-10 text-schedule"
      onKeyDown={(event) => event.key === 'Escape' && onClose()}
    >
      <legend className="sr-only">Columns</legend>
      <ol className="grid gap-x-20 md:max-lg:grid-cols-2 lg:grid-cols-4">
        {[...shown, ...hidden].map((measure) => (
          <Choice
            key={measure}
            {...{ measure, system }}
            isShown={shown.includes(measure)}
            isOnly={shown.length === 1 && shown[0] === measure}
            onShown={(isShown) =>
              change(measure, 'shown', isShown ? [...shown, measure] : shown.filter((one) => one !== measure))
            }
          >
            {measure !== shown[0] && (
              <Move {...{ measure }} part="earlier" onMove={() => move(measure, 'earlier')} />
            )}
            {measure !== shown.at(-1) && (
              <Move {...{ measure }} part="later" onMove={() => move(measure, 'later')} />
            )}
          </Choice>
        ))}
      </ol>
      <Foot
        {...{ choosing, onClose }}
        onUsual={() => {
          host.current?.querySelector('input')?.focus();
          choosing.choose(USUAL_COLUMNS);
        }}
      />
    </fieldset>
  );
}

function Foot({
  choosing: { columns, failure, again },
  onUsual,
  onClose,
}: Pick<ColumnChooserProps, 'choosing' | 'onClose'> & { readonly onUsual: () => void }) {
  return (
    <div className="mt-6 flex flex-wrap items-center gap-x-18 gap-y-4">
      <span className="text-ink-2">
        Kept for your next visit, and in this page’s address. A phone shows the mass and the first other one.
      </span>
      {failure && (
        <span role="alert" className="flex items-center gap-10 font-semibold text-error">
          {failure}
          <Button tone="text" onClick={again}>
            Try again
          </Button>
        </span>
      )}
      <span className="ml-auto flex gap-18">
        {columns && (
          <Button tone="text" onClick={onUsual}>
            The usual columns
          </Button>
        )}
        <Button tone="text" onClick={onClose}>
          Close
        </Button>
      </span>
    </div>
  );
}

interface ChoiceProps {
  readonly measure: SectionMeasure;
  readonly system: UnitSystemName;
  readonly isShown: boolean;
  /** Without it the schedule would have none. */
  readonly isOnly: boolean;
  readonly onShown: (isShown: boolean) => void;
  readonly children: ReactNode;
}

function Choice({ measure, system, isShown, isOnly, onShown, children }: ChoiceProps) {
  const field = SECTION_MEASURES[measure];
  return (
    <li
      data-column={measure}
      className="flex min-h-28 items-center gap-4 pointer-coarse:min-h-44 max-md:min-h-44"
    >
      <span className="mr-auto min-w-0">
        <Checkbox
          data-part="shown"
          checked={isShown}
          disabled={isOnly}
          onChange={(event) => onShown(event.target.checked)}
        >
          <i className="inline-block min-w-36 whitespace-nowrap">
            <RichHtml text={symbolOf(field, axesOf(system))} />
          </i>
          {FIELD_WORDS[field].name}
        </Checkbox>
      </span>
      {isShown && children}
    </li>
  );
}

interface MoveProps {
  readonly measure: SectionMeasure;
  readonly part: 'earlier' | 'later';
  readonly onMove: () => void;
}

const Move = ({ measure, part, onMove }: MoveProps) => (
  <button
    type="button"
    data-part={part}
    aria-label={`Move ${FIELD_WORDS[SECTION_MEASURES[measure]].name} ${part}`}
    className="size-26 border border-rule-strong leading-none hover:bg-paper-3 pointer-coarse:size-44 max-md:size-44"
    onClick={onMove}
  >
    <span aria-hidden="true">{part === 'earlier' ? '←' : '→'}</span>
  </button>
);

/** What is moved in a list loses the focus; it is given back to the same control, else to its neighbour. */
function useFocusAfter(
  host: { readonly current: HTMLElement | null },
  columns: readonly SectionMeasure[],
): (measure: SectionMeasure, part: Part) => void {
  const wanted = useRef<{ readonly measure: SectionMeasure; readonly part: Part } | null>(null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: once the columns stand in their new order
  useEffect(() => {
    if (wanted.current === null) return;
    const { measure, part } = wanted.current;
    wanted.current = null;
    const line = host.current?.querySelector(`[data-column="${measure}"]`);
    const control =
      line?.querySelector<HTMLElement>(`[data-part="${part}"]`) ?? line?.querySelector('button');
    control?.focus();
  }, [columns]);
  return (measure, part) => {
    wanted.current = { measure, part };
  };
}
