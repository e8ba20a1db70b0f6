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

/** A load with a field for each group that it is given in. */
export function LoadByGroup({ parameter, parts, system, faults, groups, onChange }: LoadByGroupProps) {
  const { symbol, name } = parameter;
  const free = groups.filter(({ group }) => parts.every((part) => part.group !== group));
  const put = (group: string, entry: LoadPart['entry']) =>
    onChange(parts.map((part) => (part.group === group ? { group, entry } : part)));
  const add = (group: string) =>
    onChange([...parts, { group, entry: { text: '0', unit: unitOf(parameter, system) } }]);
  return (
    <fieldset data-symbol={symbol} className="min-w-0">
      <legend className="sr-only">{name} by load group</legend>
      {parts.map(({ group, entry }, index) => (
        <div key={group} className="relative">
          <MeasuredField
            parameter={parameter}
            label={`${name}, ${group}`}
            entry={entry}
            system={system}
            error={faults.get(`${symbol}/${group}`) ?? (index === 0 ? faults.get(symbol) : undefined)}
            isRanged={false}
            onChange={(next) => put(group, next)}
          />
          {parts.length > 1 && (
            <button
              type="button"
              aria-label={`Remove ${name}, ${group}`}
              onClick={() => onChange(parts.filter((part) => part.group !== group))}
              className="absolute top-4 right-6 grid size-26 place-items-center text-ink-2 hover:bg-paper-3 pointer-coarse:size-44"
            >
              ×
            </button>
          )}
        </div>
      ))}
      {free.length > 0 && (
        <select
          aria-label={`Add a load group to ${name}`}
          value=""
          onChange={(event) => add(event.target.value)}
          className="mx-14 mb-9 min-h-26 text-schedule text-ink-2 underline decoration-ochre decoration-dotted underline-offset-3 pointer-coarse:min-h-44"
        >
          <option value="">Add a group</option>
          {free.map((each) => (
            <option key={each.group} value={each.group}>
              {each.group}, {each.name}
            </option>
          ))}
        </select>
      )}
    </fieldset>
  );
}
