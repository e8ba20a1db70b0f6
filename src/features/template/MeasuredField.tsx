import type { ReactNode } from 'react';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { QuantityField } from '@/components/ui/QuantityField';
import type { UnitSystemName } from '@/engine/quantity';
import { limitsOf, type QuantityParameter, unitOf } from '@/engine/template';
import { drawnName } from './names';
import type { Entry } from './raw';
import { unitsOffered } from './units';

/** A load group that a field may be given in. */
export interface LoadGroup {
  readonly group: string;
  readonly name: string;
}

interface MeasuredProps {
  readonly parameter: QuantityParameter;
  readonly entry: Entry;
  readonly system: UnitSystemName;
  readonly error: string | undefined;
  readonly onChange: (entry: Entry) => void;
  /** Words that tell this field from its neighbours, such as the load group. */
  readonly label?: string;
  readonly isRanged?: boolean;
  readonly action?: ReactNode;
}

/** A quantity with its range; what is wrong with its text is said by the field itself. */
export function MeasuredField(props: MeasuredProps) {
  const { parameter, entry, system, error, onChange, isRanged = true } = props;
  const { min, max } = limitsOf(parameter);
  return (
    <QuantityField
      symbol={<RichHtml text={drawnName(parameter.tex)} />}
      label={props.label ?? parameter.name}
      dimension={parameter.dimension}
      entry={entry}
      units={unitsOffered(parameter.dimension, unitOf(parameter, system))}
      range={isRanged ? { low: min, high: max } : undefined}
      error={error}
      action={props.action}
      onChange={(next) => onChange(next)}
    />
  );
}
