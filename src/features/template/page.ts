/** What a template's page is given by the server, and what it makes of it: pure, so that both sides say the same. */
import type { UnitSystemName } from '@/engine/quantity';
import type { Material } from '@/engine/section';
import type { Template } from '@/engine/template';
import type { MaterialChoice } from '@/features/material/choice';
import type { SectionValues } from '@/features/section/resolve';
import type { RowOrigin } from '@/features/section/section';
import { evaluateTemplate, type SectionOfTemplate, type TemplateEvaluating } from './evaluate';
import type { ProofLine } from './lines';
import { entryText, type Raw, toParameters } from './raw';
import type { Release } from './release';
import type { TemplateRow } from './template';
import type { WorkedSteps } from './worked';

/** A section that gives the stiffness. */
export interface PickedSection {
  readonly table: string;
  readonly origin?: RowOrigin | undefined;
  readonly values: SectionValues;
  /** The key of what it is made of among the choices, and what that is. */
  readonly material: string;
  readonly made: Material;
  readonly resolved: SectionOfTemplate;
}

/** A revision in the title block. */
export interface HistoryLine {
  readonly revision: string;
  readonly date: string;
  readonly by: string;
  readonly checked: string | undefined;
  readonly change: string;
}

/** The template's notes as HTML. */
export interface NotesHtml {
  readonly use: readonly string[];
  readonly doNotUse: readonly string[];
  readonly method: string;
  /** How a source's formulas follow, by its id. */
  readonly derivations: Readonly<Record<string, string>>;
}

export interface TemplatePageData {
  readonly practice: string;
  readonly system: UnitSystemName;
  readonly row: TemplateRow;
  readonly template: Template;
  readonly notes: NotesHtml;
  readonly history: readonly HistoryLine[];
  readonly proof: readonly ProofLine[];
  /** What the revision was written on, and what runs now. */
  readonly engineVersion: string;
  readonly engineNow: string;
  /** Formulas of the rules and closed forms, set, by their TeX. */
  readonly formulas: Readonly<Record<string, string>>;
  /** What the address asks for. */
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly ei: string;
  readonly section: PickedSection | null;
  /** What a section may be made of. */
  readonly materials: readonly MaterialChoice[];
  /** Why the address's section could not be taken. */
  readonly sectionFault: string | null;
  readonly releases: readonly Release[] | null;
  readonly worked: WorkedSteps;
  /** Redundants of the beam at the defaults. */
  readonly degree: number;
  /** Why this person cannot use this revision in a job; null where they can. */
  readonly barred: string | null;
}

/** Everything a person has set on the page. */
export interface PageValues {
  readonly raw: Raw;
  readonly ei: { readonly text: string; readonly unit: string };
  readonly section: PickedSection | null;
}

/** The template at the page's values. */
export const evaluatePage = (
  template: Template,
  { raw, ei, section }: PageValues,
  system: UnitSystemName,
): TemplateEvaluating =>
  evaluateTemplate(
    template,
    {
      parameters: toParameters(template, raw),
      ...(section ? { section: section.resolved } : { ei: entryText(ei, 'bending_stiffness') }),
    },
    { system },
  );

const DAY = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: '2-digit',
  timeZone: 'UTC',
});

/** "12 May 26", as title blocks have it. */
export const dayText = (date: Date): string => DAY.format(date);
