import type { UnitSystemName } from '@/engine/quantity';
import type { SheetBlock } from '@/engine/sheet';
import type { MemberView } from '@/features/member/member';

export const PAPERS = ['A4', 'Letter'] as const;
export type Paper = (typeof PAPERS)[number];

/** ?paper=letter; A4 without. */
export const readPaper = (text: string | null): Paper => (text?.toLowerCase() === 'letter' ? 'Letter' : 'A4');

/** A calc sheet before it is divided into pages. */
export interface SheetView {
  readonly practice: string;
  readonly job: { readonly number: string; readonly name: string; readonly client: string };
  readonly system: UnitSystemName;
  readonly mark: string;
  readonly title: string;
  readonly status: MemberView['status'];
  readonly by: string;
  /** ISO; when its figures were found. */
  readonly at: string;
  /** What its figures follow from, for the title block of every page. */
  readonly pins: readonly string[];
  readonly watermark: string;
  readonly blocks: readonly SheetBlock[];
}

const CODE_GROUP = 4;
const CODE_LENGTH = 12;

/** The first twelve digits of a fingerprint, in groups that can be read out: "3f9a-01bc-77d2". */
export const shortCode = (fingerprint: string): string =>
  fingerprint.slice(0, CODE_LENGTH).replaceAll(new RegExp(`(.{${CODE_GROUP}})(?=.)`, 'g'), '$1-');

/** Printed across every page: a member of a job is a draft until a sheet of it is checked and issued. */
export const watermarkOf = (status: MemberView['status']): string =>
  status === 'removed' ? 'Removed, not for use' : 'Draft, not checked';

type Pinned = Pick<
  MemberView,
  'template' | 'section' | 'criteria' | 'combinations' | 'materials' | 'engine_version' | 'fingerprint'
>;

/** "Overhang 1, Propped cantilever with overhang, revision 2", and so on. */
export function pinTexts(member: Pinned, system: UnitSystemName): string[] {
  const {
    template,
    section,
    criteria,
    combinations,
    materials,
    engine_version: engine,
    fingerprint,
  } = member;
  return [
    `Template ${template.reference}, ${template.name}, revision ${template.revision}`,
    section ? `Sections ${section.table_name}, edition ${section.edition}` : 'No section',
    ...(materials ? [`Materials ${materials.name}, revision ${materials.revision}`] : []),
    criteria ? `Criteria ${criteria.name}, revision ${criteria.revision}` : 'No criteria',
    ...(combinations ? [`Combinations ${combinations.name}, revision ${combinations.revision}`] : []),
    system === 'metric' ? 'Metric units' : 'US customary units',
    ...(engine === null ? [] : [`Engine ${engine}`]),
    ...(fingerprint === null ? [] : [`Verification code ${shortCode(fingerprint)}`]),
  ];
}

/** What has been issued since, or was withdrawn, which a reader of this sheet should know. */
export function newerTexts({ template, section, criteria, combinations, materials }: Pinned): string[] {
  const pins = [
    { pin: template, name: 'the template', verb: 'was', count: 'Revision' },
    { pin: section, name: 'the section table', verb: 'was', count: 'Edition' },
    { pin: materials, name: 'the material set', verb: 'was', count: 'Revision' },
    { pin: criteria, name: 'the criteria', verb: 'were', count: 'Revision' },
    { pin: combinations, name: 'the combination set', verb: 'was', count: 'Revision' },
  ];
  return pins.flatMap(({ pin, name, verb, count }) => [
    ...(pin?.newer == null ? [] : [`${count} ${pin.newer} of ${name} has been issued since.`]),
    ...(pin?.state === 'withdrawn'
      ? [
          `${name.replace('the', 'The')} ${verb} withdrawn: ${(pin.withdrawal_reason ?? 'no reason is given').replace(/\.$/, '')}.`,
        ]
      : []),
  ]);
}
