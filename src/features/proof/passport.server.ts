import { and, eq } from 'drizzle-orm';
import { revisionConfirmation } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { formatQuantity, type UnitSystemName } from '@/engine/quantity';
import { limitsOf, type QuantityParameter, type Template, unitOf } from '@/engine/template';
import type { ProofReport } from '@/engine/template/proof-run';
import { ENGINE_VERSION } from '@/engine/version';
import { namesOf } from '@/features/review/people.server';
import { type Actor, requireRevision } from '@/features/review/rows.server';
import { type ProofLine, sourceText, toProofLines } from '@/features/template/lines';
import type { SchematicView } from '@/features/template/template';
import { readTemplate } from '@/features/template/template.server';
import { setTex } from '@/features/template/tex';
import type { ProofView } from './proof';
import { newestProof, reportOf, toProofView } from './proof.server';

/** What a template is, what it was proven by, and who answers for it: one sheet. */
export interface Passport {
  readonly template: Template;
  readonly schematic: SchematicView;
  readonly state: 'draft' | 'in_review' | 'issued' | 'superseded' | 'withdrawn';
  readonly revision: number;
  readonly changeNote: string;
  readonly parameters: readonly { readonly html: string; readonly name: string; readonly range: string }[];
  readonly rules: readonly { readonly title: string; readonly severity: string }[];
  readonly formulas: readonly PassportFormula[];
  readonly sources: readonly string[];
  readonly cases: readonly ProofLine[];
  readonly proof: ProofView | null;
  readonly report: ProofReport | null;
  readonly people: readonly { readonly role: string; readonly who: string; readonly at: Date | null }[];
  readonly sha256: string;
  readonly engine: string;
}

interface PassportFormula {
  readonly name: string;
  readonly html: string;
  /** Number of its source in the list of sources. */
  readonly source: number;
  readonly points: number | null;
  /** Largest difference from the solver, as a share. */
  readonly largest: number | null;
}

type Viewer = Actor & { readonly unitSystem: UnitSystemName };

export async function readPassport(viewer: Viewer, slug: string, number: number): Promise<Passport> {
  const { template, schematic, row, proof: cases } = await readTemplate(viewer, { slug, number });
  const system = viewer.unitSystem;
  return withPractice(viewer, async (tx) => {
    const stored = await requireRevision(tx, viewer.practiceId, { kind: 'template', slug, number });
    const run = await newestProof(tx, stored);
    const proof = run ? toProofView(run, stored) : null;
    const report = run && proof?.current ? reportOf(run) : null;
    const [confirmed] = await tx
      .select({ personId: revisionConfirmation.personId, at: revisionConfirmation.at })
      .from(revisionConfirmation)
      .where(
        and(
          eq(revisionConfirmation.practiceId, viewer.practiceId),
          eq(revisionConfirmation.revisionId, stored.id),
        ),
      );
    const names = await namesOf(tx, [...stored.editorIds, confirmed?.personId ?? null]);
    const edited = stored.editorIds.map((id) => names.get(id) ?? '');
    return {
      template,
      schematic,
      state: stored.state,
      revision: stored.number,
      changeNote: stored.changeNote,
      parameters: template.parameters.flatMap((one) => parameterRows(one, system)),
      rules: template.rules.map(({ title, severity }) => ({ title, severity })),
      formulas: formulasOf(template, report),
      sources: template.sources.map(sourceText),
      cases: toProofLines(template, report?.cases ?? cases, system),
      proof,
      report,
      people: [
        { role: 'Written', who: [row.author, ...edited].join(', '), at: stored.createdAt },
        { role: 'Reviewed and issued', who: row.reviewer ?? '', at: stored.issuedAt },
        {
          role: 'Held against its sources',
          who: confirmed ? (names.get(confirmed.personId) ?? '') : '',
          at: confirmed?.at ?? null,
        },
      ],
      sha256: stored.sha256,
      engine: proof?.current ? proof.engine_version : ENGINE_VERSION,
    };
  });
}

function parameterRows(parameter: Template['parameters'][number], system: UnitSystemName) {
  const { tex, name } = parameter;
  const html = setTex(tex, false);
  switch (parameter.kind) {
    case 'quantity':
      return [{ html, name, range: rangeOf(parameter, system) }];
    case 'choice':
      return [{ html, name, range: parameter.options.map((one) => one.name).join(', ') }];
    case 'rows':
      return [
        { html, name, range: `${parameter.least} to ${parameter.most} rows` },
        ...parameter.columns.flatMap((column) =>
          column.kind === 'quantity'
            ? [{ html: setTex(column.tex, false), name: column.name, range: rangeOf(column, system) }]
            : [],
        ),
      ];
  }
}

function rangeOf(parameter: QuantityParameter, system: UnitSystemName): string {
  const { min, max } = limitsOf(parameter);
  const unit = unitOf(parameter, system);
  return `${formatQuantity(min, unit)} to ${formatQuantity(max, unit)}`;
}

const formulasOf = ({ results, sources }: Template, report: ProofReport | null): PassportFormula[] =>
  results.map(({ id, name, tex, formula, source }) => {
    const swept = report?.sweep.forms[id];
    return {
      name,
      html: setTex(`\\displaystyle ${tex} = ${formula}`, false),
      source: sources.findIndex((one) => one.id === source) + 1,
      points: swept?.points ?? null,
      largest: swept?.largest ?? null,
    };
  });
