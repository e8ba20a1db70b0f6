import { useRef } from 'react';
import type { UnitSystemName } from '@/engine/quantity';
import { type QuantityParameter, unitOf } from '@/engine/template';
import type { FieldFaults } from './faults';
import { type LoadGroup, MeasuredField } from './MeasuredField';
import type { LoadPart } from './raw';

interface LoadByGroupProps {
  readonly parameter: QuantityParameter;
  readonly parts: readonly LoadPart[];
  readonly system: UnitSystemName;
  readonly faults: FieldFaults;
  readonly groups: readonly LoadGroup[];
  readonly onChange: (parts: readonly LoadPart[]) => void;
}

/** A load with a compartment for each group that it is given in. */
export function LoadByGroup({ parameter, parts, system, faults, groups, onChange }: LoadByGroupProps) {
  const { symbol, name } = parameter;
  const host = useRef<HTMLFieldSetElement>(null);
  const free = groups.filter(({ group }) => parts.every((part) => part.group !== group));
  const put = (group: string, entry: LoadPart['entry']) =>
    onChange(parts.map((part) => (part.group === group ? { group, entry } : part)));
  // What is added is typed next, and what is taken out leaves the focus on the field before it.
  const goTo = (index: number) =>
    requestAnimationFrame(() => {
      const field = host.current?.querySelectorAll<HTMLInputElement>('[data-part] input[type="text"]')[index];
      field?.focus();
      field?.select();
    });
  const add = (group: string) => {
    onChange([...parts, { group, entry: { text: '0', unit: unitOf(parameter, system) } }]);
    goTo(parts.length);
  };
  const takeOut = (group: string, index: number) => {
    onChange(parts.filter((part) => part.group !== group));
    goTo(Math.max(0, index - 1));
  };
  return (
    <fieldset ref={host} data-symbol={symbol} className="contents">
      <legend className="sr-only">{name} by load group</legend>
      {parts.map(({ group, entry }, index) => (
        <div key={group} data-part={group} className="-ml-px min-w-0 border-t border-l border-rule">
          <MeasuredField
            parameter={parameter}
            label={`${name}, ${group}`}
            entry={entry}
            system={system}
            error={faults.get(`${symbol}/${group}`) ?? (index === 0 ? faults.get(symbol) : undefined)}
            isRanged={false}
            action={
              parts.length > 1 && (
                <button
                  type="button"
                  aria-label={`Remove ${name}, ${group}`}
                  onClick={() => takeOut(group, index)}
                  className="-my-4 grid size-26 place-items-center hover:bg-paper-3 pointer-coarse:size-44"
                >
                  ×
                </button>
              )
            }
            onChange={(next) => put(group, next)}
          />
          {index === parts.length - 1 && free.length > 0 && <AddGroup name={name} free={free} onAdd={add} />}
        </div>
      ))}
    </fieldset>
  );
}

interface AddProps {
  readonly name: string;
  readonly free: readonly LoadGroup[];
  readonly onAdd: (group: string) => void;
}

/** The groups that the load is not given in yet. */
function AddGroup({ name, free, onAdd }: AddProps) {
  return (
    <details className="px-14 pb-9">
      <summary
        aria-label={`Add a group to ${name}`}
        className="inline-block min-h-26 list-none text-schedule text-ink-2 underline decoration-ochre decoration-dotted underline-offset-3 pointer-coarse:min-h-44 [&::-webkit-details-marker]:hidden"
      >
        Add a group
      </summary>
      <div className="flex flex-wrap gap-6">
        {free.map(({ group, name: words }) => (
          <button
            key={group}
            type="button"
            onClick={(event) => {
              event.currentTarget.closest('details')?.removeAttribute('open');
              onAdd(group);
            }}
            className="min-h-26 border border-ink px-8 text-schedule font-semibold hover:bg-paper-3 pointer-coarse:min-h-44"
          >
            {group} <span className="font-normal">{words}</span>
          </button>
        ))}
      </div>
    </details>
  );
}
