import type { z } from 'zod';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import type { Actor } from '@/features/review/rows.server';
import { RULES } from '@/features/section/import';
import type { ImportReport } from './imports';
import { findImport, toView } from './rows.server';

/** What was found, what was put right, left out or accepted, by whom and why. Of an edition it never changes again. */
export function readReport(actor: Actor, id: string): Promise<z.output<typeof ImportReport>> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const view = await toView(tx, actor, id);
    const { facts, fixes } = await findImport(tx, actor.practiceId, id);
    const rules = [...new Set(view.report?.groups.map(({ rule }) => rule))].sort((a, b) => a - b);
    return {
      ...view,
      fixes: fixes.map(({ findings, ...one }) => ({ ...one, findings: [...findings] })),
      rules: rules.map((number) => ({ number, words: RULES[number] ?? '' })),
      left_out: facts?.heldLines ?? [],
    };
  });
}
