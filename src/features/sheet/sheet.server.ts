import { withPractice } from '@/db/tenancy';
import { resolveCriteria } from '@/engine/check';
import type { UnitSystemName } from '@/engine/quantity';
import { sectionCautions } from '@/engine/section';
import {
  buildFaultSheet,
  buildSheet,
  type SheetBlock,
  type SheetCaution,
  type SheetInput,
} from '@/engine/sheet';
import { type Actor, type JobRow, openJob } from '@/features/job/job.server';
import { loadPins, type Pins } from '@/features/member/pins.server';
import { drawnSolution } from '@/features/member/result';
import { type MemberRow, requireMember, toMemberView } from '@/features/member/row.server';
import { newerTexts, pinTexts, type SheetView, watermarkOf } from './sheet';

/** The calc sheet of a member as it was last saved. */
export function readSheet(
  actor: Actor & { readonly practiceName: string },
  number: string,
  mark: string,
  cautions: readonly SheetCaution[],
): Promise<SheetView> {
  const { practiceId, practiceName } = actor;
  return withPractice(actor, async (tx) => {
    const job = await openJob(tx, actor, number, 'member.read');
    const row = await requireMember(tx, practiceId, job.id, mark);
    const pins = await loadPins(tx, practiceId, row);
    const member = await toMemberView(tx, row, job.number, pins);
    const newer: SheetBlock[] = newerTexts(member).map((text) => ({ kind: 'text', tone: 'warning', text }));
    const [heading, covers, ...blocks] = blocksOf(row, pins, job, cautions);
    return {
      practice: practiceName,
      job: { number: job.number, name: job.name, client: job.client },
      system: job.unitSystem,
      mark: member.mark,
      title: member.title,
      status: member.status,
      by: member.evaluated_by ?? member.changed_by,
      at: member.evaluated_at ?? member.changed_at,
      pins: pinTexts(member, job.unitSystem),
      watermark: watermarkOf(member.status),
      blocks: [heading, covers, ...newer, ...blocks].filter((block) => block !== undefined),
    };
  });
}

function blocksOf(row: MemberRow, pins: Pins, job: JobRow, cautions: readonly SheetCaution[]): SheetBlock[] {
  const { template, criteria, combinations } = pins;
  const judged =
    criteria && resolveCriteria(criteria.document, combinations?.document ?? null, row.settings.categories);
  const { result, parameters, settings, purpose } = row;
  const head = {
    purpose,
    basis: job.basis,
    template: {
      reference: template.reference,
      name: template.name,
      revision: template.number,
      parameters: template.document.parameters,
    },
    cautions,
  };
  if (result?.kind !== 'result')
    return buildFaultSheet(head, result?.message ?? 'This member has not been evaluated. Save it first.');
  return buildSheet({
    ...head,
    system: job.unitSystem,
    parameters,
    ownWeight: { acts: settings.self_weight, reason: settings.self_weight_reason },
    patterns: { act: settings.patterns, reason: settings.patterns_reason },
    section: sectionOf(pins, job.unitSystem),
    criteria: criteria &&
      judged && {
        name: criteria.name,
        revision: criteria.number,
        basis: judged.strength.basis,
        combinations: judged.strength.combinations,
        letters: judged.letters ?? {},
        patterns: judged.patterns ?? [],
      },
    result: { ...result, total: drawnSolution(result.total) },
  });
}

function sectionOf({ section }: Pins, system: UnitSystemName): SheetInput['section'] {
  if (!section) return null;
  const { row, material } = section;
  const { standard, clause, fromMemory } = material.source;
  return {
    designation: row.values.designation,
    table: row.tableName,
    edition: row.edition,
    material: {
      name: material.name,
      e: material.e,
      source: `${standard}, ${clause}${fromMemory ? ', from memory' : ''}`,
    },
    computed: row.computed,
    cautions: sectionCautions(row.values.dimensions, system),
  };
}
