import { type Tenant, withPractice } from '@/db/tenancy';
import { checkRedundants } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import type { Template } from '@/engine/template';
import { ENGINE_VERSION } from '@/engine/version';
import { may, type Person } from '@/features/account/permission';
import { choiceOf, type MaterialChoice } from '@/features/material/choice';
import { materialChoices } from '@/features/material/material.server';
import { chooseSection } from '@/features/section/choose.server';
import { toRowOrigin } from '@/features/section/section';
import { AppError } from '@/lib/app-error';
import { initialsOf } from '@/lib/initials';
import { markdown } from '@/lib/markdown';
import { OWN_STIFFNESS, readStiffness, readValues, type Stiffness } from './address';
import { derivationOf } from './answer';
import { type CatalogueData, sendCard } from './catalogue-card';
import { toProofLines } from './lines';
import {
  dayText,
  evaluatePage,
  type HistoryLine,
  type NotesHtml,
  type PickedSection,
  type TemplatePageData,
} from './page';
import { toRaw } from './raw';
import { readReleases, toRedundant } from './release';
import { pickSection } from './section-pick';
import { setStep } from './set-step';
import { readCatalogue, readTemplate, type TemplateRead } from './template.server';
import { setTex } from './tex';

type Viewer = Person & Tenant & { readonly practiceName: string; readonly unitSystem: UnitSystemName };

/** A template's page at the values of its address. */
export async function readTemplatePage(
  viewer: Viewer,
  key: { readonly slug: string; readonly number?: number | undefined },
  query: URLSearchParams,
): Promise<TemplatePageData> {
  const read = await readTemplate(viewer, key);
  const { template, row } = read;
  const stiffness = readStiffness(query);
  const materials = await withPractice(viewer, (tx) => materialChoices(tx, viewer.practiceId, null));
  const { section, fault } = await sectionOf(viewer, stiffness, materials);
  const asked = readReleases(query.get('release') ?? '');
  const releases = asked.length > 0 ? asked : null;
  const system = viewer.unitSystem;
  const parameters = readValues(template, query);
  return {
    practice: viewer.practiceName,
    system,
    row,
    template,
    notes: notesOf(template),
    history: read.history.map(toHistoryLine),
    proof: toProofLines(template, read.proof, system),
    engineVersion: read.engineVersion,
    engineNow: ENGINE_VERSION,
    formulas: formulasOf(template),
    parameters,
    ei: stiffness.ei,
    section,
    materials,
    sectionFault: fault,
    releases,
    worked: workedAt(template, parameters, { ...stiffness, section }, releases, system),
    degree: read.schematic.beam.degree,
    barred: barredFor(viewer, row.state),
  };
}

const toHistoryLine = (line: TemplateRead['history'][number]): HistoryLine => ({
  revision: String(line.number),
  date: dayText(line.date),
  by: initialsOf(line.author),
  checked: line.reviewer === null ? undefined : initialsOf(line.reviewer),
  change: line.changeNote,
});

async function sectionOf(
  viewer: Viewer,
  { section: designation, table, material: key }: Stiffness,
  materials: readonly MaterialChoice[],
): Promise<{ section: PickedSection | null; fault: string | null }> {
  if (designation === '') return { section: null, fault: null };
  const material = choiceOf(materials, key);
  if (!material) return { section: null, fault: `There is no material “${key}”. Choose the section again.` };
  try {
    const named = { designation, table: table === '' ? undefined : table };
    const found = await withPractice(viewer, (tx) => chooseSection(tx, viewer.practiceId, named));
    const pick = pickSection(found.table, found.values, material, toRowOrigin(found));
    return pick.ok ? { section: pick.section, fault: null } : { section: null, fault: pick.message };
  } catch (error) {
    if (error instanceof AppError && error.code === 'invalid') return { section: null, fault: error.message };
    throw error;
  }
}

const notesOf = ({ use, do_not_use: doNotUse, method, sources }: Template): NotesHtml => ({
  use: use.map(markdown),
  doNotUse: doNotUse.map(markdown),
  method: markdown(method),
  derivations: Object.fromEntries(
    sources.flatMap(({ id, derivation }) => (derivation ? [[id, markdown(derivation)]] : [])),
  ),
});

/** Each formula of the page that does not change with the values, set once. */
function formulasOf({ rules, results }: Template): Record<string, string> {
  const texts = [
    ...rules.flatMap(({ shown }) => (shown ? [shown.tex] : [])),
    ...results.map(({ tex, formula }) => `${tex} = ${formula}`),
  ];
  // In line, with fractions as tall as a display's.
  return Object.fromEntries(texts.map((tex) => [tex, setTex(`\\displaystyle ${tex}`, false)]));
}

/** The derivation at the address's values, or at the defaults where those fail. */
function workedAt(
  template: Template,
  parameters: Readonly<Record<string, unknown>>,
  stiffness: Omit<Stiffness, 'section'> & { section: PickedSection | null },
  releases: TemplatePageData['releases'],
  system: UnitSystemName,
) {
  const at = (given: Readonly<Record<string, unknown>>, ei: string, section: PickedSection | null) =>
    evaluatePage(
      template,
      {
        raw: toRaw(template, given, { system }),
        ei: { text: ei === '' ? template.stiffness.default_ei : ei, unit: '' },
        section,
      },
      system,
    );
  const asked = at(parameters, stiffness.ei, stiffness.section);
  const outcome = asked.ok ? asked : at({}, OWN_STIFFNESS.ei, null);
  if (!outcome.ok) return { steps: [], formulas: [] };
  const { evaluation } = outcome;
  const redundants = releases?.map((release) => toRedundant(evaluation.beam, release));
  const isAdmissible = redundants && checkRedundants(evaluation.beam, redundants).length === 0;
  const steps = derivationOf(evaluation, isAdmissible ? redundants : undefined, system);
  return { steps, formulas: steps.map(setStep) };
}

function barredFor(viewer: Viewer, state: TemplateRead['row']['state']): string | null {
  if (state === 'draft' || state === 'in_review') return 'Not issued: cannot be used yet.';
  if (state !== 'issued') return `This revision is ${state}: it is not placed in new members.`;
  return may(viewer, 'member.edit', { access: 'practice' }) ? null : 'Members are placed by engineers.';
}

/** The catalogue with the drawings of its templates. */
export async function readCataloguePage(viewer: Viewer): Promise<CatalogueData> {
  const entries = await readCatalogue(viewer);
  const cards = entries.map((entry) =>
    sendCard({
      ...entry,
      day: dayText(new Date(entry.row.date)),
      barred: barredFor(viewer, entry.row.state),
    }),
  );
  return { practice: viewer.practiceName, cards };
}
