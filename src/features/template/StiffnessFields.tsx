import { memo } from 'react';
import { QuantityField } from '@/components/ui/QuantityField';
import { formatNumber, toUnit, UNIT_SYSTEMS, type UnitSystemName } from '@/engine/quantity';
import type { Template } from '@/engine/template';
import type { MaterialChoice } from '@/features/material/choice';
import type { PageValues, PickedSection } from './page';
import { SectionPick } from './SectionPick';
import { unitsOffered } from './units';

interface StiffnessFieldsProps extends Pick<PageValues, 'ei' | 'section'> {
  readonly template: Template;
  readonly system: UnitSystemName;
  readonly fault: string | undefined;
  readonly sectionFault: string | null;
  readonly materials: readonly MaterialChoice[];
  readonly onChange: (change: Partial<PageValues>) => void;
}

/** EI as a number of its own, or from a section: one of the two. */
export const StiffnessFields = memo(function StiffnessFields(props: StiffnessFieldsProps) {
  const { template, ei, section, materials, system, fault, sectionFault, onChange } = props;
  const affects = template.stiffness.affects.join(', ');
  const locked = section ? `from ${section.values.designation}, ${section.made.name}` : undefined;
  const shown = section ? { text: plainNumber(section, ei.unit), unit: ei.unit } : ei;
  return (
    <>
      <div data-symbol="EI" className="grid">
        <QuantityField
          symbol="EI"
          label="Stiffness"
          dimension="bending_stiffness"
          entry={shown}
          units={unitsOffered('bending_stiffness', ei.unit)}
          locked={locked}
          error={fault}
          help={`Changes ${affects}.`}
          onChange={(entry) => onChange({ ei: entry })}
        />
      </div>
      <SectionPick
        section={section}
        materials={materials}
        system={system}
        fault={sectionFault}
        onPick={(picked: PickedSection | null) => onChange({ section: picked })}
      />
    </>
  );
});

const plainNumber = ({ resolved }: PickedSection, unit: string): string =>
  formatNumber(toUnit(resolved.ei, unit), UNIT_SYSTEMS.metric.bending_stiffness);
