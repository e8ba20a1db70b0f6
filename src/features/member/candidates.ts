import type { CheckKind } from '@/engine/check';
import { choiceOf, type MaterialChoice } from '@/features/material/choice';
import { type SectionItem, toRowOrigin, toSectionValues } from '@/features/section/section';
import { stockQuery } from '@/features/stock/words';
import { usualMaterial } from '@/features/template/section-pick';
import { evaluateMember, type MemberInputs } from './evaluate';
import type { DraftSection } from './workspace';

/** What a person looks for; sizes in mm and kg/m, empty where anything will do. */
export interface SectionSearch {
  readonly q: string;
  readonly depthMax: number | null;
  readonly massMax: number | null;
  /** Whose stock: a choice of stockChoices, empty for any section. */
  readonly stock: string;
}

const MOST = '10';
/** A list that nobody has narrowed begins with sections a quarter lighter than the one in use. */
const LIGHTER = 0.75;

/** The query of GET /api/v1/sections, the lightest first. Null where nothing is said to look for. */
export function sectionQuery(
  { q, depthMax, massMax, stock }: SectionSearch,
  current: DraftSection | null,
): Record<string, string> | null {
  const isOpen = q.trim() === '' && depthMax === null && massMax === null;
  if (isOpen && !current && stock === '') return null;
  const inTable = q.trim() === '' && current ? { table: current.table } : {};
  return {
    limit: MOST,
    sort: 'mass',
    ...inTable,
    ...(q.trim() !== '' && { q: q.trim() }),
    ...(depthMax !== null && { depth_max: String(depthMax) }),
    ...(massMax !== null && { mass_max: String(massMax) }),
    ...stockQuery(stock),
    ...(isOpen && current && { mass_min: String(current.values.massKgM * LIGHTER) }),
  };
}

/** The section as the draft takes it: of the material in use where sections like it are made of the same, else of the usual one. */
export function draftSection(
  item: SectionItem,
  current: DraftSection | null,
  materials: readonly MaterialChoice[],
): DraftSection {
  const values = toSectionValues(item);
  const usual = usualMaterial(values, item.table);
  const isAlike = current !== null && usualMaterial(current.values, current.table) === usual;
  return {
    values,
    table: item.table,
    origin: toRowOrigin(item),
    material: isAlike ? current.material : (choiceOf(materials, usual)?.key ?? usual),
  };
}

export type Utilisation = { readonly [K in CheckKind]: number | null };

/** The worst of each kind of check with another section; what cannot be evaluated says why. */
export function utilisationWith(
  inputs: MemberInputs,
  section: DraftSection,
  materials: readonly MaterialChoice[],
): Utilisation | string {
  const material = choiceOf(materials, section.material)?.material;
  if (!material) return 'its material is not in the issued sets';
  const reading = evaluateMember({ ...inputs, section: { values: section.values, material } });
  if (!reading.ok) return reading.faults[0]?.message ?? 'not possible';
  const rows = reading.evaluation.checks?.rows ?? [];
  const worst = (kind: CheckKind) => {
    const ratios = rows.filter((row) => row.kind === kind).map(({ ratio }) => ratio);
    return ratios.length > 0 ? Math.max(...ratios) : null;
  };
  return { bending: worst('bending'), shear: worst('shear'), deflection: worst('deflection') };
}
