import { useMemo } from 'react';
import { Button } from '@/components/ui/Button';
import type { UnitSystemName } from '@/engine/quantity';
import type { Template } from '@/engine/template';
import { fieldFaults } from '@/features/template/faults';
import { ParameterFields } from '@/features/template/ParameterFields';
import { type Given, type RawValue, toParameters, toRaw } from '@/features/template/raw';
import type { Fault } from '@/lib/app-error';
import type { EditorState, StatedValues } from '../edit';
import { atEnds } from './box-values';
import { useWorst } from './use-worst';
import type { Search } from './worst';

interface ValueStripProps {
  readonly editor: EditorState;
  readonly template: Template;
  readonly system: UnitSystemName;
  /** Of these values, at their symbols. */
  readonly faults: readonly Fault[];
}

/** The values that the drawing is shown at: typed, at the ends of their ranges, or where the draft fares worst. */
export function ValueStrip({ editor, template, system, faults }: ValueStripProps) {
  const { values, setValues } = editor;
  const raw = useMemo(() => toRaw(template, values, { system }), [template, values, system]);
  const worst = useWorst(template, setValues);
  const onChange = (symbol: string, value: RawValue) => {
    const given = toParameters(template, { ...raw, [symbol]: value })[symbol];
    const stated = given === undefined ? undefined : statedOf(given);
    if (stated !== undefined) setValues({ ...values, [symbol]: stated });
  };
  return (
    <div>
      <div className="flex flex-wrap items-center gap-x-8 gap-y-6">
        <span className="caps">Shown at</span>
        <Button size="small" onClick={() => setValues({})}>
          Default
        </Button>
        <Button size="small" onClick={() => setValues(atEnds(template, 'min'))}>
          Smallest
        </Button>
        <Button size="small" onClick={() => setValues(atEnds(template, 'max'))}>
          Largest
        </Button>
        <Button size="small" aria-busy={worst.isOn} onClick={worst.begin}>
          Worst in the box
        </Button>
        <span role="status" className="text-schedule text-ink-2">
          {worst.search && searchWords(worst.search, worst.isOn)}
        </span>
      </div>
      <details className="mt-6">
        <summary className="flex min-h-28 cursor-pointer flex-wrap items-center text-schedule pointer-coarse:min-h-44">
          <span className="link mr-8">Values</span> {valueWords(template, values)}
        </summary>
        <div className="-mx-(--pad)">
          <ParameterFields
            template={template}
            raw={raw}
            system={system}
            faults={fieldFaults(faults)}
            onChange={onChange}
          />
        </div>
      </details>
    </div>
  );
}

/** "L1 = 6 m, P = 10 kN". */
const valueWords = ({ parameters }: Template, values: StatedValues): string =>
  parameters
    .flatMap((parameter) => {
      const value = values[parameter.symbol] ?? parameter.default;
      return typeof value === 'string' ? [`${parameter.symbol} = ${value}`] : [];
    })
    .join(', ');

/** A load by its groups has no place among stated values: the drawing is shown at their sum. */
function statedOf(given: Given): StatedValues[string] | undefined {
  return typeof given === 'string' || Array.isArray(given) ? given : undefined;
}

function searchWords({ done, total, points, worst }: Search, isOn: boolean): string {
  if (isOn) return `Looking at point ${done + 1} of ${total}.`;
  if (!worst) return 'Block rules let in no point of the box. Narrow the ranges to what the rules allow.';
  if (worst.message !== null) return `No result there: ${worst.message}`;
  const percent = (worst.share * 100).toPrecision(2);
  return `Worst of ${points} points: ${percent} % of what two methods may differ by.`;
}
