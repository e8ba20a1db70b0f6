import { Button } from '@/components/ui/Button';
import type { UnitSystemName } from '@/engine/quantity';
import { QuantityInput } from './QuantityInput';
import { MOST_WHEELS, newWheel, type TrainReading, type WheelEntry, type WheelFaults } from './train-entry';

interface TrainRowsProps {
  readonly rows: readonly WheelEntry[];
  readonly reading: TrainReading;
  readonly system: UnitSystemName;
  readonly onChange: (rows: readonly WheelEntry[]) => void;
}

/** The wheels from the front backwards, a line for each. */
export function TrainRows({ rows, reading, system, onChange }: TrainRowsProps) {
  const put = (index: number, change: Partial<WheelEntry>) =>
    onChange(rows.map((row, at) => (at === index ? { ...row, ...change } : row)));
  return (
    <fieldset className="min-w-0">
      <legend className="caps mb-4">Wheels, from the front</legend>
      <ol className="grid gap-8">
        {rows.map((row, index) => (
          <WheelRow
            // biome-ignore lint/suspicious/noArrayIndexKey: a wheel has no identity but its place
            key={index}
            index={index}
            row={row}
            faults={reading.ok ? undefined : reading.faults[index]}
            isAlone={rows.length === 1}
            onChange={(change) => put(index, change)}
            onRemove={() => onChange(rows.filter((_, at) => at !== index))}
          />
        ))}
      </ol>
      <div className="mt-10">
        <Button
          size="small"
          reason={rows.length >= MOST_WHEELS ? `At most ${MOST_WHEELS} wheels.` : undefined}
          onClick={() => onChange([...rows, newWheel(system, false)])}
        >
          Add a wheel
        </Button>
      </div>
    </fieldset>
  );
}

interface WheelRowProps {
  readonly index: number;
  readonly row: WheelEntry;
  readonly faults: WheelFaults | undefined;
  readonly isAlone: boolean;
  readonly onChange: (change: Partial<WheelEntry>) => void;
  readonly onRemove: () => void;
}

function WheelRow({ index, row, faults, isAlone, onChange, onRemove }: WheelRowProps) {
  const number = index + 1;
  return (
    <li className="grid grid-cols-[18px_minmax(0,1fr)_minmax(0,1fr)_auto] items-start gap-x-10">
      <span className="pt-8 text-right text-schedule text-ink-2">{number}</span>
      <QuantityInput
        label={`Force of wheel ${number}`}
        isLabelHidden
        dimension="force"
        entry={row.force}
        error={faults?.force}
        onChange={(force) => onChange({ force })}
      />
      {index === 0 ? (
        <span className="pt-8 text-schedule text-ink-2">at the front</span>
      ) : (
        <QuantityInput
          label={`Spacing of wheel ${number} behind the one before`}
          isLabelHidden
          dimension="length"
          entry={row.spacing}
          error={faults?.spacing}
          onChange={(spacing) => onChange({ spacing })}
        />
      )}
      <span className="flex min-h-34 items-center pointer-coarse:min-h-44">
        {!isAlone && (
          <Button tone="text" aria-label={`Remove wheel ${number}`} onClick={onRemove}>
            Remove
          </Button>
        )}
      </span>
    </li>
  );
}
