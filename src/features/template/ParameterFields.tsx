import { memo, type ReactNode } from 'react';
import { ChoiceField } from '@/components/ui/Field';
import type { UnitSystemName } from '@/engine/quantity';
import type { Parameter, Template } from '@/engine/template';
import type { FieldFaults } from './faults';
import { LoadByGroup } from './LoadByGroup';
import { type LoadGroup, MeasuredField } from './MeasuredField';
import { ParameterRows } from './ParameterRows';
import type { Raw, RawValue } from './raw';

export interface ParameterFieldsProps {
  readonly template: Pick<Template, 'parameters'>;
  readonly raw: Raw;
  readonly system: UnitSystemName;
  readonly faults: FieldFaults;
  readonly onChange: (symbol: string, value: RawValue) => void;
  /** Groups that a load may be given in; needed where `raw` holds loads by group. */
  readonly groups?: readonly LoadGroup[];
  /** Further compartments, such as the stiffness. */
  readonly children?: ReactNode;
}

/**
 * The parameter schedule laid on its side: a compartment for each quantity and choice, lists of rows below. Each field is marked
 * with `data-symbol`, where a figure on the drawing leads.
 */
export function ParameterFields(props: ParameterFieldsProps) {
  const { parameters } = props.template;
  const lists = parameters.filter((parameter) => parameter.kind === 'rows');
  return (
    <>
      <div className="grid overflow-hidden max-md:grid-cols-1 md:grid-cols-4 lg:grid-cols-[repeat(auto-fit,minmax(180px,1fr))] [&>*]:-ml-px [&>*]:border-t [&>*]:border-l [&>*]:border-t-rule [&>*]:border-l-rule">
        {parameters.map(
          (parameter) =>
            parameter.kind !== 'rows' && (
              <OneField
                key={parameter.symbol}
                parameter={parameter}
                value={props.raw[parameter.symbol]}
                system={props.system}
                error={props.faults.get(parameter.symbol)}
                faults={props.raw[parameter.symbol]?.kind === 'load' ? props.faults : undefined}
                groups={props.groups}
                onChange={props.onChange}
              />
            ),
        )}
        {props.children}
      </div>
      {lists.map((parameter) => (
        <ParameterRows
          key={parameter.symbol}
          parameter={parameter}
          rows={rowsIn(props.raw[parameter.symbol])}
          system={props.system}
          faults={props.faults}
          groups={props.groups ?? []}
          onChange={(rows) => props.onChange(parameter.symbol, { kind: 'rows', rows })}
        />
      ))}
    </>
  );
}

const rowsIn = (value: RawValue | undefined) => (value?.kind === 'rows' ? value.rows : []);

interface OneProps extends Pick<ParameterFieldsProps, 'system' | 'onChange'> {
  readonly parameter: Exclude<Parameter, { kind: 'rows' }>;
  readonly value: RawValue | undefined;
  readonly error: string | undefined;
  /** Of its groups, for a load that is given by them. */
  readonly faults: FieldFaults | undefined;
  readonly groups: readonly LoadGroup[] | undefined;
}

const NO_FAULTS: FieldFaults = new Map();

/** Kept while another field is dragged: the frame is the drawing's. */
const OneField = memo(function OneField(props: OneProps) {
  const { parameter, value, system, error, faults = NO_FAULTS, onChange, groups = [] } = props;
  const { symbol } = parameter;
  if (value === undefined) return null;
  const set = (next: RawValue) => onChange(symbol, next);
  if (parameter.kind === 'choice') {
    if (value.kind !== 'choice') return null;
    const choices = parameter.options.map((option) => ({ value: option.value, label: option.name }));
    return (
      <div data-symbol={symbol} className="px-14 pt-8 pb-9">
        <ChoiceField
          label={parameter.name}
          choices={choices}
          value={value.value}
          error={error}
          help={parameter.help}
          onChange={(event) => set({ kind: 'choice', value: event.target.value })}
        />
      </div>
    );
  }
  if (value.kind === 'load')
    return (
      <LoadByGroup
        parameter={parameter}
        parts={value.parts}
        system={system}
        faults={faults}
        groups={groups}
        onChange={(parts) => set({ kind: 'load', parts })}
      />
    );
  if (value.kind !== 'quantity') return null;
  return (
    <div data-symbol={symbol} className="grid">
      <MeasuredField
        parameter={parameter}
        entry={value.entry}
        system={system}
        error={error}
        onChange={(entry) => set({ kind: 'quantity', entry })}
      />
    </div>
  );
});
