import type { User } from '@/features/account/account';
import { attempt, type Outcome } from '@/features/desk/form';
import type { Actor } from '@/features/review/rows.server';
import { AppError, type Fault, invalid } from '@/lib/app-error';
import { paths } from '@/paths';
import { type Build, build, builtRow, isBuild, ofBeam, readDensity, type Typed } from './build';
import { addMadeSection, beamOf, MADE } from './made.server';
import { type SectionItem, type SectionRow, toSectionItem } from './section';

/** A made section as its page shows it. */
export interface BuildView {
  readonly kind: Build;
  readonly name: string;
  /** Null while the form describes none. */
  readonly row: SectionRow | null;
  readonly item: SectionItem | null;
  faults: readonly Fault[];
  readonly caution: string;
  /** What was typed, to be sent again with the wish to keep it. */
  readonly fields: readonly (readonly [string, string])[];
  /** What was typed for another way to make it, kept while this one is looked at. */
  readonly others: readonly (readonly [string, string])[];
}

const FIELDS: Readonly<Record<Build, readonly string[]>> = {
  side: ['beam', 'count', 'gap'],
  plated: ['beam', 'top_width', 'top_thickness', 'bottom_width', 'bottom_thickness'],
  outline: ['corners', 'thickness', 'j'],
  values: [
    'depth',
    'width',
    'thickness',
    'area',
    'i_major',
    'i_minor',
    'w_el',
    'w_el_minor',
    'shear_area',
    'w_pl',
    'w_pl_minor',
    'j',
    'iw',
  ],
};

const OTHERS = [...new Set(Object.values(FIELDS).flat())];

const CAUTIONS: Readonly<Record<Build, string>> = {
  side: 'The beams share a load only as far as they are joined; J and I_{w} are the sums of their own.',
  plated:
    'The plates act with the beam only where welds or bolts carry the shear between them: check them. J and I_{w} are the sums of the parts’ own, a lower bound.',
  outline:
    'Exact for the outline as drawn. The estimate of J holds for compact solid outlines, a square within 7 %; not for thin walls.',
  values: 'Nothing is checked against an outline: the values are as good as their source.',
};

/** What the form describes: the section, or what is wrong with it. */
export async function readBuild(user: User, typed: Typed): Promise<BuildView> {
  // Another way to make it is asked for by a button beside the form, which sends what is typed with it.
  const asked = typed('as') || typed('build');
  const kind: Build = isBuild(asked) ? asked : 'side';
  const name = typed('designation').trim();
  const view = {
    kind,
    name,
    caution: CAUTIONS[kind],
    fields: [
      ['build', kind] as const,
      ...['designation', ...FIELDS[kind], 'density'].map((one) => [one, typed(one)] as const),
    ],
    others: OTHERS.filter((one) => !FIELDS[kind].includes(one) && typed(one) !== '').map(
      (one) => [one, typed(one)] as const,
    ),
  };
  const beam = await readBeam(user, kind, typed('beam').trim());
  const { density, faults: ofDensity } = readDensity(typed, user.unitSystem);
  const built = build(kind, typed, beam.values, user.unitSystem);
  const ofName: Fault[] =
    name === '' ? [{ pointer: '/designation', code: 'empty', message: 'Give it a name.' }] : [];
  const ofBuild = built.ok ? [] : built.faults;
  // A beam that is not found is one fault, not also a beam that is missing.
  const others = ofBuild.filter(({ pointer }) => pointer !== '/beam' || beam.faults.length === 0);
  const faults = [...ofName, ...beam.faults, ...others, ...ofDensity];
  if (!built.ok || faults.length > 0) return { ...view, row: null, item: null, faults };
  const row = builtRow(name, built.dimensions, density);
  return { ...view, row, item: toSectionItem(row, MADE.slug, 1), faults };
}

async function readBeam(user: User, kind: Build, designation: string) {
  if (!ofBeam(kind) || designation === '') return { values: null, faults: [] };
  try {
    const { values } = await beamOf(user, designation);
    return { values, faults: [] };
  } catch (error) {
    if (!(error instanceof AppError) || error.faults.length === 0) throw error;
    return { values: null, faults: error.faults };
  }
}

/** Puts the section into the draft of the practice's own table, and leads to it. */
export const addBuilt = (actor: Actor, { row }: BuildView, source: string): Promise<Outcome> =>
  attempt(async () => {
    const said = source.trim();
    if (said === '' || row === null)
      throw invalid([
        {
          pointer: '/source',
          code: 'empty',
          message: 'Say where the section comes from: the reviewer checks it against that.',
        },
      ]);
    const edition = await addMadeSection(actor, row, said);
    return paths.libraryDraft('section-table', MADE.slug, edition);
  });
