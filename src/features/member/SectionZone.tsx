import { type ReactNode, useState } from 'react';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { ChoiceField, Field } from '@/components/ui/Field';
import { UtilisationTick } from '@/components/ui/UtilisationTick';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { formatFor, readQuantity, type UnitSystemName } from '@/engine/quantity';
import { sectionCautions } from '@/engine/section';
import type { MaterialChoice } from '@/features/material/choice';
import type { SectionItem } from '@/features/section/section';
import { StockWords } from '@/features/stock/StockWords';
import type { Supplier } from '@/features/stock/stock';
import { stockChoices } from '@/features/stock/words';
import { draftSection, type Utilisation } from './candidates';
import type { MemberInputs } from './evaluate';
import { type Candidates, useCandidates, useUtilisations } from './use-candidates';
import type { DraftSection } from './workspace';

interface SectionZoneProps {
  readonly section: DraftSection | null;
  readonly inputs: MemberInputs;
  readonly materials: readonly MaterialChoice[];
  readonly system: UnitSystemName;
  readonly suppliers: readonly Supplier[];
  readonly today: string;
  /** Of the whole member, in m; null until it is known. */
  readonly lengthM: number | null;
  readonly mayEdit: boolean;
  readonly onPick: (section: DraftSection) => void;
}

const UNITS = {
  metric: { depth: 'mm', mass: 'kg/m', massName: 'kg/m' },
  us: { depth: 'in', mass: 'lbm/ft', massName: 'lb/ft' },
} as const;
const NONE: readonly SectionItem[] = [];

/** Sections by designation, depth and mass, the lightest first, each judged with the member's loads. */
export function SectionZone({ section, inputs, ...props }: SectionZoneProps) {
  const { materials, system, suppliers, today } = props;
  const [text, setText] = useState({ q: '', depth: '', mass: '', stock: '' });
  const units = UNITS[system];
  const depth = limit(text.depth, 'length', units.depth);
  const mass = limit(text.mass, 'mass_per_length', units.mass);
  const search = {
    q: text.q,
    depthMax: depth.value === null ? null : depth.value * 1000,
    massMax: mass.value,
    stock: text.stock,
  };
  const found = useCandidates(search, section);
  const items = found.state === 'found' ? found.items : NONE;
  const utilisations = useUtilisations(items, inputs, section, materials);
  return (
    <section className="zone">
      <ZoneHeading letter="C" note="lightest first">
        Section
      </ZoneHeading>
      <SearchFields
        text={text}
        units={units}
        faults={{ depth: depth.fault, mass: mass.fault }}
        stocks={suppliers.length > 0 ? stockChoices(suppliers, today) : []}
        onChange={setText}
      />
      <p role="status" className="text-schedule text-ink-2 empty:hidden">
        {said(found, section, text.stock !== '')}
      </p>
      {section && <Cautions {...section.values} system={system} />}
      <CandidateTable {...{ ...props, section, items, utilisations }} massName={units.massName} />
    </section>
  );
}

interface CandidateTableProps extends Omit<SectionZoneProps, 'inputs'> {
  readonly items: readonly SectionItem[];
  readonly utilisations: ReadonlyMap<SectionItem, Utilisation | string>;
  readonly massName: string;
}

function CandidateTable({
  items,
  section,
  utilisations,
  materials,
  massName,
  ...props
}: CandidateTableProps) {
  const { system, mayEdit, onPick } = props;
  if (items.length === 0) return null;
  return (
    <table className="schedule entries">
      <thead>
        <tr>
          <th scope="col">Section</th>
          <th scope="col" className="figure">
            Mass<small>{massName}</small>
          </th>
          <th scope="col">Bending</th>
          <th scope="col">Shear</th>
          <th scope="col">Deflection</th>
          {mayEdit && <th scope="col">Use</th>}
        </tr>
      </thead>
      <tbody>
        {items.map((item) => (
          <Row
            key={`${item.table} ${item.designation}`}
            item={item}
            utilisation={utilisations.get(item)}
            isUsed={section?.table === item.table && section.values.designation === item.designation}
            system={system}
            stock={<StockWords item={item} {...props} />}
            massName={massName}
            onPick={mayEdit ? () => onPick(draftSection(item, section, materials)) : undefined}
          />
        ))}
      </tbody>
    </table>
  );
}

/** What the checks take for granted of the section that is chosen. */
const Cautions = ({
  designation,
  dimensions,
  system,
}: Pick<DraftSection['values'], 'designation' | 'dimensions'> & Pick<SectionZoneProps, 'system'>) =>
  sectionCautions(dimensions, system).map((caution) => (
    <p key={caution} className="mb-8 text-schedule">
      <b className="font-semibold text-ochre-ink">{designation}.</b> <RichHtml text={caution} />
    </p>
  ));

interface SearchText {
  readonly q: string;
  readonly depth: string;
  readonly mass: string;
  readonly stock: string;
}

interface SearchFieldsProps {
  readonly text: SearchText;
  readonly units: { readonly depth: string; readonly massName: string };
  readonly faults: { readonly depth: string | undefined; readonly mass: string | undefined };
  /** None where no stock is known. */
  readonly stocks: readonly { readonly value: string; readonly label: string }[];
  readonly onChange: (text: SearchText) => void;
}

function SearchFields({ text, units, faults, stocks, onChange }: SearchFieldsProps) {
  const field = (name: keyof SearchText) => ({
    value: text[name],
    autoComplete: 'off',
    onChange: (event: { target: { value: string } }) => onChange({ ...text, [name]: event.target.value }),
  });
  return (
    <div className="mb-8 grid grid-cols-[minmax(0,2fr)_minmax(0,1fr)_minmax(0,1fr)] gap-14 max-md:grid-cols-2">
      <div className="max-md:col-span-2">
        <Field label="Designation" type="search" {...field('q')} />
      </div>
      <Field label={`Depth at most, ${units.depth}`} error={faults.depth} {...field('depth')} />
      <Field label={`Mass at most, ${units.massName}`} error={faults.mass} {...field('mass')} />
      {stocks.length > 0 && (
        <div className="col-span-3 max-md:col-span-2">
          <ChoiceField label="Stock" choices={stocks} {...field('stock')} />
        </div>
      )}
    </div>
  );
}

function limit(
  text: string,
  dimension: 'length' | 'mass_per_length',
  unit: string,
): { value: number | null; fault?: string } {
  if (text.trim() === '') return { value: null };
  const reading = readQuantity(text, dimension, { unit });
  return reading.ok ? { value: reading.value } : { value: null, fault: reading.message };
}

function said(found: Candidates, section: DraftSection | null, isStockAsked: boolean): string {
  if (found.state === 'failed') return found.message;
  if (found.state === 'reading') return 'Looking in the section tables';
  if (found.state !== 'found') return 'Say a designation, a depth or a mass to look for.';
  if (found.total === 0)
    return isStockAsked
      ? 'Nothing in stock answers this. Allow more depth or mass, or what is not in stock.'
      : 'No section answers this. Allow more depth or mass, or another designation.';
  return found.total > found.items.length
    ? `The lightest ${found.items.length} of ${found.total}${section ? '' : '; none is chosen yet'}.`
    : '';
}

interface RowProps {
  readonly item: SectionItem;
  readonly utilisation: Utilisation | string | undefined;
  readonly isUsed: boolean;
  readonly system: UnitSystemName;
  readonly stock: ReactNode;
  readonly massName: string;
  readonly onPick: (() => void) | undefined;
}

function Row({ item, utilisation, isUsed, system, stock, massName, onPick }: RowProps) {
  const isSaid = typeof utilisation === 'string';
  const mass = formatFor(item.mass_kg_m, 'mass_per_length', system).split('\u00a0')[0];
  return (
    <tr data-chosen={isUsed ? '' : undefined} className="max-md:grid-cols-3">
      <th scope="row" className="whitespace-nowrap">
        {item.designation}
        {stock}
      </th>
      <td className="figure">
        {mass}
        <span className="text-ink-2 md:hidden"> {massName}</span>
      </td>
      {isSaid ? (
        <td colSpan={3} className="max-md:order-2 max-md:col-span-3">
          {utilisation}
        </td>
      ) : (
        (['bending', 'shear', 'deflection'] as const).map((kind) => (
          <td key={kind} data-label={kind.charAt(0).toUpperCase() + kind.slice(1)} className="max-md:order-2">
            {utilisation?.[kind] == null ? '–' : <UtilisationTick ratio={utilisation[kind]} width={48} />}
          </td>
        ))
      )}
      {onPick && (
        <td className="py-0! whitespace-nowrap max-md:order-1 max-md:text-right">
          <button
            type="button"
            aria-label={isUsed ? `${item.designation} is in use` : `Use ${item.designation}`}
            aria-disabled={isUsed}
            onClick={isUsed ? undefined : onPick}
            className={`min-h-26 font-semibold pointer-coarse:min-h-44 ${isUsed ? 'cursor-default' : 'link'}`}
          >
            {isUsed ? 'in use' : 'Use'}
          </button>
        </td>
      )}
    </tr>
  );
}
